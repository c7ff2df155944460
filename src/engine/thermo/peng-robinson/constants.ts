import type { ChemicalData } from '../../chemicals/types';
import { R_J_molK } from '../types';

// Reduced density b/v at the critical point: the real root of the critical conditions, in closed form.
const eta = 1 / (1 + Math.cbrt(4 - Math.sqrt(8)) + Math.cbrt(4 + Math.sqrt(8)));

/** a(Tc) Pc / (R Tc)^2, exact: 0.45723552892... */
export const OMEGA_A = (8 + 40 * eta) / (49 - 37 * eta);
/** b Pc / (R Tc), exact: 0.07779607390... */
export const OMEGA_B = eta / (3 + eta);
/** Critical compressibility of the equation: 0.30740130870... */
export const Z_CRITICAL = 1 / (3 + eta);

/**
 * Slope m of the temperature function alpha = [1 + m (1 - sqrt(T/Tc))]^2.
 *
 * @param omega  acentric factor [-]
 * Source: '1976' Peng & Robinson, Ind. Eng. Chem. Fundam. 15 (1976) 59; '1978' Robinson & Peng, GPA Research Report
 * RR-28 (1978), which replaces the slope above omega = 0.491.
 */
export function alphaSlope(alpha: '1976' | '1978', omega: number): number {
  if (alpha === '1978' && omega > 0.491)
    return 0.379642 + (1.48503 + (-0.164423 + 0.016666 * omega) * omega) * omega;
  return 0.37464 + (1.54226 - 0.26992 * omega) * omega;
}

/**
 * What one chemical brings to the equation. sqrt(a) = rootA0 - rootA1 sqrt(T).
 * Where the published bracket 1 + m (1 - sqrt(T/Tc)) passes zero (hot gases far above critical) the root keeps its
 * sign, so that a is as published and its cross terms and their slopes stay smooth.
 */
export interface CubicConstants {
  /** [Pa^0.5 m3/mol] */
  readonly rootA0: number;
  /** [Pa^0.5 m3/(mol K^0.5)] */
  readonly rootA1: number;
  /** [m3/mol] */
  readonly b: number;
  readonly m: number;
  readonly Tc: number;
  readonly Pc: number;
  readonly omega: number;
}

/** Names of the constants that the equation needs and the chemical lacks. */
export function missingConstants(chem: ChemicalData): readonly ('Tc_K' | 'Pc_Pa' | 'omega')[] {
  return (['Tc_K', 'Pc_Pa', 'omega'] as const).filter((name) => chem[name] === undefined);
}

/** Throws when a constant is missing: a sketch is checked by missingForModel before a model is made. */
export function cubicConstants(chem: ChemicalData, alpha: '1976' | '1978'): CubicConstants {
  const { Tc_K: Tc, Pc_Pa: Pc, omega } = chem;
  if (Tc === undefined || Pc === undefined || omega === undefined)
    throw new Error(`Peng-Robinson needs Tc, Pc and omega of ${chem.id}`);
  const m = alphaSlope(alpha, omega);
  const rootAc = R_J_molK * Tc * Math.sqrt(OMEGA_A / Pc);
  return {
    rootA0: rootAc * (1 + m),
    rootA1: (rootAc * m) / Math.sqrt(Tc),
    b: (OMEGA_B * R_J_molK * Tc) / Pc,
    m,
    Tc,
    Pc,
    omega,
  };
}
