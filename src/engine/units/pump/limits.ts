import { type Finding, saw } from '../../outcome';
import { finding, type Rule, rule, thresholdOf } from '../limits/rule';
import type { Answer, Call } from '../types';
import type { PumpResults, PumpSettings } from './types';

/** Vapour in what enters, by mole [-]; what rounding may leave at a bubble point does not count. */
const VAPOUR = rule('pump/vapour-enters', 'beyond-limit', 1e-8, 'fraction');
const LOW_HEAD = rule('pump/low-suction-head', 'note', 3, 'length');
/** Share of the pressure within which a liquid counts as being at its bubble point [-]. */
const STATIC_ONLY = rule('pump/static-head-only', 'note', 1e-4, 'fraction');
/** Power that comes out of the pump [W]. */
const GIVES = rule('pump/gives-power', 'caution', 0, 'power', 'balance');

/** Thresholds that only a pump has. */
export const PUMP_RULES: readonly Rule[] = [VAPOUR, LOW_HEAD, STATIC_ONLY, GIVES];

/** Limits of a pump: vapour that enters, else too little head at the suction; power that comes out. None without flow. */
export function pumpLimits(call: Call<PumpSettings>, answer: Answer<PumpResults>): Finding[] {
  const inlet = call.in.in;
  if (!inlet || inlet.phases.length === 0) return [];
  const at = { unit: call.unit };
  const { results } = answer;
  const found: Finding[] = [];
  const vapour = inlet.phases.find((p) => p.kind === 'vapour')?.fraction ?? 0;
  if (vapour > thresholdOf(VAPOUR, call.limits)) {
    found.push(finding(VAPOUR, { ...at, port: 'in' }, [saw('vapour', vapour, 'fraction')], call.limits));
  } else if (results.npshAvailable_m !== undefined && results.bubbleP_Pa !== undefined) {
    const head = saw('head', results.npshAvailable_m, 'length');
    const bubble = saw('bubblePressure', results.bubbleP_Pa, 'pressure');
    const margin = 1 - results.bubbleP_Pa / inlet.P_Pa;
    if (call.settings.staticHead === undefined && margin <= thresholdOf(STATIC_ONLY, call.limits))
      found.push(finding(STATIC_ONLY, at, [bubble], call.limits));
    else if (results.npshAvailable_m < thresholdOf(LOW_HEAD, call.limits))
      found.push(finding(LOW_HEAD, at, [head, bubble], call.limits));
  }
  if (-results.power_W > thresholdOf(GIVES, call.limits)) {
    const seen = [
      saw('inletPressure', inlet.P_Pa, 'pressure'),
      saw('outletPressure', results.P_Pa, 'pressure'),
    ];
    found.push(finding(GIVES, at, seen, call.limits));
  }
  return found;
}
