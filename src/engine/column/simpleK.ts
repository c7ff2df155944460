import type { StageSystem } from './system';

/** K by place: ln K = a - b/T at a reference pressure, fitted to the model's start values at two temperatures. */
export interface SimpleK {
  readonly a: Float64Array;
  readonly b: Float64Array;
  readonly P_Pa: number;
}

/** Simple K-values through the model's start values at T1 and T2 [K], at the pressure of the middle place. */
export function simpleK(s: StageSystem, T1: number, T2: number): SimpleK {
  const { n, model, task } = s;
  const P_Pa = task.P_Pa[Math.floor(s.places / 2)]!;
  const K1 = new Float64Array(n);
  const K2 = new Float64Array(n);
  model.startK(T1, P_Pa, K1);
  model.startK(T2, P_Pa, K2);
  const a = new Float64Array(n);
  const b = new Float64Array(n);
  for (let i = 0; i < n; i++) {
    b[i] = Math.log(K2[i]! / K1[i]!) / (1 / T1 - 1 / T2);
    a[i] = Math.log(K1[i]!) + b[i]! / T1;
  }
  return { a, b, P_Pa };
}

/** Temperature at which sum z K = 1 (bubble) or sum z / K = 1 (dew) by simple K-values [K]. */
export function simplePoint(k: SimpleK, z: Float64Array, P_Pa: number, of: 'bubble' | 'dew'): number {
  const sign = of === 'bubble' ? 1 : -1;
  let low = 1 / 1500;
  let high = 1 / 40;
  for (let pass = 0; pass < 24; pass++) {
    const u = (low + high) / 2;
    let sum = 0;
    for (let i = 0; i < z.length; i++)
      if (z[i]! > 0) sum += z[i]! * Math.exp(sign * (k.a[i]! - k.b[i]! * u + Math.log(k.P_Pa / P_Pa)));
    // The bubble sum falls with 1/T, the dew sum rises.
    if (sum > 1 === (of === 'bubble')) low = u;
    else high = u;
  }
  return 2 / (low + high);
}
