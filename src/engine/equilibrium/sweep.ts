import { answerOf } from './answer';
import { between } from './blend';
import { newtonFraction, type Sought } from './fraction';
import { bubbleOfTwo } from './incipient';
import { flashTP } from './tp';
import { LEAST_T_K, MOST_T_K } from './whole';
import type { FlashWork } from './work';

/** How a search for a vapour fraction ended. */
export type FractionSearch = 'solved' | 'no-convergence' | 'no-such-state' | 'out-of-range';

/** Steps from the thin end of the usual range to its dense end. */
const GRID = 48;
const LEAST_P_Pa = 1e-9;
/** A bracket of T or P, in its logarithm, within which the vapour fraction is taken to jump. */
const JUMP = 1e-12;

/** What the sweep asks of a flash: vapour fraction at u, 2 and -1 for one phase, undefined where nothing settles. */
type FractionAt = (u: number) => number | undefined;

/**
 * The slow, sure way to a vapour fraction: flashes at given T and P from the thin side to the dense one, until the vapour
 * fraction passes the wanted value; then halves, then Newton. Where the fraction jumps because a second liquid comes or goes,
 * the state is part of those on both sides.
 *
 * @param centre  where the start values have the fraction
 * @param stands  whether what Newton left in the workspace is an answer
 * @returns  'no-convergence' where the fraction jumps and two liquids do not explain it (three may); 'out-of-range' when the
 *           state lies beyond the coldest temperature or the least pressure
 */
export function searchFraction(
  w: FlashWork,
  z: Float64Array,
  beta: number,
  sought: Sought,
  given: number,
  centre: number,
  stands: () => boolean,
): FractionSearch {
  let iterations = w.iterations;
  const flashAt = (u: number): boolean => {
    const ok = sought === 'T' ? flashTP(w, z, u, given, 'nothing') : flashTP(w, z, given, u, 'nothing');
    iterations += w.iterations;
    return ok;
  };
  const at: FractionAt = (u) => {
    if (!flashAt(u)) return undefined;
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
    return end === 'equal' && stands();
  };
  let unexplained = false;
  const jump = (thin: number, dense: number): boolean => {
    const end = partOfBoth(w, z, sought, given, flashAt, thin, dense, beta);
    unexplained ||= end === 'unexplained';
    return end === 'explained';
  };

  // From thin to dense: temperature down, pressure up.
  const thin = sought === 'T' ? Math.min(centre * 2, MOST_T_K) : centre * 1e-3;
  const dense = sought === 'T' ? Math.max(centre * 0.35, LEAST_T_K) : centre * 1e3;
  // A gas whose solubility rises with temperature leaves its oil in the cold, far from where the start values say.
  const further = sought === 'T' ? LEAST_T_K : dense;
  const ratio = (dense / thin) ** (1 / GRID);
  const steps = Math.ceil(Math.log(further / thin) / Math.log(ratio) - 1e-9);
  let uBefore = thin;
  let before = at(thin);
  for (let k = 1; k <= steps; k++) {
    const u = k === steps ? further : thin * ratio ** k;
    const now = at(u);
    if (before !== undefined && now !== undefined && (before - beta) * (now - beta) <= 0 && before !== now) {
      if (halve(w, at, finish, jump, [uBefore, u], before, beta)) {
        w.iterations = iterations;
        if (w.told !== undefined) w.told = { ...w.told, iterations };
        return 'solved';
      }
    }
    uBefore = u;
    before = now;
  }
  const last = at(sought === 'T' ? LEAST_T_K : LEAST_P_Pa);
  w.iterations = iterations;
  if (last === undefined || unexplained) return 'no-convergence';
  return (sought === 'T' ? last > beta : last < beta) ? 'out-of-range' : 'no-such-state';
}

/** Halves a bracket in which the vapour fraction passes beta, trying Newton on the way. */
function halve(
  w: FlashWork,
  at: FractionAt,
  finish: (u: number) => boolean,
  jump: (thin: number, dense: number) => boolean,
  [thin, dense]: readonly [number, number],
  fThin: number,
  beta: number,
): boolean {
  let a = thin;
  let fa = fThin;
  let b = dense;
  for (let half = 0; half < 60; half++) {
    const middle = Math.sqrt(a * b);
    const f = at(middle);
    if (f === undefined) return false;
    const tries = Math.abs(f - beta) < 0.05 || (half > 6 && half < 12) || half % 6 === 0;
    if (w.phases === 2 && tries && finish(middle)) return true;
    if ((fa - beta) * (f - beta) > 0) {
      a = middle;
      fa = f;
    } else b = middle;
    if (Math.abs(Math.log(a / b)) < JUMP) return jump(a, b);
  }
  return false;
}

/**
 * The vapour fraction jumps over the wanted one because a second liquid comes or goes (three phases meet): part of the
 * state on each side. For a bubble point that is the two liquids, with the vapour that is about to form. Without a
 * second liquid on either side it is one phase that grows dense: no jump.
 */
function partOfBoth(
  w: FlashWork,
  z: Float64Array,
  sought: Sought,
  given: number,
  flashAt: (u: number) => boolean,
  thin: number,
  dense: number,
  beta: number,
): 'explained' | 'unexplained' | 'none' {
  if (!flashAt(thin)) return 'unexplained';
  const light = answerOf(w);
  if (!flashAt(dense)) return 'unexplained';
  const heavy = answerOf(w);
  if (light.hiddenLiquid === undefined && heavy.hiddenLiquid === undefined) return 'none';
  const share = (beta - heavy.vapourFraction) / (light.vapourFraction - heavy.vapourFraction);
  if (!(share >= 0 && share <= 1)) return 'unexplained';
  if (beta > 0) {
    w.told = between(heavy, light, share);
    return 'explained';
  }
  // A bubble point: the two liquids of one side, and the vapour of the other to begin with.
  const [liquids, vapours] = light.vapourFraction === 0 ? [light, heavy] : [heavy, light];
  const vapour = vapours.phases.find((phase) => phase.kind === 'vapour');
  if (vapour === undefined || (liquids === light && !flashAt(thin)) || !w.lumped) return 'unexplained';
  const u = sought === 'T' ? liquids.T_K : liquids.P_Pa;
  return bubbleOfTwo(w, z, sought, given, u, vapour.x) ? 'explained' : 'unexplained';
}
