/**
 * Kernels of a block elimination: small dense blocks, row-major, inside larger arrays. All allocate nothing.
 */

/**
 * LU factors of the square left half of an n x (2n) block by partial pivoting; the right half is replaced by the solution of
 * left * X = right.
 *
 * @param a      rows of length 2n from `at` on; left half becomes the factors, right half X
 * @param pivot  n entries from `pivotAt` on: row exchanged with row k at step k
 * @returns      false when a column has no finite pivot other than zero: the block is then undefined
 * Two pivots a pass: the trailing rows are read and written half as often.
 * Source: Golub & Van Loan, Matrix Computations, 4th ed., alg. 3.4.1 (outer products, here two at a time).
 */
export function factorBlock(
  a: Float64Array,
  at: number,
  n: number,
  pivot: Int32Array,
  pivotAt: number,
): boolean {
  const w = 2 * n;
  let k = 0;
  for (; k + 1 < n; k += 2) {
    if (!bringPivot(a, at, n, k, pivot, pivotAt)) return false;
    const top = at + k * w;
    const inv0 = 1 / a[top + k]!;
    for (let i = k + 1; i < n; i++) {
      const row = at + i * w;
      const f = a[row + k]! * inv0;
      a[row + k] = f;
      a[row + k + 1]! -= f * a[top + k + 1]!;
    }
    if (!bringPivot(a, at, n, k + 1, pivot, pivotAt)) return false;
    const next = top + w;
    const f1 = a[next + k]!;
    for (let c = k + 2; c < w; c++) a[next + c]! -= f1 * a[top + c]!;
    const inv1 = 1 / a[next + k + 1]!;
    trailing(a, at, n, k, inv1);
  }
  if (k < n && !bringPivot(a, at, n, k, pivot, pivotAt)) return false;
  backSubstitute(a, at, n);
  return true;
}

/** Takes pivot rows k and k + 1 from the rows below, two a pass: each entry of the pivot rows is read once for both. */
function trailing(a: Float64Array, at: number, n: number, k: number, inv1: number): void {
  const w = 2 * n;
  const top = at + k * w;
  const next = top + w;
  let i = k + 2;
  for (; i + 1 < n; i += 2) {
    const row = at + i * w;
    const below = row + w;
    const g0 = a[row + k]!;
    const h0 = a[below + k]!;
    const g1 = a[row + k + 1]! * inv1;
    const h1 = a[below + k + 1]! * inv1;
    a[row + k + 1] = g1;
    a[below + k + 1] = h1;
    for (let c = k + 2; c < w; c++) {
      const p = a[top + c]!;
      const q = a[next + c]!;
      a[row + c] = a[row + c]! - g0 * p - g1 * q;
      a[below + c] = a[below + c]! - h0 * p - h1 * q;
    }
  }
  if (i < n) {
    const row = at + i * w;
    const g0 = a[row + k]!;
    const g1 = a[row + k + 1]! * inv1;
    a[row + k + 1] = g1;
    for (let c = k + 2; c < w; c++) a[row + c] = a[row + c]! - g0 * a[top + c]! - g1 * a[next + c]!;
  }
}

/** Brings the largest entry of column k, from row k down, to row k. */
function bringPivot(
  a: Float64Array,
  at: number,
  n: number,
  k: number,
  pivot: Int32Array,
  pivotAt: number,
): boolean {
  const w = 2 * n;
  let best = k;
  let size = Math.abs(a[at + k * w + k]!);
  for (let i = k + 1; i < n; i++) {
    const value = Math.abs(a[at + i * w + k]!);
    if (value > size) {
      size = value;
      best = i;
    }
  }
  if (!(size > 0 && size < Number.POSITIVE_INFINITY)) return false;
  pivot[pivotAt + k] = best;
  if (best !== k) {
    const p = at + k * w;
    const q = at + best * w;
    for (let c = 0; c < w; c++) {
      const kept = a[p + c]!;
      a[p + c] = a[q + c]!;
      a[q + c] = kept;
    }
  }
  return true;
}

function backSubstitute(a: Float64Array, at: number, n: number): void {
  const w = 2 * n;
  for (let i = n - 1; i >= 0; i--) {
    const row = at + i * w;
    let j = i + 1;
    for (; j + 1 < n; j += 2) {
      const f = a[row + j]!;
      const g = a[row + j + 1]!;
      const p = at + j * w;
      const q = p + w;
      for (let c = n; c < w; c++) a[row + c] = a[row + c]! - f * a[p + c]! - g * a[q + c]!;
    }
    if (j < n) {
      const f = a[row + j]!;
      const p = at + j * w;
      for (let c = n; c < w; c++) a[row + c]! -= f * a[p + c]!;
    }
    const scale = 1 / a[row + i]!;
    for (let c = n; c < w; c++) a[row + c]! *= scale;
  }
}

/**
 * Solves left * x = b with the factors left by factorBlock, for one right-hand side of n entries in `b` from `bAt` on, in
 * place. The factors must be good: factorBlock gave true.
 */
