import { answerOf } from './answer';
import { between } from './blend';
import { newtonCaloric } from './caloric';
import { staysTwoLiquids } from './liquids';
import { orderByVolume } from './settle';
import { placeFlows, sameness } from './split';
import { liquidLike, setPlane } from './stability';
import { hiddenLiquid } from './starts';
import { flashTP, provedSplit, type StartK } from './tp';
import { type Caloric, closeEnough, LEAST_T_K, MOST_T_K, rounding, wholeOf } from './whole';
import type { FlashWork } from './work';

/** How a search for a temperature ended. 'between-states': enthalpy or entropy jumps over what was asked. */
export type SearchEnd = 'solved' | 'no-convergence' | 'out-of-range' | 'between-states';

/** Relative width of a temperature bracket below which enthalpy is taken to jump. */
const JUMP = 1e-8;
const PASSES = 80;
const GOLDEN = 0.618;
/**
 * So many passes, and only before the answer is bracketed, look for the single phase's temperature before they test its stability:
 * a jump is closed in on by states that are known to be stable.
 */
const EARLY = 6;

/**
 * Phases of z at given pressure and molar enthalpy or entropy. Both rise with temperature at constant pressure, so a
 * bracket grows tight around the answer from every equilibrium state that is met; inside the two-phase region flows
 * and temperature are solved together.
 *
 * @param target  molar enthalpy [J/mol] or entropy [J/(mol K)]
 * @param T0      where to start [K]
 * @param from    'K': w.lnK holds a start
 * @returns 'solved' with the answer in w (see flashTP; w.T_K); 'between-states': the property jumps over the target
 */
export function flashCaloric(
  w: FlashWork,
  z: Float64Array,
  P: number,
  target: number,
  of: Caloric,
  T0: number,
  from: StartK,
): SearchEnd {
  let low = LEAST_T_K;
  let high = MOST_T_K;
  let T = T0 > low && T0 < high ? T0 : 300;
  let iterations = 0;
  let missed = 0;
  let belowT = 0;
  let belowMiss = 0;
  let aboveT = 0;
  let aboveMiss = 0;
  let lastT = 0;
  /** T is where the single phase has the property. */
  let tuned = false;
  for (let pass = 0; pass < PASSES; pass++) {
    let ok: boolean | undefined;
    if (pass < EARLY && !tuned && !(belowT > 0 && aboveT > 0)) {
      ok = provedSplit(w, z, T, P, pass === 0 ? from : 'nothing');
      const likely = ok === undefined ? likelyT(w, P, target, of, T, low, high) : Number.NaN;
      iterations += w.iterations;
      if (likely > 0) {
        ok = flashTP(w, z, likely, P, 'nothing');
        iterations += w.iterations;
        if (ok) T = likely;
      }
    }
    tuned = false;
    if (ok !== true) {
      ok = flashTP(w, z, T, P, 'nothing');
      iterations += w.iterations;
    }
    if (!ok) {
      // A state that does not settle (at a critical point, or where three phases meet) is stepped round.
      if (++missed > 8) {
        const narrow = belowT > 0 && aboveT > 0 && high - low < 1e-6 * high;
        return narrow && partOfEach(w, z, low, high, P, target, of) ? done(w, iterations) : 'no-convergence';
      }
      if (belowT > 0 && aboveT > 0) T = low + (high - low) * ((missed * GOLDEN) % 1);
      else T *= 1 + (missed % 2 === 0 ? -1 : 1) * 3e-4 * missed;
      continue;
    }
    const miss = target - wholeOf(w, of);
    if (Math.abs(miss) <= closeEnough(of, T, target)) return done(w, iterations);
    if (Math.abs(T - lastT) < 1e-12 * T && Math.abs(miss) < rounding(of, T)) {
      // Beside a boundary the single phase comes closer, a hair beyond where it is stable.
      const there = atBoundary(w, z, T, T, P, target, of) || flashTP(w, z, T, P, 'nothing');
      return there ? done(w, iterations + w.iterations) : 'no-convergence';
    }
    const moved = lastT > 0 ? Math.abs(T - lastT) : 0;
    lastT = T;
    if (miss > 0) {
      low = T;
      belowT = T;
      belowMiss = miss;
    } else {
      high = T;
      aboveT = T;
      aboveMiss = miss;
    }

    let next: number;
    let outside = false;
    if (w.phases === 2) {
      const hidden = w.hidden;
      w.iterations = 0;
      const end = newtonCaloric(w, T, P, target, of);
      iterations += w.iterations;
      if (end === 'equal' && isAnswer(w, P, hidden)) return done(w, iterations);
      outside = end === 'outside';
      // Not the stable state, or a phase is about to vanish: go on from that temperature.
      next = end === 'going' ? Number.NaN : w.T_K;
    } else if (w.lumped) {
      w.iterations = 0;
      const end = newtonCaloric(w, T, P, target, of);
      iterations += w.iterations;
      if (end === 'equal' && staysTwoLiquids(w, w.T_K, P)) return done(w, iterations);
      next = end === 'going' ? Number.NaN : w.T_K;
    } else {
      next = singleT(w, P, target, of, T, low, high);
      tuned = next > low && next < high;
    }

    if (belowT > 0 && aboveT > 0) {
      if (high - low < JUMP * high) {
        w.iterations = 0;
        const bridged = acrossJump(w, z, low, high, P, target, of);
        iterations += w.iterations;
        if (bridged) return done(w, iterations);
        if (high - low < 1e-12 * high) {
          w.iterations = 0;
          const found =
            atBoundary(w, z, low, high, P, target, of) || partOfEach(w, z, low, high, P, target, of);
          iterations += w.iterations;
          return found ? done(w, iterations) : 'between-states';
        }
        next = (low + high) / 2;
      }
      if (!(next > low && next < high)) {
        // Regula falsi first, then halves: a jump is found by halving.
        next =
          pass % 3 === 0 &&
          Math.abs(belowMiss) < 50 * Math.abs(aboveMiss) &&
          Math.abs(aboveMiss) < 50 * Math.abs(belowMiss)
            ? low + ((high - low) * belowMiss) / (belowMiss - aboveMiss)
            : (low + high) / 2;
      }
      const edge = 1e-3 * (high - low);
      if (pass > 8 && (next - low < edge || high - next < edge)) next = (low + high) / 2;
    } else {
      // A vanishing phase holds the temperature back, each time by less: a bracket needs steps that grow.
      if (outside && Math.abs(next - T) < 2 * moved) next = T + Math.sign(miss) * 2 * moved;
      const ahead = miss > 0 ? Math.min(T * 1.3, (T + high) / 2) : Math.max(T / 1.3, (T + low) / 2);
      if (!(next > low && next < high) || (outside && Math.abs(next - T) > Math.abs(ahead - T))) next = ahead;
    }
    if (next > 0.999 * MOST_T_K || next < 1.001 * LEAST_T_K) return 'out-of-range';
    T = next;
  }
  return 'no-convergence';
}

