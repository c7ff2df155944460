import { makeStream, type StreamCondition } from '../equilibrium/stream';
import type { FlashWarm, StreamState } from '../equilibrium/types';
import { type Finding, noSolution, type Outcome, saw, solved } from '../outcome';
import type { PressureSI } from './groups';
import { placesOf } from './present';
import { totalOf } from './total';
import type { Call } from './types';

export { totalOf } from './total';

/** A stream through which nothing flows: no phases, no enthalpy; temperature and pressure say where it would start. */
export const emptyStream = (nc: number, T_K: number, P_Pa: number): StreamState => ({
  n_mol_s: new Float64Array(nc),
  P_Pa,
  T_K,
  H_W: 0,
  S_W_K: 0,
  phases: [],
  vapourFraction: 0,
  residual: 0,
  iterations: 0,
});

/**
 * The same material in the same state, `share` times as much of it [-]; without flow for a share of 0, the very same stream for
 * 1.
 */
export function scaledStream(stream: StreamState, share: number): StreamState {
  if (share === 1) return stream;
  if (share === 0 || stream.phases.length === 0)
    return emptyStream(stream.n_mol_s.length, stream.T_K, stream.P_Pa);
  return {
    ...stream,
    n_mol_s: stream.n_mol_s.map((n) => n * share),
    H_W: stream.H_W * share,
    ...(stream.S_W_K === undefined ? {} : { S_W_K: stream.S_W_K * share }),
    phases: stream.phases.map((p) => ({ ...p, n_mol_s: p.n_mol_s.map((n) => n * share) })),
  };
}

/** What several inlets bring together, before anything is decided about the outlet. */
export interface Mixed {
  readonly n_mol_s: Float64Array;
  readonly total_mol_s: number;
  readonly H_W: number;
  /** Lowest pressure of the inlets that flow, or of all when none does [Pa]. */
  readonly P_Pa: number;
  /** Mean by flow, a start value [K]. */
  readonly T_K: number;
}

/**
 * Adds inlets up. The order of their ports does not change the sum: they are added by port name. Without any inlet the pressure
 * comes out infinite and the temperature not a number: the network asks no unit that lacks one.
 *
 * @param nc  length of the full list
 */
export function mixed(inlets: Call<unknown>['in'], nc: number): Mixed {
  const n_mol_s = new Float64Array(nc);
  const all = Object.keys(inlets)
    .sort()
    .map((port) => inlets[port]!);
  const flowing = all.filter((s) => s.phases.length > 0);
  let H_W = 0;
  let weighted = 0;
  for (const s of flowing) {
    for (let i = 0; i < nc; i++) n_mol_s[i]! += s.n_mol_s[i]!;
    H_W += s.H_W;
    weighted += totalOf(s.n_mol_s) * s.T_K;
  }
  const total_mol_s = totalOf(n_mol_s);
  const those = flowing.length > 0 ? flowing : all;
  return {
    n_mol_s,
    total_mol_s,
    H_W,
    P_Pa: Math.min(...those.map((s) => s.P_Pa)),
    T_K: total_mol_s > 0 ? weighted / total_mol_s : (all[0]?.T_K ?? Number.NaN),
  };
}

/**
 * Outlet pressure [Pa] from what is set: itself, a drop from the inlet's [Pa], or a ratio to it [-].
 *
 * @returns  pressure/not-positive, at the setting, where nothing above zero is left
 */
export function outletPressure(
  call: Pick<Call<unknown>, 'unit'>,
  p: PressureSI,
  inlet_Pa: number,
): Outcome<number> {
  const P_Pa = 'P' in p ? p.P : 'drop' in p ? inlet_Pa - p.drop : inlet_Pa * p.ratio;
  const path = `p.${Object.keys(p)[0] ?? ''}`;
  return P_Pa > 0
    ? solved(P_Pa)
    : noSolution({
        code: 'pressure/not-positive',
        weight: 'beyond-limit',
        at: { unit: call.unit, path },
        evidence: [saw('pressure', P_Pa, 'pressure'), saw('inletPressure', inlet_Pa, 'pressure')],
      });
}

/** The finding with the unit's name, where a lower room made it without knowing the unit. */
export const atUnit = (call: Pick<Call<unknown>, 'unit'>, f: Finding): Finding =>
  f.at.unit === undefined ? { ...f, at: { unit: call.unit, ...f.at } } : f;

/**
 * Flash of `n_mol_s` (full list, none below zero) at two conditions, or at a pressure and an enthalpy flow, which the stream
 * then carries exactly. Findings name the unit. A hidden second liquid is told once, by the limits of the stream that carries
 * it.
 *
 * @returns  no solution with the flash's own codes (equilibrium/...) where no state meets the conditions
 */
export function streamAt(
  call: Pick<Call<unknown>, 'unit' | 'model' | 'work'>,
  n_mol_s: Float64Array,
  at: StreamCondition,
  warm?: FlashWarm,
): Outcome<StreamState> {
  const made = makeStream(call.model, n_mol_s, at, call.work, warm, { unit: call.unit });
  if (made.state !== 'solved' || made.findings.length === 0) return made;
  return solved(
    made.value,
    made.findings.filter((f) => f.code !== 'equilibrium/second-liquid'),
  );
}

/** What a unit remembers of the last state it flashed: start values that never change an answer. */
export interface WarmState extends FlashWarm {
  readonly T_K: number;
  /** Which chemicals K is over, by place in the full list. */
  readonly present: readonly number[];
}

/**
 * Start values to remember of a stream: its conditions, and K over the chemicals present where it is vapour and liquid with
 * every K finite.
 */
export function warmOf(stream: StreamState): WarmState {
  const { T_K, P_Pa, vapourFraction, n_mol_s, phases } = stream;
  const present = placesOf(n_mol_s);
  const [vapour, liquid] = phases;
  if (vapour?.kind !== 'vapour' || liquid?.kind !== 'liquid') return { T_K, P_Pa, present };
  const K = new Float64Array(present.length);
  let usable = true;
  for (let k = 0; k < K.length; k++) {
    K[k] = vapour.x[present[k]!]! / liquid.x[present[k]!]!;
    if (!(K[k]! > 0 && K[k]! < Number.POSITIVE_INFINITY)) usable = false;
  }
  return usable ? { T_K, P_Pa, vapourFraction, K, present } : { T_K, P_Pa, present };
}

/** Start values for a flash of `n_mol_s`: what was remembered, as far as it is about the same chemicals; else a temperature. */
export function warmFrom(warm: unknown, n_mol_s: Float64Array, otherwise_K: number): FlashWarm {
  if (warm === undefined) return { T_K: otherwise_K };
  const { present, ...rest } = warm as WarmState;
  let k = 0;
  for (let i = 0; i < n_mol_s.length; i++)
    if (n_mol_s[i]! > 0 && present[k++] !== i) return { T_K: rest.T_K };
  return k === present.length ? rest : { T_K: rest.T_K };
}
