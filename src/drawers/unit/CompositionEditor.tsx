import { useState } from 'react';
import type { FieldEdit } from '../../parts/fieldEdit';
import { QuantityField } from '../../parts/QuantityField';
import { Segmented } from '../../parts/Segmented';
import { formatDecimals, formatSignificant, parseQuantity } from '../../quantity';
import type { Json } from '../../sketch/types';
import { normaliseParts } from '../../store/commands';
import { useSketch, useStores } from '../../store/react';
import { shownStream } from '../../store/resultsStore';
import { useChemicals, useSolvedChemicals } from '../chemicalNames';
import type { SettingChange } from '../edits';
import { run } from '../run';
import { capital } from '../words';
import { AirEditor } from './AirEditor';
import { asFlows, converted, isNear, type Mode, modeOf, partsOf, sumOf, usualUnit } from './composition';
import type { Form } from './form';
import type { Assumed } from './given';
import { readPaste } from './paste';
import { FieldFindings } from './SettingRow';
import { useForm } from './useForm';

/** The total flow that a composition belongs to. */
const flowBeside = (path: string): string => [...path.split('.').slice(0, -1), 'flow'].join('.');

const MODES = [
  { value: 'mole', text: 'mol' },
  { value: 'mass', text: 'mass' },
  { value: 'flows', text: 'flows' },
  { value: 'preset', text: 'air' },
] as const;

interface Props {
  readonly path: string;
  /** Used while nothing is given. */
  readonly assumed?: Assumed | undefined;
}

/** Parts by mole or mass, component flows, or ready-made air; a table that takes a paste from a spreadsheet. */
export function CompositionEditor({ path, assumed }: Props) {
  const form = useForm();
  const { results } = useStores();
  const given = form.ask((now) => modeOf(now.value(path)));
  const [wanted, setWanted] = useState<Mode | null>(null);
  const isAssumed = given === undefined && wanted === null && assumed !== undefined;
  const mode = wanted ?? given ?? 'mole';
  const word = form.word(path);
  const chemicals = useChemicals();
  const solved = useSolvedChemicals();
  const outlet = useSketch((state) => state.sketch.streams.find((s) => s.from?.[0] === form.unit.id)?.id);
  /** Read only where something is done with them: what is typed in one row draws no other. */
  const parts = () => partsOf(form.value(path));
  const isFraction = (m: Mode | undefined): boolean => m === 'mole' || m === 'mass';

  const put = (next: Json, label: string, more: readonly SettingChange[] = []): void => {
    setWanted(null);
    form.set([{ path, value: next }, ...more], `${label} ${form.unit.tag} ${word}`);
  };
  const choose = (next: Mode): void => {
    if (next === given) {
      setWanted(null);
      return;
    }
    if (next === 'preset') {
      put({ preset: 'dry air' }, 'set');
      return;
    }
    if (next === 'flows') {
      const shown = shownStream(outlet ? results.getState().streams.get(outlet) : undefined);
      if (shown && !shown.outOfDate && parts().size > 0) {
        const z = [...shown.result.z].map((x, k) => [solved[k]?.id ?? '', x] as const);
        const flows = asFlows(z, shown.result.n_mol_s);
        put({ flows }, 'set', [{ path: flowBeside(path), value: undefined }]);
        return;
      }
    }
    setWanted(next);
  };
  const isQuestion = wanted !== null && isFraction(wanted) && isFraction(given) && parts().size > 0;
  const molarMass = (id: string): number | undefined => chemicals.find((c) => c.id === id)?.MW_g_mol;
  const turned =
    isQuestion && wanted !== 'flows' && wanted !== 'preset'
      ? converted(parts(), wanted, molarMass)
      : undefined;

  return (
    <fieldset className="group composition">
      <legend>{capital(word)}</legend>
      <Segmented
        label={`${capital(word)}: given as`}
        path={`${path}.basis`}
        options={MODES}
        value={isAssumed ? undefined : mode}
        disabled={form.disabled}
        onChange={choose}
      />
      {isAssumed ? (
        <p className="field-note">Not given: {assumed.text} is assumed.</p>
      ) : isQuestion ? (
        <div className="question">
          <p>
            The numbers were typed by {given === 'mole' ? 'mole' : 'mass'}. Now by {wanted}:
          </p>
          <button
            type="button"
            className="button line"
            disabled={!turned}
            onClick={() => turned && put({ basis: wanted, parts: turned }, 'convert')}
          >
            Convert the numbers
          </button>
          <button
            type="button"
            className="button line"
            onClick={() => put({ basis: wanted, parts: Object.fromEntries(parts()) }, 'set')}
          >
            Keep the numbers
          </button>
          <button type="button" className="link" onClick={() => setWanted(null)}>
            Leave it
          </button>
        </div>
      ) : mode === 'preset' ? (
        <AirEditor path={path} />
      ) : (
        <Grid path={path} mode={mode} isNew={mode !== given} word={word} done={() => setWanted(null)} />
      )}
      <FieldFindings path={path} />
    </fieldset>
  );
}

