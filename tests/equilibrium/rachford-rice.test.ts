import { describe, expect, test } from 'vitest';
import { vapourFractionOf } from '../../src/engine/equilibrium/rachford-rice';
import { makeRandom } from '../robust/random';

const of = (...values: number[]): Float64Array => Float64Array.from(values);

describe('the vapour fraction by the mole balance', () => {
  test('two chemicals agree with the hand calculation', () => {
    // Derived: z = 0.5, K = 2 and 0.5: 0.5/(1 + b) = 0.25/(1 - b/2), so b = 0.5.
    expect(vapourFractionOf(of(0.5, 0.5), of(2, 0.5), -1)).toBeCloseTo(0.5, 14);
  });

  test('a feed below its bubble point gives 0, above its dew point 1, on them too', () => {
    expect(vapourFractionOf(of(0.5, 0.5), of(1.2, 0.5), -1)).toBe(0);
    expect(vapourFractionOf(of(0.5, 0.5), of(3, 1), -1)).toBe(1);
    expect(vapourFractionOf(of(0.5, 0.5), of(1.5, 0.5), -1)).toBe(0);
  });

  test('the balance closes for K over forty orders of magnitude and traces, from any start', () => {
    const random = makeRandom(7);
    let inside = 0;
    for (let k = 0; k < 2000; k++) {
      const n = random.whole(2, 20);
      const z = new Float64Array(n).map(() => random.logBetween(1e-12, 1));
      const total = z.reduce((a, b) => a + b, 0);
      for (let i = 0; i < n; i++) z[i] = z[i]! / total;
      const K = new Float64Array(n).map(() => random.logBetween(1e-20, 1e20));
      const beta = vapourFractionOf(z, K, random.next());
      if (beta === 0 || beta === 1) continue;
      inside++;
      // Newton's next step tells how far the answer is from the zero, in beta.
      let sum = 0;
      let slope = 0;
      for (let i = 0; i < n; i++) {
        const term = (K[i]! - 1) / (1 - beta + beta * K[i]!);
        sum += z[i]! * term;
        slope += z[i]! * term * term;
      }
      expect(Math.abs(sum / slope)).toBeLessThan(1e-9 * Math.min(beta, 1 - beta) + 3e-16);
      expect(Math.abs(beta - vapourFractionOf(z, K, -1))).toBeLessThan(1e-9);
    }
    expect(inside).toBeGreaterThan(500);
  });
});
