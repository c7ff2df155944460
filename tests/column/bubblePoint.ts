/**
 * A column by another route, for confirmation only: bubble-point sweeps (Wang & Henke, 1966). Component balances as
 * tridiagonal systems, temperatures from bubble points, flows from energy balances; no Jacobian, no shared code but the model.
 */
import type { ThermoModel } from '../../src/engine/thermo/types';

export interface SweptColumn {
  readonly model: ThermoModel;
  /** By place, condenser first, reboiler last [Pa]. */
  readonly P_Pa: readonly number[];
  readonly top: 'liquid' | 'vapour';
  readonly feedPlace: number;
  readonly feed: readonly number[];
  readonly feedH_W: number;
  readonly refluxRatio: number;
  readonly distillate: number;
}

export interface Swept {
  readonly T: readonly number[];
  readonly x: readonly (readonly number[])[];
  readonly V: readonly number[];
  readonly passes: number;
  readonly change_K: number;
}

/** @param T  temperatures to start from by place [K] */
export function sweep(c: SweptColumn, T0: readonly number[], most = 3000): Swept {
  const { model, P_Pa, feed } = c;
  const n = model.n;
  const M = P_Pa.length;
  const total = feed.reduce((a, b) => a + b, 0);
  const liq = model.makeProps();
  const vap = model.makeProps();
  const T = [...T0];
  const x: Float64Array[] = T.map(() => Float64Array.from(feed, (f) => f / total));
  const y: Float64Array[] = x.map((z) => z.slice());
  const D = c.distillate;
  let V = T.map((_, j) => (j === 0 ? (c.top === 'vapour' ? D : 0) : D * (1 + c.refluxRatio)));
  const K = x.map(() => new Float64Array(n).fill(1));
  const renew = (j: number): void => {
    model.evaluate('liquid', T[j]!, P_Pa[j]!, x[j]!, 1, liq);
    model.evaluate('vapour', T[j]!, P_Pa[j]!, y[j]!, 1, vap);
    for (let i = 0; i < n; i++) K[j]![i] = Math.exp(liq.lnPhi[i]! - vap.lnPhi[i]!);
  };
  /** Temperature at which sum K x = 1, y and K with it. */
  const boil = (j: number, most: number): void => {
    for (let pass = 0; pass < most; pass++) {
      renew(j);
      const sum = K[j]!.reduce((s, k, i) => s + k * x[j]![i]!, 0);
      for (let i = 0; i < n; i++) y[j]![i] = (K[j]![i]! * x[j]![i]!) / sum;
      const at = T[j]!;
      T[j] = at + 1e-3;
      renew(j);
      const up = K[j]!.reduce((s, k, i) => s + k * x[j]![i]!, 0);
      T[j] = at;
      const step = (-Math.log(sum) * 1e-3) / Math.log(up / sum);
      T[j] = at + Math.max(-5, Math.min(5, step));
      if (Math.abs(step) < 1e-10) break;
    }
    renew(j);
  };
  for (let j = 0; j < M; j++) {
    model.startK(T[j]!, P_Pa[j]!, K[j]!);
    const sum = K[j]!.reduce((s, k, i) => s + k * x[j]![i]!, 0);
    for (let i = 0; i < n; i++) y[j]![i] = (K[j]![i]! * x[j]![i]!) / sum;
  }
  let change = Number.POSITIVE_INFINITY;
  let passes = 0;
  for (; passes < most && (passes < 80 || change > 1e-9); passes++) {
    const before = [...T];
    // Liquid below place j by the balance around the top.
    const L = T.map((_, j) => {
      if (j === M - 1) return total - D;
      const fed = j >= c.feedPlace ? total : 0;
      return V[j + 1]! + fed - D;
    });
    for (let i = 0; i < n; i++) {
      // a l_(j-1) + b x_j + c x_(j+1) = d, in x.
      const lower: number[] = [];
      const diag: number[] = [];
      const upper: number[] = [];
      const rhs: number[] = [];
      for (let j = 0; j < M; j++) {
        const out = j === 0 && c.top === 'liquid' ? L[0]! + D : L[j]!;
        const rising = j === 0 && c.top === 'liquid' ? 0 : V[j]!;
        lower.push(j === 0 ? 0 : L[j - 1]!);
        diag.push(-(out + rising * K[j]![i]!));
        upper.push(j === M - 1 ? 0 : V[j + 1]! * K[j + 1]![i]!);
        rhs.push(j === c.feedPlace ? -feed[i]! : 0);
      }
      for (let j = 1; j < M; j++) {
        const f = lower[j]! / diag[j - 1]!;
        diag[j]! -= f * upper[j - 1]!;
        rhs[j]! -= f * rhs[j - 1]!;
      }
      for (let j = M - 1; j >= 0; j--)
        x[j]![i] = Math.max((rhs[j]! - (j === M - 1 ? 0 : upper[j]! * x[j + 1]![i]!)) / diag[j]!, 1e-300);
    }
    for (let j = 0; j < M; j++) {
      const sum = x[j]!.reduce((a, b) => a + b, 0);
      for (let i = 0; i < n; i++) x[j]![i]! /= sum;
      // At first one short step a pass: the compositions are wild.
      boil(j, passes < 20 ? 1 : 60);
    }
    change = Math.max(...T.map((t, j) => Math.abs(t - before[j]!)));
    if (passes > 20) V = flows(c, T, x, y, V, 0.5);
  }
  return { T, x: x.map((z) => Array.from(z)), V, passes, change_K: change };
}

/** New vapour flows from energy balances around the top, damped. */
function flows(
  c: SweptColumn,
  T: readonly number[],
  x: readonly Float64Array[],
  y: readonly Float64Array[],
  old: readonly number[],
  share: number,
): number[] {
  const { model, P_Pa } = c;
  const props = model.makeProps();
  const h = (side: 'liquid' | 'vapour', j: number): number => {
    model.evaluate(side, T[j]!, P_Pa[j]!, side === 'liquid' ? x[j]! : y[j]!, 1, props);
    return props.h_J_mol;
  };
  const D = c.distillate;
  const total = c.feed.reduce((a, b) => a + b, 0);
  const V = [...old];
  V[1] = D * (1 + c.refluxRatio);
  const hTop = c.top === 'liquid' ? h('liquid', 0) : h('vapour', 0);
  const condensed = V[1]! * h('vapour', 1) - D * hTop - c.refluxRatio * D * h('liquid', 0);
  for (let j = 1; j < T.length - 1; j++) {
    // Around places 0..j: V_(j+1) h_V + F H = D h_D + Q + L_j h_L, with L_j = V_(j+1) + F - D.
    const fed = j >= c.feedPlace;
    const hL = h('liquid', j);
    const next =
      (D * hTop + condensed - (fed ? c.feedH_W : 0) + ((fed ? total : 0) - D) * hL) /
      (h('vapour', j + 1) - hL);
    V[j + 1] = old[j + 1]! + share * (next - old[j + 1]!);
  }
  return V;
}
