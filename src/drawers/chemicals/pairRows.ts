import { useMemo } from 'react';
import type { PairKij } from '../../engine/thermo/types';
import { formatDecimals, MINUS } from '../../quantity';
import type { Json } from '../../sketch/types';
import { useCompiled, useSketch } from '../../store/react';

type Bank = Pick<PairKij, 'kij' | 'origin' | 'source'>;

/** One pair of chemicals: what the sketch gives, and what counts where it gives nothing. */
export interface PairRow {
  readonly i: string;
  readonly j: string;
  readonly iName: string;
  readonly jName: string;
  /** Given in the sketch [-]. */
  readonly own: number | undefined;
  /** What is known besides; undefined while a new list of chemicals is being read. */
  readonly bank: Bank | undefined;
}

export interface Stranger {
  readonly i: string;
  readonly j: string;
  readonly kij: number;
}

export type Origin = PairKij['origin'];
export const ORIGINS: readonly Origin[] = ['given', 'fitted', 'predicted', 'none'];

export const originOf = (row: PairRow): Origin =>
  row.own === undefined ? (row.bank?.origin ?? 'none') : 'given';

/** Four decimals, as pair constants are published. */
export const kijText = (kij: number): string =>
  kij === 0 ? '0' : formatDecimals(kij, 4).replace('-', MINUS);

const keyOf = (one: string, two: string): string => JSON.stringify([one, two].sort());

/** The constants that the sketch gives, as far as they can be read; the last of two for the same pair counts. */
function givenPairs(pairs: readonly Json[] | undefined): ReadonlyMap<string, Stranger> {
  const given = new Map<string, Stranger>();
  for (const entry of pairs ?? []) {
    if (typeof entry !== 'object' || entry === null || Array.isArray(entry)) continue;
    const { i, j, kij } = entry as { readonly [key: string]: Json };
    if (typeof i === 'string' && typeof j === 'string' && typeof kij === 'number')
      given.set(keyOf(i, j), { i, j, kij });
  }
  return given;
}

/** Every pair of the chemicals in force, in their order, and pairs given of chemicals that are not in the sketch. */
export function usePairRows(): {
  readonly rows: readonly PairRow[];
  readonly strangers: readonly Stranger[];
} {
  const basis = useCompiled((state) => state.basis);
  const pairs = useSketch((state) => state.sketch.model.pairs);
  return useMemo(() => {
    if (!basis) return { rows: [], strangers: [] };
    const given = givenPairs(pairs);
    const { chemicals } = basis;
    const rows = basis.model.pairs.flatMap(({ i, j, instead, ...bank }): PairRow[] => {
      const [one, two] = [chemicals[i], chemicals[j]];
      if (!one || !two) return [];
      const own = given.get(keyOf(one.id, two.id))?.kij;
      return [
        {
          i: one.id,
          j: two.id,
          iName: one.name,
          jName: two.name,
          own,
          bank: instead ?? (bank.origin === 'given' ? undefined : bank),
        },
      ];
    });
    const ids = new Set<string>(chemicals.map(({ id }) => id));
    const strangers = [...given.values()].filter(({ i, j }) => !ids.has(i) || !ids.has(j));
    return { rows, strangers };
  }, [basis, pairs]);
}

/** "3 fitted, 1 predicted". */
export function countsOf(rows: readonly PairRow[]): string {
  return ORIGINS.map((origin) => [origin, rows.filter((row) => originOf(row) === origin).length] as const)
    .filter(([, n]) => n > 0)
    .map(([origin, n]) => `${n} ${origin}`)
    .join(', ');
}

export const pairsOf = (rows: readonly PairRow[], chemical: string): readonly PairRow[] =>
  chemical === '' ? rows : rows.filter(({ i, j }) => i === chemical || j === chemical);
