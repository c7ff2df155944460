import { describe, expect, test } from 'vitest';
import { makeAnderson } from '../../src/engine/numerics/anderson';
import { luFactor, luSolve } from '../../src/engine/numerics/lu';
import { seeded } from './seeded';

/** x <- A x + b with the row sums of |A| below `gain`, and its fixed point by LU. */
function linearMap(n: number, gain: number, seed: number) {
  const random = seeded(seed);
  const a = Float64Array.from({ length: n * n }, () => ((2 * random() - 1) * gain) / n);
  const b = Float64Array.from({ length: n }, () => 1 + random());
  const lu = a.map((v, k) => (k % (n + 1) === 0 ? 1 : 0) - v);
  const fixed = b.slice();
  const pivot = new Int32Array(n);
  luFactor(lu, n, pivot);
  luSolve(lu, n, pivot, fixed);
  const g = (x: Float64Array): Float64Array =>
    b.map((v, i) => x.reduce((sum, w, j) => sum + a[i * n + j]! * w, v));
  return { g, fixed };
}

const farthest = (x: Float64Array, y: Float64Array): number =>
  x.reduce((most, v, i) => Math.max(most, Math.abs(v - y[i]!)), 0);

function accelerate(g: (x: Float64Array) => Float64Array, n: number, depth: number, maps: number) {
  const anderson = makeAnderson(n, depth);
  const one = new Float64Array(n).fill(1);
  let x = new Float64Array(n);
  for (let k = 0; k < maps; k++) {
    anderson.push(x, g(x));
    const next = new Float64Array(n);
    anderson.propose(one, next);
    x = next;
  }
  return { x, anderson };
}

describe('acceleration of a fixed point', () => {
  test('ends a linear map of n numbers after n + 2 answers when it holds n differences', () => {
    for (const seed of [1, 2, 3]) {
      const { g, fixed } = linearMap(5, 3, seed);
      // Derived: n independent differences determine the map; plain substitution would not even contract.
      expect(farthest(accelerate(g, 5, 5, 7).x, fixed)).toBeLessThan(1e-9);
    }
  });

  test('leads a slow map to its end in a few steps where substitution needs thousands', () => {
    const g = (x: Float64Array): Float64Array => Float64Array.of(0.999 * x[0]! + 1, 0.99 * x[1]! + 2);
    // Derived: 1 / (1 - 0.999) and 2 / (1 - 0.99).
    const { x } = accelerate(g, 2, 5, 5);
    expect(x[0]! / 1000).toBeCloseTo(1, 9);
    expect(x[1]! / 200).toBeCloseTo(1, 9);
  });

  test('leaves differences out that say nothing new, and is never not a number', () => {
    const { x, anderson } = accelerate(() => Float64Array.of(3, 4), 2, 4, 6);
    expect([...x]).toEqual([3, 4]);
    expect(anderson.held).toBe(4);
    const still = makeAnderson(2, 3);
    for (let k = 0; k < 4; k++) still.push(Float64Array.of(1, 1), Float64Array.of(2, 2));
    const out = new Float64Array(2);
    expect(still.propose(Float64Array.of(1, 1), out)).toBe(0);
    expect([...out]).toEqual([2, 2]);
  });

  test('may forget all, or the last point alone', () => {
    const { g, fixed } = linearMap(3, 0.9, 7);
    const { anderson } = accelerate(g, 3, 3, 5);
    const start = Float64Array.of(1, 2, 3);
    const scale = Float64Array.of(1, 1, 1);
    const out = new Float64Array(3);
    anderson.leap();
    anderson.push(start, g(start));
    // Derived: the slopes of the map are known, so one answer is enough.
    expect(anderson.propose(scale, out)).toBe(3);
    expect(farthest(out, fixed)).toBeLessThan(1e-6);
    anderson.forget();
    expect(anderson.held).toBe(0);
    expect(() => anderson.propose(scale, out)).toThrow();
  });
});
