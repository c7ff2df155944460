/**
 * Acceleration of a fixed-point iteration x <- g(x): from the last points and answers the combination is taken whose residual
 * g - x, were the map linear, would be least (type II).
 *
 * Source: D. G. Anderson, J. ACM 12 (1965) 547; least squares on differences as in Walker & Ni, SIAM J. Numer. Anal. 49 (2011)
 * 1715, by modified Gram-Schmidt, newest difference first: a column that hardly differs from the newer ones is left out.
 */
export interface Anderson {
  readonly n: number;
  readonly depth: number;
  /** Differences it holds. */
  readonly held: number;
  /** Takes in a point and the map's answer there; both are copied. */
  push(x: Float64Array, g: Float64Array): void;
  /**
   * The next point after the last one pushed; without differences that is g itself.
   *
   * @param scale  size of each entry, > 0; entries count in the least squares by their residual over it
   * @param out    length n; overwritten
   * @returns how many differences took part
   */
  propose(scale: Float64Array, out: Float64Array): number;
  /** Forgets every point and difference. */
  forget(): void;
  /** Forgets the last point alone: what comes next is another problem whose slopes are about the same. */
  leap(): void;
}

/** A difference whose part not explained by newer ones is smaller than this share is left out [-]. */
const INDEPENDENT = 1e-8;

/**
 * An empty acceleration.
 *
 * @param n      length of the points
 * @param depth  most differences that are held; the oldest is forgotten first
 * Allocates (3 depth + 3) vectors of n here, nothing later. propose throws before the first point is pushed.
 */
export const makeAnderson = (n: number, depth: number): Anderson => new Acceleration(n, depth);

class Acceleration implements Anderson {
  readonly n: number;
  readonly depth: number;
  held = 0;
  /** Differences of points and of residuals, in a ring. */
  private readonly dx: readonly Float64Array[];
  private readonly df: readonly Float64Array[];
  /** Orthogonal columns of the scaled differences, newest first, their triangle, and what of the residual lies along each. */
  private readonly q: readonly Float64Array[];
  private readonly r: Float64Array;
  private readonly rhs: Float64Array;
  /** Which difference each column is of. */
  private readonly taken: Int32Array;
  private readonly rest: Float64Array;
  private readonly lastX: Float64Array;
  private readonly lastG: Float64Array;
  private placed = false;
  /** Place of the newest difference. */
  private newest: number;

  constructor(n: number, depth: number) {
    const vectors = (): Float64Array[] => Array.from({ length: depth }, () => new Float64Array(n));
    this.n = n;
    this.depth = depth;
    this.dx = vectors();
    this.df = vectors();
    this.q = vectors();
    this.r = new Float64Array(depth * depth);
    this.rhs = new Float64Array(depth);
    this.taken = new Int32Array(depth);
    this.rest = new Float64Array(n);
    this.lastX = new Float64Array(n);
    this.lastG = new Float64Array(n);
    this.newest = depth - 1;
  }

  push(x: Float64Array, g: Float64Array): void {
    const { n, depth, lastX, lastG } = this;
    if (this.placed) {
      this.newest = (this.newest + 1) % depth;
      if (this.held < depth) this.held++;
      const [toX, toF] = [this.dx[this.newest]!, this.df[this.newest]!];
      for (let i = 0; i < n; i++) {
        toX[i] = x[i]! - lastX[i]!;
        toF[i] = g[i]! - x[i]! - (lastG[i]! - lastX[i]!);
      }
    }
    lastX.set(x);
    lastG.set(g);
    this.placed = true;
  }

  propose(scale: Float64Array, out: Float64Array): number {
    if (!this.placed) throw new Error('a point comes before a proposal');
    const used = this.factor(scale);
    const { n, depth, r, rhs } = this;
    out.set(this.lastG);
    for (let k = used - 1; k >= 0; k--) {
      let gamma = rhs[k]!;
      for (let j = k + 1; j < used; j++) gamma -= r[k * depth + j]! * rhs[j]!;
      gamma /= r[k * depth + k]!;
      rhs[k] = gamma;
      const [ofX, ofF] = [this.dx[this.taken[k]!]!, this.df[this.taken[k]!]!];
      for (let i = 0; i < n; i++) out[i]! -= gamma * (ofX[i]! + ofF[i]!);
    }
    return used;
  }

  forget(): void {
    this.placed = false;
    this.held = 0;
  }

  leap(): void {
    this.placed = false;
  }

  /** Makes the columns; returns how many there are. */
  private factor(scale: Float64Array): number {
    const { n, depth, q, r, rest, lastX, lastG } = this;
    let used = 0;
    for (let i = 0; i < n; i++) rest[i] = (lastG[i]! - lastX[i]!) / scale[i]!;
    for (let age = 0; age < this.held; age++) {
      const at = (this.newest - age + depth) % depth;
      const column = q[used]!;
      const from = this.df[at]!;
      for (let i = 0; i < n; i++) column[i] = from[i]! / scale[i]!;
      const whole = Math.sqrt(dot(column, column));
      for (let k = 0; k < used; k++) {
        const along = dot(q[k]!, column);
        r[k * depth + used] = along;
        subtract(column, along, q[k]!);
      }
      const left = Math.sqrt(dot(column, column));
      if (!(left > INDEPENDENT * whole) || !(left < Number.POSITIVE_INFINITY)) continue;
      for (let i = 0; i < n; i++) column[i]! /= left;
      r[used * depth + used] = left;
      const along = dot(column, rest);
      this.rhs[used] = along;
      subtract(rest, along, column);
      this.taken[used++] = at;
    }
    return used;
  }
}

function dot(a: Float64Array, b: Float64Array): number {
  let sum = 0;
  for (let i = 0; i < a.length; i++) sum += a[i]! * b[i]!;
  return sum;
}

function subtract(a: Float64Array, factor: number, b: Float64Array): void {
  for (let i = 0; i < a.length; i++) a[i]! -= factor * b[i]!;
}
