const SQRT2 = Math.SQRT2;

/** ln[(Z + (1+sqrt 2) B)/(Z + (1-sqrt 2) B)] / (2 sqrt 2) [-]; keeps its digits in thin gases. */
export function attraction(Z: number, B: number): number {
  return Math.log1p((2 * SQRT2 * B) / (Z + (1 - SQRT2) * B)) / (2 * SQRT2);
}
