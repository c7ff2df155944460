import type { ChemicalData } from '../chemicals/types';
import { zRAOf } from './liquidVolume';
import { rackettVolume_m3_mol } from './pure/liquidVolume';
import type { PureChemical } from './pure/pure';

/** Density [kg/m3] of a liquid about which nothing is known. */
const UNKNOWN_kg_m3 = 800;
/** From here up in Tr the volume grows ever more slowly towards a limit instead of following the critical singularity. */
const TAME_FROM = 0.9;

/** True when nothing tells the liquid volume of a chemical, so that 800 kg/m3 is assumed: worth an entry in a register. */
export const isVolumeAssumed = (chem: ChemicalData): boolean =>
  (chem.Tc_K === undefined || chem.Pc_Pa === undefined || (chem.zRA ?? chem.omega) === undefined) &&
  (chem.corr.liquid_density ?? []).length === 0;

/** Molar volume of a pure liquid and its slope by T, defined and smooth at every temperature. */
export interface PureVolume {
  at(T: number): number;
  slope(T: number): number;
}

/**
 * Volume of one chemical as (part of) a liquid at any T [m3/mol]: the modified Rackett equation up to Tr 0.9, beyond
 * that with the value and slope of Tr 0.9 towards a limit reached within a few tenths of Tc, which serves dissolved
 * gases; without critical constants the stated density; without that 800 kg/m3.
 */
export function pureVolume(pure: PureChemical): PureVolume {
  const { chemical } = pure;
  const { Tc_K: Tc, Pc_Pa: Pc } = chemical;
  const zRA = zRAOf(chemical);
  if (Tc !== undefined && Pc !== undefined && zRA !== undefined) {
    const below = (T: number): number => rackettVolume_m3_mol(T, Tc, Pc, zRA);
    const slopeBelow = (T: number): number =>
      (below(T) * Math.log(zRA) * (-2 / 7) * (1 - T / Tc) ** (-5 / 7)) / Tc;
    const T1 = TAME_FROM * Tc;
    const v1 = below(T1);
    const slope1 = slopeBelow(T1);
    const reach = 0.1 * Tc;
    return {
      at: (T) => (T <= T1 ? below(T) : v1 + slope1 * reach * -Math.expm1((T1 - T) / reach)),
      slope: (T) => (T <= T1 ? slopeBelow(T) : slope1 * Math.exp((T1 - T) / reach)),
    };
  }
  const { rhoL } = pure;
  if (rhoL) {
    const at = (T: number): number => 1 / rhoL(T);
    const h = 1e-5;
    return { at, slope: (T) => (at(T * (1 + h)) - at(T * (1 - h))) / (2 * h * T) };
  }
  const v = (chemical.MW_g_mol * 1e-3) / UNKNOWN_kg_m3;
  return { at: () => v, slope: () => 0 };
}
