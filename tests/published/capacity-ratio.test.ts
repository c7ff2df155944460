import { describe, expect, test } from 'vitest';
import { makeModel } from '../../src/engine/thermo/model';
import { heatCapacityRatio } from '../../src/engine/thermo/transport';
import { chemical, specOf } from '../laws/thermoCases';

const T_K = 298.15;

/**
 * Pure liquids at 25 degC and 1 atm, from memory of common handbooks: heat capacity [J/(mol K)], molar volume [cm3/mol],
 * thermal expansion [1e-3/K], isothermal compressibility [1/GPa].
 */
const LIQUIDS = [
  ['benzene', 135.7, 89.4, 1.22, 0.966],
  ['toluene', 157.3, 106.9, 1.08, 0.91],
  ['n-hexane', 195.6, 131.6, 1.39, 1.67],
  ['water', 75.3, 18.07, 0.257, 0.4525],
] as const;

/** Cp/Cv from what is measured: Cp - Cv = T v alpha^2 / kappa. */
const measured = ([, cp, v, alpha, kappa]: (typeof LIQUIDS)[number]): number =>
  cp / (cp - (T_K * v * 1e-6 * (alpha * 1e-3) ** 2) / (kappa * 1e-9));

const byCubic = (id: string): number => {
  const model = makeModel(specOf({ kind: 'peng-robinson' }), [chemical(id)]).of([0]);
  const out = model.makeProps();
  model.evaluate('liquid', T_K, 101325, Float64Array.of(1), 2, out);
  return heatCapacityRatio(out)!;
};

describe('Cp/Cv of liquids by the cubic equation', () => {
  test('the measured ones come out as handbooks have them: benzene 1.43, toluene 1.35, water 1.01 (from memory)', () => {
    const of = Object.fromEntries(LIQUIDS.map((liquid) => [liquid[0], measured(liquid)]));
    expect(of.benzene).toBeCloseTo(1.43, 1);
    expect(of.toluene).toBeCloseTo(1.35, 1);
    expect(of.water).toBeCloseTo(1.007, 2);
  });

  test('is off by more than 7 % for each and 10 % for most: none is shown. Should this fail, it may be', () => {
    const off = LIQUIDS.map((liquid) => Math.abs(byCubic(liquid[0]) / measured(liquid) - 1));
    expect(Math.min(...off)).toBeGreaterThan(0.07);
    expect(off.filter((x) => x > 0.1).length).toBeGreaterThanOrEqual(3);
  });
});
