import { evaluateBoth } from './split';
import { type Caloric, closeEnough, LEAST_T_K, MOST_T_K } from './whole';
import type { FlashWork } from './work';

/**
 * Saturation of a pure chemical at a temperature: both phases' level-2 properties, w.T_K, w.P_Pa.
 *
 * @returns false at and above the critical temperature, or where the model gives none
 */
export function saturateAtT(w: FlashWork, T: number): boolean {
  const start = w.model.saturationP_Pa(0, T);
  if (start === undefined || !(start > 0)) return false;
  ready(w);
  let P = start;
  for (let pass = 0; pass < 12; pass++) {
    evaluateBoth(w, T, P, 2);
    w.iterations += 2;
    const gap = w.vap.props.lnPhi[0]! - w.liq.props.lnPhi[0]!;
    w.residual = Math.abs(gap);
    if (w.residual < 1e-14) break;
    const move = -gap / (P * (w.vap.props.dP[0]! - w.liq.props.dP[0]!));
    if (!(Math.abs(move) < 0.3)) break;
    const next = P * Math.exp(move);
    if (next === P) break;
    P = next;
  }
  w.T_K = T;
  w.P_Pa = P;
  return isSaturated(w);
}

/** Saturation of a pure chemical at a pressure; false at and above the critical pressure, or where there is none. */
export function saturateAtP(w: FlashWork, P: number): boolean {
  const { model } = w;
  ready(w);
  const critical = model.pseudoCritical(w.feed.x).T_K;
  let low = LEAST_T_K;
  let high = Math.min(critical, MOST_T_K);
  const psat = (T: number): number | undefined => model.saturationP_Pa(0, T);
  // ln P is close to linear in 1/T: secant in that plane inside the bracket.
  const lnP = Math.log(P);
  let T = Math.min(0.7 * high, 1000);
  let lastX = 0;
  let lastF = 0;
  for (let pass = 0; pass < 100; pass++) {
    const p = psat(T);
    // No value: too cold for the model to give one, unless the critical point is near.
    const f = p === undefined || !(p > 0) ? (T > 0.99 * critical ? 1 : -1e3) : Math.log(p) - lnP;
    if (Math.abs(f) < 1e-9) break;
    if (f > 0) high = T;
    else low = T;
    if (high - low < 1e-12 * high) break;
    const x = 1 / T;
    const slope = pass > 0 ? (f - lastF) / (x - lastX) : Number.NaN;
    lastX = x;
    lastF = f;
    let next = 1 / (x - f / slope);
    if (!(next > low && next < high)) next = pass === 0 ? T * (f > 0 ? 0.9 : 1.1) : (low + high) / 2;
    if (!(next > low && next < high)) next = (low + high) / 2;
    T = next;
  }
  for (let pass = 0; pass < 12; pass++) {
    evaluateBoth(w, T, P, 2);
    w.iterations += 2;
    const gap = w.vap.props.lnPhi[0]! - w.liq.props.lnPhi[0]!;
    w.residual = Math.abs(gap);
    if (w.residual < 1e-14) break;
    const move = -gap / (w.vap.props.dT[0]! - w.liq.props.dT[0]!);
    if (!(Math.abs(move) < 0.05 * T)) break;
    if (T + move === T) break;
    T += move;
  }
  w.T_K = T;
  w.P_Pa = P;
  return isSaturated(w);
}

function ready(w: FlashWork): void {
  const { vap, liq, feed } = w;
  w.hidden = false;
  w.lumped = false;
  w.iterations = 0;
  feed.x[0] = 1;
  feed.side = 'stable';
  for (const phase of [vap, liq]) phase.x[0] = 1;
  vap.side = 'vapour';
  liq.side = 'liquid';
}

function isSaturated(w: FlashWork): boolean {
  const { vap, liq } = w;
  return w.residual < 2e-10 && !vap.props.single && !liq.props.single;
}

/** Gives the saturated phases in the workspace their shares. */
export function share(w: FlashWork, beta: number): void {
  w.phases = 2;
  w.vap.total = beta;
  w.liq.total = 1 - beta;
  w.vap.flow[0] = beta;
  w.liq.flow[0] = 1 - beta;
}

/**
 * A pure chemical at a pressure and a molar enthalpy or entropy: inside the dome by the lever rule, exact; outside by
 * Newton on its one phase.
 *
 * @returns 'solved', or 'out-of-range'
 */
export function pureCaloric(
  w: FlashWork,
  P: number,
  target: number,
  of: Caloric,
  T0: number,
): 'solved' | 'out-of-range' | 'no-convergence' {
  let low = LEAST_T_K;
  let high = MOST_T_K;
  let T = T0 > low && T0 < high ? T0 : 300;
  if (saturateAtP(w, P)) {
    const above = of === 'h' ? w.vap.props.h_J_mol : w.vap.props.s_J_molK;
    const below = of === 'h' ? w.liq.props.h_J_mol : w.liq.props.s_J_molK;
    const close = closeEnough(of, w.T_K, target);
    const beta = (target - below) / (above - below);
    if (target >= below - close && target <= above + close) {
      share(w, Math.min(1, Math.max(0, beta)));
      return 'solved';
    }
    // Start on the right side of the boiling point.
    if (target > above) {
      low = w.T_K;
      T = T > low ? T : low * 1.001;
      w.feed.side = 'vapour';
    } else {
      high = w.T_K;
      T = T < high ? T : high * 0.999;
      w.feed.side = 'liquid';
    }
  }
  w.phases = 1;
  w.P_Pa = P;
  w.residual = 0;
  const { feed, model } = w;
  let worse = 0;
  let least = Number.POSITIVE_INFINITY;
  let leastT = T;
  for (let pass = 0; pass < 200; pass++) {
    model.evaluate(feed.side, T, P, feed.x, 2, feed.props);
    w.iterations++;
    w.T_K = T;
    const miss = target - (of === 'h' ? feed.props.h_J_mol : feed.props.s_J_molK);
    const close = closeEnough(of, T, target);
    if (Math.abs(miss) < least) {
      least = Math.abs(miss);
      leastT = T;
    } else worse++;
    if (Math.abs(miss) <= close || (worse > 3 && Math.abs(miss) < 10 * close)) return 'solved';
    if (miss > 0) low = T;
    else high = T;
    if (low > 0.999 * MOST_T_K || high < 1.001 * LEAST_T_K) return 'out-of-range';
    let next = T + (of === 'h' ? miss : miss * T) / feed.props.cp_J_molK;
    if (!(next > low && next < high)) next = (low + high) / 2;
    if (next === T) {
      if (!(least < 1e3 * close)) return 'no-convergence';
      // Rounding of a dense liquid's root ends the search a little beside the closest that was seen.
      model.evaluate(feed.side, leastT, P, feed.x, 2, feed.props);
      w.T_K = leastT;
      return 'solved';
    }
    T = next;
  }
  return 'no-convergence';
}
