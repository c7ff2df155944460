import type { StreamState } from '../../equilibrium/types';
import type { UnitId } from '../../ids';
import { type Finding, named, saw } from '../../outcome';
import type { Model } from '../../thermo/types';
import { totalOf } from '../total';
import type { SiteSI } from '../types';
import { finding, type Overrides, type Rule, rule, thresholdOf } from './rule';

const degC = (t: number): number => t + 273.15;

/** Codes of the levels at which heat is taken away or brought; every kind with a duty may emit them. */
export const UTILITY_FINDINGS = [
  'cooling/below-air',
  'cooling/below-cooling-water',
  'cooling/below-chilled-water',
  'cooling/second-refrigerant',
  'heating/above-low-pressure-steam',
  'heating/above-medium-pressure-steam',
  'heating/above-high-pressure-steam',
  'heating/cracks',
  'heating/polymerises',
] as const;

/** From the coldest level up; the first that fires is the one that is said. Cooling water: approach to its inlet. */
const COOLING: readonly Rule[] = [
  rule('cooling/second-refrigerant', 'caution', degC(-20), 'temperature'),
  rule('cooling/below-chilled-water', 'caution', degC(12), 'temperature'),
  rule('cooling/below-cooling-water', 'caution', 10, 'temperatureDifference'),
  rule('cooling/below-air', 'note', degC(50), 'temperature'),
];
const CRACKS = rule('heating/cracks', 'beyond-limit', degC(350), 'temperature');
/** From the hottest level down. */
const HEATING: readonly Rule[] = [
  CRACKS,
  rule('heating/above-high-pressure-steam', 'caution', degC(235), 'temperature'),
  rule('heating/above-medium-pressure-steam', 'note', degC(170), 'temperature'),
  rule('heating/above-low-pressure-steam', 'note', degC(135), 'temperature'),
];
const POLYMERISES = rule('heating/polymerises', 'caution', degC(110), 'temperature');

/** Thresholds of the limits in this file. */
export const UTILITY_RULES: readonly Rule[] = [...COOLING, ...HEATING, POLYMERISES];

/** Dienes and styrenes, by CAS number where the family alone does not tell. */
const STYRENES = new Set(['100-42-5', '98-83-9']);

/** Whether something is there that may crack: carbon with hydrogen, or what has no formula, above a trace of 0.01 mol %. */
function holdsOrganics(stream: StreamState, model: Model): boolean {
  const least = 1e-4 * totalOf(stream.n_mol_s);
  return model.chemicals.some(
    ({ elements }, i) =>
      stream.n_mol_s[i]! > least && (!elements || ((elements.C ?? 0) > 0 && (elements.H ?? 0) > 0)),
  );
}

/** The first present chemical that polymerises when warm, above a trace of 0.01 mol %. */
function polymerising(stream: StreamState, model: Model): string | undefined {
  const total = totalOf(stream.n_mol_s);
  return model.chemicals.find(
    (c, i) =>
      stream.n_mol_s[i]! > 1e-4 * total &&
      (c.family === 'diene' || (c.cas !== undefined && STYRENES.has(c.cas))),
  )?.id;
}

/**
 * Which level of cooling or heating a duty needs, judged by the temperature at which the stream leaves: the coldest or hottest
 * level that fires is told, no other. Beside it, warm dienes and styrenes.
 *
 * @param heat_W  heat into the unit [W]; 0 asks for no level
 * @param out     stream at whose temperature the heat is exchanged
 * @param reacts  the unit is there for reactions: cracking is none of its limits
 */
export function utilityLevels(
  unit: UnitId,
  heat_W: number,
  out: StreamState,
  model: Model,
  site: SiteSI,
  overrides: Overrides,
  reacts = false,
): Finding[] {
  const seen = [saw('temperature', out.T_K, 'temperature')];
  const found: Finding[] = [];
  if (heat_W < 0) {
    const level = COOLING.find((r) => {
      const t = thresholdOf(r, overrides);
      return out.T_K < (r.dim === 'temperatureDifference' ? site.coolingWater_K + t : t);
    });
    const water = saw('coolingWater', site.coolingWater_K, 'temperature');
    if (level) found.push(finding(level, { unit }, [...seen, water], overrides));
  }
  if (heat_W > 0) {
    const mayCrack = !reacts && holdsOrganics(out, model);
    const level = HEATING.find((r) => out.T_K > thresholdOf(r, overrides) && (r !== CRACKS || mayCrack));
    if (level) found.push(finding(level, { unit }, seen, overrides));
    const chemical = out.T_K > thresholdOf(POLYMERISES, overrides) ? polymerising(out, model) : undefined;
    if (chemical)
      found.push(finding(POLYMERISES, { unit }, [...seen, named('chemical', chemical)], overrides));
  }
  return found;
}
