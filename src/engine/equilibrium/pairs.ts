import { bracketedRoot } from '../numerics/root';
import { flashCaloric } from './ph';
import { pureCaloric, saturateAtP, saturateAtT, share } from './pure';
import { flashTP } from './tp';
import type { Condition, FlashWarm } from './types';
import { flashFraction } from './vf';
import { type Caloric, closeEnough, rounding, wholeOf } from './whole';
import type { FlashWork } from './work';

/** How a search for a state by two conditions ended. */
export type PairEnd = 'solved' | 'no-convergence' | 'no-such-state';

/** Pressures that are searched [Pa]. */
const THIN_Pa = 1;
const DENSE_Pa = 1e9;
const GRID = 48;

/**
 * The pairs without both of a pressure and a temperature or fraction that the direct searches serve: T with h or s,
 * vapour fraction with h or s, and h with s. Each is one outer search in ln P (in the vapour fraction inside a
 * two-phase region at given T), every state on the way a full flash.
 *
 * Where several states answer, the one of the lowest pressure is taken.
 */
export function flashPair(
  w: FlashWork,
  z: Float64Array,
  at: Condition,
  warm: FlashWarm | undefined,
): PairEnd {
  if ('T_K' in at && 'h_J_mol' in at) return atTemperature(w, z, at.T_K, at.h_J_mol, 'h');
  if ('T_K' in at && 's_J_molK' in at) return atTemperature(w, z, at.T_K, at.s_J_molK, 's');
  if ('vapourFraction' in at && 'h_J_mol' in at) return atFraction(w, z, at.vapourFraction, at.h_J_mol, 'h');
  if ('vapourFraction' in at && 's_J_molK' in at)
    return atFraction(w, z, at.vapourFraction, at.s_J_molK, 's');
  if ('h_J_mol' in at && 's_J_molK' in at) return atHeatAndEntropy(w, z, at.h_J_mol, at.s_J_molK, warm);
  throw new Error('a pair of conditions that has its own search');
}

/** A state, put into w; the value is the property less its target, NaN where there is no state. */
type State = (u: number) => number;

/** Zero of a state function between two arguments, leaving w at it. */
function tighten(w: FlashWork, state: State, a: number, b: number, of: Caloric, target: number): boolean {
  let evaluations = 0;
  const counted: State = (u) => {
    const value = state(u);
    evaluations += w.iterations;
    return value;
  };
  const root = bracketedRoot(counted, a, b, {
    xTol: 1e-16 * Math.max(1, Math.abs(a), Math.abs(b)),
    fTol: closeEnough(of, 300, target),
    evaluations: 120,
  });
  const left = counted(root.x);
  w.iterations = evaluations;
  return Math.abs(left) <= Math.max(rounding(of, 300), 2 * closeEnough(of, 300, target));
}

/** First change of sign of a state function on an even grid from a to b. */
function firstCrossing(state: State, a: number, b: number): readonly [number, number] | undefined {
  let before = Number.NaN;
  let uBefore = a;
  for (let k = 0; k <= GRID; k++) {
    const u = a + ((b - a) * k) / GRID;
    const value = state(u);
    if (value === 0) return [u, u];
    if (before * value < 0) return [uBefore, u];
    before = value;
    uBefore = u;
  }
  return undefined;
}

const totalOf = (w: FlashWork, of: Caloric): number => {
  const { told } = w;
  if (told !== undefined) return of === 'h' ? told.h_J_mol : told.s_J_molK;
  return wholeOf(w, of);
};

/** Whether a state function changes its sign between a and b, on a grid of its own; looks no further than states go. */
function crossesAgain(state: State, a: number, b: number): boolean {
  let before = Number.NaN;
  for (let k = 0; k <= GRID; k++) {
    const value = state(a + ((b - a) * k) / GRID);
    if (before * value < 0) return true;
    if (Number.isNaN(value) && !Number.isNaN(before)) return false;
    before = value;
  }
  return false;
}

