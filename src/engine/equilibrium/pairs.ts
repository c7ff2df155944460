import type { Condition, FlashWarm } from './types';
import type { FlashWork } from './work';

/** Pairs without a pressure, or with neither temperature nor pressure. */
export function flashPair(
  w: FlashWork,
  _z: Float64Array,
  _at: Condition,
  _warm: FlashWarm | undefined,
): 'solved' | 'no-convergence' | 'no-such-state' {
  w.phases = 1;
  return 'no-convergence';
}
