import type { ThermoModel } from '../thermo/types';
import { heatsApart } from './candidates';

/** Activity coefficients are extrapolated from 298 K as 1/T; each is taken this many times too large. */
const MARGIN = 1.5;
/** -ln of an activity of a tenth: no liquid rich in such a chemical is near. */
const FAR = 2.3;
/** ln of the activity coefficient at infinite dilution below which a regular solution is one liquid. */
const PARTS = 2;

interface Apart {
  /** T ln gamma of i at infinite dilution in j at [j * n + i] [K]. */
  readonly oneWay: Float64Array;
  /** The larger of the two ways round [K]. */
  readonly pair: Float64Array;
}
const kept = new WeakMap<ThermoModel, Apart>();

function apartOf(model: ThermoModel): Apart {
  const known = kept.get(model);
  if (known) return known;
  const { n } = model;
  const oneWay = heatsApart(model);
  const pair = oneWay.map((heat, k) => Math.max(heat, oneWay[(k % n) * n + Math.floor(k / n)]!));
  const made = { oneWay, pair };
  kept.set(model, made);
  return made;
}

/**
 * Whether a liquid is surely one liquid, without a stability test: far from parting even if the activity coefficients were half
 * as large again. False says nothing.
 *
 * In a regular solution with pair constants between 0 and 2 the Gibbs energy is convex: for any change d of the amounts that
 * sums to 0, and of which the parts of either sign sum to 1, sum of d_i^2/x_i is at least 4 and d'Ad at least -2 max A.
 * Chemicals whose activity cannot reach a tenth are left out, as stability tests leave them out.
 *
 * @param x  mole fractions over the model's chemicals; absent ones are 0
 */
export function isOneLiquid(model: ThermoModel, T_K: number, x: Float64Array): boolean {
  if (model.spec.kind === 'raoult') return true;
  const { n } = model;
  const { oneWay, pair } = apartOf(model);
  const counts = (i: number): boolean => {
    if (x[i] === 0) return false;
    let most = 0;
    for (let j = 0; j < n; j++) if (x[j] !== 0 && oneWay[j * n + i]! > most) most = oneWay[j * n + i]!;
    return Math.log(x[i]!) + (MARGIN * most) / T_K >= -FAR;
  };
  for (let i = 1; i < n; i++) {
    let strange = false;
    for (let j = 0; j < i; j++) if (x[j] !== 0 && MARGIN * pair[j * n + i]! >= PARTS * T_K) strange = true;
    if (!strange || !counts(i)) continue;
    for (let j = 0; j < i; j++) if (MARGIN * pair[j * n + i]! >= PARTS * T_K && counts(j)) return false;
  }
  return true;
}