interface GridProps {
  readonly path: string;
  readonly mode: Exclude<Mode, 'preset'>;
  /** The composition is not given this way yet: the first number typed begins it anew. */
  readonly isNew: boolean;
  readonly word: string;
  readonly done: () => void;
}

function Grid({ path, mode, isNew, word, done }: GridProps) {
  const form = useForm();
  const chemicals = useChemicals();
  const [pasted, setPasted] = useState<string | null>(null);
  const key = mode === 'flows' ? 'flows' : 'parts';
  const read = (now: Form): ReturnType<typeof partsOf> =>
    isNew ? new Map<string, never>() : partsOf(now.value(path));
  const unit = form.ask((now) => usualUnit(read(now), mode, now.site));
  const frame = (filled: Readonly<Record<string, Json>>): Json =>
    mode === 'flows' ? { flows: filled } : { basis: mode, parts: filled };
  // Component flows carry the total with them: a flow beside them would say it twice.
  const beside: readonly SettingChange[] =
    mode === 'flows' && form.has(flowBeside(path)) ? [{ path: flowBeside(path), value: undefined }] : [];
  const begin: readonly SettingChange[] = isNew ? [{ path, value: frame({}) }, ...beside] : beside;

  const paste = (text: string, from: number): boolean => {
    const targets = chemicals.map(({ id, name, formula, cas }) => ({
      id,
      names: [id, name, ...(formula ? [formula] : []), ...(cas ? [cas] : [])],
    }));
    const found = readPaste(text, targets, from, unit);
    if (!found) return false;
    if (found.values.size > 0) {
      const merged = { ...Object.fromEntries(form.ask(read)), ...Object.fromEntries(found.values) };
      form.set([...beside, { path, value: frame(merged) }], `paste ${form.unit.tag} ${word}`);
      done();
    }
    const left = [
      ...(found.unknown.length > 0 ? [`not among the sketch's chemicals: ${found.unknown.join(', ')}`] : []),
      ...(found.surplus > 0 ? [`${found.surplus} rows too many`] : []),
    ];
    setPasted(left.length > 0 ? `Left out: ${left.join('; ')}.` : null);
    return true;
  };
  const edit = (id: string, name: string) => {
    const plain = form.edit([...path.split('.'), key, id], `${word}, ${name}`, begin);
    return {
      ...plain,
      set: (next: Parameters<typeof plain.set>[0]) => {
        plain.set(next);
        done();
      },
    };
  };
  if (chemicals.length === 0) return <NoChemicals />;
  return (
    <>
      <table className="parts">
        <tbody>
          {chemicals.map(({ id, name }, row) => (
            <Part
              key={id}
              id={id}
              name={name}
              label={`${name}, ${capital(word)}`}
              path={`${path}.${key}.${id}`}
              mode={mode}
              usual={unit}
              read={read}
              edit={edit(id, name)}
              onPaste={(text) => paste(text, row)}
            />
          ))}
        </tbody>
        {mode === 'flows' ? null : <Sum path={path} read={read} />}
      </table>
      {mode === 'flows' ? null : <SumNote path={path} read={read} />}
      {pasted ? (
        <p className="field-note" role="status">
          {pasted}
        </p>
      ) : (
        <p className="muted small">A column copied from a spreadsheet can be pasted into any row.</p>
      )}
      <FieldFindings path={`${path}.${key}`} />
    </>
  );
}

