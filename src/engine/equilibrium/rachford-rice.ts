/**
 * Vapour fraction from the two-phase mole balance (Rachford-Rice).
 *
 * @param z      overall mole fractions, length n, sum 1
 * @param K      equilibrium ratios y/x, length n, each > 0
 * @param guess  where to start; anything outside (0, 1) means no guess
 * @returns      beta inside (0, 1); exactly 0 when the feed is at or below its bubble point with these K, exactly 1 at
 *               or above its dew point
 * Source: Rachford & Rice, J. Pet. Technol. 4(10), 1952, p. 19; the function falls steadily between its poles.
 */
export function vapourFractionOf(z: Float64Array, K: Float64Array, guess: number): number {
  const n = z.length;
  let at0 = -1;
  let at1 = 1;
  for (let i = 0; i < n; i++) {
    at0 += z[i]! * K[i]!;
    at1 -= z[i]! / K[i]!;
  }
  if (!(at0 > 0)) return 0;
  if (!(at1 < 0)) return 1;
  let low = 0;
  let high = 1;
  let beta = guess > 0 && guess < 1 ? guess : at0 / (at0 - at1);
  for (let pass = 0; pass < 100; pass++) {
    let f = 0;
    let slope = 0;
    for (let i = 0; i < n; i++) {
      const k = K[i]! - 1;
      // Not 1 + beta k: that would lose the digits of a small K near beta = 1.
      const t = k / (1 - beta + beta * K[i]!);
      f += z[i]! * t;
      slope += z[i]! * t * t;
    }
    if (f > 0) low = beta;
    else high = beta;
    let next = beta + f / slope;
    if (!(next > low && next < high)) next = (low + high) / 2;
    const moved = Math.abs(next - beta);
    beta = next;
    if (moved <= 1e-10 * Math.min(beta, 1 - beta)) break;
  }
  return beta;
}