function done(w: FlashWork, iterations: number): 'solved' {
  w.iterations = iterations;
  return 'solved';
}

/** A split that newtonCaloric found, tested as flashTP tests its own; small phases are real, but none is negative. */
function isAnswer(w: FlashWork, P: number, hiddenBefore: boolean): boolean {
  const T = w.T_K;
  if (sameness(w)) return false;
  orderByVolume(w);
  if (w.formers.length === 0) return true;
  if (liquidLike(w, w.vap, T) && liquidLike(w, w.liq, T)) return false;
  setPlane(w, w.vap);
  const hidden = hiddenLiquid(w, T, P, w.vap, w.liq);
  if (hidden) w.hiddenX.set(w.trial.x);
  w.hidden = hidden;
  // A second liquid that was not there at the start: the stable state may have no vapour; ask again from nothing.
  return !hidden || hiddenBefore;
}

/**
 * Where to look after a start at which no split was proved: the temperature at which the single phase in w.feed has the property,
 * whether it is stable or not; NaN if that leads nowhere. The stability test, which costs most, is then made there and not at the
 * start. Far from there only a vapour that is heated is still a phase: a liquid may part or boil, a vapour condense.
 */
function likelyT(
  w: FlashWork,
  P: number,
  target: number,
  of: Caloric,
  T: number,
  low: number,
  high: number,
): number {
  const { model, feed } = w;
  model.evaluate('stable', T, P, feed.x, 2, feed.props);
  w.iterations++;
  const vapour = feed.props.side === 'vapour';
  const found = singleT(w, P, target, of, T, low, high);
  const most = vapour ? 0.999 * MOST_T_K : (1 + FAR) * T;
  const inside = found > Math.max(low, (1 - FAR) * T) && found < Math.min(high, most);
  return inside ? found : Number.NaN;
}

/** Change of temperature over which a single phase is followed, unless it is a heated vapour [-]. */
const FAR = 0.2;

