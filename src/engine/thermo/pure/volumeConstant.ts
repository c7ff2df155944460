/**
 * The constant of the modified Rackett equation, and how it goes with temperature where a density of the saturated
 * liquid is known.
 *
 * One constant serves hydrocarbons; liquids that hold together by hydrogen bonds stray from it by several per cent.
 * So where a chemical has a density correlation, its constant at T is the one with which
 *
 *   v = (R Tc/Pc) Z^(1 + (1 - Tr)^(2/7))
 *
 * gives that density back: ln Z = ln(v Pc/(R Tc)) / (1 + (1 - Tr)^(2/7)). Below and above the correlation it levels
 * off from the value and the slope at the end, so that the equation with a constant takes over without a step or a kink.
 */
import type { ChemicalData } from '../../chemicals/types';
import { R_J_molK } from '../types';
import { makeCurve, statedRange } from './curve';
import { rackettFromOmega } from './liquidVolume';

/** ln Z_RA at T [K] > 0 and its slope [1/K]; finite at every temperature. */
export interface VolumeConstant {
  ln(T: number): number;
  slope(T: number): number;
}

/** Up to here in Tr a density is followed: the equation's own slope is infinite at Tr 1. */
const FOLLOWED_TO = 0.98;
/** Tables: intervals of equal width in T, a cubic with the right value and slope at both ends in each. */
const INTERVALS = 96;
const MIDDLE = INTERVALS / 2;
/** The constant has levelled off, but for a third, this share of Tc away from the end of the correlation. */
const REACH = 0.01;
/** d ln Z/d Tr: a density that asks for more heads for another critical temperature and is not followed. */
const STEEPEST = 3;
/** Constants of every known liquid lie well inside; a density that asks for another is not followed any further. */
const LEAST = 0.1;
const MOST = 0.5;

/** The one constant of a chemical: its own, else from omega; undefined with neither. */
export const plainConstant = (chem: ChemicalData): number | undefined =>
  chem.zRA ?? (chem.omega === undefined ? undefined : rackettFromOmega(chem.omega));

/** True when nothing tells the liquid volume of a chemical, so that 800 kg/m3 is assumed: worth an entry in a register. */
export const isVolumeAssumed = (chem: ChemicalData): boolean =>
  (chem.Tc_K === undefined || chem.Pc_Pa === undefined || plainConstant(chem) === undefined) &&
  (chem.corr.liquid_density ?? []).length === 0;

const made = new WeakMap<ChemicalData, VolumeConstant | 'none'>();

/**
 * The constant of a chemical over temperature; undefined without Tc and Pc, or with neither a density, nor a constant, nor omega.
 * A chemical without a density correlation has the same constant everywhere. Prepared once a chemical.
 */
export function volumeConstant(chem: ChemicalData): VolumeConstant | undefined {
  let known = made.get(chem);
  if (known === undefined) {
    known = follow(chem) ?? constant(chem) ?? 'none';
    made.set(chem, known);
  }
  return known === 'none' ? undefined : known;
}

function constant(chem: ChemicalData): VolumeConstant | undefined {
  const z = plainConstant(chem);
  if (chem.Tc_K === undefined || chem.Pc_Pa === undefined || z === undefined) return undefined;
  const ln = Math.log(z);
  return { ln: () => ln, slope: () => 0 };
}

/** Values and slopes at the ends of the intervals, from the density. */
function follow(chem: ChemicalData): VolumeConstant | undefined {
  const { Tc_K: Tc, Pc_Pa: Pc } = chem;
  const rows = chem.corr.liquid_density ?? [];
  if (Tc === undefined || Pc === undefined || rows.length === 0) return undefined;
  const density = makeCurve(rows);
  const at = (T: number): readonly [number, number] | undefined => {
    const rho = density.at(T);
    const below = 1 - T / Tc;
    const power = 1 + below ** (2 / 7);
    const ln = Math.log(Pc / (R_J_molK * Tc * rho)) / power;
    const dPower = (-(2 / 7) * below ** (-5 / 7)) / Tc;
    const slope = (-density.slope(T) / rho - ln * dPower) / power;
    const sound = rho > 0 && ln > Math.log(LEAST) && ln < Math.log(MOST) && Math.abs(slope) * Tc <= STEEPEST;
    return sound ? [ln, slope] : undefined;
  };
  const range = statedRange(rows);
  let low = Math.max(range.Tmin ?? 0, 1e-3 * Tc);
  let high = Math.min(range.Tmax ?? Tc, FOLLOWED_TO * Tc);
  const value = new Float64Array(INTERVALS + 1);
  const slope = new Float64Array(INTERVALS + 1);
  // Where the density makes no sense at an end, the stretch around the middle in which it does; each pass cuts it finer.
  for (let pass = 0; pass < 4 && high > low; pass++) {
    const step = (high - low) / INTERVALS;
    const node = (k: number): number => (k === INTERVALS ? high : low + k * step);
    let from = 0;
    let to = INTERVALS;
    for (let k = 0; k <= INTERVALS; k++) {
      const found = at(node(k));
      if (found) [value[k], slope[k]] = found;
      else if (k <= MIDDLE) from = k + 1;
      else {
        to = k - 1;
        break;
      }
    }
    if (from === 0 && to === INTERVALS) return table(low, step, value, slope, REACH * Tc);
    [low, high] = [node(from), node(to)];
  }
  return undefined;
}

function table(
  low: number,
  step: number,
  value: Float64Array,
  slope: Float64Array,
  reach: number,
): VolumeConstant {
  const last = value.length - 1;
  const high = low + last * step;
  const ends = { low: value[0]!, dLow: slope[0]!, high: value[last]!, dHigh: slope[last]! };
  return {
    ln(T) {
      if (T < low) return ends.low + ends.dLow * reach * Math.expm1((T - low) / reach);
      if (T > high) return ends.high - ends.dHigh * reach * Math.expm1((high - T) / reach);
      const k = Math.min(Math.floor((T - low) / step), last - 1);
      const t = (T - low) / step - k;
      const [a, b] = [value[k]!, value[k + 1]!];
      const [da, db] = [slope[k]! * step, slope[k + 1]! * step];
      return a + t * (da + t * (3 * (b - a) - 2 * da - db + t * (2 * (a - b) + da + db)));
    },
    slope(T) {
      if (T < low) return ends.dLow * Math.exp((T - low) / reach);
      if (T > high) return ends.dHigh * Math.exp((high - T) / reach);
      const k = Math.min(Math.floor((T - low) / step), last - 1);
      const t = (T - low) / step - k;
      const [a, b] = [value[k]!, value[k + 1]!];
      const [da, db] = [slope[k]! * step, slope[k + 1]! * step];
      return (da + t * (2 * (3 * (b - a) - 2 * da - db) + 3 * t * (2 * (a - b) + da + db))) / step;
    },
  };
}
