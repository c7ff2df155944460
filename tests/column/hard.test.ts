/** Columns that a plain start does not solve, kept for the rescue that does. */
import { expect, test } from 'vitest';
import { solveColumn } from '../../src/engine/column/solve';
import { column } from '../../src/engine/units/column/solve';
import { bankModel } from '../robust/bankModels';
import { taskOf } from '../robust/columns';
import { scenarios } from './fixtures';
import { KEPT } from './kept';

test.each(KEPT)('kept for "%s"', async (by, c) => {
  const model = (await bankModel(c.ids)).of(c.ids.map((_, i) => i));
  const task = taskOf(c, model, c.fixed);
  if (!task) throw new Error('no feed');
  const end = solveColumn(task);
  expect(end.state).toBe('solved');
  expect(end.effort.tried.at(-1)).toBe(by);
  expect(end.effort.residual).toBeLessThan(1e-9);
});

test('every way of starting a column with ends has a case that needs it', () => {
  expect(new Set(KEPT.map(([by]) => by))).toEqual(
    new Set(['more-sweeps', 'heats', 'plain-then-move', 'scan', 'other-ratio']),
  );
});

test('ethane off at a reflux ratio and a purity solves from nothing within two starts', async () => {
  const s = (await scenarios()).find((x) => x.name.startsWith('ethane off'))!;
  const found = column.solve(s.call);
  if (found.state !== 'solved') throw new Error('not solved');
  // Snapshot: 10 to 30 steps; four starts took 80.
  expect(found.value.effort.iterations).toBeLessThan(40);
});
