import { expect, test } from 'vitest';
import { makeModel } from '../../src/engine/thermo/model';
import { chemical, specOf } from '../laws/thermoCases';

/** Liquids at 25 degC and 1 atm [J/(mol K)], from memory of common handbooks. */
const CP: readonly (readonly [string, number])[] = [
  ['n-pentane', 167.2],
  ['n-hexane', 195.6],
  ['n-heptane', 224.7],
  ['n-octane', 254.6],
  ['cyclohexane', 154.9],
  ['benzene', 135.7],
  ['toluene', 157.3],
  ['ethylbenzene', 185.8],
  ['water', 75.3],
];

/** Heat capacity of the model's liquid by the handbook's [-]. */
const byHandbook = ([id, cp]: (typeof CP)[number]): number => {
  const model = makeModel(specOf({ kind: 'peng-robinson' }), [chemical(id)]).of([0]);
  const out = model.makeProps();
  model.evaluate('liquid', 298.15, 101325, Float64Array.of(1), 2, out);
  return out.cp_J_molK / cp;
};

test('heat capacities of liquids by Peng-Robinson are as far off as the stream summary warns: up to some 15 %', () => {
  const ratios = CP.map(byHandbook);
  for (const r of ratios) expect(Math.abs(r - 1)).toBeLessThan(0.15);
  expect(Math.max(...ratios.map((r) => Math.abs(r - 1)))).toBeGreaterThan(0.08);
});
