import { answerOf } from './answer';
import type { Sought } from './fraction';
import { settle } from './settle';
import { newtonSplit, renewK, sameness } from './split';
import { liquidLike, setPlane } from './stability';
import { hiddenLiquid } from './starts';
import { startFromTrial } from './tp';
import { LEAST_T_K, MOST_T_K } from './whole';
import type { FlashWork } from './work';

/** Steps of temperature or pressure. */
const PASSES = 40;
/** Largest step in the logarithm of what is sought. */
const STEP = { T: 0.03, P: 0.5 };
/** How far the vapour may lie from the liquids' common plane [-]; and where rounding allows no better. */
const TOUCHES = 1e-12;
const NEARLY = 1e-10;
const SUBSTITUTIONS = 200;

/**
 * Bubble point of a feed that parts into two liquids: the two are followed along temperature or pressure until a vapour
 * touches their common plane. Exact, unlike the bubble point of the one liquid that the feed would be if it did not part.
 *
 * @param vapour  composition to start the vapour from
 * @param u0      temperature [K] or pressure [Pa] of the two liquids in w.vap and w.liq
 * @returns true with the answer in w.told; the two liquids are told as one
 */
export function bubbleOfTwo(
  w: FlashWork,
  z: Float64Array,
  sought: Sought,
  given: number,
  u0: number,
  vapour: Float64Array,
): boolean {
  const { trial } = w;
  let u = u0;
  let uBefore = 0;
  let apartBefore = 0;
  const start = vapour.slice();
  for (let pass = 0; pass < PASSES; pass++) {
    const T = sought === 'T' ? u : given;
    const P = sought === 'T' ? given : u;
    if (newtonSplit(w, T, P, 12) !== 'equal') {
      renewK(w);
      if (settle(w, z, T, P) !== 'equal') return false;
    }
    if (sameness(w) || !liquidLike(w, w.vap, T) || !liquidLike(w, w.liq, T)) return false;
    setPlane(w, w.liq);
    trial.x.set(start);
    const apart = vapourAbove(w, T, P);
    if (!(Math.abs(apart) < 30) || liquidLike(w, trial, T)) return false;
    start.set(trial.x);
    const stuck = Math.abs(u / uBefore - 1) < 3e-16 * (sought === 'T' ? 1 : 10);
    if (Math.abs(apart) < TOUCHES || (stuck && Math.abs(apart) < NEARLY)) {
      w.T_K = T;
      w.P_Pa = P;
      return told(w, Math.abs(apart)) && isAlone(w, T, P);
    }
    const perLnU = pass === 0 ? slope(w, sought, u) : (apart - apartBefore) / Math.log(u / uBefore);
    let move = -apart / perLnU;
    const most = STEP[sought];
    if (Math.abs(move) > most) move = Math.sign(move) * most;
    uBefore = u;
    apartBefore = apart;
    u *= Math.exp(move);
    if (!(u > 0) || (sought === 'T' && !(u > LEAST_T_K && u < MOST_T_K))) return false;
  }
  return false;
}

/**
 * Two liquids of the feed at w.T_K, w.P_Pa, from a liquid whose composition is in w.hiddenX and which lies below the
 * feed's own plane; then w.vap and w.liq hold them.
 */
export function partInTwo(w: FlashWork, z: Float64Array): boolean {
  const { feed, trial, model, T_K: T, P_Pa: P } = w;
  feed.x.set(z);
  model.evaluate('liquid', T, P, feed.x, 0, feed.props);
  trial.side = 'liquid';
  trial.x.set(w.hiddenX);
  model.evaluate('liquid', T, P, trial.x, 0, trial.props);
  if (startFromTrial(w, z, T, P) === undefined) return false;
  w.vap.side = 'liquid';
  return settle(w, z, T, P) === 'equal';
}

/** Whether neither of the two liquids lets a third one form, nor the vapour another one. */
function isAlone(w: FlashWork, T: number, P: number): boolean {
  setPlane(w, w.liq);
  if (hiddenLiquid(w, T, P, w.vap, w.liq) || hiddenLiquid(w, T, P, w.liq, w.vap)) {
    w.told = undefined;
    w.hiddenX.set(w.trial.x);
    return false;
  }
  return true;
}

/** Follows the vapour in w.trial to where it is stationary; ln of its amounts' sum: above zero it lies below the plane. */
function vapourAbove(w: FlashWork, T: number, P: number): number {
  const { n, d, trial, model } = w;
  trial.side = 'vapour';
  let before = 0;
  for (let pass = 0; pass < SUBSTITUTIONS; pass++) {
    model.evaluate('vapour', T, P, trial.x, 2, trial.props);
    w.iterations++;
    let total = 0;
    for (let i = 0; i < n; i++) {
      trial.flow[i] = Math.exp(d[i]! - trial.props.lnPhi[i]!);
      total += trial.flow[i]!;
    }
    let moved = 0;
    for (let i = 0; i < n; i++) {
      const next = trial.flow[i]! / total;
      moved = Math.max(moved, Math.abs(next - trial.x[i]!));
      trial.x[i] = next;
    }
    const apart = Math.log(total);
    if (moved < 1e-13 || (moved < 1e-11 && apart === before)) return apart;
    before = apart;
  }
  return Number.NaN;
}

/** About d ln(sum)/d ln u, with the liquids' compositions frozen. */
function slope(w: FlashWork, sought: Sought, u: number): number {
  const { n, trial, liq } = w;
  const gas = sought === 'T' ? trial.props.dT : trial.props.dP;
  const liquid = sought === 'T' ? liq.props.dT : liq.props.dP;
  let sum = 0;
  for (let i = 0; i < n; i++) sum += trial.x[i]! * u * (liquid[i]! - gas[i]!);
  return sum;
}

function told(w: FlashWork, apart: number): true {
  const { trial } = w;
  const { props } = trial;
  const smaller = w.vap.total < w.liq.total ? w.vap : w.liq;
  w.hidden = true;
  w.hiddenX.set(smaller.x);
  w.phases = 1;
  w.lumped = true;
  const { phases, ...rest } = answerOf(w);
  w.told = {
    ...rest,
    residual: Math.max(w.residual, apart),
    phases: [
      {
        kind: 'vapour',
        fraction: 0,
        x: trial.x.slice(),
        h_J_mol: props.h_J_mol,
        s_J_molK: props.s_J_molK,
        v_m3_mol: props.v_m3_mol,
        Z: props.Z,
        cp_J_molK: props.cp_J_molK,
      },
      ...phases,
    ],
  };
  return true;
}