type ReadParts = (form: Form) => ReturnType<typeof partsOf>;

interface PartProps {
  readonly id: string;
  readonly name: string;
  readonly label: string;
  readonly path: string;
  readonly mode: GridProps['mode'];
  readonly usual: string;
  readonly read: ReadParts;
  readonly edit: FieldEdit;
  readonly onPaste: (text: string) => boolean;
}

/** One row; it reads nothing but its own number. */
function Part({ id, name, label, path, mode, usual, read, edit, onPaste }: PartProps) {
  const form = useForm();
  const dims = mode === 'flows' ? (['molarFlow', 'massFlow'] as const) : 'fraction';
  const part = form.ask((now) => read(now).get(id));
  const typed = part === undefined ? undefined : parseQuantity(part, dims, form.site);
  return (
    <tr>
      <th scope="row">{name}</th>
      <td>
        <QuantityField
          label={label}
          path={path}
          value={part}
          dims={dims}
          min={0}
          max={mode === 'flows' ? undefined : 1}
          site={form.site}
          unitKept={typed?.ok ? typed.unit : usual}
          empty="–"
          disabled={form.disabled}
          edit={edit}
          onPaste={onPaste}
        />
        <FieldFindings path={path} />
      </td>
    </tr>
  );
}

interface SumProps {
  readonly path: string;
  readonly read: ReadParts;
}

const useSum = (read: ReadParts) =>
  useForm().ask((now) => ({ ...sumOf(read(now)), isEmpty: read(now).size === 0 }));

function Sum({ path, read }: SumProps) {
  const { sum, isEmpty } = useSum(read);
  if (isEmpty) return null;
  return (
    <tfoot>
      <tr>
        <th scope="row">Sum</th>
        <td>
          <span className={Math.abs(sum - 1) > 5e-4 ? 'sum off' : 'sum'} data-field={`${path}.sum`}>
            {formatDecimals(sum * 100, 3)} <span className="uom">%</span>
          </span>
        </td>
      </tr>
    </tfoot>
  );
}

/** What parts miss, and a way to scale them. */
function SumNote({ path, read }: SumProps) {
  const form = useForm();
  const { sketch } = useStores();
  const { sum, whole, isEmpty } = useSum(read);
  const off = sum - 1;
  if (!whole || isEmpty || Math.abs(off) <= 1e-9) return null;
  return (
    <div className="sum-note">
      <span>
        {formatSignificant(Math.abs(off) * 100, 3)} % {off < 0 ? 'missing' : 'too much'}.
        {isNear(sum) ? null : ' That is more than a slip, so nothing is scaled unless you say so.'}
      </span>
      <button
        type="button"
        className="button line"
        disabled={form.disabled || !(sum > 0)}
        title={isNear(sum) ? undefined : 'Keeps the proportions between the numbers that were typed'}
        onClick={() => run(sketch, (s) => normaliseParts(s, form.unit.id, `${path}.parts`))}
      >
        {isNear(sum) ? 'Scale to 100 %' : 'Scale what was typed to 100 %'}
      </button>
    </div>
  );
}

function NoChemicals() {
  const { session } = useStores();
  return (
    <p className="field-note">
      The sketch has no chemicals yet.{' '}
      <button type="button" className="link" onClick={() => session.openDrawer({ is: 'chemicals' })}>
        Choose chemicals
      </button>
    </p>
  );
}
