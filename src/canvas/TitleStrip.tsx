import { memo, useEffect } from 'react';
import { useShallow } from 'zustand/react/shallow';
import { labelsSentence, omittedSentence } from '../drawing/labelText';
import { useMeasures } from '../parts/measures';
import { revisionInForce } from '../store/commands';
import { type Stores, useCompiled, useResults, useSketch, useStores } from '../store/react';
import { kindWord, modelWord } from '../wording';
import { missed, SMALL } from './quiet';
import { type SheetState, useSheet } from './sheetStore';
import { wholeState } from './whole';

/** Foot of the sheet: name, revision, model, what has no room, what labels show; at the right the state of the whole. */
export const TitleStrip = memo(function TitleStrip() {
  const title = useSketch((state) => state.sketch.title);
  const revision = useSketch((state) => revisionInForce(state.sketch));
  const model = useSketch((state) => state.sketch.model.kind);
  const labels = useSketch((state) => state.sketch.display.labels);
  const measures = useMeasures();
  const omitted = useSheet(({ scene, quiet }) => omittedSentence(missed(scene.omitted, quiet)));
  const isFar = useSheet(({ quiet }) => quiet.duties);
  return (
    <footer className="title-strip">
      <span className="strip-parts">
        <i />
        <span className="strip-title">{title.title?.trim() || 'Untitled sketch'}</span>
        <span>{revision ? `Rev ${revision}, draft` : 'No revision'}</span>
        <span>{modelWord(model)}</span>
        {omitted ? <span>{omitted}</span> : null}
        <span className="strip-labels">
          {isFar ? `Labels: from ${100 * SMALL} % zoom` : labelsSentence(labels, measures)}
        </span>
      </span>
      <WholeState />
    </footer>
  );
});

const QUIET_MS = 900;

/** What the hand is doing, while it does it; by keys, which of them count then. */
const underWay = ({ dropping, moved, heldNotes, movingByKeys, pulling, bending }: SheetState): string => {
  if (dropping) return `Moving: ${kindWord(dropping.kind)}, Esc leaves it`;
  if (movingByKeys) return 'Moving: arrows move it, Enter leaves it there, Esc puts it back';
  if (moved || heldNotes) return 'Moving, Esc leaves it';
  if (bending?.byKeys) return 'Bending: arrows move the piece, Enter leaves it there, Esc puts it back';
  if (pulling?.byKeys)
    return 'Connecting: arrows choose a port, Enter connects or offers units, Esc leaves it';
  return pulling ? 'Connecting, Esc leaves it' : '';
};

/** What is done in bold, then what goes with it. */
function inTwo(text: string): { readonly word: string; readonly rest: string } {
  const at = text.search(/[:,]/);
  return { word: text.slice(0, at), rest: text.slice(at) };
}

/** Names of the chemicals of what was compiled last. */
const chemicalOf =
  ({ compiled }: Stores) =>
  (id: string): string | undefined =>
    compiled.getState().basis?.chemicals.find((chemical) => chemical.id === id)?.name;

function WholeState() {
  const stores = useStores();
  const sketch = useSketch((state) => state.sketch);
  const edit = useSketch((state) => state.edit);
  const gaps = useCompiled((state) => state.gaps);
  const results = useResults(
    useShallow(({ units, at, answering, solvedEdit, tookMs, trouble, stopped }) => ({
      units,
      at,
      answering,
      solvedEdit,
      tookMs,
      trouble,
      stopped,
    })),
  );
  const doing = useSheet(underWay);
  const { word, rest } = doing
    ? inTwo(doing)
    : wholeState(sketch, edit, { ...stores.results.getState(), ...results }, gaps, chemicalOf(stores));
  const solvedEdit = results.solvedEdit;

  // One announcement for a run of edits: when the numbers have stood still for a moment.
  useEffect(() => {
    if (solvedEdit === 0) return;
    const timer = setTimeout(() => {
      const now = wholeState(
        stores.sketch.getState().sketch,
        stores.sketch.getState().edit,
        stores.results.getState(),
        stores.compiled.getState().gaps,
        chemicalOf(stores),
      );
      if (now.word) stores.session.setState({ spoken: `${now.word}${now.rest}` });
    }, QUIET_MS);
    return () => clearTimeout(timer);
  }, [solvedEdit, stores]);

  return (
    <span className="strip-state" data-strip="state" title={`${word}${rest}`}>
      <b>{word}</b>
      {rest}
    </span>
  );
}
