/** Which interaction parameter every pair of chemicals gets, and why: given, fitted, predicted or none. */
import type { ChemicalData } from '../../chemicals/types';
import type { PairKij } from '../types';
import { type GroupTable, predictedKij } from './ppr78';

/** One tabulated constant of the Peng-Robinson equation; the chemicals are matched by CAS number. */
export interface FittedPair {
  readonly cas: readonly [string, string];
  readonly kij: number;
  readonly source: string;
}

/** Tables that pairs are looked up in. */
export interface PairTables {
  readonly fitted: ReadonlyMap<string, FittedPair>;
  readonly groups: GroupTable;
}

/** What the sketch says about pairs. */
export interface PairChoice {
  readonly bankPairs: boolean;
  /** By chemical id, in either order. */
  readonly pairs: readonly { readonly i: string; readonly j: string; readonly kij: number }[];
}

/** Key of a pair of ids or CAS numbers, the same in either order. */
export const pairKey = (a: string, b: string): string => (a < b ? `${a}|${b}` : `${b}|${a}`);

/** Fitted constants by the CAS numbers of both chemicals. */
export function fittedTable(rows: readonly FittedPair[]): ReadonlyMap<string, FittedPair> {
  return new Map(rows.map((row) => [pairKey(row.cas[0], row.cas[1]), row]));
}

/**
 * Every pair i < j of the list: what the user gave; else the fitted constant of the bank; else the value that group
 * contributions predict at 298.15 K, kept constant; else 0 with origin 'none'. With `bankPairs` false only what the
 * user gave counts.
 */
export function resolvePairs(
  chemicals: readonly ChemicalData[],
  choice: PairChoice,
  tables: PairTables,
): PairKij[] {
  const given = new Map(choice.pairs.map((p) => [pairKey(p.i, p.j), p.kij]));
  const out: PairKij[] = [];
  for (let i = 0; i < chemicals.length; i += 1) {
    for (let j = i + 1; j < chemicals.length; j += 1) {
      out.push({ i, j, ...resolve(chemicals[i]!, chemicals[j]!, given, choice.bankPairs, tables) });
    }
  }
  return out;
}

function resolve(
  one: ChemicalData,
  two: ChemicalData,
  given: ReadonlyMap<string, number>,
  bankPairs: boolean,
  tables: PairTables,
): Omit<PairKij, 'i' | 'j'> {
  const own = given.get(pairKey(one.id, two.id));
  const instead = ofBank(one, two, bankPairs, tables);
  return own === undefined ? instead : { kij: own, origin: 'given', source: 'given in the sketch', instead };
}

function ofBank(
  one: ChemicalData,
  two: ChemicalData,
  bankPairs: boolean,
  tables: PairTables,
): Pick<PairKij, 'kij' | 'origin' | 'source'> {
  if (!bankPairs) return { kij: 0, origin: 'none', source: 'none given; pairs of the bank are switched off' };
  const fitted =
    one.cas !== undefined && two.cas !== undefined ? tables.fitted.get(pairKey(one.cas, two.cas)) : undefined;
  if (fitted) return { kij: fitted.kij, origin: 'fitted', source: fitted.source };
  const predicted = predictedKij(one, two, tables.groups);
  if (predicted !== undefined) {
    return { kij: predicted, origin: 'predicted', source: 'E-PPR78 group contributions at 298.15 K' };
  }
  return { kij: 0, origin: 'none', source: 'no fitted value and no published group contributions' };
}
