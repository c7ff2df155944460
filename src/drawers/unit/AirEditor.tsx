import { Choice } from '../../parts/Choice';
import { QuantityField } from '../../parts/QuantityField';
import { quantityOf } from './given';
import { SettingRow } from './SettingRow';
import { useForm } from './useForm';

const AIRS = [
  { value: 'dry air', text: 'dry air' },
  { value: '79/21', text: '79 % nitrogen, 21 % oxygen' },
  { value: 'humid air', text: 'humid air' },
];

/** Ready-made air, with its humidity where it has one. */
export function AirEditor({ path }: { readonly path: string }) {
  const form = useForm();
  const preset = form.value(`${path}.preset`);
  const at = `${path}.relativeHumidity`;
  return (
    <>
      <SettingRow label="Air" path={`${path}.preset`}>
        <Choice
          label="Air"
          path={`${path}.preset`}
          value={typeof preset === 'string' ? preset : 'dry air'}
          options={AIRS}
          disabled={form.disabled}
          onChange={(next) => form.set([{ path, value: { preset: next } }], `set ${form.unit.tag} air`)}
        />
      </SettingRow>
      {preset === 'humid air' ? (
        <SettingRow label="Relative humidity" path={at}>
          <QuantityField
            label="Relative humidity"
            path={at}
            value={quantityOf(form.value(at))}
            dims="fraction"
            min={0}
            max={1}
            unitKept="%"
            needed
            site={form.site}
            disabled={form.disabled}
            edit={form.edit(at, 'relative humidity')}
          />
        </SettingRow>
      ) : null}
      <p className="muted small">By mole. Chemicals the sketch does not list are added as an assumption.</p>
    </>
  );
}
