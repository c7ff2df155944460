import type { SettingSpec } from '../../engine/units/types';
import type { Json } from '../../sketch/types';
import { capital } from '../words';
import { Fields } from './Fields';
import { hasOneLine } from './SettingControl';
import { FieldFindings } from './SettingRow';
import { useForm } from './useForm';

type ListSpec = Extract<SettingSpec, { is: 'list' }>;

/** So many of the same, one after the other, with a button to add and one each to take away. */
export function ListEditor({ spec, path }: { readonly spec: ListSpec; readonly path: string }) {
  const form = useForm();
  const word = form.word(path);
  const value = form.value(path);
  const items: readonly Json[] = Array.isArray(value) ? value : [];
  const shown = Math.max(items.length, spec.min);
  const isFull = spec.max !== undefined && items.length >= spec.max;
  const { of } = spec;
  return (
    <fieldset className="group">
      <legend>{capital(word)}</legend>
      {Array.from({ length: shown }, (_, k) => {
        const at = `${path}.${k}`;
        return (
          // biome-ignore lint/suspicious/noArrayIndexKey: the position is the item's name
          <div className="list-item" key={k}>
            <div className="list-head">
              <span>{k + 1}</span>
              {items.length > spec.min ? (
                <button
                  type="button"
                  className="link"
                  disabled={form.disabled}
                  onClick={() =>
                    form.set([{ path: at, value: undefined }], `remove ${form.unit.tag} ${word} ${k + 1}`)
                  }
                >
                  Remove
                </button>
              ) : null}
            </div>
            {of.is === 'record' ? (
              <Fields fields={of.fields} base={at} choose={of.choose} />
            ) : (
              <form.Editor spec={of} path={at} />
            )}
          </div>
        );
      })}
      {isFull ? null : (
        <button
          type="button"
          className="button line"
          disabled={form.disabled}
          onClick={() =>
            form.set([{ path, value: [...items, hasOneLine(of) ? '' : {}] }], `add ${form.unit.tag} ${word}`)
          }
        >
          Add
        </button>
      )}
      <FieldFindings path={path} />
    </fieldset>
  );
}
