/** Columns that a plain start does not solve, kept for the rescue that does. Drawn at random (seeds 9 and 10). */
import { expect, test } from 'vitest';
import { solveColumn } from '../../src/engine/column/solve';
import type { Attempt } from '../../src/engine/column/types';
import { column } from '../../src/engine/units/column/solve';
import { bankModel } from '../robust/bankModels';
import { type ColumnCase, taskOf } from '../robust/columns';
import { scenarios } from './fixtures';

const KEPT: readonly (readonly [Attempt, ColumnCase])[] = [
  [
    'scan',
    {
      ids: [
        'p-diethylbenzene',
        '1-methylnaphthalene',
        'n-undecane',
        '2,3,4-trimethylpentane',
        'p-cymene',
        'n-pentadecane',
        'n-heptane',
        'n-tetradecane',
        '1,2,3-trimethylbenzene',
      ],
      z: [
        0.056914839619147235, 0.19022892021655702, 0.052458314001405264, 0.16328310909772095,
        0.25190382396256644, 0.01177110147803117, 0.11471170865693557, 0.10675907001904614,
        0.051969112948590274,
      ],
      stages: 36,
      top: 'liquid',
      reboiler: true,
      P_Pa: [176446.93442250486, 186497.88470848347],
      feedPlace: 26,
      vapourFraction: 0.5713706731330603,
      fixed: [
        { fix: 'refluxRatio', value: 4.97241747328448 },
        { fix: 'purity', product: 'bottoms', chemical: 1, value: 0.21569936109492838, basis: 'mole' },
      ],
    },
  ],
  [
    'scan',
    {
      ids: [
        'methylacetylene',
        'cyclopropane',
        'cyclopentene',
        'propadiene',
        'cis-2-butene',
        '2,2,3-trimethylbutane',
      ],
      z: [
        0.16174405428142052, 0.10798321134372273, 0.22996066352022732, 0.3018311974700465,
        0.17301336903018594, 0.02546750435439694,
      ],
      stages: 44,
      top: 'liquid',
      reboiler: true,
      P_Pa: [885070.4615761961, 947394.8618716996],
      feedPlace: 19,
      vapourFraction: 0,
      fixed: [
        { fix: 'refluxRatio', value: 6.228199711468988 },
        { fix: 'purity', product: 'bottoms', chemical: 1, value: 0.000037396660065895495, basis: 'mole' },
      ],
    },
  ],
];

test.each(KEPT)('kept for "%s"', async (by, c) => {
  const model = (await bankModel(c.ids)).of(c.ids.map((_, i) => i));
  const task = taskOf(c, model, c.fixed);
  if (!task) throw new Error('no feed');
  const end = solveColumn(task);
  expect(end.state).toBe('solved');
  expect(end.effort.tried.at(-1)).toBe(by);
  expect(end.effort.residual).toBeLessThan(1e-9);
});

test('ethane off at a reflux ratio and a purity solves from nothing, though the plain start fails', async () => {
  const s = (await scenarios()).find((x) => x.name.startsWith('ethane off'))!;
  const found = column.solve(s.call);
  expect(found.state).toBe('solved');
});
