import { parseQuantity, quantityText, type Site } from '../../quantity';
import type { Json, Quantity } from '../../sketch/types';
import { ASKED_WITHIN } from '../../store/commands';
import { quantityOf } from './given';

export type Mode = 'mole' | 'mass' | 'flows' | 'preset';

type Tree = { readonly [key: string]: Json };
const isTree = (value: Json | undefined): value is Tree =>
  typeof value === 'object' && value !== null && !Array.isArray(value);

/** How a composition is given; undefined where nothing is. */
export function modeOf(value: Json | undefined): Mode | undefined {
  if (!isTree(value)) return undefined;
  if ('flows' in value) return 'flows';
  if ('preset' in value) return 'preset';
  return value.basis === 'mass' ? 'mass' : 'basis' in value || 'parts' in value ? 'mole' : undefined;
}

/** What is typed for each chemical, by id. */
export function partsOf(value: Json | undefined): ReadonlyMap<string, Quantity> {
  const parts = isTree(value) ? (value.flows ?? value.parts) : undefined;
  const entries = isTree(parts) ? Object.entries(parts) : [];
  return new Map(
    entries.flatMap(([id, part]) => {
      const typed = quantityOf(part);
      return typed === undefined ? [] : [[id, typed] as const];
    }),
  );
}

/** Sum of the fractions that can be read [-], and whether all of them could. */
export function sumOf(parts: ReadonlyMap<string, Quantity>): {
  readonly sum: number;
  readonly whole: boolean;
} {
  let sum = 0;
  let whole = true;
  for (const part of parts.values()) {
    const read = parseQuantity(part, 'fraction');
    if (read.ok) sum += read.si;
    else whole = false;
  }
  return { sum, whole };
}

/** Whether fractions are so little off that a slip explains it; further off, what was meant is not known. */
export const isNear = (sum: number): boolean => Math.abs(sum - 1) <= ASKED_WITHIN + 1e-9;

/** The unit a bare number takes in a new cell: that of the cells already filled, else per cent. */
export function usualUnit(parts: ReadonlyMap<string, Quantity>, mode: Mode, site: Site): string {
  const dims = mode === 'flows' ? (['molarFlow', 'massFlow'] as const) : (['fraction'] as const);
  const counts = new Map<string, number>();
  for (const part of parts.values()) {
    const read = parseQuantity(part, dims, site);
    if (read.ok) counts.set(read.unit, (counts.get(read.unit) ?? 0) + 1);
  }
  const [first] = [...counts].sort((a, b) => b[1] - a[1]);
  return first?.[0] ?? (mode === 'flows' ? 'kmol/h' : '%');
}

/**
 * Fractions turned from mole to mass or back, as per cent texts; undefined when a number cannot be read or a molar mass is
 * not known. The largest takes what rounding leaves, so that they sum to 100 % as they did.
 */
export function converted(
  parts: ReadonlyMap<string, Quantity>,
  to: 'mole' | 'mass',
  MW: (id: string) => number | undefined,
): Readonly<Record<string, string>> | undefined {
  const amounts: [string, number][] = [];
  for (const [id, part] of parts) {
    const read = parseQuantity(part, 'fraction');
    const weight = MW(id);
    if (!read.ok || weight === undefined) return undefined;
    amounts.push([id, to === 'mass' ? read.si * weight : read.si / weight]);
  }
  const total = amounts.reduce((sum, [, amount]) => sum + amount, 0);
  if (!(total > 0)) return undefined;
  const millionths = amounts.map(([id, amount]) => [id, Math.round((amount / total) * 1e8)] as const);
  const largest = millionths.reduce((a, b) => (b[1] > a[1] ? b : a));
  const left = 1e8 - millionths.reduce((sum, [, n]) => sum + n, 0);
  return Object.fromEntries(
    millionths.map(([id, n]) => [id, `${(n + (id === largest[0] ? left : 0)) / 1e6} %`]),
  );
}

/** Component flows from fractions and a total, in kmol/h. */
export function asFlows(
  z: readonly (readonly [string, number])[],
  n_mol_s: number,
): Readonly<Record<string, string>> {
  return Object.fromEntries(
    z.flatMap(([id, x]) => {
      const text =
        x > 0 ? quantityText(x * n_mol_s, 'molarFlow', 'kmol/h', undefined, { figures: 7 }) : undefined;
      return text === undefined ? [] : [[id, text]];
    }),
  );
}
