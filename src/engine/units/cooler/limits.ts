import type { Finding } from '../../outcome';
import type { HeatedResults, HeatedSettings } from '../heated';
import { joiningPressure } from '../limits/joiningPressure';
import { finding, type Rule, rule, saw, thresholdOf } from '../limits/rule';
import { utilityLevels } from '../limits/utilities';
import type { Answer, Call, SiteSI } from '../types';

/** The duty's sign is against the unit's name by more than this [W]. */
const HEATS = rule('cooler/heats', 'caution', 0, 'power', 'balance');
export const COOLER_RULES: readonly Rule[] = [HEATS];

export function coolerLimits(
  call: Call<HeatedSettings>,
  answer: Answer<HeatedResults>,
  site: SiteSI,
): Finding[] {
  const out = answer.out.out;
  if (!out || out.phases.length === 0) return [];
  const found = joiningPressure(call.unit, call.in, out.P_Pa, call.limits);
  if (answer.heat_W > thresholdOf(HEATS, call.limits)) {
    const seen = [saw('added', answer.heat_W, 'power'), saw('temperature', out.T_K, 'temperature')];
    found.push(finding(HEATS, { unit: call.unit }, seen, call.limits));
  }
  found.push(...utilityLevels(call.unit, answer.heat_W, out, call.model, site, call.limits));
  return found;
}
