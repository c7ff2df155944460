import { describe, expect, test } from 'vitest';
import { bank, loadChemicals, loadPairTables } from '../../src/data/bank';
import { makeGroupTable, predictedKij } from '../../src/engine/thermo/pairs/ppr78';

const chemicals = new Map((await loadChemicals(bank.index.map((entry) => entry.id))).map((c) => [c.id, c]));
const { groups } = await loadPairTables();
const of = (id: string) => chemicals.get(id)!;

// Published: Jaubert & Mutelet, Fluid Phase Equilib. 224 (2004) 285, worked example, with the parameters of that set.
test('propane and n-butane at 303.15 K have k_ij 0.0028 with the first published set of group parameters', () => {
  const first = makeGroupTable([{ a: 'CH3', b: 'CH2', A_MPa: 74.81, B_MPa: 165.7 }]);
  expect(predictedKij(of('propane'), of('n-butane'), first, 303.15)).toBeCloseTo(0.0028, 4);
});

// The same figures worked out independently of this code with the refitted set (Jaubert et al. 2022), to four digits.
// Benzene is left out of the tight list: k_ij with a paraffin moves by 5e-4 with its critical constants.
describe('group contributions of the refitted set', () => {
  test.each([
    ['propane', 'n-butane', 303.15, 0.0025],
    ['methane', 'carbon-dioxide', 250, 0.1057],
    ['carbon-dioxide', 'n-butane', 310.9, 0.1109],
    ['methane', 'n-decane', 344.3, 0.0437],
    ['nitrogen', 'methane', 150, 0.0315],
    ['hydrogen-sulfide', 'n-pentane', 377.6, 0.0561],
    ['carbon-dioxide', 'ethane', 250, 0.1279],
    ['carbon-dioxide', 'propane', 270, 0.1297],
    ['carbon-dioxide', 'n-decane', 344.3, 0.1008],
    ['carbon-dioxide', 'nitrogen', 250, -0.0158],
    ['carbon-dioxide', 'hydrogen-sulfide', 300, 0.0924],
    ['hydrogen-sulfide', 'ethane', 283, 0.0841],
    ['nitrogen', 'ethane', 250, 0.0331],
    ['nitrogen', 'propane', 200, 0.0464],
    ['methane', 'propane', 277, 0.0179],
    ['propylene', 'propane', 300, 0.0072],
    ['nitrogen', 'oxygen', 85, -0.0138],
    ['argon', 'oxygen', 100, 0.0108],
    ['ammonia', 'water', 333, -0.2646],
  ])('%s and %s at %d K: %d', (one, two, T, kij) => {
    expect(Math.abs(predictedKij(of(one), of(two), groups, T)! - kij)).toBeLessThan(1.5e-4);
    expect(predictedKij(of(two), of(one), groups, T)).toBeCloseTo(
      predictedKij(of(one), of(two), groups, T)!,
      12,
    );
  });
});

// Published: Knapp, Doering, Oellrich, Ploecker & Prausnitz (1982), fitted constants, from memory. Both are constants
// for the same equation, found in different ways; with other alpha functions they agree to about 0.015.
describe('group contributions against fitted constants', () => {
  test.each([
    ['carbon-dioxide', 'ethane', 250, 0.1322],
    ['carbon-dioxide', 'propane', 270, 0.1241],
    ['carbon-dioxide', 'hydrogen-sulfide', 300, 0.0974],
    ['hydrogen-sulfide', 'ethane', 283, 0.0833],
    ['propylene', 'propane', 300, 0.0074],
    ['argon', 'oxygen', 100, 0.0104],
    ['ethane', 'benzene', 300, 0.0322],
    ['benzene', 'n-hexane', 333.15, 0.0093],
    ['ammonia', 'water', 333, -0.2589],
  ])('%s and %s', (one, two, T, kij) => {
    expect(Math.abs(predictedKij(of(one), of(two), groups, T)! - kij)).toBeLessThan(0.015);
  });
});
