import type { PureChemical } from './pure/pure';
import { volumeConstant } from './pure/volumeConstant';
import { R_J_molK } from './types';

export { isVolumeAssumed } from './pure/volumeConstant';

/** Density [kg/m3] of a liquid about which nothing is known. */
const UNKNOWN_kg_m3 = 800;
/** From here up in Tr the volume grows ever more slowly towards a limit instead of following the critical singularity. */
const TAME_FROM = 0.9;

/** Molar volume of a pure liquid and its slope by T, defined and smooth at every temperature. */
export interface PureVolume {
  at(T: number): number;
  slope(T: number): number;
}

/**
 * Volume of one chemical as (part of) a liquid at any T [m3/mol]: the modified Rackett equation up to Tr 0.9 with the constant
 * of pure/volumeConstant.ts, beyond that with the value and slope of Tr 0.9 towards a limit reached within a few tenths of Tc,
 * which serves dissolved gases; without critical constants the stated density; without that 800 kg/m3.
 */
export function pureVolume(pure: PureChemical): PureVolume {
  const { chemical } = pure;
  const { Tc_K: Tc, Pc_Pa: Pc } = chemical;
  const constant = volumeConstant(chemical);
  if (Tc !== undefined && Pc !== undefined && constant !== undefined) {
    const size = (R_J_molK * Tc) / Pc;
    const below = (T: number): number => size * Math.exp(constant.ln(T) * (1 + (1 - T / Tc) ** (2 / 7)));
    const slopeBelow = (T: number): number => {
      const part = (1 - T / Tc) ** (2 / 7);
      const ln = constant.ln(T);
      const power = 1 + part;
      const dPower = ((-2 / 7) * part) / (Tc - T);
      return size * Math.exp(ln * power) * (constant.slope(T) * power + ln * dPower);
    };
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
