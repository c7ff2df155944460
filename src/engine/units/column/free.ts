import { type Finding, named, saw } from '../../outcome';

/**
 * What may be counted and compared without solving: how many quantities are free, which of those given contradict each
 * other. Works on settings as typed and as compiled, since it looks at names only; imports no solver.
 */
export interface FixedView {
  readonly top?: { readonly distillate?: unknown };
  readonly bottom?: { readonly reboiler?: unknown };
  readonly fixedBy?: readonly FixedItem[];
}
export interface FixedItem {
  readonly fix?: unknown;
  readonly product?: unknown;
  readonly chemical?: unknown;
  readonly stage?: unknown;
  readonly at?: unknown;
}

/** Number of quantities that must be fixed; undefined while the ends are not chosen. */
export function freeCount({ top, bottom }: FixedView): number | undefined {
  const distillate = top?.distillate;
  const reboiler = bottom?.reboiler;
  if (typeof distillate !== 'string' || typeof reboiler !== 'boolean') return undefined;
  return (distillate === 'none' ? 0 : 1) + (reboiler ? 1 : 0);
}

/** "fixed 1 of 2": what is given of what is free. */
export function fixedCount(view: FixedView): { readonly fixed: number; readonly free: number | undefined } {
  return { fixed: view.fixedBy?.length ?? 0, free: freeCount(view) };
}

/** Port by which the distillate, or the vapour of a column without a condenser, leaves. */
export const topPort = (view: FixedView): string =>
  view.top?.distillate === 'liquid' ? 'liquidDistillate' : 'vapourDistillate';

const isEndProduct = (product: unknown): boolean =>
  product === 'liquidDistillate' || product === 'vapourDistillate' || product === 'bottoms';

/** What makes two items the same question. */
const keyOf = (x: FixedItem): string =>
  [x.fix, x.product, x.fix === 'purity' || x.fix === 'recovery' ? x.chemical : '', x.stage, x.at].join('|');

const refusal = (code: Finding['code'], path: string, evidence: Finding['evidence'] = []): Finding => ({
  code,
  weight: 'beyond-limit',
  at: { path },
  evidence,
});

/** Too few or too many quantities for the ends; undefined when the number fits or the ends are not chosen. */
export function countMiss(view: FixedView): Finding | undefined {
  const { fixed, free } = fixedCount(view);
  if (free === undefined || fixed === free) return undefined;
  const code = fixed < free ? 'column/fixed-too-few' : 'column/fixed-too-many';
  return refusal(code, 'fixedBy', [saw('fixed', fixed, 'number'), saw('free', free, 'number')]);
}

/** Items that have no place in this column: an end or a product that it does not have. */
function withoutPlace(view: FixedView): Finding[] {
  const condenser = view.top?.distillate !== 'none';
  const reboiler = view.bottom?.reboiler === true;
  const found: Finding[] = [];
  view.fixedBy?.forEach((x, k) => {
    const path = `fixedBy.${k}`;
    const needs =
      x.fix === 'refluxRatio' || x.fix === 'reflux'
        ? 'condenser'
        : x.fix === 'boilup'
          ? 'reboiler'
          : x.fix === 'duty'
            ? x.at
            : x.stage;
    if (needs === 'condenser' && !condenser)
      found.push(refusal('column/no-such-end', path, [named('end', needs)]));
    if (needs === 'reboiler' && !reboiler)
      found.push(refusal('column/no-such-end', path, [named('end', needs)]));
    if (isEndProduct(x.product) && x.product !== 'bottoms' && x.product !== topPort(view))
      found.push(refusal('column/no-such-product', `${path}.product`, [named('port', String(x.product))]));
  });
  return found;
}

/**
 * Quantities that contradict or repeat each other, whatever their values: the same twice, both end products' flows,
 * reflux ratio with reflux and distillate, one chemical's recovery in both of two products, the flow of a side draw, which its
 * draw gives already; and such as the column has no
 * place for.
 *
 * @param sides  number of side draws: with one, recoveries in both ends leave something open
 */
export function conflictsOf(view: FixedView, sides = 0): Finding[] {
  const found = withoutPlace(view);
  const items = view.fixedBy ?? [];
  const seen = new Map<string, number>();
  items.forEach((x, k) => {
    const key = keyOf(x);
    const before = seen.get(key);
    if (before === undefined) seen.set(key, k);
    else
      found.push(
        refusal('column/fixed-twice', `fixedBy.${k}`, [
          saw('first', before + 1, 'number'),
          saw('second', k + 1, 'number'),
        ]),
      );
  });
  items.forEach((x, k) => {
    if (x.fix === 'flow' && typeof x.product === 'string' && !isEndProduct(x.product))
      found.push(refusal('column/draw-flow-given', `fixedBy.${k}`, [named('port', x.product)]));
  });
  const placeOf = (test: (x: FixedItem) => boolean): number => items.findIndex(test);
  const top = placeOf((x) => x.fix === 'flow' && x.product === topPort(view));
  const bottoms = placeOf((x) => x.fix === 'flow' && x.product === 'bottoms');
  if (top >= 0 && bottoms >= 0)
    found.push(refusal('column/both-products-fixed', `fixedBy.${Math.max(top, bottoms)}`));
  const ratio = placeOf((x) => x.fix === 'refluxRatio');
  const reflux = placeOf((x) => x.fix === 'reflux');
  if (ratio >= 0 && reflux >= 0 && top >= 0)
    found.push(refusal('column/reflux-three-ways', `fixedBy.${Math.max(ratio, reflux, top)}`));
  if (sides === 0)
    items.forEach((x, k) => {
      if (x.fix !== 'recovery' || x.product !== 'bottoms') return;
      const other = placeOf(
        (y) => y.fix === 'recovery' && y.product === topPort(view) && y.chemical === x.chemical,
      );
      if (other >= 0) found.push(refusal('column/recovery-both', `fixedBy.${Math.max(k, other)}`));
    });
  return found;
}

/** Both duties given: the balance then says nearly the same twice. */
export const bothDuties = (view: FixedView): boolean =>
  ['condenser', 'reboiler'].every((end) => view.fixedBy?.some((x) => x.fix === 'duty' && x.at === end));
