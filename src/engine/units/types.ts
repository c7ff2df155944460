import type { Dimension } from '../../quantity/dimension';
import type { StreamState } from '../equilibrium/types';
import type { Port, StreamId, UnitId } from '../ids';
import type { Finding, Outcome } from '../outcome';
import type { Model } from '../thermo/types';

/**
 * Settings are data: one description drives the drawer, the compile step, the JSON Schema, --set, the assumption register and
 * the law tests. Labels live in wording/; a key without a label is shown as its own words.
 */
interface SettingCommon {
  /** May be absent without an assumption (absence has a meaning of its own, e.g. adiabatic). */
  readonly optional?: true;
  /**
   * Used when absent, and listed as an assumption: its compiled value, the text as a user would type it, the reason as a plain
   * sentence. For a group the value has one key, e.g. { drop: 0 }: the assumption's path then ends in that key ('p.drop').
   */
  readonly otherwise?: { readonly value: unknown; readonly text: string; readonly why: string };
  /**
   * Used when absent: what a setting beside it has, listed as an assumption; not filled in while the setting at a path from
   * the top has a stated value.
   */
  readonly sameAs?: {
    readonly key: string;
    readonly why: string;
    readonly unless?: { readonly path: string; readonly is: string | boolean };
  };
}
export type SettingSpec = SettingCommon &
  (
    | { readonly is: 'quantity'; readonly dim: Dimension; readonly min?: number; readonly max?: number }
    /** `share`: a bare fraction ("8 %") is allowed too and means that mole share of what enters the unit. */
    | { readonly is: 'flow'; readonly share?: true }
    | { readonly is: 'composition' }
    | { readonly is: 'chemical' }
    | { readonly is: 'product' }
    | { readonly is: 'whole'; readonly min: number; readonly max?: number }
    | { readonly is: 'option'; readonly values: readonly string[] }
    | {
        readonly is: 'record';
        readonly fields: Readonly<Record<string, SettingSpec>>;
        /** Fields of which a stated number is given. */
        readonly choose?: readonly Choice[];
      }
    | { readonly is: 'list'; readonly of: SettingSpec; readonly min: number; readonly max?: number }
    /** Exactly `count` of these (a range for settings that allow one or two). */
    | {
        readonly is: 'some';
        readonly count: 1 | 2 | readonly [1, 2];
        readonly of: Readonly<Record<string, SettingSpec>>;
        /** Allowed pairs when not every pair of keys makes sense. */
        readonly pairs?: readonly (readonly [string, string])[];
      }
    | { readonly is: 'yesNo' }
    | { readonly is: 'map'; readonly keys: 'port' | 'chemical'; readonly of: SettingSpec }
    | { readonly is: 'cases'; readonly by: string; readonly cases: Readonly<Record<string, SettingSpec>> }
    | { readonly is: 'stage'; readonly ends: boolean }
  );

/** Compiled forms of the settings that are not a plain SI number. */
export type FlowSI =
  | { readonly is: 'molar'; readonly n_mol_s: number }
  | { readonly is: 'mass'; readonly m_kg_s: number }
  /** A share of all feeds of the unit, resolved by the unit itself. Shares of a stream are resolved by the network first. */
  | {
      readonly is: 'share';
      readonly share: number;
      readonly of: 'feed' | { readonly stream: StreamId };
      readonly basis: 'mole' | 'mass';
      readonly chemical?: number;
    };
export type CompositionSI =
  /** Fractions over the full list, sum 1 after compile's normalisation. */
  | { readonly is: 'parts'; readonly basis: 'mole' | 'mass'; readonly parts: Float64Array }
  /** Component flows over the full list [mol/s]; then there is no `flow`. */
  | { readonly is: 'flows'; readonly n_mol_s: Float64Array }
  | {
      readonly is: 'preset';
      readonly preset: 'dry air' | '79/21' | 'humid air';
      /** 0..1, humid air. */
      readonly relativeHumidity: number;
      /** Indices in the full list. */
      readonly at: {
        readonly N2: number;
        readonly O2: number;
        readonly Ar: number;
        readonly CO2: number;
        readonly H2O: number;
      };
    };

