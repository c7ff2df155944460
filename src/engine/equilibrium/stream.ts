import { type Outcome, type Place, solved } from '../outcome';
import type { Model } from '../thermo/types';
import { type FlashWork, flash, makeFlashWork } from './flash';
import type { Condition, FlashAnswer, FlashPhase, FlashWarm, Phase, StreamState } from './types';

/** Scratch that outlives a flash: a workspace a set of chemicals, by the list of those present. */
export interface FlashShelf {
  readonly flash: Map<string, unknown>;
}

/** Two conditions of a stream: molar ones, or the enthalpy flow itself, which is then carried exactly. */
export type StreamCondition = Condition | { readonly P_Pa: number; readonly H_W: number };

/**
 * A stream from its amounts and two conditions.
 *
 * Only the chemicals present (not exactly zero) take part; a trace is present, however small.
 *
 * @param n_mol_s  full list, each >= 0; without any flow the answer has no phases, and T and P as given (else as warm
 *                 has them, else 298.15 K and 101325 Pa)
 * @param work     the worker's scratch; a workspace a set of chemicals is kept in it
 * @param warm     start values; K over the chemicals present
 * @param where    place put on findings
 */
export function makeStream(
  model: Model,
  n_mol_s: Float64Array,
  at: StreamCondition,
  work: FlashShelf,
  warm?: FlashWarm,
  where: Place = {},
): Outcome<StreamState> {
  if (n_mol_s.length !== model.nc) throw new Error(`${n_mol_s.length} amounts for ${model.nc} chemicals`);
  const present: number[] = [];
  let total = 0;
  for (let i = 0; i < n_mol_s.length; i++) {
    const n = n_mol_s[i]!;
    if (!(n >= 0 && n < Number.POSITIVE_INFINITY)) {
      throw new Error(`amount of ${model.chemicals[i]!.id} is ${n}`);
    }
    if (n === 0) continue;
    present.push(i);
    total += n;
  }
  if (present.length === 0) return solved(withoutFlow(n_mol_s, at, warm));
  const z = new Float64Array(present.length);
  for (let k = 0; k < present.length; k++) z[k] = n_mol_s[present[k]!]! / total;
  const thermo = model.of(present);
  const molar: Condition = 'H_W' in at ? { P_Pa: at.P_Pa, h_J_mol: at.H_W / total } : at;
  const outcome = flash(thermo, z, molar, workFor(work, thermo, present), warm, where);
  if (outcome.state === 'no-solution') return { state: 'no-solution', findings: outcome.findings };
  const answer = outcome.value;
  const H_W = 'H_W' in at ? at.H_W : total * ('h_J_mol' in at ? at.h_J_mol : answer.h_J_mol);
  const stream = expand(answer, n_mol_s, present, total, H_W, thermo.hasEntropy);
  return solved(stream, outcome.findings);
}

/**
 * One phase of a stream as a stream of its own, saturated, without another flash.
 *
 * @param phase  one of stream.phases; an incipient one gives a stream without flow
 */
export function streamOfPhase(stream: StreamState, phase: Phase): StreamState {
  let total = 0;
  for (const n of phase.n_mol_s) total += n;
  const flows = total > 0;
  const vapourFraction = stream.phases.length > 1 ? (phase.kind === 'vapour' ? 1 : 0) : stream.vapourFraction;
  return {
    n_mol_s: phase.n_mol_s,
    P_Pa: stream.P_Pa,
    T_K: stream.T_K,
    H_W: flows ? total * phase.h_J_mol : 0,
    ...(stream.S_W_K === undefined ? {} : { S_W_K: flows ? total * phase.s_J_molK : 0 }),
    phases: flows ? [{ ...phase, fraction: 1 }] : [],
    vapourFraction: flows ? vapourFraction : 0,
    ...(stream.hiddenLiquid !== undefined && phase.kind !== 'vapour'
      ? {
          hiddenLiquid: stream.hiddenLiquid,
          ...(stream.liquidsTogether ? { liquidsTogether: true as const } : {}),
        }
      : {}),
    residual: stream.residual,
    iterations: 0,
  };
}

function withoutFlow(n_mol_s: Float64Array, at: StreamCondition, warm: FlashWarm | undefined): StreamState {
  return {
    n_mol_s,
    P_Pa: 'P_Pa' in at ? at.P_Pa : (warm?.P_Pa ?? 101325),
    T_K: 'T_K' in at ? at.T_K : (warm?.T_K ?? 298.15),
    H_W: 0,
    S_W_K: 0,
    phases: [],
    vapourFraction: 'vapourFraction' in at ? at.vapourFraction : 0,
    residual: 0,
    iterations: 0,
  };
}

function workFor(work: FlashShelf, thermo: ReturnType<Model['of']>, present: readonly number[]): FlashWork {
  const key = present.join(' ');
  const known = work.flash.get(key) as FlashWork | undefined;
  // The same chemicals under another model (an edited basis) need a workspace of their own.
  if (known !== undefined && known.model === thermo) return known;
  const made = makeFlashWork(thermo);
  work.flash.set(key, made);
  return made;
}

function expand(
  answer: FlashAnswer,
  n_mol_s: Float64Array,
  present: readonly number[],
  total: number,
  H_W: number,
  hasEntropy: boolean,
): StreamState {
  const { phases } = answer;
  const full = (x: Float64Array): Float64Array => {
    const out = new Float64Array(n_mol_s.length);
    for (let k = 0; k < present.length; k++) out[present[k]!] = x[k]!;
    return out;
  };
  const flows = phases.length === 2 ? parted(phases[0]!, phases[1]!, n_mol_s, present) : [n_mol_s];
  return {
    n_mol_s,
    P_Pa: answer.P_Pa,
    T_K: answer.T_K,
    H_W,
    ...(hasEntropy ? { S_W_K: total * answer.s_J_molK } : {}),
    phases: phases.map((phase, k) => ({ ...phase, x: full(phase.x), n_mol_s: flows[k]! })),
    vapourFraction: answer.vapourFraction,
    ...(answer.hiddenLiquid ? { hiddenLiquid: full(answer.hiddenLiquid) } : {}),
    ...(answer.liquidsTogether ? { liquidsTogether: true as const } : {}),
    residual: answer.residual,
    iterations: answer.iterations,
  };
}

/** Flows of two phases that add up to the stream's to the last digit; the smaller share is kept exact. */
function parted(
  a: FlashPhase,
  b: FlashPhase,
  n_mol_s: Float64Array,
  present: readonly number[],
): [Float64Array, Float64Array] {
  const inA = new Float64Array(n_mol_s.length);
  const inB = new Float64Array(n_mol_s.length);
  for (let k = 0; k < present.length; k++) {
    const i = present[k]!;
    const n = n_mol_s[i]!;
    const toA = a.fraction * a.x[k]!;
    const toB = b.fraction * b.x[k]!;
    if (toA < toB) {
      inA[i] = (n * toA) / (toA + toB);
      inB[i] = n - inA[i]!;
    } else {
      inB[i] = (n * toB) / (toA + toB);
      inA[i] = n - inB[i]!;
    }
  }
  return [inA, inB];
}
