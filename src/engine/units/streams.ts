import { makeStream } from '../equilibrium/stream';
import type { Condition, FlashWarm, StreamState } from '../equilibrium/types';
import { type Finding, noSolution, type Outcome, solved } from '../outcome';
import type { PressureSI } from './groups';
import type { Call } from './types';

/** Total molar flow [mol/s]. */
export function totalOf(n_mol_s: Float64Array): number {
  let total = 0;
  for (const n of n_mol_s) total += n;
  return total;
}

/** A stream through which nothing flows; temperature and pressure say where it would start. */
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

/** The same material in the same state, `share` times as much of it. */
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

/** Adds inlets up. The order of their ports does not change the sum: they are added by port name. */
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

/** Outlet pressure [Pa], or the reason why there is none. */
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
        evidence: [
          { name: 'pressure', value: P_Pa, dim: 'pressure' },
          { name: 'inletPressure', value: inlet_Pa, dim: 'pressure' },
        ],
      });
}

/** The unit's name on findings that lower rooms made without knowing it. */
export const atUnit = (call: Pick<Call<unknown>, 'unit'>, f: Finding): Finding =>
  f.at.unit === undefined ? { ...f, at: { unit: call.unit, ...f.at } } : f;

function placed<T>(call: Pick<Call<unknown>, 'unit'>, outcome: Outcome<T>): Outcome<T> {
  const [first, ...rest] = outcome.findings.map((f) => atUnit(call, f));
  if (outcome.state === 'solved') return first ? { ...outcome, findings: [first, ...rest] } : outcome;
  return first ? { ...outcome, findings: [first, ...rest] } : outcome;
}

/** Flash of `n_mol_s` at two conditions; findings carry the unit. */
export const streamAt = (
  call: Pick<Call<unknown>, 'unit' | 'model' | 'work'>,
  n_mol_s: Float64Array,
  at: Condition,
  warm?: FlashWarm,
): Outcome<StreamState> => placed(call, makeStream(call.model, n_mol_s, at, call.work, warm));

/**
 * Flash at a pressure and an enthalpy flow. The flash meets the enthalpy to its own tolerance; the stream then carries the flow
 * that was asked for, so that balances close to rounding.
 */
export function streamWithEnthalpy(
  call: Pick<Call<unknown>, 'unit' | 'model' | 'work'>,
  n_mol_s: Float64Array,
  P_Pa: number,
  H_W: number,
  warm?: FlashWarm,
): Outcome<StreamState> {
  const made = streamAt(call, n_mol_s, { P_Pa, h_J_mol: H_W / totalOf(n_mol_s) }, warm);
  return made.state === 'solved' ? { ...made, value: { ...made.value, H_W } } : made;
}

/** A start value that never changes an answer: the temperature of the last one, if there was one. */
export function warmFrom(warm: unknown, otherwise_K: number): FlashWarm {
  const T_K =
    typeof warm === 'object' && warm !== null && 'T_K' in warm && typeof warm.T_K === 'number'
      ? warm.T_K
      : otherwise_K;
  return { T_K };
}
