import { describe, expect, test } from 'vitest';
import { positiveRoots } from '../../src/engine/numerics/cubic';
import { bracketedRoot } from '../../src/engine/numerics/root';
import { seeded } from './seeded';

describe('positive roots of a cubic', () => {
  test('finds three known positive roots over many orders of magnitude (seed 5)', () => {
    const next = seeded(5);
    const ends = new Float64Array(2);
    for (let trial = 0; trial < 20_000; trial++) {
      const [p, q, r] = [0, 0, 0].map(() => 10 ** (-9 * next()) * (1 + next())).sort((a, b) => a - b) as [
        number,
        number,
        number,
      ];
      // Roots that lie close together are known no better than their distance allows.
      const gap = Math.min((q - p) / q, (r - q) / r);
      if (gap < 1e-2) continue;
      expect(positiveRoots(-(p + q + r), p * q + q * r + r * p, -p * q * r, ends)).toBe(3);
      expect(Math.abs(ends[0]! / p - 1)).toBeLessThan(1e-12 / gap);
      expect(Math.abs(ends[1]! / r - 1)).toBeLessThan(1e-12 / gap);
    }
  });

  test('finds a single positive root beside a complex or a negative pair (seed 6)', () => {
    const next = seeded(6);
    const ends = new Float64Array(2);
    for (let trial = 0; trial < 20_000; trial++) {
      const r = 10 ** (6 * next() - 4);
      const real = 4 * next() - 2;
      const imaginary = next() < 0.5 ? 0.1 + next() : 0;
      // A double root on the positive side is another matter: keep it negative.
      const c = imaginary === 0 ? -Math.abs(real) - 0.01 : real;
      const [sum, product] = [2 * c, c * c + imaginary * imaginary];
      expect(positiveRoots(-(r + sum), product + r * sum, -r * product, ends)).toBe(1);
      expect(ends[1]).toBe(ends[0]);
      expect(Math.abs(ends[0]! / r - 1)).toBeLessThan(1e-9);
    }
  });

  test('keeps every digit of both roots that lie nine orders of magnitude apart', () => {
    // (w - 1)(w - 1e-7)(w - 1e-9), coefficients rounded once
    const ends = new Float64Array(2);
    positiveRoots(-1.000000101, 1.010000001e-7, -1e-16, ends);
    expect(ends[1]).toBeCloseTo(1, 15);
    expect(Math.abs(ends[0]! / 1e-9 - 1)).toBeLessThan(1e-13);
  });

  test('a triple root is found as well as rounding lets it', () => {
    const ends = new Float64Array(2);
    positiveRoots(-0.75, 0.1875, -0.015625, ends);
    expect([...ends]).toEqual([0.25, 0.25]);
    positiveRoots(-0.9, 0.27, -0.027, ends);
    expect(ends[0]).toBeCloseTo(0.3, 4);
    expect(ends[1]).toBeCloseTo(0.3, 4);
  });
});

describe('a zero between two arguments', () => {
  const cases: readonly [string, (x: number) => number, number, number, number][] = [
    ['cos x - x', (x) => Math.cos(x) - x, 0, 1, 0.7390851332151607],
    ['x^3 - 2x - 5 (Wallis)', (x) => x ** 3 - 2 * x - 5, 2, 3, 2.0945514815423265],
    ['a steep exponential', (x) => Math.exp(30 * x) - 1.5, -1, 1, Math.log(1.5) / 30],
    ['a flat ninth power', (x) => (x - 0.3) ** 9, -1, 1, 0.3],
    ['a falling function', (x) => 1 / x - 4, 0.01, 9, 0.25],
  ];
  test.each(cases)('is found for %s', (_name, f, a, b, zero) => {
    const found = bracketedRoot(f, a, b, { xTol: 1e-12 });
    expect(found.found).toBe(true);
    expect(Math.abs(found.x - zero)).toBeLessThan(3e-12);
    expect(found.evaluations).toBeLessThanOrEqual(Math.ceil(Math.log2((b - a) / 2e-12)) + 4);
  });

  test('closes on a jump', () => {
    const found = bracketedRoot((x) => (x < Math.SQRT2 ? -1 : 3), 0, 4, { xTol: 1e-10 });
    expect(Math.abs(found.x - Math.SQRT2)).toBeLessThan(3e-10);
    expect(found.high - found.low).toBeLessThan(3e-10);
  });

  test('says why there is none', () => {
    expect(bracketedRoot((x) => x * x + 1, -1, 2, { xTol: 1e-9 }).why).toBe('no-bracket');
    expect(bracketedRoot((x) => Math.log(x), -1, 2, { xTol: 1e-9 }).why).toBe('not-finite');
    expect(bracketedRoot((x) => x - 0.3, 0, 1, { xTol: 0, evaluations: 2 }).why).toBe('evaluations');
  });
});
