import { QuantityField } from '../../parts/QuantityField';
import { TextField } from '../../parts/TextField';
import { type Dimension, STANDARD_SITE } from '../../quantity';
import type { Sketch, TitleBlock } from '../../sketch/types';
import { type Edit, revisionInForce, setSite, setTitle } from '../../store/commands';
import { useCompiled, useSketch, useStores } from '../../store/react';
import { focusField } from '../focusField';
import { Head } from '../Head';
import { run } from '../run';
import { useSay } from '../useSay';
import { Measures } from './Measures';

/** Title block, site, measures, and what the sheet's labels show. */
export function SketchDrawer() {
  const title = useSketch((state) => state.sketch.title);
  return (
    <>
      <Head label={title.title || 'Untitled sketch'} sentence="Title block, site, measures and labels." />
      <div className="drawer-body">
        <Title />
        <Site />
        <Measures />
      </div>
    </>
  );
}

const LINES: readonly (readonly [keyof TitleBlock, string])[] = [
  ['title', 'Title'],
  ['number', 'Number'],
  ['project', 'Project'],
  ['area', 'Area'],
  ['revision', 'Revision'],
  ['date', 'Date'],
  ['author', 'Drawn by'],
  ['checked', 'Checked by'],
  ['approved', 'Approved by'],
];

function Title() {
  const { sketch } = useStores();
  const title = useSketch((state) => state.sketch.title);
  const fromTable = useSketch((state) => (state.sketch.revisions?.length ?? 0) > 0);
  const disabled = useSketch((state) => !state.writable);
  const line = (key: keyof TitleBlock, label: string, lines?: number) => (
    <div className="setting" key={key}>
      <div className="setting-label">{label}</div>
      <div className="setting-control">
        <TextField
          label={label}
          path={`title.${key}`}
          className="framed"
          value={title[key] ?? ''}
          disabled={disabled}
          {...(lines ? { lines } : {})}
          onCommit={(text) => run(sketch, (s) => setTitle(s, key, text))}
        />
      </div>
    </div>
  );
  return (
    <section className="section">
      <div className="section-head">
        <h3>Title block</h3>
      </div>
      {LINES.map(([key, label]) =>
        key === 'revision' && fromTable ? <RevisionLine key={key} /> : line(key, label),
      )}
      {line('notes', 'Notes', 3)}
    </section>
  );
}

/** The revision where the table has entries: its newest one, changed there. */
function RevisionLine() {
  const { session } = useStores();
  const mark = useSketch((state) => revisionInForce(state.sketch));
  const own = useSketch((state) => state.sketch.title.revision?.trim());
  return (
    <div className="setting">
      <div className="setting-label">Revision</div>
      <div className="setting-control" data-field="title.revision">
        <div className="setting-label">
          <output aria-label="Revision">{mark}</output>
        </div>
        <p className="field-note">
          The newest entry of the revision table.
          {own && own !== mark
            ? ` “${own}”, typed here before, is kept; it counts when the table is empty.`
            : ''}
        </p>
        <button
          type="button"
          className="link"
          onClick={() => {
            session.openDrawer({ is: 'basis' });
            focusField('revisions.0.mark');
          }}
        >
          Change it in the table
        </button>
      </div>
    </div>
  );
}

interface SiteLine {
  readonly key: keyof Sketch['site'];
  readonly label: string;
  readonly dim: Dimension;
  readonly text: string;
  readonly why: string;
}

const SITE: readonly SiteLine[] = [
  {
    key: 'pressure',
    label: 'Pressure',
    dim: 'pressure',
    text: '101325 Pa',
    why: 'Gauge pressures count from it.',
  },
  {
    key: 'ambient',
    label: 'Ambient temperature',
    dim: 'temperature',
    text: '20 degC',
    why: 'The site has no ambient temperature.',
  },
  {
    key: 'coolingWater',
    label: 'Cooling water in',
    dim: 'temperature',
    text: '28 degC',
    why: 'Limits of cooling count from its inlet.',
  },
];

function Site() {
  const say = useSay();
  const { sketch } = useStores();
  const site = useSketch((state) => state.sketch.site);
  const disabled = useSketch((state) => !state.writable);
  const gaps = useCompiled((state) => state.gaps);
  return (
    <section className="section">
      <div className="section-head">
        <h3>Site</h3>
        <span className="muted">any unit may be typed</span>
      </div>
      {SITE.map(({ key, label, dim, text, why }) => {
        const put =
          (next: string) =>
          (s: Sketch): Edit =>
            setSite(s, key, next);
        const after = (s: Sketch, next: string): Sketch => {
          const edit = put(next)(s);
          return edit.ok ? edit.sketch : s;
        };
        return (
          <div className="setting" key={key}>
            <div className="setting-label">{label}</div>
            <div className="setting-control">
              <QuantityField
                label={`Site: ${label.toLowerCase()}`}
                path={`site.${key}`}
                value={site[key]}
                dims={dim}
                min={0}
                site={STANDARD_SITE}
                assumed={{ text, why }}
                disabled={disabled}
                edit={{
                  set: (next) => void run(sketch, put(next === undefined ? '' : String(next))),
                  begin: () => sketch.begin(`slide site ${label.toLowerCase()}`),
                  change: (next) => sketch.change((s) => after(s, String(next))),
                  commit: () => sketch.commit(),
                  cancel: () => sketch.cancel(),
                }}
              />
              {gaps
                .filter((gap) => gap.at.path === `site.${key}`)
                .map((gap) => (
                  <p className="refusal" key={gap.code}>
                    {say(gap).sentence}
                  </p>
                ))}
            </div>
          </div>
        );
      })}
    </section>
  );
}
