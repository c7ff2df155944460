/**
 * y = sum of a[k] T^(k + lowest), and its two integrals, for heat capacities.
 *
 * Every heat-capacity form reduces to this: the nine-coefficient form of McBride, Zehe & Gordon (NASA/TP-2002-211556)
 * starts at T^-2, a polynomial at T^0, a monatomic gas is the constant 5/2 R.
 */
import type { Corr } from '../../chemicals/types';
import { R_J_molK } from '../types';

/** Coefficients of T^-2, T^-1, T^0, T^1, ... in J/(mol K). */
export type PowerTerms = readonly number[];

/** Forms that a heat capacity of the ideal gas may have. */
export const CP_FORMS: ReadonlySet<Corr['form']> = new Set(['cp_nasa9', 'poly5', 'powers', 'monatomic']);

/**
 * A heat-capacity correlation as power terms in J/(mol K).
 * Throws when the form is not one of CP_FORMS: callers check what a user wrote.
 */
export function powerTerms(corr: Corr): PowerTerms {
  switch (corr.form) {
    case 'monatomic':
      return [0, 0, 2.5 * R_J_molK];
    case 'cp_nasa9':
      return corr.c.map((a) => a * R_J_molK);
    case 'poly5':
      return [0, 0, ...corr.c];
    case 'powers': {
      const scale = corr.of === 'Cp/R' ? R_J_molK : 1;
      return [0, 0, ...corr.c.map((a) => a * scale)];
    }
    default:
      throw new Error(`form ${corr.form} is no heat capacity of an ideal gas`);
  }
}

/** Value of the terms at T [K] > 0. */
export function powerValue(a: PowerTerms, T: number): number {
  let y = 0;
  for (let k = a.length - 1; k >= 0; k -= 1) y = y * T + a[k]!;
  return y / (T * T);
}

/** An antiderivative of Cp over T [J/mol]. */
export function powerIntegral(a: PowerTerms, T: number): number {
  let y = 0;
  for (let k = a.length - 1; k >= 2; k -= 1) y = y * T + a[k]! / (k - 1);
  return y * T - (a[0] ?? 0) / T + (a[1] ?? 0) * Math.log(T);
}

/** An antiderivative of Cp/T over T [J/(mol K)]. */
export function powerIntegralOverT(a: PowerTerms, T: number): number {
  let y = 0;
  for (let k = a.length - 1; k >= 3; k -= 1) y = y * T + a[k]! / (k - 2);
  return y * T + (a[2] ?? 0) * Math.log(T) - (a[1] ?? 0) / T - (a[0] ?? 0) / (2 * T * T);
}
