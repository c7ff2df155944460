import type { DocumentKind } from '../../documents/messages';
import { TextField } from '../../parts/TextField';
import type { Sketch } from '../../sketch/types';
import { setDocuments } from '../../store/commands';
import { useSketch, useStores } from '../../store/react';
import { Dialogue } from '../Dialogue';
import { Choices } from './Choices';
import { copyPicture, EXPORTS, exportDocument, type Solved, saveMade, USUAL_WIDTH } from './exports';
import { type Preview, upToDate, usePreview } from './usePreview';
import './documents.css';

/** Documents: what they show, how they look, and every way to save them. */
export function DocumentsPage() {
  const { solved, preview, again } = usePreview();
  return (
    <Dialogue title="Documents" wide>
      <div className="documents">
        <div className="documents-side">
          <Saving solved={solved} preview={preview} />
          {solved ? <Choices input={solved.input} /> : null}
        </div>
        <Pages preview={preview} again={again} />
      </div>
    </Dialogue>
  );
}

const TABLES: readonly DocumentKind[] = ['summary-pdf', 'xlsx', 'csv', 'json'];
const DRAWING: readonly DocumentKind[] = ['sheet-pdf', 'svg', 'png'];

function Saving({ solved, preview }: { readonly solved: Solved | undefined; readonly preview: Preview }) {
  const stores = useStores();
  const now = (): Sketch => stores.sketch.getState().sketch;
  const save = (what: DocumentKind): void => {
    const sketch = now();
    if (what === 'summary-pdf' && preview.is === 'made' && preview.of === sketch)
      saveMade(stores, preview.made, sketch.title.title);
    else if (solved) void exportDocument(stores, what, () => upToDate(solved, sketch));
  };
  const copy = (): void => {
    // Nothing is awaited before the clipboard is asked.
    if (solved) void copyPicture(stores, { ...solved.input, sketch: now() });
  };
  const button = (what: DocumentKind) => (
    <button
      key={what}
      type="button"
      className={what === 'summary-pdf' ? 'button fill' : 'button line'}
      disabled={!solved}
      data-export={what}
      onClick={() => save(what)}
    >
      {EXPORTS[what].label}
    </button>
  );
  return (
    <>
      <h3>Save the stream summary as</h3>
      <div className="documents-buttons">{TABLES.map(button)}</div>
      <h3>Save the drawing alone as</h3>
      <div className="documents-buttons">
        {DRAWING.map(button)}
        <button type="button" className="button line" disabled={!solved} data-export="copy" onClick={copy}>
          Copy as picture
        </button>
      </div>
      <PictureWidth />
    </>
  );
}

/** Pictures are painted this wide; beyond it no browser paints. */
const WIDEST = 8192;
const LEAST = 200;

function PictureWidth() {
  const { sketch: store } = useStores();
  const width = useSketch((state) => state.sketch.documents?.pictureWidth);
  const disabled = useSketch((state) => !state.writable);
  return (
    <div className="documents-paper">
      <span>Width of a picture, px</span>
      <TextField
        label="Width of a picture in pixels"
        path="documents.pictureWidth"
        className="framed"
        value={width === undefined ? '' : String(width)}
        placeholder={String(USUAL_WIDTH)}
        disabled={disabled}
        onCommit={(text) => {
          const wanted = text.trim() === '' ? undefined : Number(text);
          if (wanted !== undefined && !(Number.isInteger(wanted) && wanted >= LEAST && wanted <= WIDEST))
            return `A whole number from ${LEAST} to ${WIDEST}.`;
          const edit = setDocuments(store.getState().sketch, { pictureWidth: wanted });
          if (edit.ok) store.apply(edit.label, () => edit.sketch);
          return undefined;
        }}
      />
    </div>
  );
}

function Pages({ preview, again }: { readonly preview: Preview; readonly again: () => void }) {
  return (
    <div className="documents-pages" data-state={preview.is}>
      {preview.is === 'solving' ? <p className="muted">Solving once more from nothing …</p> : null}
      {preview.is === 'nothing' ? (
        <p>Nothing to document yet: choose chemicals, draw a feed, connect a unit.</p>
      ) : null}
      {preview.is === 'failed' ? <p role="alert">The pages were not made: {preview.why}</p> : null}
      {preview.is === 'making' ? (
        <p>
          <label>
            {preview.doing} … <progress value={preview.share} max={1} aria-label="Making the pages" />
          </label>{' '}
          <button type="button" className="button line" onClick={preview.cancel}>
            Cancel
          </button>
        </p>
      ) : null}
      {preview.is === 'cancelled' ? (
        <p>
          Cancelled: no pages were made.{' '}
          <button type="button" className="button line" onClick={again}>
            Make them
          </button>
        </p>
      ) : null}
      {preview.is === 'made' ? <Shown address={preview.address} pages={preview.made.pages ?? 0} /> : null}
    </div>
  );
}

function Shown({ address, pages }: { readonly address: string; readonly pages: number }) {
  const can = navigator.pdfViewerEnabled;
  return (
    <>
      <p className="muted" data-pages={pages}>
        {pages === 1 ? '1 page' : `${pages} pages`}
        {can ? '' : '. This browser shows no PDF inside a page: save it to look at it.'}
      </p>
      {can ? <iframe title="Pages of the stream summary" src={`${address}#navpanes=0&view=FitH`} /> : null}
    </>
  );
}
