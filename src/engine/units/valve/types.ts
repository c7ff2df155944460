import type { PressureSI } from '../groups';

export interface ValveSettings {
  readonly p: PressureSI;
}

export interface ValveResults {
  readonly drop_Pa: number;
  readonly T_K: number;
  /** Outlet less inlet. */
  readonly dT_K: number;
  readonly vapourFraction: number;
}
