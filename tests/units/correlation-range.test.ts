/** The range stated with a correlation: told per stream, the worst of what the model reads there. */
import { beforeAll, describe, expect, test } from 'vitest';
import type { CorrProperty } from '../../src/engine/chemicals/types';
import type { Basis } from '../../src/engine/network/types';
import type { Finding } from '../../src/engine/outcome';
import { basisOf, fresh, molar, parts, problemOf, unit } from '../network/fixtures';

const IDS = ['n-hexane', 'toluene', 'methane'];
let cubic: Basis;
let ideal: Basis;
beforeAll(async () => {
  cubic = await basisOf(IDS, 'peng-robinson');
  ideal = await basisOf(IDS, 'raoult');
});

/** A basis in which one property of n-hexane is said to hold over another range. */
const withRange = (basis: Basis, of: CorrProperty, range: { Tmin?: number; Tmax?: number }): Basis => ({
  ...basis,
  id: `${basis.id} ${of} ${JSON.stringify(range)}`,
  chemicals: basis.chemicals.map((c, k) =>
    k === 0 ? { ...c, corr: { ...c.corr, [of]: c.corr[of]!.map((row) => ({ ...row, ...range })) } } : c,
  ),
});
function told(basis: Basis, state: object, ...x: number[]): Finding[] {
  const feed = unit('f feed > out=a', { state, flow: molar(10), composition: parts(...x) });
  const batch = fresh(problemOf(basis, [feed]), basis);
  expect(batch.units[0]?.[1].state).toBe('solved');
  return batch.findings.filter((f) => f.code.includes('correlation'));
}
const what = (found: readonly Finding[]) =>
  found.map((f) => [f.code, f.weight, f.evidence.find((e) => e.name === 'property')?.text]);
const LIQUID = { T: 300, P: 20e5 };
const STEPS = [
  [0.001, 'stream/outside-correlation', 'note'],
  [9.9, 'stream/outside-correlation', 'note'],
  [10.1, 'stream/well-outside-correlation', 'caution'],
  [49.9, 'stream/well-outside-correlation', 'caution'],
  [50.1, 'stream/far-outside-correlation', 'beyond-limit'],
] as const;

describe.each(STEPS)('%d K outside its range', (distance, code, weight) => {
  test.each([
    ['ideal_gas_cp', 'Peng-Robinson'],
    ['ideal_gas_cp', 'Raoult'],
    ['liquid_density', 'Peng-Robinson'],
    ['liquid_density', 'Raoult'],
    ['vapor_pressure', 'Raoult'],
  ] as const)(`the %s is a ${weight} with %s, above and below`, (property, model) => {
    const basis = model === 'Raoult' ? ideal : cubic;
    for (const range of [{ Tmax: 300 - distance }, { Tmin: 300 + distance }]) {
      const found = told(withRange(basis, property, range), LIQUID, 1, 1, 0);
      expect(what(found)).toEqual([[code, weight, property]]);
      expect(found[0]?.at.stream).toBe('a');
      const seen = found[0]?.evidence.find((e) => e.name === 'distance')?.value;
      expect(seen).toBeCloseTo(distance, 6);
    }
  });
});

describe('nothing is told', () => {
  const away = { Tmax: 200 };
  test('inside every range', () => {
    for (const basis of [cubic, ideal]) expect(told(basis, LIQUID, 1, 1, 0)).toEqual([]);
  });
  test('of a vapour pressure where an equation of state stands in its place', () => {
    expect(told(withRange(cubic, 'vapor_pressure', away), LIQUID, 1, 1, 0)).toEqual([]);
  });
  test('of vapour pressure and liquid density of a gas', () => {
    const gas = { T: 300, P: 1000 };
    expect(told(withRange(ideal, 'vapor_pressure', away), gas, 1, 1, 0)).toEqual([]);
    for (const basis of [cubic, ideal])
      expect(told(withRange(basis, 'liquid_density', away), gas, 1, 1, 0)).toEqual([]);
  });
  test('of a liquid density that the equation of state gives itself', () => {
    const own: Basis = { ...cubic, id: 'own', model: { ...cubic.model, liquidVolume: 'cubic' } };
    expect(told(withRange(own, 'liquid_density', away), LIQUID, 1, 1, 0)).toEqual([]);
  });
  test('of the liquid density of a gas dissolved far above its critical temperature', () => {
    expect(told(cubic, LIQUID, 1, 1, 0.1)).toEqual([]);
  });
  test('of the density of less than one in a hundred', () => {
    expect(told(withRange(cubic, 'liquid_density', away), LIQUID, 0.009, 0.991, 0)).toEqual([]);
    expect(told(withRange(cubic, 'liquid_density', away), LIQUID, 0.011, 0.989, 0)).toHaveLength(1);
  });
});
