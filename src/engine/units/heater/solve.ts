import { type HeatedResults, type HeatedSettings, solveHeated } from '../heated';
import type { UnitKind } from '../types';
import { heaterLimits } from './limits';

/** Heat goes into the stream. */
export const heater: UnitKind<HeatedSettings, HeatedResults> = { solve: solveHeated, limits: heaterLimits };
