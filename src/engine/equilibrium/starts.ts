import { LN_GAMMA_APART } from './candidates';
import { mostApart } from './miscible';
import { softLiquid } from './soft';
import { BELOW, follow, liquidLike, setPlane } from './stability';
import type { FlashWork, Slot } from './work';

/** -ln of an activity of a tenth: a pure liquid this far above the plane has no liquid rich in it nearby. */
const FAR = 2.3;
/** ln of an activity coefficient from which a chemical may be better off in a liquid of its own. */
const STRANGE = 0.4;
/** Below this, activity coefficients are found anew instead of extrapolated from 298 K [K]. */
const COLD_K = 240;
/** -ln of an activity at which the pure liquid is all but stable beside the tested one. */
const CLOSE = 0.3;

/**
 * Whether the single phase in w.feed (properties at T, P; plane in w.d) can lower its Gibbs energy by splitting; then
 * w.trial holds a phase below the tangent plane.
 *
 * Starts: vapour z K, liquid z / K, the lightest pure as vapour, the heaviest and every other liquid former as liquid.
 * The likelier kind of trial comes first, so that an unstable feed is found out early.
 */
export function isUnstable(w: FlashWork, T: number, P: number): boolean {
  const { n, model, feed, K, startW } = w;
  model.startK(T, P, K);
  const dense = feed.props.side === 'liquid';
  for (let turn = 0; turn < 2; turn++) {
    const vapour = (turn === 0) === dense;
    for (let i = 0; i < n; i++) startW[i] = vapour ? feed.x[i]! * K[i]! : feed.x[i]! / K[i]!;
    tame(startW, n);
    w.trial.side = vapour ? 'vapour' : 'liquid';
    if (follow(w, T, P, feed, undefined)) return true;
  }
  if (model.spec.kind === 'raoult') return false;
  if (pureTrial(w, T, P, w.lightest, 'vapour', feed, undefined)) return true;
  const heaviestAbove = pureAbove(w, T, P, w.heaviest, 'liquid');
  if (heaviestAbove < BELOW) return true;
  if (heaviestAbove < FAR && followPure(w, T, P, w.heaviest, feed, undefined)) return true;
  return hiddenLiquid(w, T, P, feed, undefined, heaviestAbove);
}

/**
 * Whether some liquid rich in one of the liquid formers lies below the plane in w.d; w.trial then holds it.
 *
 * A pure liquid i lies at minus the logarithm of its activity above the plane: one evaluation rules most of them out.
 * Then comes the mixture of the tested phase with as much of the chemical that is least at home in it, and last what lies
 * along the softest direction of a tested liquid.
 *
 * @param known1  the tested phase, a liquid if there is one; @param known2  the other phase of a split; level-2 properties
 * @param heaviestAbove  how far the pure heaviest lies above the plane, when it has been followed without finding anything
 */
export function hiddenLiquid(
  w: FlashWork,
  T: number,
  P: number,
  known1: Slot,
  known2: Slot | undefined,
  heaviestAbove?: number,
): boolean {
  const { formers, heat_K, startW, n } = w;
  const tested = known2 ?? known1;
  const inLiquid = known2 !== undefined || liquidLike(w, known1, T);
  let stranger = -1;
  let most = STRANGE;
  let strange = false;
  for (let k = 0; k < formers.length; k++) {
    const i = formers[k]!;
    // In the cold it grows faster than as 1/T.
    const lnGammaMost = Math.max(heat_K[k]! / T, T < COLD_K ? mostApart(w.model, T, i) : 0);
    if (lnGammaMost < LN_GAMMA_APART) continue;
    strange = true;
    // Beside a vapour the tested phase is a liquid: the activity in it cannot be larger than this.
    const lnX = Math.log(tested.x[i]!);
    if (inLiquid && lnX + 1.5 * lnGammaMost < -FAR) continue;
    const tried = i === w.heaviest ? heaviestAbove : undefined;
    const above = tried ?? pureAbove(w, T, P, i, 'liquid');
    if (above < BELOW) return true;
    if (!(above < FAR)) continue;
    // -above is ln(x gamma). A liquid rich in i lies below only if i is not at home in the tested one.
    const lnGamma = -above - lnX;
    if (lnGamma > most) {
      most = lnGamma;
      stranger = i;
    }
    if (inLiquid && lnGamma < (above < CLOSE ? STRANGE / 4 : STRANGE)) continue;
    if (tried === undefined && followPure(w, T, P, i, known1, known2)) return true;
  }
  if (stranger >= 0) {
    for (let i = 0; i < n; i++) startW[i] = 0.5 * tested.x[i]!;
    startW[stranger] = startW[stranger]! + 0.5;
    w.trial.side = 'liquid';
    if (follow(w, T, P, known1, known2)) return true;
  }
  return strange && inLiquid && softLiquid(w, T, P, tested, known1, known2);
}

