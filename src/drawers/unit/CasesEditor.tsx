import type { SettingSpec } from '../../engine/units/types';
import { Choice } from '../../parts/Choice';
import { capital, optionWord } from '../words';
import { Fields } from './Fields';
import { hasOneLine, SettingControl } from './SettingControl';
import { FieldFindings, SettingRow } from './SettingRow';
import { useForm } from './useForm';

type CasesSpec = Extract<SettingSpec, { is: 'cases' }>;
const VALUE = 'value';

/** One of several forms of a setting: which, its value in the same row, and what else belongs to it below. */
export function CasesEditor({ spec, path }: { readonly spec: CasesSpec; readonly path: string }) {
  const form = useForm();
  const by = `${path}.${spec.by}`;
  const given = form.value(by);
  const chosen = typeof given === 'string' && Object.hasOwn(spec.cases, given) ? given : '';
  const inner = chosen === '' ? undefined : spec.cases[chosen];
  const fields = inner?.is === 'record' ? inner.fields : inner ? { [VALUE]: inner } : {};
  const { [VALUE]: first, ...others } = fields;
  // An item of a list is called by what the list is called.
  const word = form.word(path.replace(/\.\d+$/, ''));
  const isShort = first !== undefined && hasOneLine(first);
  return (
    <>
      <SettingRow
        path={by}
        label={
          <Choice
            asLabel
            label={`${capital(word)}: which`}
            path={by}
            disabled={form.disabled}
            value={chosen}
            options={[
              ...(chosen === '' ? [{ value: '', text: 'Choose one' }] : []),
              ...Object.keys(spec.cases).map((key) => ({
                value: key,
                text: capital(optionWord(form.kind.kind, key)),
              })),
            ]}
            onChange={(next) =>
              form.set([{ path, value: { [spec.by]: next } }], `set ${form.unit.tag} ${word}`)
            }
          />
        }
      >
        {isShort ? (
          <>
            <SettingControl
              key={chosen}
              spec={first}
              path={`${path}.${VALUE}`}
              word={optionWord(form.kind.kind, chosen)}
              needed={!first.optional}
            />
            <FieldFindings path={`${path}.${VALUE}`} />
          </>
        ) : null}
      </SettingRow>
      <Fields key={chosen} fields={isShort ? others : fields} base={path} />
    </>
  );
}
