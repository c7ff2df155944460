/**
 * Molar volume of a saturated liquid from one constant a chemical.
 *
 * v = (R Tc/Pc) Z_RA^(1 + (1 - Tr)^(2/7))
 * Source: Rackett, J. Chem. Eng. Data 15 (1970) 514; Spencer & Danner, J. Chem. Eng. Data 17 (1972) 236.
 */
import { R_J_molK } from '../types';

/** Saturated-liquid volume [m3/mol]; at and above Tc the volume at Tc. */
export function rackettVolume_m3_mol(T: number, Tc: number, Pc: number, zRA: number): number {
  return ((R_J_molK * Tc) / Pc) * zRA ** (1 + Math.max(0, 1 - T / Tc) ** (2 / 7));
}

/** Z_RA that gives the volume v [m3/mol] at T [K] < Tc. */
export function rackettConstant(T: number, Tc: number, Pc: number, v: number): number {
  return ((v * Pc) / (R_J_molK * Tc)) ** (1 / (1 + (1 - T / Tc) ** (2 / 7)));
}

/** Z_RA of a chemical without a density: 0.29056 - 0.08775 omega. Yamada & Gunn, J. Chem. Eng. Data 18 (1973) 234. */
export const rackettFromOmega = (omega: number): number => 0.29056 - 0.08775 * omega;
