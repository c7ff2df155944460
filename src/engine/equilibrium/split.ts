import { choleskyShifted, choleskySolve } from '../numerics/cholesky';
import { vapourFractionOf } from './rachford-rice';
import type { FlashWork, Slot } from './work';

/** Stopping aim of every split: largest |difference of ln fugacity|. */
export const EQUAL = 1e-11;
/** Accepted where rounding of the model allows no better. */
export const NEARLY_EQUAL = 2e-10;
/** Substitution has calmed down once ln K moves by less. */
export const CALM = 1e-2;
/** Phases whose ln K are all smaller than this are one phase. */
const TRIVIAL = 1e-5;
const LARGEST_LNK = 600;
/** No flow loses more than this share of itself in one step. */
const CUT = 0.95;

/** How the search ended: at equal fugacities; without an answer; with both phases one; with the feed a single phase. */
export type SplitEnd = 'equal' | 'going' | 'trivial' | 'outside';

/** Flows, fractions and totals of both phases from w.K at vapour fraction beta. */
export function placeFlows(w: FlashWork, z: Float64Array, beta: number): void {
  const { n, K, vap, liq } = w;
  let V = 0;
  let L = 0;
  for (let i = 0; i < n; i++) {
    const t = z[i]! / (1 - beta + beta * K[i]!);
    const l = (1 - beta) * t;
    const v = beta * K[i]! * t;
    liq.flow[i] = l;
    vap.flow[i] = v;
    L += l;
    V += v;
  }
  vap.total = V;
  liq.total = L;
  fractions(vap, n);
  fractions(liq, n);
}

/** Mole fractions of a phase from its flows, the first n of them. */
export function fractions(phase: Slot, n: number): void {
  const scale = 1 / phase.total;
  for (let i = 0; i < n; i++) phase.x[i] = phase.flow[i]! * scale;
}

/** Properties of both phases as placed, at T [K] and P [Pa]. */
export function evaluateBoth(w: FlashWork, T: number, P: number, level: 0 | 1 | 2): void {
  const { model, vap, liq } = w;
  model.evaluate(vap.side, T, P, vap.x, level, vap.props);
  model.evaluate(liq.side, T, P, liq.x, level, liq.props);
}

/** ln K from the phases' fugacity coefficients into w.lnK and w.K; returns the largest change. */
export function renewK(w: FlashWork): number {
  const { n, K, lnK, vap, liq } = w;
  const phiV = vap.props.lnPhi;
  const phiL = liq.props.lnPhi;
  let change = 0;
  for (let i = 0; i < n; i++) {
    let next = phiL[i]! - phiV[i]!;
    if (next > LARGEST_LNK) next = LARGEST_LNK;
    else if (next < -LARGEST_LNK) next = -LARGEST_LNK;
    const moved = Math.abs(next - lnK[i]!);
    if (moved > change) change = moved;
    lnK[i] = next;
    K[i] = Math.exp(next);
  }
  return change;
}

/** Both phases have become one: same composition and same volume (an azeotrope keeps two volumes). */
function isTrivial(w: FlashWork): boolean {
  for (let i = 0; i < w.n; i++) if (Math.abs(w.lnK[i]!) > TRIVIAL) return false;
  return sameVolume(w);
}

function sameVolume(w: FlashWork): boolean {
  return Math.abs(w.vap.props.v_m3_mol / w.liq.props.v_m3_mol - 1) < 1e-3;
}

/**
 * Successive substitution from w.K (w.lnK alongside) at given T and P.
 *
 * @param steps  at most this many; stops earlier once ln K moves by less than `calm`
 * @returns 'going' with flows, fractions and level-0 properties of both phases in place; 'outside' when the feed is a
 *          single phase with these K; 'trivial' when both phases have become one
 */
export function substitute(
  w: FlashWork,
  z: Float64Array,
  T: number,
  P: number,
  steps: number,
  calm: number,
): SplitEnd {
  let beta = -1;
  for (let pass = 0; pass < steps; pass++) {
    beta = vapourFractionOf(z, w.K, beta);
    if (beta <= 0 || beta >= 1) return 'outside';
    placeFlows(w, z, beta);
    evaluateBoth(w, T, P, 0);
    w.iterations += 2;
    const change = renewK(w);
    if (isTrivial(w)) return 'trivial';
    if (change < calm) break;
  }
  return 'going';
}

/** Gibbs energy of the split as placed, less that of the single phase whose plane is in w.d [-, per mole and RT]. */
export function gibbsAgainstPlane(w: FlashWork): number {
  const { n, d, vap, liq } = w;
  let sum = 0;
  for (let i = 0; i < n; i++) {
    const v = vap.flow[i]!;
    const l = liq.flow[i]!;
    if (v > 0) sum += v * (Math.log(vap.x[i]!) + vap.props.lnPhi[i]! - d[i]!);
    if (l > 0) sum += l * (Math.log(liq.x[i]!) + liq.props.lnPhi[i]! - d[i]!);
  }
  return sum;
}

/** g_i = ln f_i of vap less that of liq; returns the largest of them, and puts the Gibbs energy into w.s[n]. */
export function differences(w: FlashWork): number {
  const { n, g, vap, liq } = w;
  let err = 0;
  let gibbs = 0;
  for (let i = 0; i < n; i++) {
    const v = vap.flow[i]!;
    const l = liq.flow[i]!;
    const fV = Math.log(vap.x[i]!) + vap.props.lnPhi[i]!;
    const fL = Math.log(liq.x[i]!) + liq.props.lnPhi[i]!;
    gibbs += v * fV + l * fL;
    const out = fV - fL;
    g[i] = out;
    const size = Math.abs(out);
    if (!(size <= err)) err = size;
  }
  w.s[n] = gibbs;
  return err;
}

