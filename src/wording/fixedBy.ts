import type { StreamId } from '../engine/ids';
import { parseQuantity, unitLabel } from '../quantity';
import type { Dimension } from '../quantity/dimension';
import type { Names } from './general/slots';
import { portWord } from './words';

/** Settings as they were typed: anything may be missing. */
type Typed = Readonly<Record<string, unknown>>;
const isTyped = (value: unknown): value is Typed => typeof value === 'object' && value !== null;

const BLANK = '…';

/** A quantity as typed, in its own unit: "-1200 kW", "98 degC" as "98 °C". */
function quantityText(value: unknown, dims: readonly Dimension[]): string {
  if (typeof value !== 'string' && typeof value !== 'number') return BLANK;
  const read = parseQuantity(value, dims);
  return read.ok ? `${read.number} ${unitLabel(read.unit, read.dim)}`.trim() : String(value);
}

const nameOf = (id: unknown, names: Names): string =>
  typeof id === 'string' ? (names.chemical?.(id) ?? id) : BLANK;

/** "14 % of stream 1, mol", "40 kmol/h". */
export function flowText(value: unknown, names: Names): string {
  if (!isTyped(value)) return quantityText(value, ['molarFlow', 'massFlow']);
  const { share, of, basis, chemical } = value;
  const id = isTyped(of) ? of.stream : undefined;
  const stream = typeof id === 'string' ? `stream ${names.number?.(id as StreamId) ?? id}` : 'all feeds';
  const what = chemical === undefined ? stream : `${nameOf(chemical, names)} in ${stream}`;
  return `${quantityText(share, ['fraction'])} of ${what}, ${basis === 'mass' ? 'mass' : 'mol'}`;
}

/** "stage 12", "the condenser". */
export const placeText = (at: unknown): string =>
  typeof at === 'number' ? `stage ${at}` : at === 'condenser' || at === 'reboiler' ? `the ${at}` : BLANK;

/** A duty by its size and a word for its direction; into the column is positive in files. */
export function dutyText(value: unknown): string {
  const text = quantityText(value, ['power']);
  if (text === BLANK) return text;
  const isRemoved = /^[-−]/.test(text);
  return `${text.replace(/^[-−+]\s*/, '')} ${isRemoved ? 'removed' : 'added'}`;
}

/** One of the quantities that fix a column, in words: "vapour distillate 14 % of stream 1, mol". */
export function fixingText(item: unknown, names: Names): string {
  if (!isTyped(item)) return BLANK;
  const { value } = item;
  const product = typeof item.product === 'string' ? portWord('column', item.product) : BLANK;
  const chemical = nameOf(item.chemical, names);
  switch (item.fix) {
    case 'refluxRatio':
      return `reflux ratio ${quantityText(value, ['number'])}`;
    case 'boilup':
      return `boil-up ratio ${quantityText(value, ['number'])}`;
    case 'flow':
      return `${product} ${flowText(value, names)}`;
    case 'reflux':
      return `reflux ${flowText(value, names)}`;
    case 'purity':
      return `${chemical} in ${product} ${quantityText(value, ['fraction'])}, ${item.basis === 'mass' ? 'mass' : 'mol'}`;
    case 'recovery':
      return `recovery of ${chemical} in ${product} ${quantityText(value, ['fraction'])}`;
    case 'temperature':
      return `${quantityText(value, ['temperature'])} at ${placeText(item.stage)}`;
    case 'duty':
      return `${typeof item.at === 'string' ? item.at : BLANK} duty ${dutyText(value)}`;
    default:
      return BLANK;
  }
}

/** "reflux ratio 2.4; vapour distillate 14 % of stream 1, mol"; "nothing: no ends" needs no words and is empty. */
export const fixedByText = (settings: Typed, names: Names): string =>
  Array.isArray(settings.fixedBy)
    ? settings.fixedBy.map((item: unknown) => fixingText(item, names)).join('; ')
    : '';

/** "26 stages + partial condenser + reboiler": stages lie between the ends, ends are named. */
export function stagesText(settings: Typed): string {
  const { stages } = settings;
  const count = typeof stages === 'number' || typeof stages === 'string' ? String(stages) : BLANK;
  return [`${count} ${count === '1' ? 'stage' : 'stages'}`, ...endWords(settings)].join(' + ');
}

/** "partial condenser", "total condenser", "reboiler": the ends that a column has. */
export function endWords({ top, bottom }: Typed): readonly string[] {
  const distillate = isTyped(top) ? top.distillate : undefined;
  const reboiler = isTyped(bottom) ? bottom.reboiler : undefined;
  return [
    ...(distillate === 'vapour' ? ['partial condenser'] : distillate === 'liquid' ? ['total condenser'] : []),
    ...(reboiler === true ? ['reboiler'] : []),
  ];
}
