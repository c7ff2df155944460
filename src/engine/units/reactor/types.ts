import type { HeatSI, PressureSI } from '../groups';
import type { Reaction } from './react';

export interface ReactorSettings {
  readonly reactions: readonly Reaction[];
  /** Absent when temperature and vapour fraction are both given: the pressure is then a result. */
  readonly p?: PressureSI;
  /** Absent: adiabatic. */
  readonly h?: HeatSI;
}

export interface ReactorResults {
  readonly T_K: number;
  readonly P_Pa: number;
  readonly vapourFraction: number;
  /** Heat into the reactor [W]; absent when it is adiabatic. */
  readonly duty_W?: number;
  /** Taken up by the reactions at 25 degC as ideal gases [W]; negative when heat is set free. */
  readonly heatOfReaction_W: number;
  /** Turns of each reaction [mol/s]. */
  readonly extents_mol_s: readonly number[];
}
