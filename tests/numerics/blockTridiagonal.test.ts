import { expect, test } from 'vitest';
import { addProduct, factorBlock, solveBlock } from '../../src/engine/numerics/blockTridiagonal';
import { seeded } from './seeded';

const SEED = 77;

test.each([1, 2, 3, 4, 5, 8, 9, 13])(
  `a block of order %d is solved for its right half and for later vectors (seed ${SEED})`,
  (n) => {
    const random = seeded(SEED + n);
    const w = 2 * n;
    // A block inside a larger array, so that a wrong offset shows.
    const at = 7;
    const a = new Float64Array(at + n * w + 5).fill(3);
    for (let k = 0; k < n * w; k++) a[at + k] = random() - 0.5;
    // A zero where a pivot would stand: rows must be exchanged.
    if (n > 1) a[at] = 0;
    const before = a.slice();
    const pivot = new Int32Array(n + 2);
    expect(factorBlock(a, at, n, pivot, 2)).toBe(true);
    const left = (i: number, k: number): number => before[at + i * w + k]!;
    for (let c = 0; c < n; c++)
      for (let i = 0; i < n; i++) {
        let sum = 0;
        for (let k = 0; k < n; k++) sum += left(i, k) * a[at + k * w + n + c]!;
        expect(Math.abs(sum - before[at + i * w + n + c]!)).toBeLessThan(1e-9);
      }
    const b = new Float64Array(n + 3).map(() => random());
    const asked = b.slice();
    solveBlock(a, at, n, pivot, 2, b, 3);
    for (let i = 0; i < n; i++) {
      let sum = 0;
      for (let k = 0; k < n; k++) sum += left(i, k) * b[3 + k]!;
      expect(Math.abs(sum - asked[3 + i]!)).toBeLessThan(1e-9);
    }
    expect([...a.subarray(0, at), ...a.subarray(at + n * w)]).toEqual(Array(at + 5).fill(3));
  },
);

test('a singular block and one that is not finite are told', () => {
  const pivot = new Int32Array(2);
  expect(factorBlock(Float64Array.of(1, 2, 0, 0, 2, 4, 0, 0), 0, 2, pivot, 0)).toBe(false);
  expect(factorBlock(Float64Array.of(1, Number.NaN, 0, 0, 2, 4, 0, 0), 0, 2, pivot, 0)).toBe(false);
});

test(`a product is added inside larger arrays (seed ${SEED})`, () => {
  const random = seeded(SEED);
  const [p, q, m, bStride, oStride] = [5, 7, 6, 9, 11];
  const A = new Float64Array(2 + p * q).map(() => random());
  const B = new Float64Array(3 + q * bStride).map(() => random());
  const out = new Float64Array(1 + p * oStride).map(() => random());
  const before = out.slice();
  addProduct(-1.5, A, 2, p, q, B, 3, bStride, m, out, 1, oStride);
  for (let i = 0; i < p; i++)
    for (let c = 0; c < oStride && 1 + i * oStride + c < out.length; c++) {
      let sum = before[1 + i * oStride + c]!;
      if (c < m) for (let k = 0; k < q; k++) sum -= 1.5 * A[2 + i * q + k]! * B[3 + k * bStride + c]!;
      expect(out[1 + i * oStride + c]!).toBeCloseTo(sum, 12);
    }
});
