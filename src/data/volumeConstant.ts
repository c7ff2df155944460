/** Fits the one constant of the liquid-volume method to one density of the chosen saturated-liquid curve. */
import type { ChemicalData } from '../engine/chemicals/types';
import { rackettConstant } from '../engine/thermo/pure/liquidVolume';
import { preparePure } from '../engine/thermo/pure/pure';

/** Where the constant is fitted: at 298.15 K or at the normal boiling point if that is lower, inside the stated range. */
export function fitTemperature_K(c: ChemicalData): number {
  const low = c.corr.liquid_density?.[0]?.Tmin ?? 0;
  return Math.max(Math.min(298.15, c.Tb_K ?? 298.15), low);
}

/**
 * Constant of the liquid-volume method from one density of the chemical's own curve, and where that comes from; nothing without
 * a density, Tc or Pc.
 */
export function liquidVolumeConstant(c: ChemicalData): Pick<ChemicalData, 'zRA' | 'zRASource'> {
  const { rhoL } = preparePure(c);
  if (!rhoL || c.Tc_K === undefined || c.Pc_Pa === undefined) return {};
  const T = fitTemperature_K(c);
  const zRA = rackettConstant(T, c.Tc_K, c.Pc_Pa, 1 / rhoL(T));
  return {
    zRA: Number(zRA.toPrecision(7)),
    zRASource: `one density at ${T.toFixed(2)} K (${c.corr.liquid_density?.[0]?.source ?? ''})`,
  };
}
