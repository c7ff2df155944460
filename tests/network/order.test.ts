import { describe, expect, test } from 'vitest';
import { components } from '../../src/engine/network/order';
import { seeded } from '../numerics/seeded';

describe('the solving order', () => {
  test('puts a unit after everything that it needs', () => {
    expect(components([[1], [2, 3], [3], []])).toEqual([[0], [1], [2], [3]]);
  });

  test('gathers a loop and keeps what lies before and after it apart', () => {
    expect(components([[1], [2], [3], [1, 4], []])).toEqual([[0], [1, 2, 3], [4]]);
  });

  test('knows two loops that share a unit as one', () => {
    expect(components([[1], [0, 2], [1]])).toEqual([[0, 1, 2]]);
  });

  test('holds a train of fifty thousand units', () => {
    const count = 50_000;
    const order = components(Array.from({ length: count }, (_, i) => (i + 1 < count ? [i + 1] : [])));
    expect(order.length).toBe(count);
    expect(order.every(([node], k) => node === k)).toBe(true);
  });

  test.each([1, 2, 3, 4, 5])('agrees with plain reachability on random graphs (seed %d)', (seed) => {
    const random = seeded(seed);
    const count = 25;
    const after = Array.from({ length: count }, () =>
      Array.from({ length: count }, (_, j) => j).filter(() => random() < 0.05),
    );
    // Derived: reach[i][j] by repeated squaring of the edges (Warshall).
    const reach = after.map((edges) => Array.from({ length: count }, (_, j) => edges.includes(j)));
    for (let k = 0; k < count; k++)
      for (let i = 0; i < count; i++)
        for (let j = 0; j < count; j++) if (reach[i]![k] && reach[k]![j]) reach[i]![j] = true;
    const order = components(after);
    const place = new Map(order.flatMap((members, at) => members.map((m) => [m, at] as const)));
    expect(place.size).toBe(count);
    for (let i = 0; i < count; i++)
      for (let j = 0; j < count; j++) {
        const together = i === j || (reach[i]![j] === true && reach[j]![i] === true);
        expect(place.get(i) === place.get(j)).toBe(together);
        if (reach[i]![j] && !together) expect(place.get(i)!).toBeLessThan(place.get(j)!);
      }
  });
});
