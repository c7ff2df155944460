import { settleLiquids } from './liquids';
import { expansionOf } from './naming';
import { vapourFractionOf } from './rachford-rice';
import { orderByVolume, settle } from './settle';
import {
  CALM,
  evaluateBoth,
  fractions,
  gibbsAgainstPlane,
  placeFlows,
  renewK,
  type SplitEnd,
  substitute,
} from './split';
import { liquidLike, setPlane } from './stability';
import { isUnstable } from './starts';
import type { FlashWork } from './work';

/** Gibbs energy gained before a split counts as proved. */
const GAIN = -1e-12;

/**
 * Where a TP flash may start: w.lnK as an earlier answer left it. 'nothing' starts from the model's start values.
 */
export type StartK = 'nothing' | 'K';

/**
 * Phases of z at given temperature and pressure.
 *
 * A split is looked for from start values of K and kept if its Gibbs energy is below the single phase's; otherwise a
 * stability test decides, and gives the start when the feed is not stable. Both phases are then tested in turn.
 *
 * On return w.phases is 1 (the phase in w.feed, level-2 properties) or 2 (w.vap, expanded further, and w.liq, flows for
 * one mole of feed, level-2 properties); w.hidden tells that a second liquid was found.
 *
 * @param z   mole fractions, each > 0, sum 1
 * @returns   false when no answer within |difference of ln fugacity| of 2e-10 was reached
 * Mutates: w only. Allocates nothing but the pseudo-critical constants.
 * Source: Michelsen, Fluid Phase Equilib. 9 (1982) 1 and 21.
 */
export function flashTP(w: FlashWork, z: Float64Array, T: number, P: number, from: StartK): boolean {
  return flashHere(w, z, T, P, from) || approach(w, z, T, P);
}

/**
 * Close to a critical point the phases hardly differ and no step is sure of its direction: a split some kelvins away,
 * where they differ more, is followed to the temperature asked.
 */
function approach(w: FlashWork, z: Float64Array, T: number, P: number): boolean {
  let iterations = w.iterations;
  for (const away of [-3e-3, 3e-3, -1e-2, 1e-2]) {
    const far = flashHere(w, z, T * (1 + away), P, 'nothing');
    iterations += w.iterations;
    if (!far || w.phases !== 2) continue;
    w.iterations = iterations;
    w.T_K = T;
    w.P_Pa = P;
    w.hidden = false;
    w.lumped = false;
    renewK(w);
    let end: SplitEnd = 'equal';
    let left = away;
    while (left !== 0 && end === 'equal') {
      left = Math.abs(left) < 1e-5 ? 0 : left / 2;
      const beta = vapourFractionOf(z, w.K, -1);
      if (beta > 0 && beta < 1) placeFlows(w, z, beta);
      end = settle(w, z, T * (1 + left), P);
      renewK(w);
    }
    iterations = w.iterations;
    if (end !== 'equal') continue;
    w.feed.x.set(z);
    w.model.evaluate('stable', T, P, w.feed.x, 0, w.feed.props);
    setPlane(w, w.feed);
    if (gibbsAgainstPlane(w) < 1e-13) return finishTwo(w, z, T, P);
  }
  return false;
}

/**
 * The cheap half of flashTP: a split from start values, kept where its Gibbs energy proves it.
 *
 * @returns as flashTP; undefined when no split was proved, which says nothing of the feed's stability. Then w.feed holds the single
 *          phase (level 0) and w.d its plane
 */
