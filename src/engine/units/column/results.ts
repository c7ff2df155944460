import type { StageSystem } from '../../column/system';
import type { Port } from '../../ids';
import type { Call } from '../types';
import type { ColumnSettings, PlaceSI } from './settings';
import { type ColumnJob, nameOfPlace } from './task';

/** Fractions by chemical id, one value a stage. */
export type Profile = Readonly<Record<string, Float64Array>>;

export interface EndResults {
  readonly duty_W: number;
  readonly T_K: number;
  readonly P_Pa: number;
  /** Fractions of its liquid and vapour (of a total condenser: its bubble-point vapour). */
  readonly x: Readonly<Record<string, number>>;
  readonly y: Readonly<Record<string, number>>;
  readonly hL_J_mol: number;
  readonly hV_J_mol: number;
  /** As on the stages; of a total condenser at its bubble point [-]. */
  readonly densityRatio: number;
}

export interface ColumnResults {
  /** Liquid returned to stage 1 by all distillate, molar [-]; absent without a condenser. */
  readonly refluxRatio?: number;
  /** Vapour from the reboiler by bottoms, molar [-]; absent without a reboiler. */
  readonly boilup?: number;
  /** Heat into both ends together [W]. */
  readonly duty_W: number;
  readonly condenserDuty_W?: number;
  readonly reboilerDuty_W?: number;
  readonly topT_K: number;
  readonly bottomT_K: number;
  /** Stages 1..N; L and V leave the stage, draws not included. */
  readonly stages: {
    readonly T_K: Float64Array;
    readonly P_Pa: Float64Array;
    readonly L_mol_s: Float64Array;
    readonly V_mol_s: Float64Array;
    readonly x: Profile;
    readonly y: Profile;
    readonly hL_J_mol: Float64Array;
    readonly hV_J_mol: Float64Array;
    /** Mass density of the liquid by that of the vapour, by the model's own volumes [-]. */
    readonly densityRatio: Float64Array;
    readonly feed: readonly { readonly stage: PlaceSI; readonly port: Port }[];
    readonly draw: readonly {
      readonly stage: PlaceSI;
      readonly phase: 'liquid' | 'vapour';
      readonly port: Port;
      readonly n_mol_s: number;
    }[];
  };
  readonly condenser?: EndResults & {
    readonly distillate: 'liquid' | 'vapour';
    readonly reflux_mol_s: number;
    readonly distillate_mol_s: number;
    /** How far below its bubble point the reflux is [K]. */
    readonly subcooling_K: number;
  };
  readonly reboiler?: EndResults & { readonly boilup_mol_s: number; readonly bottoms_mol_s: number };
}

/**
 * Results of a solved column from the engine's state; chemicals that are not present stand with 0.
 *
 * @param duties  heat into the ends as the caller has closed them [W]; absent for an end that is not there
 */
export function resultsOf(
  call: Call<ColumnSettings>,
  job: ColumnJob,
  s: StageSystem,
  duties: { readonly condenser?: number; readonly reboiler?: number },
): ColumnResults {
  const { settings } = call;
  const foot = s.places - 1;
  const distillate_mol_s = s.totalCondenser ? s.L[0]! * s.p[0]! : s.V[0]!;
  const { condenser, reboiler } = duties;
  const end = endOf(call, job, s);
  return {
    ...(s.first === 1 ? { refluxRatio: s.L[0]! / distillate_mol_s } : {}),
    ...(settings.bottom.reboiler ? { boilup: s.V[foot]! / s.L[foot]! } : {}),
    duty_W: (condenser ?? 0) + (reboiler ?? 0),
    ...(condenser === undefined ? {} : { condenserDuty_W: condenser }),
    ...(reboiler === undefined ? {} : { reboilerDuty_W: reboiler }),
    topT_K: s.T[s.first]!,
    bottomT_K: s.T[s.last]!,
    stages: stagesOf(call, job, s),
    ...(condenser === undefined || settings.top.distillate === 'none'
      ? {}
      : {
          condenser: {
            ...end(0, condenser, s.T[0]! - s.task.subcooling_K),
            distillate: settings.top.distillate,
            reflux_mol_s: s.L[0]!,
            distillate_mol_s,
            subcooling_K: s.task.subcooling_K,
          },
        }),
    ...(reboiler === undefined
      ? {}
      : {
          reboiler: {
            ...end(foot, reboiler, s.T[foot]!),
            boilup_mol_s: s.V[foot]!,
            bottoms_mol_s: s.L[foot]!,
          },
        }),
  };
}

