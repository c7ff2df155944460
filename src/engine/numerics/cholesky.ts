/**
 * Cholesky factor of a symmetric matrix, in place; a matrix that is not safely positive definite gets the same amount
 * added to its whole diagonal, doubled until it is.
 *
 * @param a      row-major n*n; its lower triangle and diagonal are read, the lower triangle becomes the factor
 * @param n      order
 * @param spare  length n*n, scratch for a second try
 * @param floor  smallest pivot accepted, relative to the largest absolute diagonal entry
 * @returns      what was added to the diagonal, 0 for a positive definite matrix; NaN when the matrix is not finite
 * Allocates nothing. Source: Nocedal & Wright, Numerical Optimization, 2nd ed., alg. 3.3.
 */
export function choleskyShifted(a: Float64Array, n: number, spare: Float64Array, floor = 1e-12): number {
  let size = 0;
  let least = Number.POSITIVE_INFINITY;
  for (let i = 0; i < n; i++) {
    const d = a[i * n + i]!;
    if (Math.abs(d) > size) size = Math.abs(d);
    if (d < least) least = d;
    for (let j = 0; j <= i; j++) {
      const value = a[i * n + j]!;
      if (!Number.isFinite(value)) return Number.NaN;
      spare[i * n + j] = value;
    }
  }
  if (factor(a, n, floor * size)) return 0;
  for (let shift = Math.max(1e-3 * size, -least, Number.MIN_VALUE); ; shift *= 2) {
    for (let i = 0; i < n; i++) {
      for (let j = 0; j < i; j++) a[i * n + j] = spare[i * n + j]!;
      a[i * n + i] = spare[i * n + i]! + shift;
    }
    if (factor(a, n, floor * size)) return shift;
  }
}

/** Solves A x = b with the factor from choleskyShifted; b, length n, is overwritten by x. */
export function choleskySolve(a: Float64Array, n: number, b: Float64Array): void {
  for (let i = 0; i < n; i++) {
    let sum = b[i]!;
    for (let j = 0; j < i; j++) sum -= a[i * n + j]! * b[j]!;
    b[i] = sum / a[i * n + i]!;
  }
  for (let i = n - 1; i >= 0; i--) {
    let sum = b[i]!;
    for (let j = i + 1; j < n; j++) sum -= a[j * n + i]! * b[j]!;
    b[i] = sum / a[i * n + i]!;
  }
}

function factor(a: Float64Array, n: number, floor: number): boolean {
  for (let i = 0; i < n; i++) {
    const row = i * n;
    for (let j = 0; j <= i; j++) {
      const other = j * n;
      let sum = a[row + j]!;
      for (let k = 0; k < j; k++) sum -= a[row + k]! * a[other + k]!;
      if (j < i) a[row + j] = sum / a[other + j]!;
      else {
        if (!(sum > floor)) return false;
        a[row + i] = Math.sqrt(sum);
      }
    }
  }
  return true;
}