function atTemperature(w: FlashWork, z: Float64Array, T: number, target: number, of: Caloric): PairEnd {
  const single: State = (lnP) =>
    flashTP(w, z, T, Math.exp(lnP), 'nothing') ? wholeOf(w, of) - target : Number.NaN;
  const inside: State = (beta) => (atVapour(w, z, T, beta) ? totalOf(w, of) - target : Number.NaN);
  const dew = inside(1);
  const lnDew = Math.log(w.P_Pa);
  const bubble = inside(0);
  const lnBubble = Math.log(w.P_Pa);
  if (Number.isNaN(dew) || Number.isNaN(bubble) || !(lnBubble >= lnDew)) {
    return search(w, single, Math.log(THIN_Pa), Math.log(DENSE_Pa), of, target);
  }
  // From thin to dense: vapour, two phases, liquid. The flash leaves the very boundary to the fractions.
  const thin = search(w, single, Math.min(Math.log(THIN_Pa), lnDew - 5), lnDew - 1e-9, of, target);
  if (thin !== 'no-such-state') return thin;
  if (dew * bubble <= 0) return tighten(w, inside, 0, 1, of, target) ? 'solved' : 'no-convergence';
  return search(w, single, lnBubble + 1e-9, Math.log(DENSE_Pa), of, target);
}

function search(w: FlashWork, state: State, a: number, b: number, of: Caloric, target: number): PairEnd {
  const between = firstCrossing(state, a, b);
  if (between === undefined) return 'no-such-state';
  return tighten(w, state, between[0], between[1], of, target) ? 'solved' : 'no-convergence';
}

function atVapour(w: FlashWork, z: Float64Array, T: number, beta: number): boolean {
  if (w.n > 1) return flashFraction(w, z, beta, 'P', T, undefined) === 'solved';
  if (!saturateAtT(w, T)) return false;
  share(w, beta);
  return true;
}

function atFraction(w: FlashWork, z: Float64Array, beta: number, target: number, of: Caloric): PairEnd {
  const state: State = (lnP) => {
    const P = Math.exp(lnP);
    if (w.n === 1) {
      if (!saturateAtP(w, P)) return Number.NaN;
      share(w, beta);
    } else if (flashFraction(w, z, beta, 'T', P, undefined) !== 'solved') return Number.NaN;
    return totalOf(w, of) - target;
  };
  // Above the mixture's critical pressure there is nothing to find, and each miss is a long search.
  const most = 2 * w.model.pseudoCritical(w.feed.x).P_Pa;
  const [thin, dense] = [Math.log(THIN_Pa), Math.log(Math.min(most, DENSE_Pa))];
  const between = firstCrossing(state, thin, dense);
  if (between === undefined) return 'no-such-state';
  // Saturated vapour has its largest enthalpy well below the critical pressure: the same one comes twice.
  w.several = crossesAgain(state, between[1], dense);
  return tighten(w, state, between[0], between[1], of, target) ? 'solved' : 'no-convergence';
}

function atHeatAndEntropy(
  w: FlashWork,
  z: Float64Array,
  h_J_mol: number,
  s_J_molK: number,
  warm: FlashWarm | undefined,
): PairEnd {
  let T = warm?.T_K ?? 300;
  // At constant enthalpy entropy falls steadily with pressure: ds/dP = -v/T.
  const state: State = (lnP) => {
    const P = Math.exp(lnP);
    w.told = undefined;
    const end =
      w.n === 1 ? pureCaloric(w, P, h_J_mol, 'h', T) : flashCaloric(w, z, P, h_J_mol, 'h', T, 'nothing');
    if (end !== 'solved') return Number.NaN;
    T = w.T_K;
    return totalOf(w, 's') - s_J_molK;
  };
  return search(w, state, Math.log(THIN_Pa), Math.log(DENSE_Pa), 's', s_J_molK);
}
