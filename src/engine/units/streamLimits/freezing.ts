import { type Finding, named, saw } from '../../outcome';
import { finding, type Rule, rule, thresholdOf } from '../limits/rule';
import { CAS_CO2, CAS_WATER, flowing, fractionOf, type StreamContext } from './context';

/** Thresholds are mole fractions in the liquid, of the whole for water and carbon dioxide. */
const MOSTLY = rule('stream/freezes-mostly', 'caution', 0.8, 'fraction', 'melting-points');
const PARTLY = rule('stream/may-freeze', 'note', 0.2, 'fraction', 'melting-points');
const ICE = rule('stream/ice', 'caution', 1e-3, 'fraction');
const DRY_ICE = rule('stream/dry-ice', 'caution', 1e-2, 'fraction');

/** Thresholds of the limits in this file. */
export const FREEZING_RULES: readonly Rule[] = [MOSTLY, PARTLY, ICE, DRY_ICE];

const ICE_K = 273.15;
const DRY_ICE_K = 273.15 - 56;

const solidBelow = (cas: string | undefined, T_K: number): Rule | undefined => {
  if (cas === CAS_WATER && T_K < ICE_K) return ICE;
  return cas === CAS_CO2 && T_K < DRY_ICE_K ? DRY_ICE : undefined;
};

/**
 * A liquid below the melting point of the chemical it has most of among those that could freeze; water below 0 degC and carbon
 * dioxide below -56 degC (about its triple point) by their share of the whole stream. A screening by pure chemicals: most
 * mixtures freeze below the melting points of their parts.
 */
export function freezing(c: StreamContext): Finding[] {
  const { stream, overrides, at } = c;
  const seen = [saw('temperature', stream.T_K, 'temperature')];
  const found: Finding[] = [];
  const liquid = flowing(stream, 'liquid');
  let worst: { id: string; x: number; Tm_K: number } | undefined;
  c.model.chemicals.forEach((chemical, i) => {
    const ice = solidBelow(chemical.cas, stream.T_K);
    const whole = ice ? fractionOf(stream, i) : 0;
    if (ice && whole >= thresholdOf(ice, overrides))
      found.push(finding(ice, at, [...seen, saw('fraction', whole, 'fraction')], overrides));
    const x = liquid?.x[i] ?? 0;
    if (chemical.Tm_K !== undefined && stream.T_K < chemical.Tm_K && x > (worst?.x ?? 0))
      worst = { id: chemical.id, x, Tm_K: chemical.Tm_K };
  });
  if (worst && worst.x >= thresholdOf(PARTLY, overrides)) {
    const evidence = [
      ...seen,
      saw('fraction', worst.x, 'fraction'),
      saw('meltingPoint', worst.Tm_K, 'temperature'),
      named('chemical', worst.id),
    ];
    found.push(finding(worst.x >= thresholdOf(MOSTLY, overrides) ? MOSTLY : PARTLY, at, evidence, overrides));
  }
  return found;
}
