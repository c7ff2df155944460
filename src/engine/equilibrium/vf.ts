import { newtonFraction, type Sought, startPoint } from './fraction';
import { expansionOf } from './naming';
import { mayComeAgain } from './several';
import { liquidLike, setPlane } from './stability';
import { hiddenLiquid, isUnstable, vapourBelow } from './starts';
import { flashTP } from './tp';
import { LEAST_T_K, MOST_T_K } from './whole';
import type { FlashWork } from './work';

export type FractionSearch = 'solved' | 'no-convergence' | 'no-such-state' | 'out-of-range';

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
  const found = (from: number, ease: number): boolean =>
    newtonFraction(w, z, beta, sought, given, from, ease) === 'equal' &&
    accept(w) &&
    isThinSide(w, z, beta, sought, given);
  if (start !== undefined && found(start, 0)) return 'solved';
  const first = startPoint(w, z, beta, sought, given);
  if (found(first, 4)) return 'solved';
  startPoint(w, z, beta, sought, given);
  if (found(first, 15)) return 'solved';
  return searchFraction(w, z, beta, sought, given, first);
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
  const u = sought === 'T' ? w.T_K : w.P_Pa;
  const { iterations } = w;
  const lnK = Float64Array.from(w.vap.x, (y, i) => Math.log(y / w.liq.x[i]!));
  const ok =
    sought === 'T'
      ? flashTP(w, z, u * ASIDE.T, given, 'nothing')
      : flashTP(w, z, given, u / ASIDE.P, 'nothing');
  const less = ok && w.phases === 2 && w.vap.total < beta - LESS;
  w.lnK.set(lnK);
  w.iterations = iterations;
  const back = newtonFraction(w, z, beta, sought, given, u, 0) === 'equal' && accept(w);
  return back && !less;
}

/** Whether what Newton found is a vapour and a liquid; looks for a second liquid beside it. */
function accept(w: FlashWork): boolean {
  const { vap, liq, T_K: T, P_Pa: P } = w;
  if (!(T > LEAST_T_K && T < MOST_T_K)) return false;
  const lighter = expansionOf(w.model, vap.x, vap.props) > expansionOf(w.model, liq.x, liq.props);
  if (!lighter && (vap.props.single || liq.props.single)) return false;
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
  if (vapourBelow(w, T, P, liq, vap)) return false;
  setPlane(w, vap);
  if (hiddenLiquid(w, T, P, vap, liq)) {
    w.hidden = true;
    w.hiddenX.set(w.trial.x);
  }
  return true;
}

const GRID = 48;
/** Volumes that differ by less than this share. */
const ALIKE = 0.03;

/**
 * The slow, sure way: flashes at given T and P from the thin side to the dense one, until the vapour fraction passes
 * the wanted value; then halves, then Newton.
 */
function searchFraction(
  w: FlashWork,
  z: Float64Array,
  beta: number,
  sought: Sought,
  given: number,
  centre: number,
): FractionSearch {
  let iterations = w.iterations;
  const at = (u: number): number | undefined => {
    const ok = sought === 'T' ? flashTP(w, z, u, given, 'nothing') : flashTP(w, z, given, u, 'nothing');
    iterations += w.iterations;
    if (!ok) return undefined;
    if (w.phases === 2) return w.vap.total;
    const critical = w.model.pseudoCritical(w.feed.x);
    // Beyond the ends, so that bubble and dew points are crossings too.
    return !w.lumped && w.feed.props.v_m3_mol > critical.v_m3_mol ? 2 : -1;
  };
  const finish = (u: number): boolean => {
    for (let i = 0; i < w.n; i++) w.lnK[i] = Math.log(w.vap.x[i]! / w.liq.x[i]!);
    w.iterations = 0;
    const end = newtonFraction(w, z, beta, sought, given, u, 0);
    iterations += w.iterations;
    return end === 'equal' && accept(w);
  };
  // From thin to dense: temperature down, pressure up.
  const thin = sought === 'T' ? Math.min(centre * 2, MOST_T_K) : centre * 1e-3;
  const dense = sought === 'T' ? Math.max(centre * 0.35, LEAST_T_K) : centre * 1e3;
  let uBefore = thin;
  let before = at(thin);
  for (let k = 1; k <= GRID; k++) {
    const u = thin * (dense / thin) ** (k / GRID);
    const now = at(u);
    if (before !== undefined && now !== undefined && (before - beta) * (now - beta) <= 0 && before !== now) {
      let a = uBefore;
      let fa = before;
      let b = u;
      for (let half = 0; half < 60; half++) {
        const middle = Math.sqrt(a * b);
        const f = at(middle);
        if (f === undefined) break;
        if (w.phases === 2 && (Math.abs(f - beta) < 0.05 || half > 6) && finish(middle)) {
          w.iterations = iterations;
          return 'solved';
        }
        if ((fa - beta) * (f - beta) > 0) {
          a = middle;
          fa = f;
        } else b = middle;
        if (Math.abs(Math.log(a / b)) < 1e-12) break;
      }
    }
    uBefore = u;
    before = now;
  }
  w.iterations = iterations;
  return 'no-such-state';
}