/** One port of a kind. Numbered ports ('in1', 'in2', ...) are names: gaps allowed, never renumbered. */
export interface PortSpec {
  /** Full name, or the stem of a numbered port ('in'). */
  readonly name: Port;
  readonly dir: 'in' | 'out';
  readonly numbered?: { readonly min: number; readonly max: number };
  /** May stay without a stream (a numbered inlet beyond the first, an air port). */
  readonly optional?: true;
  /** There only while the setting at this path has one of these values. */
  readonly when?: { readonly path: string; readonly is: readonly string[] };
}

/**
 * Exactly `count` of these top-level settings must be given, or exactly one of the pairs. All keys are `optional` by themselves.
 */
export interface Choice {
  readonly keys: readonly string[];
  readonly count: 1;
  readonly pairs?: readonly (readonly [string, string])[];
}

/** When every one of these paths is given, the key has no meaning: refused if given, not asked for, no default filled in. */
export interface Moot {
  readonly when: readonly string[];
  readonly key: string;
}

/** How a result of the kind is shown: key in Answer.results -> what it measures. */
export interface ResultSpec {
  readonly dim: Dimension;
  /** Leave out of the drawer's list and the printed tables (vectors, internals). */
  readonly hidden?: true;
  /** A fraction that the trade speaks of in per cent: excess air of 1.2 would read as 20 %. */
  readonly percent?: true;
}

/** What a kind is, without solving anything: safe for the page. */
export interface KindCatalogue {
  readonly kind: string;
  /** Shelf group. */
  readonly group: 'boundary' | 'lines' | 'rotating' | 'heat' | 'vessels' | 'separation';
  /** Tag letters by common practice ('V', 'E', 'PV'), or an identifier stem drawn nowhere ('FEED', 'J'). */
  readonly tag: { readonly letters: string; readonly drawn: boolean };
  readonly ports: readonly PortSpec[];
  readonly settings: Readonly<Record<string, SettingSpec>>;
  /** Settings of which a stated number is given. */
  readonly choose?: readonly Choice[];
  /** Settings that lose their meaning beside others. */
  readonly moot?: readonly Moot[];
  /**
   * What is still missing in settings that are complete by their descriptions, e.g. how many of a list are needed; paths are
   * inside the settings. With any of these the unit needs a value.
   */
  readonly missing?: (settings: unknown, ports: readonly Port[]) => readonly Omit<Finding, 'weight'>[];
  /** Chemicals that the kind needs beside those of the sketch: what complete combustion takes and makes. */
  readonly brings?: 'combustion';
  readonly results: Readonly<Record<string, ResultSpec>>;
  /** Codes this kind may emit. */
  readonly findings: readonly string[];
  /** Settings a freshly dropped unit starts with (as the user would type them). */
  readonly fresh?: Readonly<Record<string, unknown>>;
}

/** Scratch of the worker that lives from solve to solve (flash work by chemicals present); never part of an answer. */
export interface Work {
  readonly flash: Map<string, unknown>;
  /** Called now and then while one unit takes long, for whoever wants to know that it still runs; the engine has no clock. */
  alive?: () => void;
}

export interface SiteSI {
  readonly pressure_Pa: number;
  readonly ambient_K: number;
  readonly coolingWater_K: number;
}

export interface Call<S> {
  readonly unit: UnitId;
  readonly in: Readonly<Record<Port, StreamState>>;
  /** Outlet ports that have a stream (numbered outlets of a divide). */
  readonly outPorts: readonly Port[];
  readonly settings: S;
  readonly model: Model;
  readonly site: SiteSI;
  /** Thresholds the sketch overrides, by finding code [SI]. */
  readonly limits?: Readonly<Record<string, number>>;
  readonly warm?: unknown;
  readonly work: Work;
}

export interface Answer<R = Record<string, unknown>> {
  readonly out: Readonly<Record<Port, StreamState>>;
  /** Heat and shaft power into the unit [W]: the totals that closure uses. */
  readonly heat_W: number;
  readonly power_W: number;
  /** Made by reaction, full list; negative for consumed. */
  readonly made_mol_s?: Float64Array;
  /** Streams drawn from outside without a stream on the sheet (a chamber's air), by port. */
  readonly drawn?: Readonly<Record<Port, StreamState>>;
  readonly results: R;
  readonly effort: { readonly iterations: number; readonly residual: number };
  /** Never leaves the worker. */
  readonly warm: unknown;
}

export interface UnitKind<S = never, R = unknown> {
  solve(call: Call<S>): Outcome<Answer<R>>;
  /** Runs after solving, on solved units only. */
  limits(call: Call<S>, answer: Answer<R>, site: SiteSI): readonly Finding[];
}
