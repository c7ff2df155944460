import type { ThermoModel } from '../thermo/types';

/**
 * A phase's name. 'dense': above the pseudo-critical pressure and 0.9 of the pseudo-critical temperature, where liquid and
 * vapour are words only. 'liquid2' appears with models that solve for two liquids.
 */
export type PhaseKind = 'vapour' | 'liquid' | 'liquid2' | 'dense';

/** One phase of a flash over the present chemicals. */
export interface FlashPhase {
  readonly kind: PhaseKind;
  /** Molar fraction of the whole [-], 0 for an incipient phase. */
  readonly fraction: number;
  /** Mole fractions, length n of the model. */
  readonly x: Float64Array;
  readonly h_J_mol: number;
  readonly s_J_molK: number;
  /** The model's own molar volume [m3/mol] and compressibility. */
  readonly v_m3_mol: number;
  readonly Z: number;
  readonly cp_J_molK: number;
  /** The name follows the naming rule only: there is a single phase and no coexisting one to compare with. */
  readonly byConvention?: true;
}

/** The state that a flash found, over the present chemicals. */
export interface FlashAnswer {
  readonly T_K: number;
  readonly P_Pa: number;
  /** Of the whole, molar. */
  readonly h_J_mol: number;
  readonly s_J_molK: number;
  /** Molar vapour fraction; a dense phase counts as 1 when its volume exceeds the pseudo-critical one, else 0. */
  readonly vapourFraction: number;
  /** In the order vapour, liquid, liquid2; fractions sum to 1. */
  readonly phases: readonly FlashPhase[];
  readonly iterations: number;
  /** Largest |difference of ln fugacity| between phases [-]; 0 for one phase. */
  readonly residual: number;
  /**
   * A stability test of the answer found another liquid: the numbers are for one liquid and say so.
   * Gives the trial liquid's composition.
   */
  readonly hiddenLiquid?: Float64Array;
  /**
   * The liquid among the phases is two liquids taken together: composition, h, s and v are those of both, and its own
   * fugacities mean nothing. Only together with hiddenLiquid.
   */
  readonly liquidsTogether?: true;
}

/** Two conditions that fix the state of a given composition. Molar enthalpy and entropy on the elements' datum. */
export type Condition =
  | { readonly T_K: number; readonly P_Pa: number }
  | { readonly P_Pa: number; readonly h_J_mol: number }
  | { readonly P_Pa: number; readonly s_J_molK: number }
  | { readonly P_Pa: number; readonly vapourFraction: number }
  | { readonly T_K: number; readonly vapourFraction: number }
  | { readonly T_K: number; readonly h_J_mol: number }
  | { readonly T_K: number; readonly s_J_molK: number }
  | { readonly vapourFraction: number; readonly h_J_mol: number }
  | { readonly vapourFraction: number; readonly s_J_molK: number }
  | { readonly h_J_mol: number; readonly s_J_molK: number };

/** Where a search may start. Never changes the answer beyond tolerance. */
export interface FlashWarm {
  readonly T_K?: number;
  readonly P_Pa?: number;
  readonly K?: Float64Array;
  readonly vapourFraction?: number;
}

/** Scratch for flashes of one size; contents undefined before and after. Made by makeFlashWork(model). */
export interface FlashWorkOwner {
  readonly model: ThermoModel;
}

/** One phase of a stream, over the sketch's full list. */
export interface Phase {
  readonly kind: PhaseKind;
  /** mol/s per chemical, full list; zero for an incipient phase. */
  readonly n_mol_s: Float64Array;
  /** Molar fraction of the stream [-]. */
  readonly fraction: number;
  /** Mole fractions, full list (an incipient phase has them too). */
  readonly x: Float64Array;
  readonly h_J_mol: number;
  readonly s_J_molK: number;
  readonly v_m3_mol: number;
  readonly Z: number;
  readonly cp_J_molK: number;
  readonly byConvention?: true;
}

/** A stream inside the engine: amounts, pressure and enthalpy carry the state; temperature and phases go with it. */
export interface StreamState {
  /** mol/s per chemical of the sketch's full list; exact zeros are absent chemicals. */
  readonly n_mol_s: Float64Array;
  readonly P_Pa: number;
  /** Enthalpy flow, elements datum [W]. */
  readonly H_W: number;
  readonly T_K: number;
  /** Entropy flow [W/K]; undefined when a chemical has no standard entropy. */
  readonly S_W_K?: number;
  /** In the order vapour, liquid, liquid2; their amounts add up to n_mol_s. Empty for a stream without flow. */
  readonly phases: readonly Phase[];
  readonly vapourFraction: number;
  /** A stability test found another liquid; full list. */
  readonly hiddenLiquid?: Float64Array;
  /** The liquid among the phases is two liquids told together, as in a flash's answer. Only together with hiddenLiquid. */
  readonly liquidsTogether?: true;
  readonly residual: number;
  readonly iterations: number;
}
