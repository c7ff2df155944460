import { QuantityField } from '../../parts/QuantityField';
import type { Json } from '../../sketch/types';
import { quantityOf } from '../unit/given';
import { FieldFindings } from '../unit/SettingRow';
import { useForm } from '../unit/useForm';
import { WholeField } from '../unit/WholeField';

const PATH = 'murphree';

/** Murphree efficiencies of the vapour, stretch by stretch; where none is given stages are in equilibrium. */
export function Efficiency() {
  const form = useForm();
  const value = form.value(PATH);
  const items: readonly Json[] = Array.isArray(value) ? value : [];
  const stages = form.value('stages');
  const most = typeof stages === 'number' ? stages : undefined;
  return (
    <fieldset className={items.length === 0 ? 'group line' : 'group'}>
      <legend>{items.length === 0 ? 'Efficiency' : 'Murphree efficiency, vapour'}</legend>
      {items.map((_, k) => {
        const base = `${PATH}.${k}`;
        const of = `stretch ${k + 1}`;
        return (
          // biome-ignore lint/suspicious/noArrayIndexKey: the position is the item's name
          <div key={k}>
            <div className="stretch">
              <span>stages</span>
              <WholeField
                path={`${base}.from`}
                word={`first stage of ${of}`}
                beside={[]}
                min={1}
                max={most}
                needed
              />
              <span>to</span>
              <WholeField
                path={`${base}.to`}
                word={`last stage of ${of}`}
                beside={[]}
                min={1}
                max={most}
                needed
              />
              <QuantityField
                label={`Efficiency of ${of}`}
                path={`${base}.value`}
                value={quantityOf(form.value(`${base}.value`))}
                dims="fraction"
                min={0.01}
                max={1}
                unitKept="%"
                needed
                site={form.site}
                disabled={form.disabled}
                edit={form.edit(`${base}.value`, `efficiency of ${of}`)}
              />
              <button
                type="button"
                className="link quiet"
                aria-label={`Take away ${of}`}
                disabled={form.disabled}
                onClick={() =>
                  form.set([{ path: base, value: undefined }], `take away ${form.unit.tag} efficiency`)
                }
              >
                Away
              </button>
            </div>
            {['', '.from', '.to', '.value'].map((part) => (
              <FieldFindings key={part} path={`${base}${part}`} />
            ))}
          </div>
        );
      })}
      <p className="muted">
        {items.length === 0 ? 'Not set: stages in equilibrium. ' : 'Elsewhere 100 %. '}
        <button
          type="button"
          className="link"
          disabled={form.disabled}
          onClick={() =>
            form.set(
              [{ path: PATH, value: [...items, { from: 1, ...(most ? { to: most } : {}) }] }],
              `add ${form.unit.tag} efficiency`,
            )
          }
        >
          {items.length === 0 ? 'Add a Murphree efficiency' : 'Add an efficiency'}
        </button>
      </p>
      <FieldFindings path={PATH} />
    </fieldset>
  );
}
