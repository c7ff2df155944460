import type { ChemicalData } from '../chemicals/types';

/** Gas constant, J/(mol K); exact product of the SI defining constants to the printed digits. */
export const R_J_molK = 8.314462618;
/** Reference temperature of formation enthalpies and standard entropies [K]. */
export const T0_K = 298.15;
/** Reference pressure of standard entropies [Pa]. */
export const P0_Pa = 1e5;

/** Where a parameter comes from: the sketch, the bank's table, group contributions, or nowhere (0 is used). */
export type PairOrigin = 'given' | 'fitted' | 'predicted' | 'none';

/** One binary parameter of a cubic equation, with where it comes from. i < j index the basis' chemicals. */
export interface PairKij {
  readonly i: number;
  readonly j: number;
  readonly kij: number;
  readonly origin: PairOrigin;
  readonly source: string;
  /** What would be used had the sketch not given a value. */
  readonly instead?: Pick<PairKij, 'kij' | 'origin' | 'source'>;
}

/** What a thermodynamic model is built from: plain data, complete, with all pairs resolved. */
export interface ModelSpec {
  readonly kind: 'peng-robinson' | 'raoult';
  /** Form of the temperature function of the attraction (Peng-Robinson). */
  readonly alpha: '1976' | '1978';
  /** Liquid enthalpy of Raoult's law: from the slope of the vapour pressure or the heat-of-vaporisation correlation. */
  readonly liquidH: 'psat-slope' | 'hvap';
  /** 'corrected': liquid density by the liquid-volume method; 'cubic': the equation's own volume. */
  readonly liquidVolume: 'corrected' | 'cubic';
  readonly poynting: boolean;
  /** Every pair i < j of a cubic equation; empty for models without pairs. */
  readonly pairs: readonly PairKij[];
}

/** Which root of an equation of state, or which side of a two-sided model. 'stable': the one of lower Gibbs energy. */
export type Side = 'vapour' | 'liquid' | 'stable';

/** 0: ln phi, Z, v. 1: also h, s. 2: also cp and the derivatives of ln phi. */
export type Level = 0 | 1 | 2;

/**
 * Properties of one phase at (T, P, x), written by ThermoModel.evaluate into arrays the caller owns.
 * n is the model's number of chemicals. Also carries the evaluation's scratch, so that two calls never share any.
 */
export interface PhaseProps {
  /** ln phi_i; fugacity f_i = x_i exp(lnPhi_i) P. Defined for x_i = 0 too. */
  readonly lnPhi: Float64Array;
  /** d ln phi_i / dT at constant P, x [1/K]; level 2. */
  readonly dT: Float64Array;
  /** d ln phi_i / dP at constant T, x [1/Pa]; level 2. */
  readonly dP: Float64Array;
  /** d ln phi_i / dn_j at constant T, P, for one mole in all [1/mol]; row-major [i * n + j]; symmetric; level 2. */
  readonly dN: Float64Array;
  /**
   * Partial molar enthalpies, d(n h)/dn_i at constant T, P, elements datum [J/mol]; level 2. Take these, not -R T^2 dT,
   * where an enthalpy balance is differentiated: a model may have its liquid enthalpy from elsewhere.
   */
  readonly hPartial: Float64Array;
  /** Molar enthalpy, elements at 298.15 K as datum [J/mol]; level 1. */
  h_J_mol: number;
  /** Molar entropy [J/(mol K)]; 0 and meaningless unless the model's hasEntropy; level 1. */
  s_J_molK: number;
  /** The model's own molar volume, not the corrected liquid volume [m3/mol]. */
  v_m3_mol: number;
  /** Molar heat capacity at constant pressure [J/(mol K)]; level 2. */
  cp_J_molK: number;
  /** Molar heat capacity at constant volume [J/(mol K)]; undefined where the phase has no volume that counts; level 2. */
  cv_J_molK?: number | undefined;
  Z: number;
  /**
   * Which side was evaluated in the end. With a single real root: the side that was asked, or for 'stable' by volume against
   * 'pseudo-critical'.
   */
  side: 'vapour' | 'liquid';
  /** True when an equation of state had one real root only (vapour and liquid coincide). */
  single: boolean;
}

/**
 * A thermodynamic model over its own n chemicals (all of them present). Equations of state and activity models look alike.
 * Pure: same input, same output, whatever was evaluated before.
 */
export interface ThermoModel {
  readonly n: number;
  readonly chemicals: readonly ChemicalData[];
  readonly spec: ModelSpec;
  /** All chemicals have a standard entropy. */
  readonly hasEntropy: boolean;
  makeProps(): PhaseProps;
  /**
   * @param T [K] > 0, @param P [Pa] > 0, @param x mole fractions, length n, sum 1 (used as given)
   * Mutates `out` only. Never allocates.
   */
  evaluate(side: Side, T: number, P: number, x: Float64Array, level: Level, out: PhaseProps): void;
  /** Start values: K_i = y_i / x_i by Wilson's relation, or from vapour pressures; length n, > 0. */
  startK(T: number, P: number, K: Float64Array): void;
  /** Molar ideal-gas enthalpy of chemical i, elements datum [J/mol]. */
  hIdeal_J_mol(i: number, T: number): number;
  /** Molar ideal-gas heat capacity of chemical i [J/(mol K)]. */
  cpIdeal_J_molK(i: number, T: number): number;
  /** Vapour pressure of pure i [Pa] as this model has it; undefined above its critical temperature or without data. */
  saturationP_Pa(i: number, T: number): number | undefined;
  /** Molar volume of a liquid for density, volume flow and pump work [m3/mol]; never used in H, S or phi. */
  liquidVolume_m3_mol(T: number, P: number, x: Float64Array): number;
  /** Pseudo-critical temperature [K], pressure [Pa], volume [m3/mol] by mole-fraction averages (volume: the model's own). */
  pseudoCritical(x: Float64Array): { readonly T_K: number; readonly P_Pa: number; readonly v_m3_mol: number };
}

/** The sketch's thermodynamic model over its full list of chemicals; hands out the model of those present. */
export interface Model {
  readonly spec: ModelSpec;
  readonly chemicals: readonly ChemicalData[];
  /** Number of chemicals in the full list. */
  readonly nc: number;
  /** Model over the chemicals whose index is listed (ascending); the same list gives the same object. */
  of(present: readonly number[]): ThermoModel;
}
