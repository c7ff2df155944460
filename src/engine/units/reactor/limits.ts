import type { Finding } from '../../outcome';
import { joiningPressure } from '../limits/joiningPressure';
import { utilityLevels } from '../limits/utilities';
import type { Answer, Call, SiteSI } from '../types';
import type { ReactorResults, ReactorSettings } from './types';

/**
 * Limits of a reactor: inlets that would have to flow uphill, and the level of utility that its heat needs. None without flow.
 */
export function reactorLimits(
  call: Call<ReactorSettings>,
  answer: Answer<ReactorResults>,
  site: SiteSI,
): Finding[] {
  const out = answer.out.out;
  if (!out || out.phases.length === 0) return [];
  return [
    ...joiningPressure(call.unit, call.in, answer.results.P_Pa, call.limits),
    ...utilityLevels(call.unit, answer.heat_W, out, call.model, site, call.limits, true),
  ];
}