export function solveBlock(
  a: Float64Array,
  at: number,
  n: number,
  pivot: Int32Array,
  pivotAt: number,
  b: Float64Array,
  bAt: number,
): void {
  const w = 2 * n;
  for (let k = 0; k < n; k++) {
    const from = pivot[pivotAt + k]!;
    if (from === k) continue;
    const kept = b[bAt + k]!;
    b[bAt + k] = b[bAt + from]!;
    b[bAt + from] = kept;
  }
  for (let i = 1; i < n; i++) {
    const row = at + i * w;
    let sum = b[bAt + i]!;
    for (let j = 0; j < i; j++) sum -= a[row + j]! * b[bAt + j]!;
    b[bAt + i] = sum;
  }
  for (let i = n - 1; i >= 0; i--) {
    const row = at + i * w;
    let sum = b[bAt + i]!;
    for (let j = i + 1; j < n; j++) sum -= a[row + j]! * b[bAt + j]!;
    b[bAt + i] = sum / a[row + i]!;
  }
}

/**
 * C += factor * A B for blocks inside larger arrays.
 *
 * @param A    p x q, rows of length q from aAt on
 * @param B    q x m, rows of length bStride from bAt on
 * @param out  p x m, rows of length outStride from outAt on
 * Four rows of B and two of A a pass: each entry of C is read and written once for eight operations, each of B read once for
 * two rows.
 */
export function addProduct(
  factor: number,
  A: Float64Array,
  aAt: number,
  p: number,
  q: number,
  B: Float64Array,
  bAt: number,
  bStride: number,
  m: number,
  out: Float64Array,
  outAt: number,
  outStride: number,
): void {
  let i = 0;
  for (; i + 1 < p; i += 2)
    addTwoRows(factor, A, aAt + i * q, q, B, bAt, bStride, m, out, outAt + i * outStride, outStride);
  if (i < p) addRow(factor, A, aAt + i * q, q, B, bAt, bStride, m, out, outAt + i * outStride);
}

function addTwoRows(
  factor: number,
  A: Float64Array,
  ai: number,
  q: number,
  B: Float64Array,
  bAt: number,
  bStride: number,
  m: number,
  out: Float64Array,
  oi: number,
  outStride: number,
): void {
  const aj = ai + q;
  const oj = oi + outStride;
  let k = 0;
  for (; k + 3 < q; k += 4) {
    const f0 = factor * A[ai + k]!;
    const f1 = factor * A[ai + k + 1]!;
    const f2 = factor * A[ai + k + 2]!;
    const f3 = factor * A[ai + k + 3]!;
    const g0 = factor * A[aj + k]!;
    const g1 = factor * A[aj + k + 1]!;
    const g2 = factor * A[aj + k + 2]!;
    const g3 = factor * A[aj + k + 3]!;
    const b0 = bAt + k * bStride;
    const b1 = b0 + bStride;
    const b2 = b1 + bStride;
    const b3 = b2 + bStride;
    for (let c = 0; c < m; c++) {
      const p0 = B[b0 + c]!;
      const p1 = B[b1 + c]!;
      const p2 = B[b2 + c]!;
      const p3 = B[b3 + c]!;
      out[oi + c] = out[oi + c]! + f0 * p0 + f1 * p1 + f2 * p2 + f3 * p3;
      out[oj + c] = out[oj + c]! + g0 * p0 + g1 * p1 + g2 * p2 + g3 * p3;
    }
  }
  for (; k < q; k++) {
    const f = factor * A[ai + k]!;
    const g = factor * A[aj + k]!;
    const b0 = bAt + k * bStride;
    for (let c = 0; c < m; c++) {
      out[oi + c]! += f * B[b0 + c]!;
      out[oj + c]! += g * B[b0 + c]!;
    }
  }
}

function addRow(
  factor: number,
  A: Float64Array,
  ai: number,
  q: number,
  B: Float64Array,
  bAt: number,
  bStride: number,
  m: number,
  out: Float64Array,
  oi: number,
): void {
  let k = 0;
  for (; k + 3 < q; k += 4) {
    const f0 = factor * A[ai + k]!;
    const f1 = factor * A[ai + k + 1]!;
    const f2 = factor * A[ai + k + 2]!;
    const f3 = factor * A[ai + k + 3]!;
    const b0 = bAt + k * bStride;
    const b1 = b0 + bStride;
    const b2 = b1 + bStride;
    const b3 = b2 + bStride;
    for (let c = 0; c < m; c++)
      out[oi + c] = out[oi + c]! + f0 * B[b0 + c]! + f1 * B[b1 + c]! + f2 * B[b2 + c]! + f3 * B[b3 + c]!;
  }
  for (; k < q; k++) {
    const f = factor * A[ai + k]!;
    const b0 = bAt + k * bStride;
    for (let c = 0; c < m; c++) out[oi + c]! += f * B[b0 + c]!;
  }
}
