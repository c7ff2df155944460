import { type Finding, named, saw } from '../../outcome';
import { joiningPressure } from '../limits/joiningPressure';
import { finding, type Rule, rule, thresholdOf } from '../limits/rule';
import { utilityLevels } from '../limits/utilities';
import type { Answer, Call, SiteSI } from '../types';
import type { DrumResults, DrumSettings } from './types';

/** A drum whose heat is set has a duty of more than this [W]. */
const HAS_DUTY = rule('drum/has-duty', 'note', 0, 'power', 'balance');
/** One outlet takes less than this share [-]. */
const ONE_PHASE = rule('drum/one-phase', 'note', 0, 'fraction', 'balance');
/** A state that is neither liquid nor vapour: told wherever it is found, by no threshold. */
const DENSE = rule('drum/dense', 'caution', 0, 'fraction', 'own-rule');

/** Thresholds that only a drum has. */
export const DRUM_RULES: readonly Rule[] = [HAS_DUTY, ONE_PHASE];

/**
 * Limits of a drum: inlets that would have to flow uphill, a duty, only one phase or one that is neither liquid nor vapour, the
 * level of utility that its heat needs. None without flow.
 */
export function drumLimits(call: Call<DrumSettings>, answer: Answer<DrumResults>, site: SiteSI): Finding[] {
  const { vapour, liquid } = answer.out;
  const { results, heat_W } = answer;
  const full = [vapour, liquid].find((s) => s !== undefined && s.phases.length > 0);
  if (!full) return [];
  const at = { unit: call.unit };
  const found = joiningPressure(call.unit, call.in, results.P_Pa, call.limits);
  if (Math.abs(heat_W) > thresholdOf(HAS_DUTY, call.limits))
    found.push(finding(HAS_DUTY, at, [saw('duty', heat_W, 'power')], call.limits));
  if (full.phases.some((p) => p.kind === 'dense')) {
    found.push(finding(DENSE, at, [saw('pressure', results.P_Pa, 'pressure')], call.limits));
  } else {
    const least = Math.min(results.vapourFraction, 1 - results.vapourFraction);
    const empty = results.vapourFraction < 0.5 ? 'vapour' : 'liquid';
    if (least <= thresholdOf(ONE_PHASE, call.limits))
      found.push(finding(ONE_PHASE, { ...at, port: empty }, [named('outlet', empty)], call.limits));
  }
  found.push(...utilityLevels(call.unit, heat_W, full, call.model, site, call.limits));
  return found;
}
