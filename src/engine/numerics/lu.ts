/**
 * LU factors of a dense square matrix with partial pivoting, in place.
 *
 * @param a      row-major n*n; overwritten by the factors (unit lower triangle below the diagonal)
 * @param n      order
 * @param pivot  length n; row that was exchanged with row k at step k
 * @returns      false when a column has no pivot other than zero (or not finite): a is then undefined
 * Allocates nothing. Source: Golub & Van Loan, Matrix Computations, 4th ed., alg. 3.4.1.
 */
export function luFactor(a: Float64Array, n: number, pivot: Int32Array): boolean {
  for (let k = 0; k < n; k++) {
    let best = k;
    let size = Math.abs(a[k * n + k]!);
    for (let i = k + 1; i < n; i++) {
      const value = Math.abs(a[i * n + k]!);
      if (value > size) {
        size = value;
        best = i;
      }
    }
    if (!(size > 0 && size < Number.POSITIVE_INFINITY)) return false;
    pivot[k] = best;
    if (best !== k) swapRows(a, n, k, best);
    const row = k * n;
    const scale = 1 / a[row + k]!;
    for (let i = k + 1; i < n; i++) {
      const other = i * n;
      const factor = a[other + k]! * scale;
      a[other + k] = factor;
      if (factor === 0) continue;
      for (let j = k + 1; j < n; j++) a[other + j]! -= factor * a[row + j]!;
    }
  }
  return true;
}

/**
 * Solves A x = b with factors from luFactor, which gave true.
 *
 * @param a, pivot  as luFactor left them
 * @param b         right-hand side, n entries from `at` on; overwritten by x
 */
export function luSolve(a: Float64Array, n: number, pivot: Int32Array, b: Float64Array, at = 0): void {
  for (let k = 0; k < n; k++) {
    const from = pivot[k]!;
    if (from === k) continue;
    const kept = b[at + k]!;
    b[at + k] = b[at + from]!;
    b[at + from] = kept;
  }
  for (let i = 1; i < n; i++) {
    let sum = b[at + i]!;
    for (let j = 0; j < i; j++) sum -= a[i * n + j]! * b[at + j]!;
    b[at + i] = sum;
  }
  for (let i = n - 1; i >= 0; i--) {
    let sum = b[at + i]!;
    for (let j = i + 1; j < n; j++) sum -= a[i * n + j]! * b[at + j]!;
    b[at + i] = sum / a[i * n + i]!;
  }
}

function swapRows(a: Float64Array, width: number, p: number, q: number): void {
  for (let j = 0; j < width; j++) {
    const kept = a[p * width + j]!;
    a[p * width + j] = a[q * width + j]!;
    a[q * width + j] = kept;
  }
}
