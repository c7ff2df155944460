import type { PressureSI } from '../groups';

export interface PumpSettings {
  readonly p: PressureSI | { readonly head: number };
  /** Hydraulic power over shaft power [-]. */
  readonly efficiency: number;
  /** Height of the liquid level above the pump [m]. */
  readonly staticHead?: number;
  /** Shaft power over electric power: motor and drive [-]. */
  readonly drive?: number;
}

export interface PumpResults {
  /** Shaft power, all of it into the fluid [W]; negative when the pressure falls. */
  readonly power_W: number;
  /** Volume flow that enters times the rise of pressure [W]. */
  readonly hydraulicPower_W: number;
  /** Only with a drive efficiency. */
  readonly electric_W?: number;
  readonly head_m: number;
  /** (P - bubble pressure)/(density g) + static head; absent without a bubble point at this temperature or with vapour. */
  readonly npshAvailable_m?: number;
  readonly bubbleP_Pa?: number;
  /** What enters [m3/s]. */
  readonly volume_m3_s: number;
  readonly P_Pa: number;
  readonly T_K: number;
}
