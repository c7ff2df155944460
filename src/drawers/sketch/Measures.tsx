import { measuresOf } from '../../drawing/measures';
import { Disclosure } from '../../parts/Disclosure';
import { Segmented } from '../../parts/Segmented';
import { TextField } from '../../parts/TextField';
import { type Dimension, displayUnit, suggestedUnits, unitLabel, unitRefusal } from '../../quantity';
import type { Display, LabelKey, MeasureSet, Sketch } from '../../sketch/types';
import { type Edit, LABEL_KEYS, setDisplay } from '../../store/commands';
import { useSketch, useStores } from '../../store/react';
import { sayRefusal } from '../../wording';
import { run } from '../run';
import { capital, labelKeyWord } from '../words';

const SETS: readonly { readonly value: MeasureSet; readonly text: string; readonly title: string }[] = [
  { value: 'SI', text: 'SI', title: 'mol/s, K, kPa' },
  { value: 'metric', text: 'metric', title: 'kmol/h, °C, bar' },
  { value: 'US', text: 'US', title: 'lbmol/h, °F, psi' },
];

/** Quantities that may be shown in a unit of one's own, those on labels first. */
const QUANTITIES: readonly (readonly [Dimension, string])[] = [
  ['temperature', 'temperature'],
  ['temperatureDifference', 'temperature difference'],
  ['pressure', 'pressure'],
  ['pressureDifference', 'pressure difference'],
  ['molarFlow', 'molar flow'],
  ['massFlow', 'mass flow'],
  ['volumeFlow', 'volume flow'],
  ['power', 'heat flow and power'],
  ['molarEnergy', 'molar energy'],
  ['massEnergy', 'energy by mass'],
  ['molarEntropy', 'molar heat capacity and entropy'],
  ['heatCapacity', 'heat capacity by mass'],
  ['density', 'density'],
  ['molarMass', 'molar mass'],
  ['molarVolume', 'molar volume'],
  ['viscosity', 'viscosity'],
  ['thermalConductivity', 'thermal conductivity'],
  ['surfaceTension', 'surface tension'],
  ['conductance', 'UA value'],
  ['length', 'length'],
  ['area', 'area'],
  ['velocity', 'velocity'],
];

type Units = NonNullable<Display['units']>;
const without = (units: Units | undefined, dim: Dimension): Units | undefined => {
  const rest = Object.entries(units ?? {}).filter(([key]) => key !== dim);
  return rest.length === 0 ? undefined : Object.fromEntries(rest);
};

/** The unit of one quantity; an empty text goes back to the set's own. */
const setUnit =
  (dim: Dimension, word: string, text: string) =>
  (sketch: Sketch): Edit => {
    const others = without(sketch.display.units, dim);
    const units = text === '' ? others : { ...others, [dim]: text };
    const done = setDisplay(sketch, { units });
    return done.ok
      ? { ...done, label: `show ${word}${text === '' ? ' as the set has it' : ` in ${text}`}` }
      : done;
  };

/** What numbers are shown in, everywhere, and what the labels of the sheet show. */
export function Measures() {
  const { sketch } = useStores();
  const display = useSketch((state) => state.sketch.display);
  const site = useSketch((state) => state.sketch.site);
  const disabled = useSketch((state) => !state.writable);
  const set = (choices: Parameters<typeof setDisplay>[1]): void =>
    void run(sketch, (s) => setDisplay(s, choices));
  const pressure = displayUnit('pressure', measuresOf({ display, site }));
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
            value={pressure.label.endsWith('(g)') ? 'gauge' : 'absolute'}
            disabled={disabled}
            onChange={(next) =>
              set({ gauge: next === 'gauge' ? true : undefined, units: without(display.units, 'pressure') })
            }
          />
        </div>
      </div>
      <OwnUnits display={display} disabled={disabled} />
      <Labels display={display} disabled={disabled} />
    </section>
  );
}

interface Props {
  readonly display: Display;
  readonly disabled: boolean;
}

/** Quantity by quantity: the unit of the set, or one's own in its place. */
function OwnUnits({ display, disabled }: Props) {
  const { sketch } = useStores();
  const own = Object.keys(display.units ?? {}).length;
  const usual = measuresOf({ display: { ...display, units: {} }, site: {} });
  return (
    <Disclosure
      title="Unit of each quantity"
      aside={own === 0 ? 'all as the set has them' : `${own} of one’s own`}
    >
      <p className="field-note">Any unit may be typed; an empty field shows what the set has.</p>
      {QUANTITIES.map(([dim, word]) => {
        const text = display.units?.[dim] ?? '';
        const label = unitLabel(text, dim);
        return (
          <div className="setting" key={dim}>
            <div className="setting-label">{capital(word)}</div>
            <div className="setting-control unit-of">
              <TextField
                label={`Unit of ${word}`}
                path={`display.units.${dim}`}
                className="framed"
                value={text}
                placeholder={displayUnit(dim, usual).label}
                offers={suggestedUnits(dim)}
                disabled={disabled}
                onCommit={(typed) => {
                  const unit = typed.trim();
                  const refused = unit === '' ? undefined : unitRefusal(unit, dim);
                  if (!refused) return run(sketch, setUnit(dim, word, unit));
                  const fits = suggestedUnits(dim).slice(0, 4).join(', ');
                  return `${sayRefusal(refused.code, refused.found)} ${refused.near ?? fits} would fit.`;
                }}
              />
              {text === '' || label === text ? null : <span className="muted">shown as {label}</span>}
            </div>
          </div>
        );
      })}
    </Disclosure>
  );
}

function Labels({ display, disabled }: Props) {
  const { sketch } = useStores();
  const toggle = (key: LabelKey): void =>
    void run(sketch, (s) =>
      setDisplay(s, {
        labels: display.labels.includes(key)
          ? display.labels.filter((label) => label !== key)
          : LABEL_KEYS.filter((label) => label === key || display.labels.includes(label)),
      }),
    );
  return (
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
  );
}
