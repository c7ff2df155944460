import type { SettingSpec } from '../../engine/units/types';
import { Choice } from '../../parts/Choice';
import { capital, optionWord } from '../words';
import { Fields } from './Fields';
import { useForm } from './form';
import { SettingRow } from './SettingRow';

type CasesSpec = Extract<SettingSpec, { is: 'cases' }>;

/** A record whose fields depend on one of its own words. */
export function CasesEditor({ spec, path }: { readonly spec: CasesSpec; readonly path: string }) {
  const form = useForm();
  const by = `${path}.${spec.by}`;
  const value = form.value(by);
  const chosen = typeof value === 'string' ? value : '';
  const inner = Object.hasOwn(spec.cases, chosen) ? spec.cases[chosen] : undefined;
  return (
    <fieldset className="group">
      <SettingRow label={capital(form.word(path))} path={by}>
        <Choice
          label={`${capital(form.word(path))}: which`}
          path={by}
          disabled={form.disabled}
          value={chosen}
          options={[
            ...(chosen === '' ? [{ value: '', text: 'needs a value' }] : []),
            ...Object.keys(spec.cases).map((key) => ({ value: key, text: optionWord(form.kind.kind, key) })),
          ]}
          onChange={(next) =>
            form.set([{ path, value: { [spec.by]: next } }], `set ${form.unit.tag} ${form.word(path)}`)
          }
        />
      </SettingRow>
      {inner?.is === 'record' ? <Fields fields={inner.fields} base={path} /> : null}
      {inner && inner.is !== 'record' ? <form.Editor spec={inner} path={`${path}.value`} /> : null}
    </fieldset>
  );
}
