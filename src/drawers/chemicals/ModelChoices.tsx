import { Choice } from '../../parts/Choice';
import { Segmented } from '../../parts/Segmented';
import type { ModelChoice } from '../../sketch/types';
import { MODEL_KINDS, setModel } from '../../store/commands';
import { useCompiled, useSketch, useStores } from '../../store/react';
import { run } from '../run';
import { useSay } from '../useSay';
import { modelOption } from '../words';

/** Model kinds in words, with the choices each of them looks at. */
const LOOKS_AT: Readonly<Record<string, readonly (keyof ModelChoice)[]>> = {
  'peng-robinson': ['alpha', 'liquidVolume', 'bankPairs'],
  raoult: ['liquidH', 'liquidVolume'],
};

type Choices = Parameters<typeof setModel>[1];

/** Which equations stand behind every stream, and their options; what is not chosen is an assumption and reads so. */
export function ModelChoices() {
  const say = useSay();
  const { sketch } = useStores();
  const model = useSketch((state) => state.sketch.model);
  const disabled = useSketch((state) => !state.writable);
  const gaps = useCompiled((state) => state.gaps);
  const set = (choices: Choices): void => void run(sketch, (s) => setModel(s, choices));
  const kinds: readonly string[] = MODEL_KINDS;
  const looksAt = LOOKS_AT[model.kind] ?? [];
  const broken = gaps.filter((gap) => gap.at.unit === undefined && gap.at.path?.startsWith('model.'));
  return (
    <>
      <div className="setting">
        <div className="setting-label">Model</div>
        <div className="setting-control">
          <Choice
            label="Thermodynamic model"
            path="model.kind"
            value={model.kind}
            disabled={disabled}
            options={[
              ...kinds.map((kind) => ({ value: kind, text: modelOption(kind, true) })),
              ...(kinds.includes(model.kind)
                ? []
                : [{ value: model.kind, text: modelOption(model.kind, false) }]),
            ]}
            onChange={(kind) => set({ kind })}
          />
          {broken.map((gap) => (
            <p className="refusal" key={`${gap.code} ${gap.at.path}`}>
              {say(gap).sentence}
            </p>
          ))}
        </div>
      </div>
      {looksAt.includes('alpha') ? (
        <Option
          label="Alpha function"
          path="model.alpha"
          value={model.alpha}
          assumed="1976"
          options={[
            { value: '1976', text: '1976' },
            { value: '1978', text: '1978' },
          ]}
          disabled={disabled}
          onChange={(alpha) => set({ alpha })}
        />
      ) : null}
      {looksAt.includes('liquidH') ? (
        <Option
          label="Liquid enthalpy"
          path="model.liquidH"
          value={model.liquidH}
          assumed="psat-slope"
          options={[
            { value: 'psat-slope', text: 'vapour pressure slope' },
            { value: 'hvap', text: 'heat of vaporisation' },
          ]}
          disabled={disabled}
          onChange={(liquidH) => set({ liquidH })}
        />
      ) : null}
      {looksAt.includes('liquidVolume') ? (
        <Option
          label="Liquid volume"
          path="model.liquidVolume"
          value={model.liquidVolume}
          assumed="corrected"
          options={[
            { value: 'corrected', text: 'corrected' },
            { value: 'cubic', text: "the equation's own" },
          ]}
          disabled={disabled}
          onChange={(liquidVolume) => set({ liquidVolume })}
        />
      ) : null}
      {looksAt.includes('bankPairs') ? (
        <Option
          label="Pairs"
          path="model.bankPairs"
          value={model.bankPairs === undefined ? undefined : model.bankPairs ? 'bank' : 'given'}
          assumed="bank"
          options={[
            { value: 'bank', text: 'from the bank' },
            { value: 'given', text: 'only those given' },
          ]}
          disabled={disabled}
          onChange={(pairs) => set({ bankPairs: pairs === 'bank' })}
        />
      ) : null}
    </>
  );
}

interface OptionProps<T extends string> {
  readonly label: string;
  readonly path: string;
  readonly value: T | undefined;
  readonly assumed: T;
  readonly options: readonly { readonly value: T; readonly text: string }[];
  readonly disabled: boolean;
  readonly onChange: (value: T) => void;
}

/** A choice that shows what is assumed while nothing is chosen. */
function Option<T extends string>({ label, assumed, ...rest }: OptionProps<T>) {
  const isOpen = rest.value === undefined;
  return (
    <div className="setting">
      <div className="setting-label">{label}</div>
      <div className={isOpen ? 'setting-control assumed' : 'setting-control'}>
        <Segmented {...rest} label={label} assumed={assumed} />
        {isOpen ? (
          <p className="field-note">
            Not chosen: {rest.options.find(({ value }) => value === assumed)?.text} is assumed.
          </p>
        ) : null}
      </div>
    </div>
  );
}
