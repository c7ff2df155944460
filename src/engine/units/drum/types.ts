import type { HeatSI, PressureSI } from '../groups';

export interface DrumSettings {
  /** Absent when temperature and vapour fraction are both given: the pressure is then a result. */
  readonly p?: PressureSI;
  /** Absent: adiabatic. */
  readonly h?: HeatSI;
}

export interface DrumResults {
  readonly T_K: number;
  readonly P_Pa: number;
  readonly vapourFraction: number;
  /** Heat into the drum [W]; absent when it is adiabatic. */
  readonly duty_W?: number;
}
