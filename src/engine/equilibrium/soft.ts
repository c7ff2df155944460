import { follow } from './stability';
import type { FlashWork, Slot } from './work';

/** Curvature of the Gibbs energy against that of an ideal mixture below which a liquid may part though it is stable nearby. */
const SOFT = 0.75;
/** How far along the softest direction a trial starts: the composition's logarithm moves by this, on the average. */
const REACH = 2;
/** Near its spinodal the other liquid is close, and a far start leads past it. */
const NEARBY = 0.5;
/** Least curvature below which the nearby starts are tried. */
const SOFTER = 0.3;
const FAR_WAYS = [REACH, -REACH];
const ALL_WAYS = [REACH, -REACH, NEARBY, -NEARBY];
/** No chemical's fraction changes by more than exp of this in a start. */
const MOST = 6;
const TURNS = 10;
/** After so many turns it is clear whether anything is soft. */
const LOOK = 2;
/** Puts what is soft ahead of what is stiff. */
const AHEAD = 0.4;

/**
 * Whether another liquid lies below the plane in w.d on either side of the tested one along its softest direction, in which the
 * Gibbs energy is least curved; w.trial then holds it.
 *
 * A liquid near its spinodal need not be rich in any one chemical to part: the other liquid may only be poor in the heavy
 * ones, and no pure start leads there. In a binary mixture the two directions are all there are.
 *
 * @param tested  a liquid with level-2 properties; @param known1, known2  as for `follow`
 */
export function softLiquid(
  w: FlashWork,
  T: number,
  P: number,
  tested: Slot,
  known1: Slot,
  known2: Slot | undefined,
): boolean {
  const { n, startW, step: u } = w;
  const curvature = softest(w, tested);
  if (curvature > SOFT) return false;
  w.trial.side = 'liquid';
  for (const way of curvature < SOFTER ? ALL_WAYS : FAR_WAYS) {
    // `follow` uses w.step for its own steps.
    if (way !== REACH) softest(w, tested);
    for (let i = 0; i < n; i++) {
      const move = Math.max(-MOST, Math.min(MOST, way * u[i]!));
      startW[i] = tested.x[i]! * Math.exp(move);
    }
    if (follow(w, T, P, known1, known2, 0)) return true;
  }
  return false;
}

/**
 * Least eigenvalue of I + sqrt(x_i x_j) d ln phi_i/dn_j, to some per cent; w.step then holds the direction as changes of
 * ln x, mean square 1. In an ideal mixture all are 1, which is why the iteration starts from what differs from 1.
 */
function softest(w: FlashWork, tested: Slot): number {
  const { n, hess, step: v, s, g } = w;
  const { x, props } = tested;
  for (let i = 0; i < n; i++) {
    s[i] = Math.sqrt(x[i]!);
    // Any start that is not by chance at right angles to what is sought.
    v[i] = Math.cos(1 + 2.4 * i);
  }
  for (let i = 0; i < n; i++) {
    for (let j = 0; j < n; j++) hess[i * n + j] = -s[i]! * s[j]! * props.dN[i * n + j]!;
  }
  let gained = times(hess, v, g, n);
  for (let turn = 0; turn < TURNS; turn++) {
    const size = unit(g, n);
    if (!(size > 0)) return 1;
    for (let i = 0; i < n; i++) v[i] = g[i]!;
    gained = times(hess, v, g, n);
    // Little that is soft: not worth a closer look.
    if (turn === LOOK && 1 - gained > SOFT + 0.1) break;
    if (turn < TURNS - 1) for (let i = 0; i < n; i++) g[i] = g[i]! + AHEAD * v[i]!;
  }
  for (let i = 0; i < n; i++) v[i] = s[i]! > 0 ? v[i]! / s[i]! : 0;
  return 1 - gained;
}

/** out = A v; returns v A v. */
function times(A: Float64Array, v: Float64Array, out: Float64Array, n: number): number {
  let both = 0;
  for (let i = 0; i < n; i++) {
    let sum = 0;
    for (let j = 0; j < n; j++) sum += A[i * n + j]! * v[j]!;
    out[i] = sum;
    both += sum * v[i]!;
  }
  return both;
}

/** Brings a vector to length one; returns the length it had. */
function unit(v: Float64Array, n: number): number {
  let sum = 0;
  for (let i = 0; i < n; i++) sum += v[i]! * v[i]!;
  const size = Math.sqrt(sum);
  for (let i = 0; i < n; i++) v[i] = v[i]! / size;
  return size;
}
