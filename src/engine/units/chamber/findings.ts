import { REACTION_FINDINGS } from '../reaction/findings';

/** Codes a chamber may emit. */
export const CHAMBER_FINDINGS = [
  'pressure/not-positive',
  'pressure/enters-below',
  'feed/air-component-missing',
  'feed/water-data-missing',
  'feed/humidity-above-saturation',
  ...REACTION_FINDINGS,
  'chamber/element-not-burnt',
  'chamber/product-missing',
  'chamber/chlorine-without-hydrogen',
  'chamber/nothing-burns',
  'chamber/air-below-zero',
  'chamber/air-short',
  'chamber/no-oxygen',
  'chamber/oxygen-without-air',
  'chamber/stack-oxygen-out-of-reach',
  'chamber/air-by-component-flows',
  'chamber/air-setting-idle',
  'chamber/cold',
  'chamber/hot',
  'chamber/too-hot-for-lining',
  'chamber/dissociation-neglected',
  'chamber/little-oxygen',
  'chamber/takes-heat',
] as const;
