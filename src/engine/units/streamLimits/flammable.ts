import { type Finding, named, saw } from '../../outcome';
import { fuelShareOfLimit } from '../limits/flammable';
import { finding, type Rule, rule, thresholdOf } from '../limits/rule';
import type { StreamContext } from './context';

/** Fuel as a share of its lower flammability limit, in a gas with at least this much oxygen. */
const FLAMMABLE = rule('stream/flammable-mixture', 'caution', 0.25, 'fraction');
const OXYGEN = 0.05;

/** Thresholds of the limits in this file. */
export const FLAMMABLE_RULES: readonly Rule[] = [FLAMMABLE];

/**
 * Fuel and oxygen together in a gas: enough of both to come near the lower flammability limit. Not looked at: the upper limit,
 * inerts, temperature and pressure.
 */
export function flammable({ stream, model, overrides, at }: StreamContext): Finding[] {
  const { share, oxygen, chemical } = fuelShareOfLimit(stream, model);
  if (oxygen < OXYGEN || chemical === undefined || share < thresholdOf(FLAMMABLE, overrides)) return [];
  const seen = [
    saw('shareOfLimit', share, 'fraction'),
    saw('oxygen', oxygen, 'fraction'),
    named('chemical', chemical),
  ];
  return [finding(FLAMMABLE, at, seen, overrides)];
}
