import { type Finding, named, saw } from '../../outcome';
import { fuelShareOfLimit } from '../limits/flammable';
import { finding, rule, thresholdOf } from '../limits/rule';
import type { Call } from '../types';
import type { ProductSettings } from './types';

/** Fuel in the gas that goes to atmosphere, as a share of its lower flammability limit [-]. */
export const FLAMMABLE_TO_ATMOSPHERE = rule('product/flammable-to-atmosphere', 'caution', 0.25, 'fraction');

/** Thresholds that only a product has. */
export const PRODUCT_RULES = [FLAMMABLE_TO_ATMOSPHERE];

/** Limits of a product: gas to the atmosphere with fuel near its lower flammability limit. */
export function productLimits(call: Call<ProductSettings>): Finding[] {
  const stream = call.in.in;
  if (call.settings.to !== 'atmosphere' || stream === undefined) return [];
  const { share, chemical } = fuelShareOfLimit(stream, call.model);
  if (chemical === undefined || share < thresholdOf(FLAMMABLE_TO_ATMOSPHERE, call.limits)) return [];
  const seen = [saw('shareOfLimit', share, 'fraction'), named('chemical', chemical)];
  return [finding(FLAMMABLE_TO_ATMOSPHERE, { unit: call.unit, port: 'in' }, seen, call.limits)];
}
