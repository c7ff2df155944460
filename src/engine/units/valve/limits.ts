import { type Finding, saw } from '../../outcome';
import { finding, type Rule, rule, thresholdOf } from '../limits/rule';
import type { Answer, Call } from '../types';
import type { ValveResults, ValveSettings } from './types';

const UPHILL = rule('valve/outlet-above-inlet', 'beyond-limit', 0, 'pressureDifference', 'balance');
/** Rise of the vapour fraction that counts as flashing [-]. */
const FLASHES = rule('valve/flashes', 'note', 0, 'fraction', 'balance');
const COOLS = rule('valve/cools', 'note', 20, 'temperatureDifference', 'balance');

/** Thresholds that only a valve has. */
export const VALVE_RULES: readonly Rule[] = [UPHILL, FLASHES, COOLS];

/** Limits of a valve: a pressure that rises, a liquid that flashes, a stream that cools by much. None without flow. */
export function valveLimits(call: Call<ValveSettings>, answer: Answer<ValveResults>): Finding[] {
  const inlet = call.in.in;
  const out = answer.out.out;
  if (!inlet || !out || out.phases.length === 0) return [];
  const at = { unit: call.unit };
  const found: Finding[] = [];
  if (out.P_Pa - inlet.P_Pa > thresholdOf(UPHILL, call.limits)) {
    const seen = [saw('inletPressure', inlet.P_Pa, 'pressure'), saw('outletPressure', out.P_Pa, 'pressure')];
    found.push(finding(UPHILL, at, seen, call.limits));
  }
  // Only from a liquid on: vapour that grows is no news, and a dense stream has neither.
  const fromLiquid = inlet.vapourFraction < 1e-9 && inlet.phases.some((p) => p.kind === 'liquid');
  if (fromLiquid && out.vapourFraction - inlet.vapourFraction > thresholdOf(FLASHES, call.limits)) {
    const seen = [saw('vapourFraction', out.vapourFraction, 'fraction')];
    found.push(finding(FLASHES, at, seen, call.limits));
  }
  if (inlet.T_K - out.T_K > thresholdOf(COOLS, call.limits)) {
    const seen = [
      saw('cooling', inlet.T_K - out.T_K, 'temperatureDifference'),
      saw('temperature', out.T_K, 'temperature'),
    ];
    found.push(finding(COOLS, at, seen, call.limits));
  }
  return found;
}
