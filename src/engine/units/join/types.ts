import type { PressureSI } from '../groups';

export interface JoinSettings {
  readonly p: PressureSI;
}

export interface JoinResults {
  readonly T_K: number;
  readonly P_Pa: number;
}
