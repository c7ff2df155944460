import { describe, expect, test } from 'vitest';
import { choleskyShifted, choleskySolve } from '../../src/engine/numerics/cholesky';
import { luFactor, luSolve } from '../../src/engine/numerics/lu';
import { seeded } from './seeded';

const matrix = (n: number, next: () => number): Float64Array =>
  Float64Array.from({ length: n * n }, () => 2 * next() - 1);
const times = (a: Float64Array, n: number, x: Float64Array): Float64Array =>
  Float64Array.from({ length: n }, (_, i) => x.reduce((sum, v, j) => sum + a[i * n + j]! * v, 0));

describe('LU', () => {
  test.each([1, 2, 3, 7, 25])('solves random systems of order %i to rounding (seed 11)', (n) => {
    const next = seeded(11);
    for (let trial = 0; trial < 20; trial++) {
      const a = matrix(n, next);
      const x = Float64Array.from({ length: n }, () => next());
      const b = times(a, n, x);
      const lu = a.slice();
      const pivot = new Int32Array(n);
      expect(luFactor(lu, n, pivot)).toBe(true);
      const y = b.slice();
      luSolve(lu, n, pivot, y);
      const back = times(a, n, y);
      for (let i = 0; i < n; i++) expect(Math.abs(back[i]! - b[i]!)).toBeLessThan(1e-12);
    }
  });

  test('exchanges rows where the diagonal is zero', () => {
    const a = Float64Array.of(0, 2, 3, 0);
    const pivot = new Int32Array(2);
    expect(luFactor(a, 2, pivot)).toBe(true);
    const b = Float64Array.of(9, 4, 6);
    luSolve(a, 2, pivot, b, 1);
    expect([...b]).toEqual([9, 2, 2]);
  });

  test('says that a singular or not finite matrix has no factors', () => {
    expect(luFactor(Float64Array.of(1, 2, 2, 4), 2, new Int32Array(2))).toBe(false);
    expect(luFactor(Float64Array.of(1, Number.NaN, Number.NaN, 4), 2, new Int32Array(2))).toBe(false);
  });
});

describe('Cholesky', () => {
  test.each([1, 2, 5, 20])('solves a positive definite system of order %i without a shift (seed 3)', (n) => {
    const next = seeded(3);
    const g = matrix(n, next);
    const a = new Float64Array(n * n);
    for (let i = 0; i < n; i++)
      for (let j = 0; j < n; j++) {
        let sum = i === j ? 0.1 : 0;
        for (let k = 0; k < n; k++) sum += g[i * n + k]! * g[j * n + k]!;
        a[i * n + j] = sum;
      }
    const x = Float64Array.from({ length: n }, () => next());
    const b = times(a, n, x);
    const l = a.slice();
    expect(choleskyShifted(l, n, new Float64Array(n * n))).toBe(0);
    choleskySolve(l, n, b);
    for (let i = 0; i < n; i++) expect(b[i]).toBeCloseTo(x[i]!, 9);
  });

  test('shifts an indefinite matrix until the step goes downhill', () => {
    const a = Float64Array.of(1, 2, 2, 1);
    const l = a.slice();
    const shift = choleskyShifted(l, 2, new Float64Array(4));
    expect(shift).toBeGreaterThan(1);
    const g = Float64Array.of(1, -0.5);
    const d = g.slice();
    choleskySolve(l, 2, d);
    expect(d[0]! * g[0]! + d[1]! * g[1]!).toBeGreaterThan(0);
    const [p, q] = d;
    expect((1 + shift) * p! + 2 * q!).toBeCloseTo(1, 12);
    expect(2 * p! + (1 + shift) * q!).toBeCloseTo(-0.5, 12);
  });

  test('gives NaN for a matrix that is not finite, and ends', () => {
    expect(choleskyShifted(Float64Array.of(Number.POSITIVE_INFINITY), 1, new Float64Array(1))).toBeNaN();
    expect(choleskyShifted(new Float64Array(4), 2, new Float64Array(4))).toBeGreaterThan(0);
  });
});
