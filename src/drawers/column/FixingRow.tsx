import { Choice } from '../../parts/Choice';
import { QuantityField } from '../../parts/QuantityField';
import type { Dimension } from '../../quantity';
import type { Json, Quantity } from '../../sketch/types';
import { FlowEditor } from '../unit/FlowEditor';
import { quantityOf } from '../unit/given';
import { FieldFindings, SettingRow } from '../unit/SettingRow';
import { useForm } from '../unit/useForm';
import { capital } from '../words';
import { type Offer, offerKey, turned } from './fixings';
import { BasisPicker, ChemicalPicker, ProductPicker, StagePicker } from './pickers';
import { useFixingWords } from './words';

interface Props {
  readonly row: number;
  readonly offers: readonly Offer[];
  readonly choose: (offer: Offer) => void;
  readonly take: () => void;
  /** What goes on counting until this row has a value. */
  readonly stays: string | undefined;
  /** Just chosen: its field takes the focus. */
  readonly isNew: boolean;
  /** Back to what stood here; only of a row without a value. */
  readonly leave: (() => void) | undefined;
}

const AWAY = 'away';

/** One quantity that fixes the column: which, its value with its basis, and of what or where. */
export function FixingRow({ row, offers, choose, take, stays, isNew, leave }: Props) {
  const form = useForm();
  const words = useFixingWords();
  const base = `fixedBy.${row}`;
  // Its number is the field's own: what is dragged there leaves the row as it is.
  const item = form.ask((now) => ({ ...((now.value(base) ?? {}) as object), value: null }));
  const key = offerKey(item as object);
  const known = offers.some((offer) => offer.key === key);
  const ordinal = ['first', 'second', 'third'][row] ?? String(row + 1);
  return (
    <div className="fixing">
      <SettingRow
        path={base}
        label={
          <Choice
            asLabel
            label={`Fixed by, ${ordinal}: which`}
            path={`${base}.fix`}
            value={key}
            disabled={form.disabled}
            options={[
              ...(known ? [] : [{ value: key, text: capital(words.offer(key)) }]),
              ...offers.map((offer) => ({ value: offer.key, text: capital(words.offer(offer.key)) })),
              { value: AWAY, text: 'Take this away' },
            ]}
            onChange={(next) => {
              const offer = offers.find((o) => o.key === next);
              if (next === AWAY) take();
              else if (offer) choose(offer);
            }}
          />
        }
      >
        <Value key={key} base={base} item={item} word={words.offer(key)} isNew={isNew} leave={leave} />
        {stays === undefined ? null : <p className="field-note">Until a value is typed, {stays} stays.</p>}
        {['value', 'product', 'chemical', 'stage', 'at', 'basis'].map((part) => (
          <FieldFindings key={part} path={`${base}.${part}`} />
        ))}
      </SettingRow>
    </div>
  );
}

interface ValueProps {
  readonly base: string;
  readonly item: Json;
  readonly word: string;
  readonly isNew: boolean;
  readonly leave: (() => void) | undefined;
}

function Value({ base, item, word, isNew, leave }: ValueProps) {
  const form = useForm();
  const { fix, at, basis } = item as Readonly<Record<string, Json>>;
  const field = (dims: Dimension, says: string, more: Partial<FieldMore> = {}) => (
    <ValueField
      base={base}
      dims={dims}
      word={word}
      says={says}
      isNew={isNew}
      leave={leave}
      {...more}
      disabled={form.disabled}
    />
  );
  switch (fix) {
    case 'refluxRatio':
      return field('number', 'to distillate, mol', { min: 0 });
    case 'boilup':
      return field('number', 'to bottoms, mol', { min: 0 });
    case 'flow':
    case 'reflux':
      return (
        <FlowEditor path={`${base}.value`} word={word} beside={[]} share={false} needed autoFocus={isNew} />
      );
    case 'purity':
      return (
        <>
          {field('fraction', basis === 'mass' ? 'by mass' : 'by mole', PART)}
          <div className="flow-of">
            <ChemicalPicker base={base} />
            <ProductPicker base={base} />
            <BasisPicker base={base} />
          </div>
        </>
      );
    case 'recovery':
      return (
        <>
          {field('fraction', 'of all feeds', PART)}
          <div className="flow-of">
            <ChemicalPicker base={base} />
            <ProductPicker base={base} />
          </div>
        </>
      );
    case 'temperature':
      return (
        <>
          {field('temperature', 'of the liquid')}
          <StagePicker base={base} />
        </>
      );
    case 'duty':
      return field('power', at === 'condenser' ? 'removed' : 'added', { isTurned: at === 'condenser' });
    default:
      return null;
  }
}

const PART = { min: 0, max: 1, unitKept: '%' } as const;

interface FieldMore {
  readonly min: number;
  readonly max: number;
  readonly unitKept: string;
  /** Shown and typed with its sign turned. */
  readonly isTurned: boolean;
}
interface FieldProps extends Partial<FieldMore> {
  readonly base: string;
  readonly dims: Dimension;
  readonly word: string;
  readonly says: string;
  readonly isNew: boolean;
  readonly disabled: boolean;
  readonly leave: (() => void) | undefined;
}

function ValueField({ base, dims, word, says, isNew, isTurned = false, leave, ...more }: FieldProps) {
  const form = useForm();
  const path = `${base}.value`;
  const value = form.value(path);
  const { unitKept, ...rest } = more;
  return (
    <QuantityField
      {...rest}
      {...(unitKept === undefined || value !== undefined ? {} : { unitKept })}
      {...(leave ? { onLeave: leave } : {})}
      label={capital(word)}
      path={path}
      value={quantityOf(isTurned ? turned(value) : value)}
      dims={dims}
      site={form.site}
      basis={<span title={says}>{says}</span>}
      needed
      autoFocus={isNew}
      edit={form.edit(
        path,
        word,
        [],
        isTurned ? (text: Quantity) => turned(text) as Json : (text: Quantity) => text,
      )}
    />
  );
}
