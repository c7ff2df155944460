import type { Finding } from '../../outcome';
import type { Rule } from '../limits/rule';
import { CONDITION_RULES, coldSteel, hydrates, nearCritical, secondLiquid, vacuum } from './conditions';
import type { StreamContext } from './context';
import { CORRELATION_RULES, correlationRange } from './correlationRange';
import { FLAMMABLE_RULES, flammable } from './flammable';
import { FREE_WATER_RULES, freeWater } from './freeWater';
import { FREEZING_RULES, freezing } from './freezing';

/** Codes any stream may carry, whatever unit it leaves. */
export const STREAM_FINDINGS = [
  'stream/second-liquid',
  'stream/liquids-together',
  'stream/water-above-solubility',
  'stream/may-freeze',
  'stream/freezes-mostly',
  'stream/ice',
  'stream/dry-ice',
  'stream/cold-steel',
  'stream/too-cold-for-steel',
  'stream/vacuum',
  'stream/hydrates-not-checked',
  'stream/near-critical',
  'stream/too-near-critical',
  'stream/flammable-mixture',
  'stream/outside-correlation',
  'stream/well-outside-correlation',
  'stream/far-outside-correlation',
] as const;

/** Thresholds of all limits of streams. */
export const STREAM_RULES: readonly Rule[] = [
  ...CONDITION_RULES,
  ...CORRELATION_RULES,
  ...FLAMMABLE_RULES,
  ...FREEZING_RULES,
  ...FREE_WATER_RULES,
];

const CHECKS = [
  secondLiquid,
  freeWater,
  freezing,
  coldSteel,
  vacuum,
  hydrates,
  nearCritical,
  flammable,
  correlationRange,
] as const;

/** Every limit of one solved stream; a stream without flow has none. */
export const streamLimits = (context: StreamContext): Finding[] =>
  context.stream.phases.length === 0 ? [] : CHECKS.flatMap((check) => check(context));