/** Profiles over the stages, the ends left out. */
function stagesOf(
  { settings, model }: Call<ColumnSettings>,
  job: ColumnJob,
  s: StageSystem,
): ColumnResults['stages'] {
  const { stages } = settings;
  const firstDraw = s.movers.length - s.task.draws.length;
  const vector = (of: (j: number) => number): Float64Array => {
    const out = new Float64Array(stages);
    for (let k = 0; k < stages; k++) out[k] = of(s.first + k);
    return out;
  };
  const profile = (flows: Float64Array, sums: Float64Array): Profile => {
    const nothing = new Float64Array(stages);
    const out: Record<string, Float64Array> = {};
    for (const c of model.chemicals) out[c.id] = nothing;
    job.present.forEach((full, i) => {
      out[model.chemicals[full]!.id] = vector((j) => flows[j * s.n + i]! / sums[j]!);
    });
    return out;
  };
  return {
    T_K: vector((j) => s.T[j]!),
    P_Pa: vector((j) => s.task.P_Pa[j]!),
    L_mol_s: vector((j) => s.L[j]!),
    V_mol_s: vector((j) => s.V[j]!),
    x: profile(s.l, s.L),
    y: profile(s.v, s.V),
    hL_J_mol: vector((j) => s.liq[j]!.h_J_mol),
    hV_J_mol: vector((j) => s.vap[j]!.h_J_mol),
    densityRatio: vector((j) => densityRatio(s, j)),
    feed: job.feedPorts.map((port, k) => ({ stage: nameOfPlace(settings, s.task.feeds[k]!.place), port })),
    draw: s.task.draws.map((d, k) => ({
      stage: nameOfPlace(settings, d.place),
      phase: d.phase,
      port: job.drawPorts[k]!,
      n_mol_s: s.p[firstDraw + k]! * (d.phase === 'liquid' ? s.L : s.V)[d.place]!,
    })),
  };
}

/** What is told of an end, by its place, its heat [W] and the temperature at which its liquid leaves [K]. */
function endOf({ model }: Call<ColumnSettings>, job: ColumnJob, s: StageSystem) {
  const fractions = (flows: Float64Array, sums: Float64Array, j: number): Record<string, number> => {
    const out: Record<string, number> = {};
    for (const c of model.chemicals) out[c.id] = 0;
    job.present.forEach((full, i) => {
      out[model.chemicals[full]!.id] = flows[j * s.n + i]! / sums[j]!;
    });
    return out;
  };
  return (j: number, duty_W: number, T_K: number): EndResults => ({
    duty_W,
    T_K,
    P_Pa: s.task.P_Pa[j]!,
    x: fractions(s.l, s.L, j),
    y: fractions(s.v, s.V, j),
    hL_J_mol: s.leaving(j).h_J_mol,
    hV_J_mol: s.vap[j]!.h_J_mol,
    densityRatio: densityRatio(s, j),
  });
}

/** Mass density of a place's liquid by that of its vapour, by the model's own volumes [-]. */
function densityRatio(s: StageSystem, j: number): number {
  let liquid = 0;
  let vapour = 0;
  for (let i = 0; i < s.n; i++) {
    const MW = s.model.chemicals[i]!.MW_g_mol;
    liquid += (MW * s.l[j * s.n + i]!) / s.L[j]!;
    vapour += (MW * s.v[j * s.n + i]!) / s.V[j]!;
  }
  return (liquid / s.liq[j]!.v_m3_mol) * (s.vap[j]!.v_m3_mol / vapour);
}
