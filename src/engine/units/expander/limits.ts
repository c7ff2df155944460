import { type Finding, saw } from '../../outcome';
import type { MachineResults, MachineSettings } from '../compression/types';
import { finding, type Rule, rule, thresholdOf } from '../limits/rule';
import type { Answer, Call } from '../types';

/** Power that goes into the expander [W]. */
const TAKES = rule('expander/takes-power', 'caution', 0, 'power', 'balance');

/** Thresholds that only an expander has. */
export const EXPANDER_RULES: readonly Rule[] = [TAKES];

/** Limits of an expander: power that goes in. */
export function expanderLimits(call: Call<MachineSettings>, answer: Answer<MachineResults>): Finding[] {
  const inlet = call.in.in;
  if (!inlet || !(answer.power_W > thresholdOf(TAKES, call.limits))) return [];
  const seen = [
    saw('inletPressure', inlet.P_Pa, 'pressure'),
    saw('outletPressure', answer.results.P_Pa, 'pressure'),
  ];
  return [finding(TAKES, { unit: call.unit }, seen, call.limits)];
}
