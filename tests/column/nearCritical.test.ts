/** Cautions near the critical point of what is on the stages. */
import { expect, test } from 'vitest';
import type { Finding } from '../../src/engine/outcome';
import type { ColumnSettings } from '../../src/engine/units/column/settings';
import { column } from '../../src/engine/units/column/solve';
import { bankModel } from '../robust/bankModels';
import { callOf, SITE, solveCall, streamOf } from './fixtures';

const model = await bankModel(['propane', 'n-butane', 'n-hexane']);

function findingsAt(P: number, limits?: Readonly<Record<string, number>>): readonly Finding[] {
  const settings: ColumnSettings = {
    stages: 14,
    top: { distillate: 'liquid' },
    bottom: { reboiler: true },
    feeds: { feed1: { stage: 7 } },
    pressure: { top: P, bottom: P },
    fixedBy: [
      { fix: 'refluxRatio', value: 2 },
      {
        fix: 'flow',
        product: 'liquidDistillate',
        value: { is: 'share', share: 0.4, of: 'feed', basis: 'mole' },
      },
    ],
  };
  const feed = streamOf(model, [40, 35, 25], 50, { P_Pa: P, vapourFraction: 0 });
  const call = { ...callOf(model, { feed1: feed }, settings), ...(limits ? { limits } : {}) };
  return column.limits(call, solveCall(call), SITE);
}
const critical = (found: readonly Finding[]): Finding[] =>
  found.filter((f) => f.code.includes('near-critical'));

test('a column far below its critical pressure has no caution', () => {
  expect(critical(findingsAt(14e5))).toEqual([]);
});

test('a pressure above the share of the pseudo-critical that the sketch sets is told with both pressures', () => {
  const [found] = critical(findingsAt(14e5, { 'column/near-critical-pressure': 0.3 }));
  expect(found).toMatchObject({ code: 'column/near-critical-pressure', weight: 'caution' });
  const figure = (name: string): number => found!.evidence.find((e) => e.name === name)!.value;
  expect(figure('pressure')).toBe(14e5);
  expect(figure('share')).toBeCloseTo(14e5 / figure('critical'), 12);
  // Between the critical pressures of hexane and propane.
  expect(figure('critical')).toBeGreaterThan(30.2e5);
  expect(figure('critical')).toBeLessThan(42.6e5);
});

test('where the densities say it already, the pressure does not repeat it', () => {
  const limits = { 'column/near-critical': 40, 'column/near-critical-pressure': 0.3 };
  expect(critical(findingsAt(14e5, limits)).map((f) => f.code)).toEqual(['column/near-critical']);
});
