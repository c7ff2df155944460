import { heatedLimits } from '../heated/limits';
import { solveHeated } from '../heated/solve';
import type { HeatedResults, HeatedSettings } from '../heated/types';
import type { UnitKind } from '../types';
import { HEATS } from './limits';

/** Heat is taken from the stream; the duty counts into the unit and is negative. */
export const cooler: UnitKind<HeatedSettings, HeatedResults> = {
  solve: solveHeated,
  limits: (...asked) => heatedLimits(HEATS, 'added', ...asked),
};
