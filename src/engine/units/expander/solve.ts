import { solveMachine } from '../compression/solve';
import type { MachineResults, MachineSettings } from '../compression/types';
import type { UnitKind } from '../types';
import { expanderLimits } from './limits';

/** A gas let down against a load. */
export const expander: UnitKind<MachineSettings, MachineResults> = {
  solve: (call) => solveMachine(call, 'expand'),
  limits: expanderLimits,
};