/** Temperature at which the single phase of the feed, on its present root, has the property [K]; NaN if not found. */
function singleT(
  w: FlashWork,
  P: number,
  target: number,
  of: Caloric,
  T0: number,
  low: number,
  high: number,
): number {
  const { model, feed, trial } = w;
  let T = T0;
  let miss = target - (of === 'h' ? feed.props.h_J_mol : feed.props.s_J_molK);
  let cp = feed.props.cp_J_molK;
  const side = feed.props.side;
  for (let pass = 0; pass < 30; pass++) {
    let move = (of === 'h' ? miss : miss * T) / cp;
    const most = 0.4 * T;
    if (Math.abs(move) > most) move = Math.sign(move) * most;
    const next = T + move;
    if (next === T || !(next > low && next < high)) return next;
    T = next;
    model.evaluate(feed.side === 'liquid' ? 'liquid' : side, T, P, feed.x, 2, trial.props);
    w.iterations++;
    miss = target - (of === 'h' ? trial.props.h_J_mol : trial.props.s_J_molK);
    cp = trial.props.cp_J_molK;
    if (!(cp > 0)) return Number.NaN;
    if (Math.abs(miss) <= 0.5 * closeEnough(of, T, target) || Math.abs(move) < 2e-14 * T) return T;
  }
  return T;
}

/** A boiling range narrower than the bracket: vapour fraction by the lever rule, then flows and temperature together. */
function acrossJump(
  w: FlashWork,
  z: Float64Array,
  low: number,
  high: number,
  P: number,
  target: number,
  of: Caloric,
): boolean {
  const { n, model, feed, vap, liq, K, lnK } = w;
  const T = (low + high) / 2;
  vap.side = 'vapour';
  liq.side = 'liquid';
  model.evaluate('vapour', T, P, feed.x, 1, vap.props);
  model.evaluate('liquid', T, P, feed.x, 1, liq.props);
  w.iterations += 2;
  const above = of === 'h' ? vap.props.h_J_mol : vap.props.s_J_molK;
  const below = of === 'h' ? liq.props.h_J_mol : liq.props.s_J_molK;
  const beta = (target - below) / (above - below);
  if (!(beta > 0 && beta < 1)) return false;
  for (let i = 0; i < n; i++) {
    lnK[i] = liq.props.lnPhi[i]! - vap.props.lnPhi[i]!;
    K[i] = Math.exp(lnK[i]!);
  }
  placeFlows(w, z, beta);
  if (newtonCaloric(w, T, P, target, of) !== 'equal') return false;
  w.phases = 2;
  w.lumped = false;
  return isAnswer(w, P, true);
}

/**
 * The target lies on a boundary of the two-phase region, within rounding of it: the single phase on one of its sides,
 * taken to the temperature where it has the property.
 */
function atBoundary(
  w: FlashWork,
  z: Float64Array,
  low: number,
  high: number,
  P: number,
  target: number,
  of: Caloric,
): boolean {
  for (const T of [low, high]) {
    if (!flashTP(w, z, T, P, 'nothing') || w.phases === 2 || w.lumped) continue;
    const at = singleT(w, P, target, of, T, T * (1 - BOUNDARY), T * (1 + BOUNDARY));
    if (!(Math.abs(at - T) < BOUNDARY * T)) continue;
    w.model.evaluate(w.feed.props.side, at, P, w.feed.x, 2, w.feed.props);
    w.T_K = at;
    if (Math.abs(target - wholeOf(w, of)) <= rounding(of, at)) return true;
  }
  return false;
}
const BOUNDARY = 1e-9;

/**
 * The state jumps because a second liquid comes or goes (three phases meet): part of the state on each side. Without a
 * second liquid a jump is not explained, and there is no answer.
 */
function partOfEach(
  w: FlashWork,
  z: Float64Array,
  low: number,
  high: number,
  P: number,
  target: number,
  of: Caloric,
): boolean {
  if (!flashTP(w, z, low, P, 'nothing')) return false;
  const below = answerOf(w);
  if (!flashTP(w, z, high, P, 'nothing')) return false;
  const above = answerOf(w);
  if (below.hiddenLiquid === undefined && above.hiddenLiquid === undefined) return false;
  const a = of === 'h' ? below.h_J_mol : below.s_J_molK;
  const b = of === 'h' ? above.h_J_mol : above.s_J_molK;
  const share = (target - a) / (b - a);
  if (!(share >= 0 && share <= 1)) return false;
  w.told = between(below, above, share);
  return true;
}
