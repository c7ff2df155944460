import type { ThermoModel } from '../thermo/types';

/**
 * A column as the engine solves it. Places are counted from the top, from 0: the condenser if there is one, the stages,
 * the reboiler if there is one. All vectors of chemicals are over the model's own list (those present in the feeds).
 */
export interface ColumnTask {
  readonly model: ThermoModel;
  /** How the distillate leaves; 'none': no condenser. */
  readonly top: 'liquid' | 'vapour' | 'none';
  readonly reboiler: boolean;
  /** Pressure by place [Pa]; its length is the number of places. */
  readonly P_Pa: Float64Array;
  /** Several may share a place; the whole feed, both phases, mixes there. */
  readonly feeds: readonly ColumnFeed[];
  /** Side draws with the flow that each takes. */
  readonly draws: readonly ColumnDraw[];
  /** Murphree efficiency of the vapour by place, 1 for an equilibrium stage [-]. */
  readonly efficiency: Float64Array;
  /** How far a liquid distillate and its reflux are cooled below their bubble point [K]. */
  readonly subcooling_K: number;
  /** As many as are free; see freeCount. */
  readonly fixed: readonly Fixing[];
}

/** A feed: its place, mol/s over the model's chemicals, and its enthalpy flow [W] with all it brings, both phases together. */
export interface ColumnFeed {
  readonly place: number;
  readonly n_mol_s: Float64Array;
  readonly H_W: number;
  readonly T_K: number;
  /** Vapour fraction as it arrives [-]; a start value, and what is balanced before solving. */
  readonly vapourFraction: number;
  /** Composition of all vapour fed at its place, used below the lowest stage of a column without a reboiler. */
  readonly y?: Float64Array;
}

/** A side draw: the place and the phase it is drawn from. */
export interface ColumnDraw {
  readonly place: number;
  readonly phase: 'liquid' | 'vapour';
  readonly flow: AmountOf;
}

/** A total flow, molar [mol/s] or by mass [kg/s]. */
export interface AmountOf {
  readonly value: number;
  readonly basis: 'mole' | 'mass';
}

/** 'top': the distillate, or the top vapour where there is no condenser; a number: that side draw. */
export type ColumnProduct = 'top' | 'bottoms' | number;

/**
 * One quantity that is fixed. Reflux ratio: reflux by distillate, boilup: vapour by bottoms, both molar [-]; temperature [K];
 * duty [W], into the column positive; `chemical` is a place in the model's list.
 */
export type Fixing =
  | { readonly fix: 'refluxRatio'; readonly value: number }
  | { readonly fix: 'boilup'; readonly value: number }
  | { readonly fix: 'flow'; readonly product: ColumnProduct; readonly flow: AmountOf }
  | { readonly fix: 'reflux'; readonly flow: AmountOf }
  | {
      readonly fix: 'purity';
      readonly product: ColumnProduct;
      readonly chemical: number;
      readonly value: number;
      readonly basis: 'mole' | 'mass';
    }
  | {
      readonly fix: 'recovery';
      readonly product: ColumnProduct;
      readonly chemical: number;
      readonly value: number;
    }
  | { readonly fix: 'temperature'; readonly place: number; readonly value: number }
  | { readonly fix: 'duty'; readonly at: 'condenser' | 'reboiler'; readonly value: number };

/** Everything that is unknown of a column. Flows by place and chemical, place * n + chemical [mol/s]. */
export interface ColumnState {
  readonly l: Float64Array;
  readonly v: Float64Array;
  readonly T_K: Float64Array;
  /** What moves the ends and the draws; see Mover. */
  readonly p: Float64Array;
}

/** How a search went, told also when it failed. */
export interface Effort {
  iterations: number;
  /** Largest scaled residual at the end. */
  residual: number;
  /** Ways of starting that were tried. */
  readonly tried: Attempt[];
}

export type Attempt =
  | 'warm'
  | 'plain-start'
  | 'more-sweeps'
  /** Absorbers: start K-values alone. */
  | 'no-model-sweeps'
  /** Absorbers: all stages alike, fed with what is in equilibrium, then moved to the feeds that are. */
  | 'like-stages'
  /** Constant molar overflow, then the model's enthalpies by and by. */
  | 'heats'
  | 'plain-then-move'
  | 'scan'
  /** Another reflux ratio than the one given, then moved to it. */
  | 'other-ratio';
