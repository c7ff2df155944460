/**
 * Smallest and largest positive root of w^3 + e2 w^2 + e1 w + e0 = 0 with e0 < 0, as cubic equations of state give
 * for w = Z - B: such a cubic has one positive root or three.
 *
 * The first root is sought from beyond the inflection, where Newton-like steps cannot turn back; the two others come
 * from the deflated quadratic; each root handed out is then polished on the full cubic, since a deflated root carries
 * the rounding of the first.
 *
 * @param ends  length 2: smallest and largest positive root; equal when there is one
 * @returns     number of positive real roots, 1 or 3 (a pair closer than rounding counts as none)
 * Mutates: ends only. Allocates nothing.
 * Source: start and Halley step after Deiters & Macias-Salinas, Ind. Eng. Chem. Res. 53 (2014) 2529.
 */
export function positiveRoots(e2: number, e1: number, e0: number, ends: Float64Array): 1 | 3 {
  const turn = -e2 / 3;
  const atTurn = ((turn + e2) * turn + e1) * turn + e0;
  // Distance from the inflection to where the cubic has the inflection's height plus that of its hump.
  const d = e2 * e2 - 3 * e1;
  const h = d > 0 ? Math.sqrt(d) / 3 : 0;
  const hump = 2 * h * h * h;
  const fromBelow = atTurn > 0 && turn > 0;
  let w: number;
  if (fromBelow) {
    const t = atTurn <= hump ? 2 * h : Math.cbrt(4 * atTurn);
    w = Math.max(turn - t, 0);
  } else {
    w = turn + (atTurn >= -hump ? 2 * h : Math.cbrt(-4 * atTurn));
  }
  w = halley(e2, e1, e0, w);

  // Of the two ways to the deflated linear term take the one that does not cancel.
  const k = -e0 / w;
  const g = fromBelow ? e2 + w : (k - e1) / w;
  const disc = g * g - 4 * k;
  if (!(disc > 0) || g >= 0) {
    ends[0] = w;
    ends[1] = w;
    return 1;
  }
  const big = (-g + Math.sqrt(disc)) / 2;
  if (fromBelow) {
    ends[0] = w;
    ends[1] = polish(e2, e1, e0, big);
  } else {
    ends[0] = polish(e2, e1, e0, k / big);
    ends[1] = w;
  }
  return 3;
}

/** Halley steps until the next could not change the root, then one Newton step. */
function halley(e2: number, e1: number, e0: number, start: number): number {
  let w = start;
  for (let pass = 0; pass < 60; pass++) {
    const f = ((w + e2) * w + e1) * w + e0;
    // At an exact triple root the step would be 0/0.
    if (f === 0) return w;
    const df = (3 * w + 2 * e2) * w + e1;
    const step = (f * df) / (df * df - f * (3 * w + e2));
    w -= step;
    // Convergence is cubic: a relative step of 1e-5 leaves an error below rounding.
    if (!(Math.abs(step) > 1e-5 * Math.abs(w))) break;
  }
  return polish(e2, e1, e0, w);
}

function polish(e2: number, e1: number, e0: number, root: number): number {
  let w = root;
  for (let pass = 0; pass < 2; pass++) {
    const df = (3 * w + 2 * e2) * w + e1;
    // At a double root the slope is rounding noise: the root stands as it is.
    if (!(df > 1e-12 * (3 * w * w + Math.abs(2 * e2 * w) + Math.abs(e1)))) return w;
    const step = (((w + e2) * w + e1) * w + e0) / df;
    if (!(Math.abs(step) < 0.1 * w)) return w;
    w -= step;
  }
  return w;
}
