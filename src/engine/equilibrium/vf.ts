import { newtonFraction, type Sought, startPoint } from './fraction';
import { bubbleOfTwo, partInTwo } from './incipient';
import { expansionOf } from './naming';
import { mayComeAgain } from './several';
import { liquidLike, setPlane } from './stability';
import { hiddenLiquid, isUnstable, lighterBelow } from './starts';
import { type FractionSearch, searchFraction } from './sweep';
import { flashTP } from './tp';
import { LEAST_T_K, MOST_T_K } from './whole';
import type { FlashWork } from './work';

/**
 * Phases of z at a given vapour fraction and a given pressure (temperature is sought) or temperature (pressure is
 * sought). 0 and 1 are the bubble and the dew point; the incipient phase is then in its slot with a total of zero.
 *
 * Where several states have this fraction (retrograde), the one on the side of low density is taken: the higher
 * temperature, the lower pressure.
 *
 * @param given   pressure [Pa] or temperature [K]
 * @param start   start of what is sought, w.lnK alongside; undefined: from the model's start values
 */
export function flashFraction(
  w: FlashWork,
  z: Float64Array,
  beta: number,
  sought: Sought,
  given: number,
  start: number | undefined,
): FractionSearch {
  w.iterations = 0;
  w.hidden = false;
  w.lumped = false;
  w.told = undefined;
  const stands = (): boolean =>
    accept(w) && (boilsAsTwo(w, z, beta, sought, given) || isStable(w, z, beta, sought, given));
  const found = (from: number, ease: number): boolean =>
    newtonFraction(w, z, beta, sought, given, from, ease) === 'equal' &&
    stands() &&
    (w.told !== undefined || isThinSide(w, z, beta, sought, given));
  if (start !== undefined && found(start, 0)) return 'solved';
  const first = startPoint(w, z, beta, sought, given);
  if (found(first, 4)) return 'solved';
  startPoint(w, z, beta, sought, given);
  if (found(first, 15)) return 'solved';
  return searchFraction(w, z, beta, sought, given, first, stands);
}

/** A step to the thin side that is well above rounding and below what turns a curve. */
const ASIDE = { T: 1.002, P: 1.01 };
const LESS = 1e-6;

/**
 * Whether what Newton found is not the retrograde one of several states: a little hotter, or at a little less pressure, there
 * must be no less vapour. Asked only where states may come again; leaves w as it was.
 */
function isThinSide(w: FlashWork, z: Float64Array, beta: number, sought: Sought, given: number): boolean {
  if (!mayComeAgain(w.model, z, sought === 'T' ? 'P' : 'T', given)) return true;
  return withAside(w, z, beta, sought, given, () => {
    const ok =
      sought === 'T'
        ? flashTP(w, z, w.T_K * ASIDE.T, given, 'nothing')
        : flashTP(w, z, given, w.P_Pa / ASIDE.P, 'nothing');
    return !(ok && w.phases === 2 && w.vap.total < beta - LESS);
  });
}

/** At a bubble point beside which another liquid could form the feed itself parts: it is two liquids that boil. */
function boilsAsTwo(w: FlashWork, z: Float64Array, beta: number, sought: Sought, given: number): boolean {
  if (!w.hidden || beta > 0) return false;
  const vapour = w.vap.x.slice();
  const u = sought === 'T' ? w.T_K : w.P_Pa;
  const lnK = Float64Array.from(w.vap.x, (y, i) => Math.log(y / w.liq.x[i]!));
  const [T, P] = [w.T_K, w.P_Pa];
  // What lies below the two liquids, if anything does, is one of a pair that lies lower.
  for (let pair = 0; pair < 2; pair++) {
    w.T_K = T;
    w.P_Pa = P;
    if (!partInTwo(w, z)) break;
    if (bubbleOfTwo(w, z, sought, given, u, vapour)) return true;
  }
  w.lnK.set(lnK);
  newtonFraction(w, z, beta, sought, given, u, 0);
  accept(w);
  return false;
}

/**
 * Where another liquid could form, the stable state at this temperature and pressure may be two liquids without a vapour, or
 * vapour with the other liquid: what Newton found is then not the state that has this vapour fraction.
 */
function isStable(w: FlashWork, z: Float64Array, beta: number, sought: Sought, given: number): boolean {
  if (!w.hidden) return true;
  return withAside(w, z, beta, sought, given, () => {
    if (!flashTP(w, z, w.T_K, w.P_Pa, 'nothing')) return false;
    return w.phases === 2 && Math.abs(w.vap.total - beta) < LESS;
  });
}

/** Asks something that uses the workspace, and brings back what Newton found. */
function withAside(
  w: FlashWork,
  z: Float64Array,
  beta: number,
  sought: Sought,
  given: number,
  ask: () => boolean,
): boolean {
  const u = sought === 'T' ? w.T_K : w.P_Pa;
  const { iterations } = w;
  const lnK = Float64Array.from(w.vap.x, (y, i) => Math.log(y / w.liq.x[i]!));
  const told = ask();
  w.iterations += iterations;
  if (!told) return false;
  w.lnK.set(lnK);
  return newtonFraction(w, z, beta, sought, given, u, 0) === 'equal' && accept(w);
}

/** Whether what Newton found is a vapour and a liquid; looks for a second liquid beside it. */
function accept(w: FlashWork): boolean {
  const { vap, liq, T_K: T, P_Pa: P } = w;
  if (!(T > LEAST_T_K && T < MOST_T_K)) return false;
  const inOrder = expansionOf(w.model, vap.x, vap.props) > expansionOf(w.model, liq.x, liq.props);
  if (!inOrder && (vap.props.single || liq.props.single)) return false;
  w.phases = 2;
  w.hidden = false;
  if (Math.abs(vap.props.v_m3_mol / liq.props.v_m3_mol - 1) < ALIKE) {
    // Nearly one phase: near a critical point, or on the way to no split at all.
    w.feed.x.set(liq.x);
    w.model.evaluate('stable', T, P, w.feed.x, 2, w.feed.props);
    setPlane(w, w.feed);
    if (isUnstable(w, T, P)) return false;
  }
  if (w.formers.length === 0) return true;
  if (liquidLike(w, vap, T) && liquidLike(w, liq, T)) return false;
  // A lighter vapour below the common plane: this is not the stable split.
  const below = lighterBelow(w, T, P, liq, vap);
  if (below === 'vapour') return false;
  if (below === 'nothing') setPlane(w, vap);
  if (below === 'liquid' || hiddenLiquid(w, T, P, vap, liq)) {
    w.hidden = true;
    w.hiddenX.set(w.trial.x);
  }
  return true;
}

/** Volumes that differ by less than this share. */
const ALIKE = 0.03;
