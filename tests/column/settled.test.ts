/** What is fixed must settle the column: derived, from a split so sharp that its top is one pure chemical. */
import { describe, expect, test } from 'vitest';
import { solveColumn } from '../../src/engine/column/solve';
import type { StreamState } from '../../src/engine/equilibrium/types';
import type { ColumnSettings, FixedBy } from '../../src/engine/units/column/settings';
import { column } from '../../src/engine/units/column/solve';
import { sayFinding } from '../../src/wording';
import { bankModel } from '../robust/bankModels';
import { taskOf } from '../robust/columns';
import { callOf, molar, solveCall, streamOf } from './fixtures';

const model = await bankModel(['benzene', 'toluene']);
const feed = streamOf(model, [50, 50], 100, { T_K: 370, P_Pa: 1.5e5 });
const RATIO: FixedBy = { fix: 'refluxRatio', value: 10 };
const callWith = (stages: number, ...fixedBy: readonly FixedBy[]) => {
  const settings: ColumnSettings = {
    stages,
    top: { distillate: 'liquid' },
    bottom: { reboiler: true },
    feeds: { feed1: { stage: Math.round(stages / 2) } },
    pressure: { top: 1.1e5, bottom: 1.1e5 },
    fixedBy,
  };
  return callOf(model, { feed1: feed }, settings);
};
const topT_K = (stages: number, n: number, ratio = RATIO): number => {
  const call = callWith(stages, ratio, { fix: 'flow', product: 'liquidDistillate', value: molar(n) });
  return (solveCall(call).results as { topT_K: number }).topT_K;
};

test('a temperature that every column of the kind has is refused, though it is met', async () => {
  const pure = (await bankModel(['benzene'])).of([0]);
  const task = taskOf(
    {
      ids: ['benzene'],
      z: [1],
      stages: 10,
      top: 'liquid',
      reboiler: true,
      P_Pa: [1.1e5, 1.1e5],
      feedPlace: 5,
      vapourFraction: 0.3,
    },
    pure,
    [{ fix: 'refluxRatio', value: 2 }],
  )!;
  const boils_K = task.feeds[0]!.T_K;
  const end = solveColumn({
    ...task,
    fixed: [...task.fixed, { fix: 'temperature', place: 1, value: boils_K }],
  });
  if (end.state === 'solved') throw new Error('solved');
  expect(end.failure.why).toBe('open');
});

const distillateOf = ({ out }: { readonly out: Readonly<Record<string, StreamState>> }): number =>
  out.liquidDistillate!.n_mol_s.reduce((a, b) => a + b, 0);

describe('the temperature of the first stage beside a reflux ratio', () => {
  test('says nothing of the distillate where 90 stages make it one pure chemical: no number is told', () => {
    const [a, b] = [topT_K(90, 20), topT_K(90, 30)];
    expect(Math.abs(a - b)).toBeLessThan(1e-7);
    const outcome = column.solve(callWith(90, RATIO, { fix: 'temperature', stage: 1, value: a }));
    expect(outcome.state).toBe('no-solution');
  });

  test('settles the distillate where 8 stages leave much toluene in it', () => {
    const low: FixedBy = { fix: 'refluxRatio', value: 1 };
    const wanted = topT_K(8, 60, low);
    const found = solveCall(callWith(8, low, { fix: 'temperature', stage: 1, value: wanted }));
    expect(distillateOf(found) / 60).toBeCloseTo(1, 6);
  });

  test('is met twice where a larger distillate is the purer one, and a note says that it falls', () => {
    const low: FixedBy = { fix: 'refluxRatio', value: 3 };
    const wanted = topT_K(12, 48, low);
    const outcome = column.solve(callWith(12, low, { fix: 'temperature', stage: 1, value: wanted }));
    if (outcome.state !== 'solved') throw new Error('not solved');
    const found = distillateOf(outcome.value);
    expect(found).toBeLessThan(40);
    expect(topT_K(12, found, low)).toBeCloseTo(wanted, 7);
    const note = outcome.findings.find((f) => f.code === 'column/several-temperatures')!;
    expect(sayFinding(note, { measures: 'metric' }).sentence).toMatch(/at stage 1 falls here/);
  });
});
