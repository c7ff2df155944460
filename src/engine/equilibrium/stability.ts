import { choleskyShifted, choleskySolve } from '../numerics/cholesky';
import type { FlashWork, Slot } from './work';

/** A trial lies below the tangent plane only if it does so by more than rounding. */
export const BELOW = -1e-11;
const SUBSTITUTIONS = 6;
const NEWTONS = 25;

export type Likeness = 'any' | 'liquid' | 'vapour';

/**
 * Puts ln(x_i phi_i) of a phase into w.d: the tangent plane that trials are measured against. An absent chemical
 * (x_i = 0) stays absent in every trial.
 */
export function setPlane(w: FlashWork, phase: Slot): void {
  const { d, n } = w;
  const { x, props } = phase;
  for (let i = 0; i < n; i++) d[i] = Math.log(x[i]!) + props.lnPhi[i]!;
}

/**
 * Whether a phase at (T, P, x) is as dense as a liquid: below its pseudo-critical temperature and well below its
 * pseudo-critical volume.
 */
export function liquidLike(w: FlashWork, phase: Slot, T: number): boolean {
  const critical = w.model.pseudoCritical(phase.x);
  return T < critical.T_K && phase.props.v_m3_mol < 0.75 * critical.v_m3_mol;
}

/**
 * Follows one trial to where its distance from the tangent plane is stationary.
 *
 * @param w.startW  start amounts, length n
 * @param known1, known2  phases the trial may run into without being news (the tested phase, or both of a split)
 * @param substitutions  steps before Newton
 * @returns true when the trial lies below the plane: then w.trial holds it (x normalised, flow unnormalised)
 * Source: Michelsen, Fluid Phase Equilib. 9 (1982) 1; criterion tpd(w) = sum of w (ln w + ln phi - d) < 0.
 */
export function follow(
  w: FlashWork,
  T: number,
  P: number,
  known1: Slot,
  known2: Slot | undefined,
  substitutions = SUBSTITUTIONS,
): boolean {
  const { model, n, trial, d, startW } = w;
  const { flow: W, x, props } = trial;
  W.set(startW);
  let total = normalise(W, x, n);
  let before = Number.POSITIVE_INFINITY;
  const reach = known2 === undefined ? NEAR_FEED : NEAR_PHASE;
  for (let pass = 0; pass < substitutions; pass++) {
    model.evaluate(trial.side, T, P, x, 0, props);
    w.iterations++;
    const distance = tpd(w);
    if (distance < BELOW) return true;
    if (near(trial, known1, n, reach)) return false;
    if (known2 !== undefined && near(trial, known2, n, reach)) return false;
    let change = 0;
    for (let i = 0; i < n; i++) {
      const lnW = d[i]! - props.lnPhi[i]!;
      const next = Math.exp(lnW);
      const moved = Math.abs(next - W[i]!);
      if (moved > change) change = moved;
      W[i] = next;
    }
    total = normalise(W, x, n);
    if (change < 1e-9) return false;
    // A trial that is far above the plane and sinks slowly ends above it.
    if (pass >= 3 && distance > 0.3 && before - distance < 0.03 * distance) return false;
    before = distance;
  }
  return newton(w, T, P, known1, known2, total);
}

/** Newton on the modified distance in alpha = 2 sqrt(W), where the ideal part is a unit matrix. */
function newton(
  w: FlashWork,
  T: number,
  P: number,
  known1: Slot,
  known2: Slot | undefined,
  start: number,
): boolean {
  const { model, n, trial, d, hess, g, s, step, saved } = w;
  const { flow: W, x, props } = trial;
  let total = start;
  let best = Number.POSITIVE_INFINITY;
  const reach = known2 === undefined ? NEAR_FEED : NEAR_PHASE;
  for (let pass = 0; pass < NEWTONS; pass++) {
    model.evaluate(trial.side, T, P, x, 2, props);
    w.iterations++;
    const distance = tpd(w);
    if (distance < BELOW) return true;
    if (near(trial, known1, n, reach)) return false;
    if (known2 !== undefined && near(trial, known2, n, reach)) return false;
    let modified = 1;
    let err = 0;
    for (let i = 0; i < n; i++) {
      const root = Math.sqrt(W[i]!);
      s[i] = root;
      const out = W[i]! > 0 ? Math.log(W[i]!) + props.lnPhi[i]! - d[i]! : 0;
      modified += W[i]! * (out - 1);
      g[i] = root * out;
      if (Math.abs(g[i]!) > err) err = Math.abs(g[i]!);
    }
    if (err < 1e-9) return false;
    if (modified > best + 1e-12) {
      // Uphill: back half the way.
      for (let i = 0; i < n; i++) {
        const a = (Math.sqrt(saved[i]!) + s[i]!) / 2;
        W[i] = a * a;
      }
      total = normalise(W, x, n);
      best += 1e-10;
      continue;
    }
    best = modified;
    for (let i = 0; i < n; i++) {
      saved[i] = W[i]!;
      for (let j = 0; j <= i; j++) {
        hess[i * n + j] = (s[i]! * s[j]! * props.dN[i * n + j]!) / total + (i === j ? 1 : 0);
      }
      step[i] = -g[i]!;
    }
    choleskyShifted(hess, n, w.border);
    choleskySolve(hess, n, step);
    for (let i = 0; i < n; i++) {
      // alpha = 2 sqrt(W): half the step on the root; never below a twentieth.
      const root = Math.max(s[i]! + step[i]! / 2, 0.2 * s[i]!);
      W[i] = root * root;
    }
    total = normalise(W, x, n);
  }
  return false;
}

function tpd(w: FlashWork): number {
  const { n, d, trial } = w;
  const { x, props } = trial;
  let sum = 0;
  for (let i = 0; i < n; i++) {
    if (x[i]! > 0) sum += x[i]! * (Math.log(x[i]!) + props.lnPhi[i]! - d[i]!);
  }
  return sum;
}

/** Same composition and same volume: a nearly pure liquid and its vapour differ in the second only. */
function near(a: Slot, b: Slot, n: number, reach: number): boolean {
  if (Math.abs(a.props.v_m3_mol - b.props.v_m3_mol) > reach * b.props.v_m3_mol) return false;
  let distance = 0;
  for (let i = 0; i < n; i++) distance += Math.abs(a.x[i]! - b.x[i]!);
  return distance < reach;
}
/** A feed near its critical point splits into phases that differ little from it; a third phase differs more. */
const NEAR_FEED = 1e-3;
const NEAR_PHASE = 0.03;

function normalise(W: Float64Array, x: Float64Array, n: number): number {
  let total = 0;
  for (let i = 0; i < n; i++) total += W[i]!;
  const scale = 1 / total;
  for (let i = 0; i < n; i++) x[i] = W[i]! * scale;
  return total;
}
