import { type Finding, saw } from '../../outcome';
import { joiningPressure } from '../limits/joiningPressure';
import { finding, type Rule, rule, thresholdOf } from '../limits/rule';
import type { Answer, Call } from '../types';
import type { ChamberResults, ChamberSettings } from './types';

const COLD = rule('chamber/cold', 'caution', 1123.15, 'temperature');
const HOT = rule('chamber/hot', 'caution', 1573.15, 'temperature');
const TOO_HOT = rule('chamber/too-hot-for-lining', 'beyond-limit', 1923.15, 'temperature');
const DISSOCIATES = rule('chamber/dissociation-neglected', 'note', 1803.15, 'temperature');
/** Oxygen in the dry flue gas [-]. */
const LITTLE_O2 = rule('chamber/little-oxygen', 'caution', 0.02, 'fraction');
/** Heat that must be added [W]. */
const TAKES = rule('chamber/takes-heat', 'caution', 0, 'power', 'balance');

/** Thresholds that only a chamber has. */
export const CHAMBER_RULES: readonly Rule[] = [COLD, HOT, TOO_HOT, DISSOCIATES, LITTLE_O2, TAKES];

/**
 * Limits of a chamber: streams that would have to flow uphill into it (drawn air too), a flame too cold or too hot, little
 * oxygen left, heat that must be added. None without flow; of the flame none where nothing burns.
 */
export function chamberLimits(call: Call<ChamberSettings>, answer: Answer<ChamberResults>): Finding[] {
  const { results, drawn } = answer;
  const { limits } = call;
  const out = answer.out.out;
  if (!out || out.phases.length === 0) return [];
  const at = { unit: call.unit };
  const inlets = { ...call.in, ...drawn };
  const found = joiningPressure(call.unit, inlets, results.P_Pa, limits);
  if (results.excess !== undefined) {
    const T = results.T_K;
    const seen = [saw('temperature', T, 'temperature')];
    if (T > thresholdOf(TOO_HOT, limits)) found.push(finding(TOO_HOT, at, seen, limits));
    else if (T > thresholdOf(HOT, limits)) found.push(finding(HOT, at, seen, limits));
    else if (T < thresholdOf(COLD, limits)) found.push(finding(COLD, at, seen, limits));
    if (T > thresholdOf(DISSOCIATES, limits)) found.push(finding(DISSOCIATES, at, seen, limits));
    if (results.O2Dry < thresholdOf(LITTLE_O2, limits))
      found.push(finding(LITTLE_O2, at, [saw('oxygen', results.O2Dry, 'fraction')], limits));
  }
  if (answer.heat_W > thresholdOf(TAKES, limits)) {
    const seen = [saw('added', answer.heat_W, 'power'), saw('temperature', results.T_K, 'temperature')];
    found.push(finding(TAKES, at, seen, limits));
  }
  return found;
}
