import { expect, test } from 'vitest';
import { wholeState } from '../../src/canvas/whole';
import type { UnitId } from '../../src/engine/ids';
import { makeMemory } from '../../src/engine/network/memory';
import { solveNetwork } from '../../src/engine/network/solve';
import type { LoopProgress } from '../../src/engine/network/types';
import { createResultsStore } from '../../src/store/resultsStore';
import { drive, PACE } from '../../src/worker/drive';
import { makeTurns } from '../../src/worker/port';
import { compiled, exampleText, opened } from '../sketch/help';

test('a loop on its way is told with its tear, pass and residual, and read in the title strip', async () => {
  const sketch = opened(exampleText('nitrogen-loop'));
  const { basis, problem } = await compiled(sketch);
  if (!basis) throw new Error('the example has no basis');
  const turns = makeTurns();
  const told: (readonly [UnitId, LoopProgress | undefined])[] = [];
  const batch = await drive(solveNetwork(problem, makeMemory(basis)), {
    turns,
    now: () => performance.now(),
    pace: PACE,
    announce: true,
    overtaken: () => false,
    partial: () => undefined,
    at: (unit, loop) => told.push([unit, loop]),
  });
  turns.close();
  expect(batch?.closure?.complete).toBe(true);
  // Feeds and products stand in no loop.
  expect(told[0]![1]).toBeUndefined();
  const inLoop = told.filter(([, loop]) => loop !== undefined);
  expect(inLoop.length).toBeGreaterThan(20);
  const [unit, loop] = inLoop.at(-1)!;
  expect(loop).toMatchObject({ stream: 's14' });
  // It crosses to the page as plain data.
  expect(structuredClone(loop)).toEqual(loop);

  const store = createResultsStore();
  store.at(1, unit, loop);
  const { word, rest } = wholeState(sketch, 1, store.getState());
  expect(word + rest).toMatch(
    /^Solving, at \S+, loop torn at stream 14, pass \d+, off by (0\.\d+|\d × 10⁻[⁰¹²³⁴⁵⁶⁷⁸⁹]+), edit 1$/,
  );
  store.take(1, true, batch!, 5);
  expect(store.getState().loop).toBeNull();
});