export function provedSplit(
  w: FlashWork,
  z: Float64Array,
  T: number,
  P: number,
  from: StartK,
): boolean | undefined {
  const { model, n, feed, K, lnK } = w;
  w.T_K = T;
  w.P_Pa = P;
  w.iterations = 0;
  w.residual = 0;
  w.hidden = false;
  w.lumped = false;
  feed.x.set(z);
  feed.total = 1;
  feed.side = 'stable';
  model.evaluate('stable', T, P, feed.x, 0, feed.props);
  w.iterations++;
  if (n === 1) {
    model.evaluate('stable', T, P, feed.x, 2, feed.props);
    w.iterations++;
    return finishOne(w);
  }
  setPlane(w, feed);
  w.vap.side = 'vapour';
  w.liq.side = 'liquid';

  if (from === 'nothing') {
    model.startK(T, P, K);
    for (let i = 0; i < n; i++) lnK[i] = Math.log(K[i]!);
  } else {
    for (let i = 0; i < n; i++) K[i] = Math.exp(lnK[i]!);
  }
  if (substitute(w, z, T, P, from === 'K' ? 1 : 3, CALM) !== 'going') return undefined;
  // Warm, the split is proved once it has settled; cold, it must already lie below the single phase to be pursued.
  if (from !== 'K' && !(gibbsAgainstPlane(w) < GAIN)) return undefined;
  if (settle(w, z, T, P) !== 'equal' || !(gibbsAgainstPlane(w) < 1e-13)) return undefined;
  return finishTwo(w, z, T, P);
}

function flashHere(w: FlashWork, z: Float64Array, T: number, P: number, from: StartK): boolean {
  const proved = provedSplit(w, z, T, P, from);
  if (proved !== undefined) return proved;
  const { model, feed } = w;
  model.evaluate('stable', T, P, feed.x, 2, feed.props);
  w.iterations++;
  if (!isUnstable(w, T, P)) return finishOne(w);
  const light = startFromTrial(w, z, T, P);
  if (light === undefined) return finishOne(w);
  const end = settle(w, z, T, P);
  if (end === 'equal') return finishTwo(w, z, T, P);
  return end === 'trivial' ? finishOne(w) : false;
}

/**
 * Places a split with the trial of a stability test as one phase.
 *
 * @returns the side that the lighter phase takes; undefined when the split cannot be placed
 */
export function startFromTrial(
  w: FlashWork,
  z: Float64Array,
  T: number,
  P: number,
): 'vapour' | 'liquid' | undefined {
  const { n, feed, trial, K, lnK, vap, liq } = w;
  const trialIsLight = expansionOf(w.model, trial.x, trial.props) >= expansionOf(w.model, feed.x, feed.props);
  const bothLiquid = liquidLike(w, feed, T) && liquidLike(w, trial, T);
  vap.side = bothLiquid ? 'liquid' : 'vapour';
  liq.side = 'liquid';
  for (let i = 0; i < n; i++) {
    const toTrial = feed.props.lnPhi[i]! - trial.props.lnPhi[i]!;
    lnK[i] = trialIsLight ? toTrial : -toTrial;
    K[i] = Math.exp(lnK[i]!);
  }
  const beta = vapourFractionOf(z, K, -1);
  if (beta > 0 && beta < 1) {
    placeFlows(w, z, beta);
    return vap.side === 'liquid' ? 'liquid' : 'vapour';
  }
  // As much of the trial phase as the scarcest chemical allows, by half.
  let amount = 0.5;
  for (let i = 0; i < n; i++) {
    if (trial.x[i]! > 0) amount = Math.min(amount, (0.5 * z[i]!) / trial.x[i]!);
  }
  if (!(amount > 1e-250)) return undefined;
  const part = trialIsLight ? vap : liq;
  const rest = trialIsLight ? liq : vap;
  let total = 0;
  for (let i = 0; i < n; i++) {
    part.flow[i] = amount * Math.max(trial.x[i]!, 1e-290);
    rest.flow[i] = z[i]! - part.flow[i]!;
    total += part.flow[i]!;
  }
  part.total = total;
  rest.total = 1 - total;
  fractions(part, n);
  fractions(rest, n);
  evaluateBoth(w, T, P, 0);
  renewK(w);
  return vap.side === 'liquid' ? 'liquid' : 'vapour';
}

/** A single phase: w.feed with level-2 properties. */
function finishOne(w: FlashWork): true {
  w.phases = 1;
  w.residual = 0;
  return true;
}

function finishTwo(w: FlashWork, z: Float64Array, T: number, P: number): boolean {
  w.phases = 2;
  orderByVolume(w);
  return settleLiquids(w, z, T, P);
}
