import type { PressureSI } from '../groups';
import type { CompositionSI, FlowSI } from '../types';

/** Air drawn from outside: exactly one of excess, stackO2Dry and flow. */
export interface ChamberAir {
  /** Over the theoretical oxygen of all inlets [-]. */
  readonly excess?: number;
  /** Oxygen in the dry flue gas, by volume [-]. */
  readonly stackO2Dry?: number;
  readonly flow?: FlowSI;
  readonly T: number;
  readonly P: number;
  readonly composition: CompositionSI;
}

export interface ChamberSettings {
  /** Without effect while a stream is joined to the air port. */
  readonly air?: ChamberAir;
  readonly p: PressureSI;
  /** Heat into the chamber [W], heat lost as a share of the lower heating value [-], or the temperature of the flue gas [K]. */
  readonly heat: { readonly duty: number } | { readonly lossOfLHV: number } | { readonly T: number };
}

export interface ChamberResults {
  /** Oxygen of all inlets over the theoretical, less 1 [-]; absent when nothing burns. */
  readonly excess?: number;
  readonly T_K: number;
  readonly P_Pa: number;
  readonly theoreticalO2_mol_s: number;
  /** Of all that burns, as ideal gas at 25 degC [W]. */
  readonly LHV_W: number;
  readonly HHV_W: number;
  readonly duty_W: number;
  /** In the flue gas, by volume [-]. */
  readonly O2Dry: number;
  readonly O2Wet: number;
  readonly CO2Dry: number;
  /** All CO2 that leaves. */
  readonly CO2_kg_s: number;
  /** Drawn from outside; absent with a stream at the air port [mol/s]. */
  readonly air_mol_s?: number;
}
