import { heatedLimits } from '../heated/limits';
import { solveHeated } from '../heated/solve';
import type { HeatedResults, HeatedSettings } from '../heated/types';
import type { UnitKind } from '../types';
import { COOLS } from './limits';

/** Heat goes into the stream. */
export const heater: UnitKind<HeatedSettings, HeatedResults> = {
  solve: solveHeated,
  limits: (...asked) => heatedLimits(COOLS, 'removed', ...asked),
};
