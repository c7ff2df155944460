import type { StageSystem } from './system';

/**
 * Brings a place to the bubble point of its liquid: temperature and vapour composition, the vapour's amount kept.
 *
 * @param passes   Newton steps in ln(sum K x) against T, K renewed each time
 * @param most_K   largest step [K]
 * Leaves properties at the last but one temperature; returns the last step asked for [K].
 */
export function bubbleStage(s: StageSystem, j: number, passes = 4, most_K = 15): number {
  const { n, l, v, T, model, task } = s;
  const at = j * n;
  const liq = s.liq[j]!;
  const vap = s.vap[j]!;
  const x = s.scratch;
  const P = task.P_Pa[j]!;
  let step = 0;
  for (let pass = 0; pass < passes; pass++) {
    let L = 0;
    let V = 0;
    for (let i = 0; i < n; i++) {
      L += l[at + i]!;
      V += v[at + i]!;
    }
    for (let i = 0; i < n; i++) x[i] = v[at + i]! / V;
    model.evaluate('vapour', T[j]!, P, x, 2, vap);
    for (let i = 0; i < n; i++) x[i] = l[at + i]! / L;
    model.evaluate('liquid', T[j]!, P, x, 2, liq);
    let sum = 0;
    let slope = 0;
    for (let i = 0; i < n; i++) {
      const y = x[i]! * Math.exp(liq.lnPhi[i]! - vap.lnPhi[i]!);
      sum += y;
      slope += y * (liq.dT[i]! - vap.dT[i]!);
      v[at + i] = y;
    }
    if (!(sum > 0 && sum < Number.POSITIVE_INFINITY)) return Number.POSITIVE_INFINITY;
    for (let i = 0; i < n; i++) v[at + i] = Math.max((v[at + i]! * V) / sum, 1e-300);
    step = (-Math.log(sum) * sum) / slope;
    if (!Number.isFinite(step)) return step;
    T[j] = T[j]! + Math.min(Math.max(step, -most_K), most_K);
    if (Math.abs(step) < 0.01) break;
  }
  return step;
}