/** Distance of a pure trial from the plane; w.trial holds it. */
function pureAbove(w: FlashWork, T: number, P: number, i: number, side: 'vapour' | 'liquid'): number {
  const { model, trial, startW, d } = w;
  trial.side = side;
  startW.fill(0);
  startW[i] = 1;
  trial.x.set(startW);
  trial.flow.set(startW);
  model.evaluate(side, T, P, trial.x, 0, trial.props);
  w.iterations++;
  return trial.props.lnPhi[i]! - d[i]!;
}

/** Substitution from the pure trial in w.trial: the other chemicals as the plane has them. */
function followPure(
  w: FlashWork,
  T: number,
  P: number,
  i: number,
  known1: Slot,
  known2: Slot | undefined,
): boolean {
  const { trial, startW, d } = w;
  for (let j = 0; j < w.n; j++) startW[j] = Math.exp(d[j]! - trial.props.lnPhi[j]!);
  startW[i] = Math.max(startW[i]!, 1);
  return follow(w, T, P, known1, known2);
}

function pureTrial(
  w: FlashWork,
  T: number,
  P: number,
  i: number,
  side: 'vapour' | 'liquid',
  known1: Slot,
  known2: Slot | undefined,
): boolean {
  const above = pureAbove(w, T, P, i, side);
  if (above < BELOW) return true;
  return above < FAR && followPure(w, T, P, i, known1, known2);
}

/** Start amounts of very unequal size are brought to a sum that exp() and products can carry. */
function tame(W: Float64Array, n: number): void {
  let total = 0;
  for (let i = 0; i < n; i++) total += W[i]!;
  const scale = 1 / total;
  for (let i = 0; i < n; i++) W[i] = W[i]! * scale;
}

/**
 * Tests the phase in `phase` against a vapour-like trial only; w.trial then holds what lies below its plane. A trial that
 * starts as a vapour may end as one more liquid.
 */
export function lighterBelow(
  w: FlashWork,
  T: number,
  P: number,
  phase: Slot,
  other: Slot | undefined,
): 'vapour' | 'liquid' | 'nothing' {
  const { n, model, K, startW } = w;
  setPlane(w, phase);
  model.startK(T, P, K);
  for (let i = 0; i < n; i++) startW[i] = phase.x[i]! * K[i]!;
  tame(startW, n);
  w.trial.side = 'vapour';
  if (follow(w, T, P, phase, other) || pureTrial(w, T, P, w.lightest, 'vapour', phase, other)) {
    return liquidLike(w, w.trial, T) ? 'liquid' : 'vapour';
  }
  return 'nothing';
}

/** Whether a vapour lies below the plane of a phase. */
export function vapourBelow(
  w: FlashWork,
  T: number,
  P: number,
  phase: Slot,
  other: Slot | undefined,
): boolean {
  return lighterBelow(w, T, P, phase, other) === 'vapour';
}
