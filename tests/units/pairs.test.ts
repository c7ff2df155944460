import { expect, test } from 'vitest';
import type { Basis } from '../../src/engine/network/types';
import type { Finding } from '../../src/engine/outcome';
import { sayFinding } from '../../src/wording';
import { basisOf, fresh, molar, parts, problemOf, unit } from '../network/fixtures';

/** Two hydrocarbons and water with pairs as told: benzene + water and n-hexane + water predicted, the other fitted. */
async function withPairs(benzene: number, hexane: number): Promise<Basis> {
  const basis = await basisOf(['n-hexane', 'benzene', 'water']);
  const pairs = [
    { i: 0, j: 1, kij: 0.4, origin: 'fitted', source: '' },
    { i: 0, j: 2, kij: hexane, origin: 'predicted', source: '' },
    { i: 1, j: 2, kij: benzene, origin: 'predicted', source: '' },
  ] as const;
  return { ...basis, id: `${benzene} ${hexane}`, model: { ...basis.model, pairs } };
}
function told(basis: Basis, x: readonly number[], limits: Record<string, number> = {}): readonly Finding[] {
  const state = { T: 470, P: 1e5 };
  const feed = unit('f feed > out=a', { state, flow: molar(10), composition: parts(...x) });
  return fresh(problemOf(basis, [feed], { limits }), basis).findings.filter((f) =>
    f.code.startsWith('model/pair'),
  );
}

test('predicted pairs far from zero are named in one caution, the largest first, beside the count of all', async () => {
  const found = told(await withPairs(0.35, -0.5), [0.4, 0.4, 0.2]);
  expect(found.map((f) => [f.code, f.weight])).toEqual([
    ['model/pair-predicted-far', 'caution'],
    ['model/pair-predicted', 'note'],
  ]);
  expect(found[0]?.at).toEqual({ stream: 'a' });
  const said = sayFinding(found[0]!, { measures: 'metric', chemical: (id) => id.toUpperCase() });
  expect(said.sentence).toContain(
    'of N-HEXANE + WATER, BENZENE + WATER are predicted at 25 °C and held constant',
  );
  expect(said.sentence).toMatch(/the first at [-−]0\.5000/);
});

test.each([
  ['within 0.3 of zero', 0.29, -0.3, [0.4, 0.4, 0.2], {}],
  ['of chemicals of which one is below 0.5 %', 0.5, 0.5, [0.5, 0.496, 0.004], {}],
  ['below the sketch’s own threshold', 0.5, 0.5, [0.4, 0.4, 0.2], { 'model/pair-predicted-far': 0.6 }],
])('pairs %s are only counted', async (_, benzene, hexane, x, limits) => {
  const found = told(await withPairs(benzene, hexane), x, limits);
  expect(found.map((f) => f.code)).toEqual(['model/pair-predicted']);
});

test('with the pairs of the bank, water and hexane that meet are such a pair or a fitted one', async () => {
  const basis = await basisOf(['n-hexane', 'water']);
  const [pair] = basis.model.pairs;
  const far = pair?.origin === 'predicted' && Math.abs(pair.kij) > 0.3;
  expect(told(basis, [0.5, 0.5]).some((f) => f.code === 'model/pair-predicted-far')).toBe(far);
});
