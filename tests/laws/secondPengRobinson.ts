/**
 * A second, slow implementation of the Peng-Robinson equation (1976 alpha), written from the paper's printed formulas and
 * shared with nothing: constants to the digits of the closed forms, the cubic by bisection, ln phi by its textbook expression.
 * Source: Peng & Robinson, Ind. Eng. Chem. Fundam. 15 (1976) 59.
 */
export interface Pure {
  readonly Tc_K: number;
  readonly Pc_Pa: number;
  readonly omega: number;
}

const R = 8.314462618;
const OMEGA_A = 0.4572355289213822;
const OMEGA_B = 0.07779607390388849;

/** Largest or smallest root of f on (from, to) by a scan and bisection. */
function rootOf(f: (z: number) => number, from: number, to: number, largest: boolean): number {
  const count = 20000;
  const at = (k: number): number => from * (to / from) ** (k / count);
  for (let k = 0; k < count; k++) {
    let [a, b] = largest ? [at(count - k - 1), at(count - k)] : [at(k), at(k + 1)];
    if (f(a) > 0 === f(b) > 0) continue;
    for (let pass = 0; pass < 200; pass++) {
      const m = (a + b) / 2;
      if (f(m) > 0 === f(a) > 0) a = m;
      else b = m;
    }
    return (a + b) / 2;
  }
  throw new Error('no root');
}

/** ln phi of every chemical in a liquid or vapour; kij symmetric, zero diagonal. */
export function lnPhiOf(
  side: 'liquid' | 'vapour',
  T: number,
  P: number,
  x: readonly number[],
  pure: readonly Pure[],
  kij: (i: number, j: number) => number,
): number[] {
  const a = pure.map(({ Tc_K, Pc_Pa, omega }) => {
    const kappa = 0.37464 + 1.54226 * omega - 0.26992 * omega * omega;
    const alpha = (1 + kappa * (1 - Math.sqrt(T / Tc_K))) ** 2;
    return (OMEGA_A * R * R * Tc_K * Tc_K * alpha) / Pc_Pa;
  });
  const b = pure.map(({ Tc_K, Pc_Pa }) => (OMEGA_B * R * Tc_K) / Pc_Pa);
  const pair = (i: number, j: number): number => Math.sqrt(a[i]! * a[j]!) * (1 - kij(i, j));
  const inMix = x.map((_, i) => x.reduce((sum, xj, j) => sum + xj * pair(i, j), 0));
  const am = x.reduce((sum, xi, i) => sum + xi * inMix[i]!, 0);
  const bm = x.reduce((sum, xi, i) => sum + xi * b[i]!, 0);
  const A = (am * P) / (R * R * T * T);
  const B = (bm * P) / (R * T);
  // Z = B + w keeps the digits of a liquid.
  const cubic = (w: number): number => {
    const Z = B + w;
    return ((Z - (1 - B)) * Z + (A - 3 * B * B - 2 * B)) * Z - (A * B - B * B - B * B * B);
  };
  const Z = B + rootOf(cubic, 1e-9 * Math.max(B, 1e-6), 2, side === 'vapour');
  const s = Math.SQRT2;
  const log = Math.log((Z + (1 + s) * B) / (Z + (1 - s) * B)) / (2 * s);
  return x.map(
    (_, i) => (b[i]! / bm) * (Z - 1) - Math.log(Z - B) - (A / B) * ((2 * inMix[i]!) / am - b[i]! / bm) * log,
  );
}