/** Fills the lower triangle of w.hess with the scaled second derivative of the Gibbs energy, w.s with the scaling. */
export function fillHessian(w: FlashWork): void {
  const { n, hess, s, vap, liq } = w;
  const dV = vap.props.dN;
  const dL = liq.props.dN;
  const perV = 1 / vap.total;
  const perL = 1 / liq.total;
  const both = perV + perL;
  for (let i = 0; i < n; i++) {
    const v = vap.flow[i]!;
    const l = liq.flow[i]!;
    s[i] = Math.sqrt((v / (v + l)) * l);
  }
  for (let i = 0; i < n; i++) {
    const row = i * n;
    const si = s[i]!;
    for (let j = 0; j <= i; j++)
      hess[row + j] = si * s[j]! * (dV[row + j]! * perV + dL[row + j]! * perL - both);
    hess[row + i] = hess[row + i]! + 1;
  }
}

/** Moves flows by w.step (vap gains, liq loses), shortened so that no flow is cut by more than 95 %; returns the share taken. */
export function moveFlows(w: FlashWork, most: number): number {
  const { n, step, vap, liq } = w;
  let share = most;
  for (let i = 0; i < n; i++) {
    const move = step[i]!;
    const from = move < 0 ? CUT * vap.flow[i]! : CUT * liq.flow[i]!;
    const size = Math.abs(move);
    if (share * size > from) share = from / size;
  }
  addFlows(w, share);
  return share;
}

function addFlows(w: FlashWork, share: number): void {
  const { n, step, vap, liq } = w;
  let V = 0;
  let L = 0;
  for (let i = 0; i < n; i++) {
    const move = share * step[i]!;
    const v = vap.flow[i]! + move;
    const l = liq.flow[i]! - move;
    vap.flow[i] = v;
    liq.flow[i] = l;
    V += v;
    L += l;
  }
  vap.total = V;
  liq.total = L;
  fractions(vap, n);
  fractions(liq, n);
}

/**
 * Newton on the flows of the split as placed, by the Gibbs energy's second derivatives.
 *
 * A step is kept if the Gibbs energy falls, or if the differences fall while the energy is flat (near critical).
 *
 * @returns 'equal' with level-2 properties at the answer; 'trivial'; 'going' when it stalled
 * Source: Michelsen, Fluid Phase Equilib. 9 (1982) 21 (scaling by sqrt(v l / z)).
 */
export function newtonSplit(w: FlashWork, T: number, P: number, passes: number): SplitEnd {
  const { n, g, s, step, hess, vap, liq, saved, saved2 } = w;
  evaluateBoth(w, T, P, 2);
  w.iterations += 2;
  let err = differences(w);
  let gibbs = s[n]!;
  // Near a critical point the differences may rise before they fall.
  let loose = 6;
  // Along a direction without upward curvature a shifted step is short: it may grow from step to step.
  let boost = 1;
  for (let pass = 0; pass < passes; pass++) {
    if (err < EQUAL) {
      w.residual = err;
      return sameness(w) ? 'trivial' : 'equal';
    }
    fillHessian(w);
    for (let i = 0; i < n; i++) step[i] = -s[i]! * g[i]!;
    boost = choleskyShifted(hess, n, w.border) > 0 ? Math.min(4 * boost, 1e4) : 1;
    choleskySolve(hess, n, step);
    for (let i = 0; i < n; i++) {
      step[i] = step[i]! * s[i]!;
      saved[i] = vap.flow[i]!;
      saved2[i] = liq.flow[i]!;
    }
    const V = vap.total;
    const L = liq.total;
    let share = boost;
    let kept = false;
    for (let half = 0; half < (boost > 1 ? 10 : 4); half++) {
      share = moveFlows(w, share);
      evaluateBoth(w, T, P, 2);
      w.iterations += 2;
      const was = err;
      const now = differences(w);
      const flat = Math.abs(s[n]! - gibbs) < 1e-12 * (1 + Math.abs(gibbs));
      if (
        now < Number.POSITIVE_INFINITY &&
        ((flat && (now < was || (loose > 0 && now < 10 * was))) || (!flat && s[n]! < gibbs))
      ) {
        if (now >= was) loose--;
        err = now;
        gibbs = s[n]!;
        kept = true;
        break;
      }
      for (let i = 0; i < n; i++) {
        vap.flow[i] = saved[i]!;
        liq.flow[i] = saved2[i]!;
      }
      vap.total = V;
      liq.total = L;
      share *= 0.3;
      boost = 1;
    }
    if (!kept) {
      fractions(vap, n);
      fractions(liq, n);
      evaluateBoth(w, T, P, 2);
      w.iterations += 2;
      err = differences(w);
      gibbs = s[n]!;
      if (err < NEARLY_EQUAL) {
        w.residual = err;
        return sameness(w) ? 'trivial' : 'equal';
      }
      return 'going';
    }
    if (vap.total < 1e-200 || liq.total < 1e-200) return 'outside';
  }
  return 'going';
}

/** Both phases as placed are one: nothing has parted. */
export function sameness(w: FlashWork): boolean {
  const { n, vap, liq } = w;
  for (let i = 0; i < n; i++) {
    if (Math.abs(Math.log(vap.x[i]! / liq.x[i]!)) > TRIVIAL) return false;
  }
  return sameVolume(w);
}
