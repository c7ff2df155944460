import { describe, expect, test } from 'vitest';
import { type Arc, cheapOrder } from '../../src/engine/network/feedback';
import { loopPlanOf } from '../../src/engine/network/loop/tears';
import { planOf } from '../../src/engine/network/plan';
import type { Basis, ProblemUnit, Read } from '../../src/engine/network/types';
import { seeded } from '../numerics/seeded';
import { problemOf, streamId, unit, unitId } from './fixtures';

const cut = (order: readonly number[], arcs: readonly Arc[]): number => {
  const at = new Map(order.map((v, k) => [v, k] as const));
  return arcs.reduce((sum, a) => sum + (at.get(a.from)! >= at.get(a.to)! ? a.weight : 0), 0);
};

function* permutations(left: readonly number[], head: readonly number[] = []): Generator<number[]> {
  if (left.length === 0) yield [...head];
  for (const v of left)
    yield* permutations(
      left.filter((w) => w !== v),
      [...head, v],
    );
}

const randomArcs = (count: number, density: number, random: () => number): Arc[] => {
  const arcs: Arc[] = [];
  for (let from = 0; from < count; from++)
    for (let to = 0; to < count; to++)
      if (random() < density) arcs.push({ from, to, weight: 1 + Math.floor(9 * random()) });
  return arcs;
};

describe('the order that cuts least', () => {
  test.each([1, 2, 3, 4, 5, 6])('is the best of all orders of seven nodes (seed %d)', (seed) => {
    const random = seeded(seed);
    for (let trial = 0; trial < 5; trial++) {
      const arcs = randomArcs(7, 0.15 + 0.3 * random(), random);
      const order = cheapOrder(7, arcs);
      expect([...order].sort()).toEqual([0, 1, 2, 3, 4, 5, 6]);
      let least = Number.POSITIVE_INFINITY;
      for (const other of permutations([0, 1, 2, 3, 4, 5, 6])) least = Math.min(least, cut(other, arcs));
      expect(cut(order, arcs)).toBe(least);
    }
  });

  test('cuts a long ring once, at its cheapest arc', () => {
    const arcs = Array.from({ length: 500 }, (_, i) => ({
      from: i,
      to: (i + 1) % 500,
      weight: i === 321 ? 1 : 5,
    }));
    expect(cut(cheapOrder(500, arcs), arcs)).toBe(1);
  });

  test('of a large tangle is no worse than twice the planted one, cuts nothing where nothing turns back, and stays the same', () => {
    const random = seeded(9);
    for (let trial = 0; trial < 5; trial++) {
      const arcs = randomArcs(40, 0.1, random);
      const forward = arcs.filter((a) => a.from < a.to);
      const back = arcs.filter((a) => a.from > a.to && random() < 0.1);
      const shuffled = Array.from({ length: 40 }, (_, i) => (i * 17 + 5) % 40);
      const name = (a: Arc): Arc => ({ ...a, from: shuffled[a.from]!, to: shuffled[a.to]! });
      expect(cut(cheapOrder(40, forward.map(name)), forward.map(name))).toBe(0);
      const all = [...forward, ...back].map(name);
      const planted = back.reduce((sum, a) => sum + a.weight, 0);
      expect(cut(cheapOrder(40, all), all)).toBeLessThanOrEqual(2 * planted);
      expect(cheapOrder(40, all)).toEqual(cheapOrder(40, all));
    }
  });
});

describe('the tears of a loop', () => {
  const basis = { id: 'b' } as Basis;
  const planned = (units: readonly ProblemUnit[], reads: readonly Read[] = []) => {
    const plan = planOf(problemOf(basis, units, { reads }));
    const loops = plan.order.filter((c) => c.loop);
    expect(loops).toHaveLength(1);
    const loop = loopPlanOf(plan, loops[0]!.members);
    return { ...loop, order: loop.order.map((k) => plan.units[k]!.id) };
  };
  const ring = [
    unit('v valve in=c > out=d', {}),
    unit('f feed > out=a', {}),
    unit('d divide in=d > out1=back out2=e', {}),
    unit('j join in1=a in2=back > out=b', {}),
    unit('h heater in=b > out=c', {}),
  ];

  test('are one where one is enough: the stream that enters a unit which has flow without it', () => {
    expect(planned(ring)).toEqual({ order: ['j', 'h', 'v', 'd'], tears: ['back'], scalars: [] });
  });

  test('open nested loops at the stream that is in both', () => {
    const units = [
      ...ring.map((u) => (u.id === 'h' ? unit('h heater in=b2 > out=c', {}) : u)),
      unit('j2 join in1=b in2=e2 > out=b2', {}),
      unit('x divide in=e > out1=e2 out2=out', {}),
    ];
    expect(planned(units).tears).toHaveLength(1);
  });

  test('are a read’s number rather than a stream where the loop closes by a setting', () => {
    const units = [
      unit('g feed > out=a', {}),
      unit('f feed > out=z', {}),
      unit('j join in1=a in2=z > out=b', {}),
      unit('v valve in=b > out=c', {}),
    ];
    const read = { unit: unitId('g'), path: 'flow', stream: streamId('c'), of: 'mol' } as const;
    expect(planned(units, [read])).toEqual({ order: ['g', 'j', 'v'], tears: [], scalars: [read] });
  });
});
