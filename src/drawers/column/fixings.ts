import {
  conflictsOf,
  type FixedItem,
  type FixedView,
  freeCount,
  topPort,
} from '../../engine/units/column/free';
import type { Json } from '../../sketch/types';
import { valueAt } from '../edits';

/** What may fix a column, as a user chooses it: a quantity, of a product or an end where that tells two apart. */
export interface Offer {
  readonly key: string;
  readonly item: { readonly [key: string]: Json };
}

/** Every quantity that the ends of a column let it be fixed by, in the order they are offered. */
export function offersOf(view: FixedView): readonly Offer[] {
  const top = topPort(view);
  const condenser = view.top?.distillate !== 'none';
  const reboiler = view.bottom?.reboiler === true;
  const when = (there: boolean, ...offers: Offer[]): Offer[] => (there ? offers : []);
  return [
    ...when(condenser, { key: 'refluxRatio', item: { fix: 'refluxRatio' } }),
    ...when(reboiler, { key: 'boilup', item: { fix: 'boilup' } }),
    { key: `flow ${top}`, item: { fix: 'flow', product: top } },
    { key: 'flow bottoms', item: { fix: 'flow', product: 'bottoms' } },
    ...when(condenser, { key: 'reflux', item: { fix: 'reflux' } }),
    { key: 'purity', item: { fix: 'purity', product: top, basis: 'mole' } },
    { key: 'recovery', item: { fix: 'recovery', product: top } },
    { key: 'temperature', item: { fix: 'temperature' } },
    ...when(condenser, { key: 'duty condenser', item: { fix: 'duty', at: 'condenser' } }),
    ...when(reboiler, { key: 'duty reboiler', item: { fix: 'duty', at: 'reboiler' } }),
  ];
}

/** The offer that an item was made from, or would be: '' for one that says nothing yet. */
export function offerKey({ fix, product, at }: FixedItem): string {
  if (typeof fix !== 'string') return '';
  if (fix === 'flow') return `flow ${String(product)}`;
  return fix === 'duty' ? `duty ${String(at)}` : fix;
}

/** Offers that contradict none of the other rows. */
export function fittingOffers(view: FixedView, row: number, sides: number): readonly Offer[] {
  const items = view.fixedBy ?? [];
  const others = items.filter((_, k) => k !== row);
  const before = conflictsOf({ ...view, fixedBy: others }, sides).length;
  return offersOf(view).filter(
    ({ item }) => conflictsOf({ ...view, fixedBy: [...others, item] }, sides).length <= before,
  );
}

const NEEDS: Readonly<Record<string, readonly string[]>> = {
  flow: ['product'],
  purity: ['product', 'chemical'],
  recovery: ['product', 'chemical'],
  temperature: ['stage'],
  duty: ['at'],
};

/** Whether nothing of it is missing. */
export function isWhole(item: Json): boolean {
  const fix = valueAt(item, 'fix');
  const value = valueAt(item, 'value');
  if (typeof fix !== 'string' || value === undefined) return false;
  const isShare = typeof value === 'object' && value !== null;
  if (isShare && valueAt(value, 'share') === undefined) return false;
  return (NEEDS[fix] ?? []).every((key) => valueAt(item, key) !== undefined);
}

/** "fixed 1 of 2": only what is wholly given counts. */
export function fixedOf(view: FixedView): { readonly fixed: number; readonly free: number | undefined } {
  return {
    fixed: (view.fixedBy ?? []).filter((item) => isWhole(item as Json)).length,
    free: freeCount(view),
  };
}

/** A quantity with its sign turned: heat removed is typed as a size, and stands in files as heat into the column. */
export function turned(value: Json | undefined): Json | undefined {
  if (typeof value === 'number') return value === 0 ? 0 : -value;
  if (typeof value !== 'string') return value;
  const text = value.trim();
  return /^[-−]/.test(text) ? text.slice(1).trim() : `-${text.replace(/^\+/, '')}`;
}
