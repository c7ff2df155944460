import type { OutletConditionSI, PressureSI } from '../groups';

/** What heaters and coolers share. */
export interface HeatedSettings extends OutletConditionSI {
  /** Absent when temperature and vapour fraction are both given: the pressure is then a result. */
  readonly p?: PressureSI;
}

export interface HeatedResults {
  /** Heat into the unit [W]; negative when removed. */
  readonly duty_W: number;
  readonly T_K: number;
  readonly P_Pa: number;
  readonly vapourFraction: number;
}
