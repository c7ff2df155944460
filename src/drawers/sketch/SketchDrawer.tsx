import { QuantityField } from '../../parts/QuantityField';
import { Segmented } from '../../parts/Segmented';
import { TextField } from '../../parts/TextField';
import { type Dimension, STANDARD_SITE } from '../../quantity';
import type { LabelKey, MeasureSet, Sketch, TitleBlock } from '../../sketch/types';
import { type Edit, LABEL_KEYS, setDisplay, setSite, setTitle } from '../../store/commands';
import { useCompiled, useSketch, useStores } from '../../store/react';
import { Head } from '../Head';
import { run } from '../run';
import { useSay } from '../useSay';
import { capital, labelKeyWord } from '../words';

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

const SETS: readonly { readonly value: MeasureSet; readonly text: string; readonly title: string }[] = [
  { value: 'SI', text: 'SI', title: 'mol/s, K, kPa' },
  { value: 'metric', text: 'metric', title: 'kmol/h, °C, bar' },
  { value: 'US', text: 'US', title: 'lbmol/h, °F, psi' },
];

function Measures() {
  const { sketch } = useStores();
  const display = useSketch((state) => state.sketch.display);
  const disabled = useSketch((state) => !state.writable);
  const set = (choices: Parameters<typeof setDisplay>[1]): void =>
    void run(sketch, (s) => setDisplay(s, choices));
  const toggle = (key: LabelKey): void =>
    set({
      labels: display.labels.includes(key)
        ? display.labels.filter((label) => label !== key)
        : LABEL_KEYS.filter((label) => label === key || display.labels.includes(label)),
    });
  return (
    <section className="section">
      <div className="section-head">
        <h3>Measures and labels</h3>
      </div>
      <div className="setting">
        <div className="setting-label">Measures</div>
        <div className="setting-control">
          <Segmented
            label="Measures"
            path="display.set"
            options={SETS}
            value={display.set}
            disabled={disabled}
            onChange={(next) => set({ set: next })}
          />
        </div>
      </div>
      <div className="setting">
        <div className="setting-label">Pressures</div>
        <div className="setting-control">
          <Segmented
            label="Pressures are shown"
            path="display.gauge"
            options={[
              { value: 'absolute', text: 'absolute (a)' },
              { value: 'gauge', text: 'gauge (g)' },
            ]}
            value={display.gauge ? 'gauge' : 'absolute'}
            disabled={disabled}
            onChange={(next) => set({ gauge: next === 'gauge' ? true : undefined })}
          />
        </div>
      </div>
      <fieldset className="setting bare" data-field="display.labels">
        <legend className="setting-label">Labels show</legend>
        <div className="setting-control checks">
          {LABEL_KEYS.map((key) => (
            <label key={key}>
              <input
                type="checkbox"
                checked={display.labels.includes(key)}
                disabled={disabled || (!display.labels.includes(key) && display.labels.length >= 3)}
                onChange={() => toggle(key)}
              />
              {capital(labelKeyWord(key))}
            </label>
          ))}
          <p className="field-note">Up to three rows beside each stream.</p>
        </div>
      </fieldset>
    </section>
  );
}
