import { Choice } from '../../parts/Choice';
import { Segmented } from '../../parts/Segmented';
import { useChemicals } from '../chemicalNames';
import { useForm } from '../unit/useForm';
import { WholeField } from '../unit/WholeField';
import { portWord } from '../words';
import { endsOf, usePortRows } from './places';

interface Props {
  /** Path of the row that the choice belongs to. */
  readonly base: string;
}

function usePick(base: string, key: string, word: string) {
  const form = useForm();
  const path = `${base}.${key}`;
  const given = form.value(path);
  return {
    path,
    disabled: form.disabled,
    value: typeof given === 'string' ? given : '',
    onChange: (next: string) => {
      if (next !== '') form.set([{ path, value: next }], `set ${form.unit.tag} ${word}`);
    },
  };
}

export function ChemicalPicker({ base }: Props) {
  const chemicals = useChemicals();
  const pick = usePick(base, 'chemical', 'chemical');
  return (
    <span data-state={pick.value === '' ? 'needed' : undefined}>
      <Choice
        {...pick}
        label="Of which chemical"
        options={[
          ...(pick.value === '' ? [{ value: '', text: 'which chemical' }] : []),
          ...chemicals.map(({ id, name }) => ({ value: id as string, text: name })),
        ]}
      />
    </span>
  );
}

/** Products of the ends, and side draws that have a stream. */
export function ProductPicker({ base }: Props) {
  const form = useForm();
  const pick = usePick(base, 'product', 'product');
  const sides = usePortRows('side');
  const top = form.value('top.distillate') === 'liquid' ? 'liquidDistillate' : 'vapourDistillate';
  const ports = [top, 'bottoms', ...sides.map(({ port }) => port)];
  const all = pick.value === '' || ports.includes(pick.value) ? ports : [pick.value, ...ports];
  return (
    <Choice
      {...pick}
      label="In which product"
      options={[
        ...(pick.value === '' ? [{ value: '', text: 'in which product' }] : []),
        ...all.map((port) => ({ value: port, text: `in ${portWord('column', port)}` })),
      ]}
    />
  );
}

export function BasisPicker({ base }: Props) {
  const { value, ...pick } = usePick(base, 'basis', 'basis');
  return (
    <Segmented
      {...pick}
      label="By mole or by mass"
      value={value === 'mass' ? 'mass' : 'mole'}
      options={[
        { value: 'mole', text: 'mol' },
        { value: 'mass', text: 'mass' },
      ]}
    />
  );
}

/** A stage by its number from the top, or an end that the column has. */
export function StagePicker({ base }: Props) {
  const form = useForm();
  const stages = form.value('stages');
  return (
    <div className="flow-of">
      <WholeField
        path={`${base}.stage`}
        word="stage"
        beside={[]}
        min={1}
        max={typeof stages === 'number' ? stages : undefined}
        ends={endsOf(form)}
        needed
      />
    </div>
  );
}
