import { luFactor, luSolve } from '../numerics/lu';
import { evaluateBoth } from './split';
import type { FlashWork } from './work';

/** Which of temperature and pressure is sought. */
export type Sought = 'T' | 'P';

/** How the search ended: at equal fugacities; with both phases one; without an answer. */
export type FractionEnd = 'equal' | 'trivial' | 'going';

const EQUAL = 1e-11;
const NEARLY_EQUAL = 3e-10;

/**
 * Unnormalised phase amounts X_i = z_i / (1 - beta + beta K_i), Y_i = K_i X_i: sums in total, fractions in x.
 * Zero and one are as good as any beta: bubble and dew points.
 */
export function placeFractions(w: FlashWork, z: Float64Array, beta: number): void {
  const { n, K, vap, liq } = w;
  let X = 0;
  let Y = 0;
  for (let i = 0; i < n; i++) {
    const k = K[i]!;
    const t = z[i]! / (1 - beta + beta * k);
    liq.x[i] = t;
    vap.x[i] = k * t;
    X += t;
    Y += k * t;
  }
  vap.total = Y;
  liq.total = X;
  for (let i = 0; i < n; i++) {
    vap.x[i] = vap.x[i]! / Y;
    liq.x[i] = liq.x[i]! / X;
  }
}

/**
 * Sum of (y - x) over K from the model's start values; its zero in T or P gives the start for a given vapour fraction.
 */
function startSum(w: FlashWork, z: Float64Array, beta: number, T: number, P: number): number {
  const { n, K } = w;
  w.model.startK(T, P, K);
  let sum = 0;
  for (let i = 0; i < n; i++) {
    const k = K[i]! - 1;
    sum += (z[i]! * k) / (1 - beta + beta * K[i]!);
  }
  return sum;
}

/** Temperature or pressure at which the start values of K give the vapour fraction; leaves K, lnK there. */
export function startPoint(
  w: FlashWork,
  z: Float64Array,
  beta: number,
  sought: Sought,
  given: number,
): number {
  let low = Math.log(sought === 'T' ? 15 : 1e-12);
  let high = Math.log(sought === 'T' ? 3000 : 1e12);
  // The sum rises with T and falls with P.
  const sign = sought === 'T' ? 1 : -1;
  for (let pass = 0; pass < 60; pass++) {
    const middle = (low + high) / 2;
    const u = Math.exp(middle);
    const sum = sought === 'T' ? startSum(w, z, beta, u, given) : startSum(w, z, beta, given, u);
    if (sign * sum > 0) high = middle;
    else low = middle;
    if (high - low < 1e-3) break;
  }
  const u = Math.exp((low + high) / 2);
  if (sought === 'T') startSum(w, z, beta, u, given);
  else startSum(w, z, beta, given, u);
  for (let i = 0; i < w.n; i++) w.lnK[i] = Math.log(w.K[i]!);
  return u;
}

/**
 * Newton in ln K and ln T (or ln P) at a given vapour fraction:
 *   ln K_i + ln phi_V,i(y) - ln phi_L,i(x) = 0,  Sum (y_i - x_i) = 0.
 *
 * @param w.lnK   start, length n
 * @param beta    vapour fraction, 0 to 1
 * @param given   the other of pressure [Pa] and temperature [K]
 * @param u0      start of what is sought
 * @param ease    substitution steps before Newton (u moved along, K renewed)
 * @returns 'equal' with w.T_K, w.P_Pa, fractions and level-2 properties in place (total of vap = beta);
 *          'trivial' when both phases became one
 * Source: after Michelsen, Fluid Phase Equilib. 4 (1980) 1.
 */
