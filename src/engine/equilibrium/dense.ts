/**
 * Solves A x = b for a symmetric matrix that should be positive definite, by Cholesky in place. Where a pivot is not
 * safely positive it is raised: the step then still points downhill.
 *
 * @param A  n x n row-major, lower triangle filled with A; on return its factor L
 * @param b  right-hand side, length n or more; on return x
 * @returns  whether A was positive definite as it stood
 * Mutates: A, b. Allocates nothing.
 */
export function solveDefinite(A: Float64Array, b: Float64Array, n: number): boolean {
  let definite = true;
  for (let i = 0; i < n; i++) {
    const ri = i * n;
    for (let j = 0; j < i; j++) {
      const rj = j * n;
      let sum = A[ri + j]!;
      for (let k = 0; k < j; k++) sum -= A[ri + k]! * A[rj + k]!;
      A[ri + j] = sum * A[rj + j]!;
    }
    let pivot = A[ri + i]!;
    for (let k = 0; k < i; k++) pivot -= A[ri + k]! * A[ri + k]!;
    if (!(pivot > LEAST)) {
      definite = false;
      pivot = Math.max(Math.abs(pivot), RAISED);
    }
    // The inverse of the diagonal is kept: divisions are the slow part at this size.
    A[ri + i] = 1 / Math.sqrt(pivot);
  }
  solveFactored(A, b, n);
  return definite;
}

/** Solves with the factor that solveDefinite left in A. */
export function solveFactored(A: Float64Array, b: Float64Array, n: number): void {
  for (let i = 0; i < n; i++) {
    let sum = b[i]!;
    for (let k = 0; k < i; k++) sum -= A[i * n + k]! * b[k]!;
    b[i] = sum * A[i * n + i]!;
  }
  for (let i = n - 1; i >= 0; i--) {
    let sum = b[i]!;
    for (let k = i + 1; k < n; k++) sum -= A[k * n + i]! * b[k]!;
    b[i] = sum * A[i * n + i]!;
  }
}

const LEAST = 1e-14;
const RAISED = 1e-2;

/**
 * Solves A x = b by Gauss elimination with partial pivoting, in place.
 *
 * @param A  n x n row-major; destroyed
 * @param b  right-hand side, length n or more; on return x
 * @returns  false when a pivot is zero or not finite
 */
export function solveDense(A: Float64Array, b: Float64Array, n: number): boolean {
  for (let k = 0; k < n; k++) {
    let at = k;
    let most = Math.abs(A[k * n + k]!);
    for (let i = k + 1; i < n; i++) {
      const size = Math.abs(A[i * n + k]!);
      if (size > most) {
        most = size;
        at = i;
      }
    }
    if (!(most > 0 && most < Number.POSITIVE_INFINITY)) return false;
    if (at !== k) {
      for (let j = k; j < n; j++) {
        const kept = A[k * n + j]!;
        A[k * n + j] = A[at * n + j]!;
        A[at * n + j] = kept;
      }
      const kept = b[k]!;
      b[k] = b[at]!;
      b[at] = kept;
    }
    const inverse = 1 / A[k * n + k]!;
    for (let i = k + 1; i < n; i++) {
      const factor = A[i * n + k]! * inverse;
      if (factor === 0) continue;
      for (let j = k + 1; j < n; j++) A[i * n + j] = A[i * n + j]! - factor * A[k * n + j]!;
      b[i] = b[i]! - factor * b[k]!;
    }
  }
  for (let i = n - 1; i >= 0; i--) {
    let sum = b[i]!;
    for (let j = i + 1; j < n; j++) sum -= A[i * n + j]! * b[j]!;
    b[i] = sum / A[i * n + i]!;
  }
  return true;
}
