import { expect, test } from 'vitest';
import { makeMemory } from '../../src/engine/network/memory';
import { prewarm } from '../../src/worker/prewarm';
import { WARMING, warmingProblem } from '../../src/worker/prewarmProblem';
import { finish } from '../network/fixtures';

test('what the solver warms up with is a train that solves and closes, whatever its conditions', () => {
  const memory = makeMemory(WARMING);
  for (let k = 0; k < 50; k++) {
    const batch = finish(warmingProblem(k), memory, { from: k % 2 === 0 ? 'nothing' : 'warm' });
    expect(
      batch.units.filter(([, unit]) => unit.state !== 'solved').map(([id]) => id),
      `${k}`,
    ).toEqual([]);
    expect(batch.closure!.complete).toBe(true);
  }
});

test('a solve that waits is let in between two units of the first train', async () => {
  let time = 0;
  const asked: number[] = [];
  const { solves } = await prewarm({
    turns: { turn: async () => undefined, close: () => undefined },
    // Every look at the clock costs 3 ms: after three of them it is time to look for orders.
    now: () => {
      time += 3;
      return time;
    },
    overtaken: () => asked.push(time) === 2,
  });
  expect(solves).toBe(0);
  expect(asked).toHaveLength(2);
});
