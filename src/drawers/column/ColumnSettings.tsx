import type { SettingSpec } from '../../engine/units/types';
import { Segmented } from '../../parts/Segmented';
import { useStores } from '../../store/react';
import { endWords } from '../../wording';
import { Fields } from '../unit/Fields';
import { type Form, withAnswers } from '../unit/form';
import { FieldFindings, SettingRow } from '../unit/SettingRow';
import { FormProvider, useChanged, useForm } from '../unit/useForm';
import { WholeField } from '../unit/WholeField';
import { Efficiency } from './Efficiency';
import { setDistillate, setReboiler } from './ends';
import { FixedBy } from './FixedBy';
import { Feeds, SideDraws } from './Ports';
import './column.css';

type Fielded = Readonly<Record<string, SettingSpec>>;

const DISTILLATES: Readonly<Record<string, string>> = {
  liquid: 'liquid',
  vapour: 'vapour',
  both: 'both',
  none: 'no condenser',
};

/** A column's settings: stages and ends, pressures, what enters and is drawn where, then what fixes it. */
export function ColumnSettings() {
  const form = useForm();
  const { settings } = form.kind;
  const { stages, subcooling } = settings;
  const { max } = stages?.is === 'whole' ? stages : {};
  const ends = form.ask(({ unit }) => endWords(unit.settings));
  const isLiquid = form.value('top.distillate') === 'liquid';
  return (
    <>
      <section className="section column-settings">
        <div className="section-head">
          <h3>Settings</h3>
          <span className="muted">any unit may be typed</span>
        </div>
        <SettingRow label="Stages" path="stages">
          <div className="stages-line">
            <WholeField path="stages" word="stages" beside={[]} min={1} max={max} needed />
            <span className="muted">
              {ends.length > 0 ? ends.map((end) => `+ ${end}`).join(' ') : 'from the top, no ends'}
            </span>
          </div>
        </SettingRow>
        <Distillate />
        <Reboiler />
        {subcooling && (isLiquid || form.has('subcooling')) ? (
          <form.Editor spec={subcooling} path="subcooling" />
        ) : null}
        <Pressure />
        <Feeds />
        <SideDraws />
        <Efficiency />
        <FieldFindings path="" />
      </section>
      <FixedBy />
    </>
  );
}

function Distillate() {
  const form = useForm();
  const { sketch } = useStores();
  const spec = fieldOf(form.kind.settings.top, 'distillate');
  const value = form.value('top.distillate');
  const values = spec?.is === 'option' ? spec.values : [];
  return (
    <SettingRow label="Distillate leaves as" path="top.distillate">
      <span data-state={value === undefined ? 'needed' : undefined}>
        <Segmented
          label="Distillate leaves as"
          path="top.distillate"
          value={typeof value === 'string' ? value : undefined}
          disabled={form.disabled}
          options={values.map((v) => ({ value: v, text: DISTILLATES[v] ?? v }))}
          onChange={(next) =>
            sketch.apply(`set ${form.unit.tag} distillate`, setDistillate(form.unit.id, next))
          }
        />
      </span>
    </SettingRow>
  );
}

function Reboiler() {
  const form = useForm();
  const { sketch } = useStores();
  const value = form.value('bottom.reboiler');
  return (
    <SettingRow label="Bottom" path="bottom.reboiler">
      <span data-state={value === undefined ? 'needed' : undefined}>
        <Segmented
          label="Bottom"
          path="bottom.reboiler"
          value={value === true ? 'reboiler' : value === false ? 'none' : undefined}
          disabled={form.disabled}
          options={[
            { value: 'reboiler', text: 'reboiler' },
            { value: 'none', text: 'none' },
          ]}
          onChange={(next) =>
            sketch.apply(`set ${form.unit.tag} bottom`, setReboiler(form.unit.id, next === 'reboiler'))
          }
        />
      </span>
    </SettingRow>
  );
}

/** Pressures of the places that there are; one given for an end that has gone stays in sight. */
function Pressure() {
  const form = useForm();
  const source = useChanged(withPressureWords);
  const spec = form.kind.settings.pressure;
  if (spec?.is !== 'record') return null;
  const distillate = form.value('top.distillate');
  const there: Readonly<Record<string, boolean>> = {
    condenser: distillate !== undefined && distillate !== 'none',
    reboiler: form.value('bottom.reboiler') === true,
  };
  const fields = Object.fromEntries(
    Object.entries(spec.fields).filter(([key]) => (there[key] ?? true) || form.has(`pressure.${key}`)),
  );
  const unused = Object.keys(there).filter((end) => !there[end] && Object.hasOwn(fields, end));
  return (
    <fieldset className="group plain">
      <legend className="unseen">Pressure</legend>
      <FormProvider value={source}>
        <div className="pairs-of">
          <Fields fields={fields} base="pressure" choose={spec.choose} />
        </div>
      </FormProvider>
      {unused.map((end) => (
        <p key={end} className="field-note">
          There is no {end}: its pressure is kept and not used.
        </p>
      ))}
      <FieldFindings path="pressure" />
    </fieldset>
  );
}

/** Short ones: they stand side by side where there is room. */
const PRESSURES: Readonly<Record<string, string>> = {
  'pressure.condenser': 'condenser pressure',
  'pressure.top': 'top pressure',
  'pressure.bottom': 'bottom pressure',
  'pressure.perStage': 'drop a stage',
  'pressure.reboiler': 'reboiler pressure',
};
const withPressureWords = (form: Form): Form =>
  withAnswers({ ...form, word: (path) => PRESSURES[path] ?? form.word(path) });

const fieldOf = (spec: SettingSpec | undefined, key: string): SettingSpec | undefined =>
  spec?.is === 'record' ? (spec.fields as Fielded)[key] : undefined;
