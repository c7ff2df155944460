import { describe, expect, test } from 'vitest';
import { GROUPS } from '../robust/groups';

describe('random flashes', () => {
  // A short run; `npm run robust -- --what flashes --count 10000` is the long one.
  test('of 800 with seed 11 none is wrong and nearly all have an answer', async () => {
    const report = await GROUPS.flashes!(11, 800);
    expect(report.tried).toBe(800);
    expect(report.cases.filter((c) => !JSON.stringify(c).includes('equilibrium/'))).toEqual([]);
    expect(report.wrong).toBe(0);
    expect(report.share).toBeGreaterThan(0.99);
  });

  test('the same seed gives the same trials', async () => {
    const [a, b] = [await GROUPS.flashes!(3, 40), await GROUPS.flashes!(3, 40)];
    expect(a).toEqual(b);
  });
});
