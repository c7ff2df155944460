import { QuantityField } from '../../parts/QuantityField';
import { TextField } from '../../parts/TextField';
import { type Dimension, STANDARD_SITE } from '../../quantity';
import type { Sketch, TitleBlock } from '../../sketch/types';
import { type Edit, setSite, setTitle } from '../../store/commands';
import { useCompiled, useSketch, useStores } from '../../store/react';
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
      {LINES.map(([key, label]) => line(key, label))}
      {line('notes', 'Notes', 3)}
    </section>
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
