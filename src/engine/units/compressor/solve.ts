import { solveMachine } from '../compression/solve';
import type { MachineResults, MachineSettings } from '../compression/types';
import type { UnitKind } from '../types';
import { compressorLimits } from './limits';

/** A gas brought to a higher pressure. */
export const compressor: UnitKind<MachineSettings, MachineResults> = {
  solve: (call) => solveMachine(call, 'compress'),
  limits: compressorLimits,
};
