import { type Finding, saw } from '../../outcome';
import { joiningPressure } from '../limits/joiningPressure';
import { finding, type Rule, thresholdOf } from '../limits/rule';
import { utilityLevels } from '../limits/utilities';
import type { Answer, Call, SiteSI } from '../types';
import type { HeatedResults, HeatedSettings } from './types';

/**
 * Limits of a heater or a cooler: a stream that would have to flow uphill, heat that goes the other way than the unit's name
 * says, the level of utility that the duty needs. None without flow.
 *
 * @param against  rule of the wrong way; its threshold is the heat that may go that way [W]
 * @param way      what the unit does with heat that breaks the rule: the evidence's name
 */
export function heatedLimits(
  against: Rule,
  way: 'added' | 'removed',
  call: Call<HeatedSettings>,
  answer: Answer<HeatedResults>,
  site: SiteSI,
): Finding[] {
  const out = answer.out.out;
  if (!out || out.phases.length === 0) return [];
  const found = joiningPressure(call.unit, call.in, out.P_Pa, call.limits);
  const wrong_W = way === 'added' ? answer.heat_W : -answer.heat_W;
  if (wrong_W > thresholdOf(against, call.limits)) {
    const seen = [saw(way, wrong_W, 'power'), saw('temperature', out.T_K, 'temperature')];
    found.push(finding(against, { unit: call.unit }, seen, call.limits));
  }
  found.push(...utilityLevels(call.unit, answer.heat_W, out, call.model, site, call.limits));
  return found;
}
