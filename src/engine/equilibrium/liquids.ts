import { expansionOf } from './naming';
import { vapourFractionOf } from './rachford-rice';
import { orderByVolume, settle } from './settle';
import { gibbsAgainstPlane, placeFlows, sameness } from './split';
import { liquidLike, setPlane } from './stability';
import { hiddenLiquid, vapourBelow } from './starts';
import type { FlashWork, Slot } from './work';

/**
 * Looks for a second liquid behind a converged two-phase answer in w.vap, w.liq.
 *
 * The numbers stay those of one liquid at most. Two liquids without a vapour: the feed as one liquid, with the other
 * said. Vapour and liquid beside which another liquid could form: vapour and liquid, with the other said, unless the
 * stable state has no vapour at all.
 *
 * On return w.phases, the slots and w.hidden, w.hiddenX hold the answer (see flashTP).
 */
export function settleLiquids(w: FlashWork, z: Float64Array, T: number, P: number): boolean {
  if (w.formers.length === 0) return true;
  if (bothLiquid(w, T)) return afterTwoLiquids(w, z, T, P);
  return afterVapourLiquid(w, z, T, P, true);
}

/**
 * The stable state is two liquids, in w.vap and w.liq: they are taken together as one liquid phase of the feed's
 * composition with the properties of both (a single liquid of that composition does not exist in nature, and in the
 * model its enthalpy would be off by tens of kJ/mol). `other` is the composition that is said.
 */
function asOneLiquid(w: FlashWork, other: Float64Array): true {
  w.hidden = true;
  w.hiddenX.set(other);
  w.phases = 1;
  w.lumped = true;
  return true;
}

/** Whether two liquids that moved to another temperature are two liquids still, and no vapour lies below their plane. */
export function staysTwoLiquids(w: FlashWork, T: number, P: number): boolean {
  if (sameness(w)) return false;
  orderByVolume(w);
  if (!bothLiquid(w, T) || vapourBelow(w, T, P, w.vap, w.liq)) return false;
  const smaller = w.vap.total < w.liq.total ? w.vap : w.liq;
  return asOneLiquid(w, smaller.x);
}

function bothLiquid(w: FlashWork, T: number): boolean {
  return liquidLike(w, w.vap, T) && liquidLike(w, w.liq, T);
}

function afterTwoLiquids(w: FlashWork, z: Float64Array, T: number, P: number): boolean {
  const smaller = w.vap.total < w.liq.total ? w.vap : w.liq;
  w.hiddenX.set(smaller.x);
  setPlane(w, w.vap);
  if (!vapourBelow(w, T, P, w.vap, w.liq)) return asOneLiquid(w, w.hiddenX);
  exchange(w);
  const larger = w.vap2.total >= w.liq2.total ? w.vap2 : w.liq2;
  const rest = larger === w.vap2 ? w.liq2 : w.vap2;
  for (const liquid of [larger, rest]) {
    if (!startPair(w, z, w.trial, liquid, 'vapour') || settle(w, z, T, P) !== 'equal') continue;
    orderByVolume(w);
    if (bothLiquid(w, T)) continue;
    w.phases = 2;
    return afterVapourLiquid(w, z, T, P, false);
  }
  exchange(w);
  return asOneLiquid(w, w.hiddenX);
}

function afterVapourLiquid(
  w: FlashWork,
  z: Float64Array,
  T: number,
  P: number,
  lookForMore: boolean,
): boolean {
  setPlane(w, w.vap);
  w.hidden = hiddenLiquid(w, T, P, w.vap, w.liq);
  if (!w.hidden) return true;
  w.hiddenX.set(w.trial.x);
  if (!lookForMore) return true;
  const residual = w.residual;
  exchange(w);
  // Perhaps the stable state is two liquids and no vapour.
  const trialIsLight =
    expansionOf(w.model, w.trial.x, w.trial.props) > expansionOf(w.model, w.liq2.x, w.liq2.props);
  const light = trialIsLight ? w.trial : w.liq2;
  const dense = trialIsLight ? w.liq2 : w.trial;
  if (startPair(w, z, light, dense, 'liquid') && settle(w, z, T, P) === 'equal') {
    orderByVolume(w);
    if (bothLiquid(w, T)) {
      setPlane(w, w.vap);
      if (!vapourBelow(w, T, P, w.vap, w.liq)) return asOneLiquid(w, w.hiddenX);
    }
  }
  // Perhaps the vapour with the other liquid lies lower.
  w.trial.x.set(w.hiddenX);
  w.model.evaluate('liquid', T, P, w.trial.x, 0, w.trial.props);
  if (startPair(w, z, w.vap2, w.trial, 'vapour') && settle(w, z, T, P) === 'equal') {
    orderByVolume(w);
    if (!bothLiquid(w, T)) {
      setPlane(w, w.vap2);
      if (gibbsAgainstPlane(w) < -1e-10) return afterVapourLiquid(w, z, T, P, false);
    }
  }
  exchange(w);
  w.phases = 2;
  w.residual = residual;
  w.hidden = true;
  return true;
}

/** Places a split of z between two phases whose fugacity coefficients are known; false when z is not between them. */
function startPair(
  w: FlashWork,
  z: Float64Array,
  light: Slot,
  dense: Slot,
  side: 'vapour' | 'liquid',
): boolean {
  const { n, K, lnK } = w;
  for (let i = 0; i < n; i++) {
    lnK[i] = dense.props.lnPhi[i]! - light.props.lnPhi[i]!;
    K[i] = Math.exp(lnK[i]!);
  }
  const beta = vapourFractionOf(z, K, -1);
  if (beta <= 0 || beta >= 1) return false;
  w.vap.side = side;
  w.liq.side = 'liquid';
  placeFlows(w, z, beta);
  return true;
}

function exchange(w: FlashWork): void {
  const { vap, liq } = w;
  w.vap = w.vap2;
  w.liq = w.liq2;
  w.vap2 = vap;
  w.liq2 = liq;
}
