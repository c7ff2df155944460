import type { ThermoModel } from '../thermo/types';
import { lnGammasApart } from './candidates';

/**
 * Activity coefficients are those of pure solvents at a high pressure; the logarithm of each is taken this many times too
 * large.
 */
const MARGIN = 1.5;
/** -ln of an activity of a tenth: no liquid rich in such a chemical is near. */
const FAR = 2.3;
/** ln of the activity coefficient at infinite dilution below which a regular solution is one liquid. */
const PARTS = 2;
/** Activity coefficients are found at temperatures that grow by this factor; between two of them the worse one counts. */
const RATIO = 1.2;
/**
 * A k_ij below this draws two chemicals together so strongly that they are no regular solution, and either may matter though its
 * activity is small. Random mixtures parted unforeseen from -0.18 down.
 */
const DRAWN = -0.05;

/** ln gamma at infinite dilution between two neighbouring temperatures. */
interface Apart {
  /** Of i in j at [j * n + i], the larger. */
  readonly oneWay: Float64Array;
  /** The larger of the two ways round, at the worse temperature. */
  readonly most: Float64Array;
  /** The larger of the two ways round, at the better temperature: negative where two chemicals draw each other. */
  readonly least: Float64Array;
}
interface Kept {
  readonly at: Map<number, Float64Array>;
  readonly between: Map<number, Apart>;
}
const kept = new WeakMap<ThermoModel, Kept>();

function apartOf(model: ThermoModel, T_K: number): Apart {
  const step = Math.floor(Math.log(T_K) / Math.log(RATIO));
  let own = kept.get(model);
  if (!own) {
    own = { at: new Map(), between: new Map() };
    kept.set(model, own);
  }
  const known = own.between.get(step);
  if (known) return known;
  const { at } = own;
  const [cold, hot] = [step, step + 1].map((k) => {
    const found = at.get(k) ?? lnGammasApart(model, RATIO ** k);
    at.set(k, found);
    return found;
  }) as [Float64Array, Float64Array];
  const { n } = model;
  const turned = (k: number): number => (k % n) * n + Math.floor(k / n);
  const larger = (of: Float64Array, k: number): number => Math.max(of[k]!, of[turned(k)]!);
  const made: Apart = {
    oneWay: cold.map((v, k) => Math.max(v, hot[k]!)),
    most: cold.map((_, k) => Math.max(larger(cold, k), larger(hot, k))),
    least: cold.map((_, k) => Math.min(larger(cold, k), larger(hot, k))),
  };
  own.between.set(step, made);
  return made;
}

/** The largest ln gamma at infinite dilution of chemical i in another one, or of another one in it. */
export function mostApart(model: ThermoModel, T_K: number, i: number): number {
  const { most } = apartOf(model, T_K);
  let found = 0;
  for (let j = 0; j < model.n; j++) found = Math.max(found, most[j * model.n + i]!);
  return found;
}

/**
 * Whether a liquid is surely one liquid, without a stability test: far from parting even if the activity coefficients were half
 * as large again. False says nothing.
 *
 * In a regular solution with pair constants from -N to M the Gibbs energy is convex where M + N < 2: for a change d = p - q of
 * the amounts, p and q >= 0 without a common chemical and each of sum 1, the sum of d_i^2/x_i is at least 1/x_P + 1/x_Q >= 4, and
 * d'Ad = p'Ap + q'Aq - 2 p'Aq is at least -2 N - 2 M.
 * Chemicals whose activity cannot reach a tenth are left out, as stability tests leave them out.
 *
 * @param x  mole fractions over the model's chemicals; absent ones are 0
 */
export function isOneLiquid(model: ThermoModel, T_K: number, x: Float64Array): boolean {
  if (model.spec.kind === 'raoult') return true;
  if (model.spec.pairs.some(({ kij }) => kij < DRAWN)) return false;
  const { n } = model;
  const { oneWay, most, least } = apartOf(model, T_K);
  const counts = (i: number): boolean => {
    if (x[i] === 0) return false;
    let gamma = 0;
    for (let j = 0; j < n; j++) if (x[j] !== 0 && oneWay[j * n + i]! > gamma) gamma = oneWay[j * n + i]!;
    return Math.log(x[i]!) + MARGIN * gamma >= -FAR;
  };
  let M = 0;
  let N = 0;
  for (let i = 1; i < n; i++) {
    if (!counts(i)) continue;
    for (let j = 0; j < i; j++) {
      const apart = MARGIN * most[j * n + i]!;
      const drawn = -MARGIN * least[j * n + i]!;
      if ((apart <= M && drawn <= N) || !counts(j)) continue;
      M = Math.max(M, apart);
      N = Math.max(N, drawn);
      if (M + N >= PARTS) return false;
    }
  }
  return true;
}
