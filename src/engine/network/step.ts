import type { UnitId } from '../ids';
import type { LoopProgress, SolveBatch } from './types';

/** Where a solve stands: the unit it is about to solve, and what changed since something was last collected. */
export interface SolveStep {
  readonly unit: UnitId;
  /** While a loop is on its way. */
  readonly loop?: LoopProgress;
  collect(): SolveBatch;
}
