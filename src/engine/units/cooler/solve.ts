import { type HeatedResults, type HeatedSettings, solveHeated } from '../heated';
import type { UnitKind } from '../types';
import { coolerLimits } from './limits';

/** Heat is taken from the stream; the duty counts into the unit and is negative. */
export const cooler: UnitKind<HeatedSettings, HeatedResults> = { solve: solveHeated, limits: coolerLimits };
