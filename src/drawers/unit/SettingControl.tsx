import type { UnitId } from '../../engine/ids';
import type { SettingSpec } from '../../engine/units/types';
import { Choice } from '../../parts/Choice';
import { QuantityField } from '../../parts/QuantityField';
import { Segmented } from '../../parts/Segmented';
import type { Quantity } from '../../sketch/types';
import { useSketch } from '../../store/react';
import { useChemicals } from '../chemicalNames';
import { type SettingChange, valueAt } from '../edits';
import { capital, optionWord, portWord } from '../words';
import { FlowEditor } from './FlowEditor';
import { quantityOf } from './given';
import { useForm } from './useForm';
import { WholeField } from './WholeField';

export interface ControlProps {
  readonly spec: SettingSpec;
  readonly path: string;
  readonly word: string;
  /** Changes that go with a new value: the key that this one replaces. */
  readonly beside?: readonly SettingChange[];
  readonly assumed?: { readonly text: string; readonly why: string } | undefined;
  readonly needed?: boolean;
  /** What stands in an empty field that may stay empty. */
  readonly empty?: string;
  readonly autoFocus?: boolean;
  readonly onLeave?: () => void;
}

/** The control of a setting that fits in one line; undefined for those that need rows of their own. */
export function hasOneLine(spec: SettingSpec): boolean {
  return ['quantity', 'flow', 'whole', 'stage', 'option', 'yesNo', 'chemical', 'product'].includes(spec.is);
}

export function SettingControl({ spec, path, word, beside = [], ...rest }: ControlProps) {
  const form = useForm();
  const label = capital(word);
  const shared = { ...rest, label, path, site: form.site, disabled: form.disabled };
  const value = form.value(path);
  const formerly = useFormer(form.unit.id, path, spec.is === 'quantity' && value === undefined);
  switch (spec.is) {
    case 'quantity':
      return (
        <QuantityField
          {...shared}
          value={quantityOf(value)}
          dims={spec.dim}
          min={spec.min}
          max={spec.max}
          edit={form.edit(path, word, beside)}
          formerly={formerly}
        />
      );
    case 'flow':
      return <FlowEditor {...rest} share={spec.share === true} path={path} word={word} beside={beside} />;
    case 'whole':
      return <WholeField {...rest} path={path} word={word} beside={beside} min={spec.min} max={spec.max} />;
    case 'stage':
      return <WholeField {...rest} path={path} word={word} beside={beside} min={1} ends={spec.ends} />;
    case 'option':
      return (
        <Options
          path={path}
          word={word}
          beside={beside}
          optional={spec.optional === true || spec.otherwise !== undefined}
          {...(rest.assumed ? { assumed: rest.assumed.text } : {})}
          options={spec.values.map((v) => ({ value: v, text: optionWord(form.kind.kind, v) }))}
        />
      );
    case 'yesNo':
      return (
        <Segmented
          label={label}
          path={path}
          disabled={form.disabled}
          value={value === true ? 'yes' : value === false ? 'no' : undefined}
          options={[
            { value: 'yes', text: 'yes' },
            { value: 'no', text: 'no' },
          ]}
          onChange={(v) =>
            form.set([...beside, { path, value: v === 'yes' }], `set ${form.unit.tag} ${word}`)
          }
        />
      );
    case 'chemical':
      return <ChemicalOptions path={path} word={word} beside={beside} optional={spec.optional === true} />;
    case 'product':
      return <ProductOptions path={path} word={word} beside={beside} optional={spec.optional === true} />;
    default:
      return null;
  }
}

/** What stood at a path before it was cleared, by the history of this sketch. */
function useFormer(id: UnitId, path: string, isMissing: boolean): Quantity | undefined {
  return useSketch((state) => {
    if (!isMissing) return undefined;
    for (let k = state.past.length - 1; k >= 0; k -= 1) {
      const unit = state.past[k]?.before.units.find((u) => u.id === id);
      const value = quantityOf(valueAt(unit?.settings, path));
      if (value !== undefined) return value;
    }
    return undefined;
  });
}

interface OptionsProps {
  readonly path: string;
  readonly word: string;
  readonly beside: readonly SettingChange[];
  readonly optional: boolean;
  readonly assumed?: string;
  /** Always a list: names that come and go. */
  readonly asList?: true;
  readonly options: readonly { readonly value: string; readonly text: string }[];
}

const NOT_SAID = '';

/** Few short ones side by side, many in a list; what may be left unsaid can be left again. */
function Options({ path, word, beside, optional, assumed, asList, options }: OptionsProps) {
  const form = useForm();
  const given = form.value(path);
  const value = typeof given === 'string' ? given : NOT_SAID;
  const unsaid = {
    value: NOT_SAID,
    text: assumed ? `${assumed}, assumed` : optional ? 'not said' : 'needs a value',
  };
  const choose = (next: string): void =>
    form.set(
      next === NOT_SAID ? [{ path, value: undefined }] : [...beside, { path, value: next }],
      `${next === NOT_SAID ? 'clear' : 'set'} ${form.unit.tag} ${word}`,
    );
  const shared = { label: capital(word), path, value, disabled: form.disabled, onChange: choose };
  const letters = options.reduce((sum, option) => sum + option.text.length + 2, 0);
  if (!asList && !optional && options.length <= 4 && letters <= 34)
    return <Segmented {...shared} options={options} />;
  const withUnsaid = optional || value === NOT_SAID ? [unsaid, ...options] : options;
  return <Choice {...shared} options={withUnsaid} />;
}

function ChemicalOptions(props: Omit<OptionsProps, 'options'>) {
  const chemicals = useChemicals();
  return <Options {...props} asList options={chemicals.map(({ id, name }) => ({ value: id, text: name }))} />;
}

function ProductOptions(props: Omit<OptionsProps, 'options'>) {
  const form = useForm();
  const streams = useSketch((state) => state.sketch.streams);
  const options = streams.flatMap(({ from, number }) =>
    from?.[0] === form.unit.id
      ? [{ value: from[1], text: `${portWord(form.kind.kind, from[1])}, stream ${number}` }]
      : [],
  );
  return <Options {...props} asList options={options} />;
}
