/**
 * Predicted interaction parameters of the Peng-Robinson equation by group contributions (E-PPR78).
 *
 * k_ij(T) = [-S/2 - (sqrt(a_i)/b_i - sqrt(a_j)/b_j)^2] / [2 sqrt(a_i a_j)/(b_i b_j)]
 * S = sum_k sum_l (alpha_ik - alpha_jk)(alpha_il - alpha_jl) A_kl (298.15 K/T)^(B_kl/A_kl - 1)
 * alpha_ik is the share of group k among all groups of i; a and b are those of the 1978 equation.
 *
 * Sources: Jaubert & Mutelet, Fluid Phase Equilib. 224 (2004) 285; refitted set reviewed in Jaubert, Qian, Lasala
 * & Privat, Fluid Phase Equilib. 560 (2022) 113456; a(T): Robinson & Peng, GPA Research Report RR-28 (1978).
 */
import type { ChemicalData } from '../../chemicals/types';
import { cubicConstants, missingConstants } from '../peng-robinson/constants';
import { T0_K } from '../types';

/** One group interaction, A and B in MPa. */
export interface GroupInteraction {
  readonly a: string;
  readonly b: string;
  readonly A_MPa: number;
  readonly B_MPa: number;
}

/** Interactions by unordered pair of group names; a pair that is absent was not published. */
export type GroupTable = ReadonlyMap<string, GroupInteraction>;

const key = (k: string, l: string): string => (k < l ? `${k}|${l}` : `${l}|${k}`);

/** The table of group interactions, to be looked up in either order. */
export function makeGroupTable(rows: readonly GroupInteraction[]): GroupTable {
  return new Map(rows.map((row) => [key(row.a, row.b), row]));
}

/** sqrt(a)/b [Pa^0.5] of the 1978 equation; undefined without critical constants. */
function attraction(c: ChemicalData, T: number): number | undefined {
  if (missingConstants(c).length > 0) return undefined;
  const { rootA0, rootA1, b } = cubicConstants(c, '1978');
  return Math.abs(rootA0 - rootA1 * Math.sqrt(T)) / b;
}

/**
 * k_ij at T [K] (298.15 K when not given); undefined when a chemical has no groups or no critical constants, or
 * an interaction that counts was not published.
 */
export function predictedKij(
  one: ChemicalData,
  two: ChemicalData,
  table: GroupTable,
  T = T0_K,
): number | undefined {
  const i = attraction(one, T);
  const j = attraction(two, T);
  if (!i || !j || !one.ppr78 || !two.ppr78) return undefined;
  const S = groupSum(one.ppr78, two.ppr78, table, T);
  return S === undefined ? undefined : (-0.5e6 * S - (i - j) ** 2) / (2 * i * j);
}

/** S [MPa]; undefined when a needed interaction is missing. */
function groupSum(
  one: Readonly<Record<string, number>>,
  two: Readonly<Record<string, number>>,
  table: GroupTable,
  T: number,
): number | undefined {
  const total = (g: Readonly<Record<string, number>>): number => Object.values(g).reduce((a, b) => a + b, 0);
  const names = [...new Set([...Object.keys(one), ...Object.keys(two)])];
  const difference = names.map((g) => (one[g] ?? 0) / total(one) - (two[g] ?? 0) / total(two));
  let sum = 0;
  for (let k = 0; k < names.length; k += 1) {
    for (let l = 0; l < k; l += 1) {
      const weight = difference[k]! * difference[l]!;
      if (Math.abs(weight) < 1e-14) continue;
      const row = table.get(key(names[k]!, names[l]!));
      if (!row) return undefined;
      if (row.A_MPa !== 0) sum += 2 * weight * row.A_MPa * (T0_K / T) ** (row.B_MPa / row.A_MPa - 1);
    }
  }
  return sum;
}
