import type { ChemicalData } from '../chemicals/types';
import type { PhaseKind } from '../equilibrium/types';
import type { Port, StreamId, UnitId } from '../ids';
import type { Finding } from '../outcome';
import type { ModelSpec } from '../thermo/types';
import type { SiteSI } from '../units/types';

/** Chemicals and model with every constant and pair inside; posted to the worker only when its id is new. */
export interface Basis {
  readonly id: string;
  readonly chemicals: readonly ChemicalData[];
  readonly model: ModelSpec;
}

/** A setting that refers to a stream: resolved by the network before the unit sees it. */
export interface Read {
  readonly unit: UnitId;
  /** Path of the FlowSI inside the compiled settings, with dots. */
  readonly path: string;
  readonly stream: StreamId;
  readonly of: 'mol' | 'mass';
  readonly chemical?: number;
}

export interface ProblemUnit {
  readonly id: UnitId;
  readonly kind: string;
  /** Compiled settings (SI), or null when a value is missing: the unit is not solved and its state is needs-value. */
  readonly settings: unknown;
  /** A material of construction was chosen, so cold has been thought of. */
  readonly materialNoted?: true;
  readonly in: Readonly<Record<Port, StreamId>>;
  readonly out: Readonly<Record<Port, StreamId>>;
}

/** What the engine gets: SI, self-contained, structured-clonable, no text, no positions. */
export interface Problem {
  readonly edit: number;
  readonly basis: string;
  readonly site: SiteSI;
  readonly units: readonly ProblemUnit[];
  readonly reads: readonly Read[];
  readonly aims: readonly never[];
  /** Thresholds the sketch overrides, by finding code [SI]. */
  readonly limits: Readonly<Record<string, number>>;
}

export type SolveState = 'solved' | 'needs-value' | 'waiting' | 'no-solution';

export interface PhaseResult {
  readonly kind: PhaseKind;
  readonly fraction: number;
  readonly byConvention?: true;
  readonly x: Float64Array;
  readonly h_J_mol: number;
  readonly s_J_molK?: number;
  readonly Z: number;
  readonly MW_g_mol: number;
  /** Liquid: by the liquid-volume method unless the model says 'cubic'. */
  readonly density_kg_m3: number;
  readonly cp_J_molK: number;
  readonly cpOverCv?: number;
  readonly viscosity_Pa_s?: number;
  /** Name of the mixture rule behind the viscosity, a key of wording/. */
  readonly viscosityRule?: string;
}

export type StreamResult =
  | { readonly state: 'waiting' | 'no-solution' }
  | {
      readonly state: 'solved';
      readonly T_K: number;
      readonly P_Pa: number;
      readonly n_mol_s: number;
      readonly m_kg_s: number;
      readonly MW_g_mol: number;
      readonly H_W: number;
      /** Same components as ideal gas at 298.15 K as datum [W]. */
      readonly HfromIdeal_W: number;
      readonly S_W_K?: number;
      readonly h_J_mol: number;
      readonly s_J_molK?: number;
      readonly vapourFraction: number;
      readonly vapourMassFraction: number;
      readonly z: Float64Array;
      /** Total actual volume flow [m3/s]. */
      readonly volume_m3_s: number;
      /** As liquid at 15 degC by ideal mixing of pure liquids [m3/s]; absent when a chemical has no liquid there. */
      readonly standardLiquid_m3_s?: number;
      /** Where that is absent: the chemicals, by place in the basis, that have no liquid density there and are no mere trace. */
      readonly noStandardLiquid?: readonly number[];
      readonly phases: readonly PhaseResult[];
      readonly hiddenLiquid?: Float64Array;
      /** The liquid is two liquids told together: enthalpy and entropy of both, composition of the whole. */
      readonly liquidsTogether?: true;
    };

/** How a loop was solved; the same for all of its units. */
export interface LoopResult {
  readonly passes: number;
  /** Largest relative difference between what a tear was assumed to be and what came back [-]. */
  readonly residual: number;
  /** Streams at which the loop was opened; a read stream's when it closes by a setting alone. */
  readonly tear: readonly StreamId[];
}

/** Where a loop stands while it is solved. */
export interface LoopProgress {
  readonly units: readonly UnitId[];
  /** The tear that was farthest off in the pass before, else the first. */
  readonly stream: StreamId;
  /** From 1. */
  readonly pass: number;
  /** As in LoopResult, of the pass before. */
  readonly residual?: number;
}

export interface UnitResult {
  readonly kind: string;
  readonly state: SolveState;
  /** Present when solved. */
  readonly heat_W?: number;
  readonly power_W?: number;
  readonly iterations?: number;
  readonly residual?: number;
  /** Of a unit that was solved in a loop. */
  readonly loop?: LoopResult;
  readonly made_mol_s?: Float64Array;
  readonly drawn?: Readonly<Record<Port, StreamResult>>;
  readonly results?: Readonly<Record<string, unknown>>;
  /** Why it is not solved, first cause first. */
  readonly reasons?: readonly Finding[];
}

export interface ClosureEntry {
  readonly in: number;
  readonly out: number;
  readonly made: number;
  /** |in + made - out| relative as the definitions say; energy: see closure.ts. */
  readonly relative: number;
}
export interface UnitClosure {
  readonly mass: ClosureEntry;
  readonly energy: ClosureEntry;
  /** By index of the full list. */
  readonly chemicals: readonly ClosureEntry[];
  readonly elements: Readonly<Record<string, ClosureEntry>>;
}
/** Overall (feeds in, products and hanging ends out) and per unit. Absent parts could not be computed: something is not solved. */
export interface Closure extends UnitClosure {
  /** True when every unit is solved, so that overall figures are complete. */
  readonly complete: boolean;
  readonly byUnit: Readonly<Record<string, UnitClosure>>;
}

export type Gone = { readonly unit: UnitId } | { readonly stream: StreamId };

/** One batch of what changed since the last batch. */
export interface SolveBatch {
  readonly streams: readonly (readonly [StreamId, StreamResult])[];
  readonly units: readonly (readonly [UnitId, UnitResult])[];
  /** What has no results any more. A unit and a stream may have the same id: which of them is meant is said. */
  readonly gone: readonly Gone[];
  /** On the last batch. */
  readonly closure?: Closure;
  /** All of this edit on the last batch; empty before. Reasons of unsolved units stand in their UnitResult as well. */
  readonly findings: readonly Finding[];
}
