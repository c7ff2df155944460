import { UTILITY_FINDINGS } from '../limits/utilities';

/** Codes a column may emit. */
export const COLUMN_FINDINGS = [
  // What is asked contradicts itself, or the column.
  'column/fixed-too-few',
  'column/fixed-too-many',
  'column/fixed-twice',
  'column/both-products-fixed',
  'column/reflux-three-ways',
  'column/recovery-both',
  'column/draw-flow-given',
  'column/no-such-end',
  'column/no-such-product',
  'column/no-such-stage',
  'column/port-without-stage',
  'column/side-without-stream',
  'column/no-feed',
  'column/both-duties',
  'column/setting-idle',
  'column/efficiency-needs-vapour',
  // What balances alone forbid.
  'column/product-above-feed',
  'column/chemical-absent',
  'column/not-a-share',
  'column/not-positive',
  'column/more-than-fed',
  'column/purities-apart',
  'column/follows-already',
  'column/duty-wrong-way',
  'pressure/not-positive',
  // Why a column that could be has no answer.
  'column/dries',
  'column/one-phase',
  'column/out-of-reach',
  'column/not-found',
  'column/not-settled',
  'column/feed-vapour-above-top',
  'column/feed-in-two-liquids',
  'column/feeds-one-phase',
  // What was found, where more than one answer is possible.
  'column/several-purities',
  'column/several-temperatures',
  'column/another-possible',
  // Limits.
  'pressure/enters-below',
  'column/stage-dries',
  'column/pinch',
  'column/feed-off-stage',
  'column/pressure-falls-downwards',
  'column/vapour-below-dew-point',
  'column/near-critical',
  'column/too-near-critical',
  'column/near-critical-pressure',
  'column/second-liquid',
  ...UTILITY_FINDINGS,
] as const;
export type ColumnCode = (typeof COLUMN_FINDINGS)[number];
