import { luFactor, luSolve } from '../numerics/lu';
import { R_J_molK } from '../thermo/types';
import { differences, EQUAL, evaluateBoth, fillHessian, moveFlows, NEARLY_EQUAL } from './split';
import { type Caloric, closeEnough, LEAST_T_K, MOST_T_K } from './whole';
import type { FlashWork } from './work';

/** How the search ended: at the answer; a phase vanishes or the temperature leaves the range searched; without an answer. */
export type CaloricEnd = 'equal' | 'outside' | 'going';

/** Largest change of temperature in one step [-]. */
const TEMPERATURE_STEP = 0.08;

/**
 * Newton on the flows of the split as placed and the temperature together: equal fugacities, and enthalpy or entropy
 * as asked, at given pressure.
 *
 * Temperature and vapour fraction move together, so a pure chemical's plateau, an azeotrope and a boiling range of any
 * width are one case: the enthalpy fixes the fraction, the fugacities fix the temperature.
 *
 * @param T0      where to start [K]
 * @param target  molar enthalpy [J/mol] or entropy [J/(mol K)]
 * @returns 'equal' with w.T_K and level-2 properties at the answer; 'outside' when a phase is about to vanish, w.T_K
 *          then being the temperature reached; 'going' when it does not converge
 */
export function newtonCaloric(w: FlashWork, T0: number, P: number, target: number, of: Caloric): CaloricEnd {
  const { n, g, s, step, hess, border, rhs, vap, liq } = w;
  const m = n + 1;
  let T = T0;
  let out = 0;
  let least = Number.POSITIVE_INFINITY;
  let worse = 0;
  for (let pass = 0; pass < 40; pass++) {
    evaluateBoth(w, T, P, 2);
    w.iterations += 2;
    w.T_K = T;
    const err = differences(w);
    const have =
      of === 'h'
        ? vap.total * vap.props.h_J_mol + liq.total * liq.props.h_J_mol
        : vap.total * vap.props.s_J_molK + liq.total * liq.props.s_J_molK;
    const scale = of === 'h' ? R_J_molK * T : R_J_molK;
    const miss = Math.abs(have - target);
    const close = closeEnough(of, T, target);
    if (err < EQUAL && miss <= close) {
      w.residual = err;
      return 'equal';
    }
    const merit = err + miss / scale;
    if (merit < least) least = merit;
    else if (++worse > 12 || (worse > 2 && err < NEARLY_EQUAL && miss < 3 * close)) {
      w.residual = err;
      return err < NEARLY_EQUAL && miss < 3 * close ? 'equal' : 'going';
    }

    fillHessian(w);
    const dV = vap.props.dT;
    const dL = liq.props.dT;
    for (let i = 0; i < n; i++) {
      for (let j = 0; j <= i; j++) {
        const value = hess[i * n + j]!;
        border[i * m + j] = value;
        border[j * m + i] = value;
      }
      // T d(ln f_V - ln f_L)/dT, which is also minus the partial molar enthalpies' difference over RT.
      const slope = T * (dV[i]! - dL[i]!);
      border[i * m + n] = s[i]! * slope;
      border[n * m + i] = -s[i]! * (of === 'h' ? slope : slope + g[i]!);
      rhs[i] = -s[i]! * g[i]!;
    }
    border[n * m + n] = (vap.total * vap.props.cp_J_molK + liq.total * liq.props.cp_J_molK) / R_J_molK;
    rhs[n] = (target - have) / scale;
    if (!luFactor(border, m, w.pivots)) return 'going';
    luSolve(border, m, w.pivots, rhs);
    let share = 1;
    const dT = Math.abs(rhs[n]!);
    if (!(dT < Number.POSITIVE_INFINITY)) return 'going';
    if (dT > TEMPERATURE_STEP) share = TEMPERATURE_STEP / dT;
    let gained = 0;
    for (let i = 0; i < n; i++) {
      step[i] = rhs[i]! * s[i]!;
      gained += step[i]!;
    }
    const wantsOut = vap.total + gained <= 0 || liq.total - gained <= 0;
    out = wantsOut ? out + 1 : 0;
    if (out >= 3 || vap.total < 1e-14 || liq.total < 1e-14) return 'outside';
    share = moveFlows(w, share);
    T *= 1 + share * rhs[n]!;
    if (!(T > LEAST_T_K && T < MOST_T_K)) return 'outside';
  }
  return 'going';
}