export function newtonFraction(
  w: FlashWork,
  z: Float64Array,
  beta: number,
  sought: Sought,
  given: number,
  u0: number,
  ease: number,
): FractionEnd {
  const { n, K, lnK, g, border, rhs, vap, liq, s } = w;
  const m = n + 1;
  let u = u0;
  let least = Number.POSITIVE_INFINITY;
  let worse = 0;
  vap.side = 'vapour';
  liq.side = 'liquid';
  for (let i = 0; i < n; i++) K[i] = Math.exp(lnK[i]!);
  for (let pass = 0; pass < 50; pass++) {
    const T = sought === 'T' ? u : given;
    const P = sought === 'T' ? given : u;
    w.T_K = T;
    w.P_Pa = P;
    placeFractions(w, z, beta);
    evaluateBoth(w, T, P, 2);
    w.iterations += 2;
    const dV = sought === 'T' ? vap.props.dT : vap.props.dP;
    const dL = sought === 'T' ? liq.props.dT : liq.props.dP;
    let err = Math.abs(vap.total - liq.total);
    let size = 0;
    for (let i = 0; i < n; i++) {
      g[i] = lnK[i]! + vap.props.lnPhi[i]! - liq.props.lnPhi[i]!;
      if (!(Math.abs(g[i]!) <= err)) err = Math.abs(g[i]!);
      size = Math.max(size, Math.abs(lnK[i]!));
      // x_i y_i / z_i in unnormalised amounts, from the form that keeps its digits.
      s[i] = (liq.x[i]! * liq.total * vap.x[i]! * vap.total) / z[i]!;
    }
    if (!(err < Number.POSITIVE_INFINITY)) return 'going';
    if (size < 1e-4 && Math.abs(vap.props.v_m3_mol / liq.props.v_m3_mol - 1) < 1e-2) return 'trivial';
    if (err < least) least = err;
    else worse++;
    if (err < EQUAL || (err < NEARLY_EQUAL && worse > 2)) {
      w.residual = err;
      vap.total = beta;
      liq.total = 1 - beta;
      return 'equal';
    }
    if (worse > 25) return 'going';

    if (pass < ease) {
      // Substitution: K from the phases, u by Newton on the sum alone.
      let sum = 0;
      let slope = 0;
      for (let i = 0; i < n; i++) {
        const next = liq.props.lnPhi[i]! - vap.props.lnPhi[i]!;
        lnK[i] = Math.max(-500, Math.min(500, next));
        const k = Math.exp(lnK[i]!);
        K[i] = k;
        const t = 1 - beta + beta * k;
        sum += (z[i]! * (k - 1)) / t;
        slope += ((z[i]! * k) / (t * t)) * u * (dL[i]! - dV[i]!);
      }
      let move = -sum / slope;
      const most = sought === 'T' ? 0.05 : 0.7;
      if (!(Math.abs(move) < most)) move = slope === 0 || Number.isNaN(move) ? 0 : Math.sign(move) * most;
      u *= Math.exp(move);
      for (let i = 0; i < n; i++) {
        lnK[i] = lnK[i]! + u * (dL[i]! - dV[i]!) * move;
        K[i] = Math.exp(lnK[i]!);
      }
      continue;
    }

    const perV = (1 - beta) / vap.total;
    const perL = beta / liq.total;
    const nV = vap.props.dN;
    const nL = liq.props.dN;
    for (let i = 0; i < n; i++) {
      for (let j = 0; j < n; j++) {
        border[i * m + j] = s[j]! * (perV * nV[i * n + j]! + perL * nL[i * n + j]!) + (i === j ? 1 : 0);
      }
      border[i * m + n] = u * (dV[i]! - dL[i]!);
      border[n * m + i] = s[i]!;
      rhs[i] = -g[i]!;
    }
    border[n * m + n] = 0;
    rhs[n] = liq.total - vap.total;
    if (!luFactor(border, m, w.pivots)) return 'going';
    luSolve(border, m, w.pivots, rhs);
    const most = sought === 'T' ? 0.08 : 1;
    let share = 1;
    if (Math.abs(rhs[n]!) > most) share = most / Math.abs(rhs[n]!);
    for (let i = 0; i < n; i++) if (Math.abs(rhs[i]!) * share > 3) share = 3 / Math.abs(rhs[i]!);
    for (let i = 0; i < n; i++) {
      lnK[i] = lnK[i]! + share * rhs[i]!;
      K[i] = Math.exp(lnK[i]!);
    }
    u *= Math.exp(share * rhs[n]!);
    if (!(u > 0 && u < Number.POSITIVE_INFINITY)) return 'going';
  }
  return 'going';
}
