import { expect, test } from 'vitest';
import { flash, makeFlashWork } from '../../src/engine/equilibrium/flash';
import type { Condition } from '../../src/engine/equilibrium/types';
import { sayFinding } from '../../src/wording';
import { bankModel } from '../robust/bankModels';

async function ask(ids: readonly string[], z: readonly number[], at: Condition) {
  const model = (await bankModel(ids)).of(ids.map((_, i) => i));
  const outcome = flash(model, Float64Array.from(z), at, makeFlashWork(model));
  if (outcome.state !== 'solved') throw new Error(outcome.findings[0].code);
  return {
    ...outcome.value,
    several: outcome.findings.filter((f) => f.code === 'equilibrium/several-states'),
  };
}
const GAS = ['methane', 'n-butane'];
const Z = [0.9, 0.1];

test('a gas between its critical temperature and the hottest dew point has two dew pressures, which is noted', async () => {
  const thin = await ask(GAS, Z, { T_K: 270, vapourFraction: 1 });
  expect(thin.several).toMatchObject([{ weight: 'note' }]);
  const { sentence } = sayFinding(thin.several[0]!, { measures: 'metric' });
  expect(sentence).toMatch(
    /^More than one state has a temperature of −3\.15\d* °C and a vapour fraction of 1\.0+; the one of low/,
  );
  // The other, independently: vapour below and above, two phases between.
  const phasesAt = async (P_Pa: number) => (await ask(GAS, Z, { T_K: 270, P_Pa })).phases.length;
  expect(await phasesAt(0.99 * thin.P_Pa)).toBe(1);
  expect(await phasesAt(1.05 * thin.P_Pa)).toBe(2);
  let P = 1.05 * thin.P_Pa;
  let fraction = 1;
  let before = 0;
  while (P < 3e7) {
    const { phases, vapourFraction } = await ask(GAS, Z, { T_K: 270, P_Pa: P });
    if (phases.length === 1) break;
    [before, fraction] = [fraction, vapourFraction];
    P *= 1.01;
  }
  expect(fraction).toBeGreaterThan(before);
  expect(fraction).toBeGreaterThan(0.9);
});

test('so it has two dew temperatures at a pressure between the critical and the highest', async () => {
  for (const P_Pa of [1.08e7, 1.1e7, 1.12e7, 1.15e7, 1.2e7]) {
    const hot = await ask(GAS, Z, { P_Pa, vapourFraction: 1 });
    expect([P_Pa, hot.several.length]).toEqual([P_Pa, 1]);
    // The hotter of the two is taken: vapour just above it, vapour with liquid just below.
    expect((await ask(GAS, Z, { T_K: hot.T_K + 0.5, P_Pa })).phases).toHaveLength(1);
    expect((await ask(GAS, Z, { T_K: hot.T_K - 0.5, P_Pa })).phases).toHaveLength(2);
    expect(hot.T_K).toBeGreaterThan(279);
  }
});

test.each([
  ['cold enough to condense wholly', GAS, Z, { T_K: 180, vapourFraction: 1 }],
  ['at low pressure', GAS, Z, { P_Pa: 1e6, vapourFraction: 1 }],
  ['boiling', GAS, Z, { P_Pa: 2e6, vapourFraction: 0 }],
  [
    'two liquids of a kind at some pressure',
    ['n-hexane', 'n-heptane'],
    [0.5, 0.5],
    { P_Pa: 2.8e6, vapourFraction: 0.5 },
  ],
  ['pure', ['propane'], [1], { P_Pa: 4e6, vapourFraction: 1 }],
] as const)('nothing is noted: %s', async (_, ids, z, at) => {
  expect((await ask(ids, z, at)).several).toEqual([]);
});

test('saturated vapour of one enthalpy at two pressures: the lower is taken and that is noted', async () => {
  const low = await ask(['n-butane'], [1], { P_Pa: 2.2e6, vapourFraction: 1 });
  const again = await ask(['n-butane'], [1], { vapourFraction: 1, h_J_mol: low.h_J_mol });
  expect(again.P_Pa / 2.2e6).toBeCloseTo(1, 6);
  expect(again.several).toHaveLength(1);
  // The hottest saturated vapour of butane has some 30 bar (derived by trying): beyond it the enthalpy falls.
  const once = await ask(['n-butane'], [1], { P_Pa: 2e5, vapourFraction: 1 });
  const only = await ask(['n-butane'], [1], { vapourFraction: 1, h_J_mol: once.h_J_mol });
  expect(only.several).toEqual([]);
});
