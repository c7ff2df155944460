import { describe, expect, test } from 'vitest';
import { bank, loadChemicals } from '../../src/data/bank';
import { fitTemperature_K } from '../../src/data/volumeConstant';
import { rackettConstant, rackettVolume_m3_mol } from '../../src/engine/thermo/pure/liquidVolume';
import { preparePure } from '../../src/engine/thermo/pure/pure';
import { LIQUID_DENSITY, Z_RA } from './chemicals-figures';

// Published: constants and densities of second sources, entered from memory (chemicals-figures.ts).

const chemicals = new Map((await loadChemicals(bank.index.map((entry) => entry.id))).map((c) => [c.id, c]));

const NO_HYDROCARBONS = new Set([
  'nitrogen',
  'oxygen',
  'argon',
  'carbon-monoxide',
  'carbon-dioxide',
  'ammonia',
  'methanol',
  'ethanol',
  'acetone',
]);

/** Mean |deviation| of the method's volume over Tr 0.60, 0.61, ... 0.95. */
function meanDeviation(id: string, zRA: number, rho: (T: number) => number): number {
  const { Tc_K: Tc, Pc_Pa: Pc } = chemicals.get(id)!;
  let sum = 0;
  for (let k = 0; k <= 35; k += 1) {
    const T = (0.6 + 0.01 * k) * Tc!;
    sum += Math.abs(rackettVolume_m3_mol(T, Tc!, Pc!, zRA) * rho(T) - 1);
  }
  return sum / 36;
}

const mean = (values: readonly number[]): number => values.reduce((a, b) => a + b, 0) / values.length;

describe('saturated-liquid volume of hydrocarbons by the modified Rackett equation, Tr 0.6 to 0.95', () => {
  test("the bank's constants, each from one density of another table, meet Perry's densities within 1 %", () => {
    const deviations = Object.entries(LIQUID_DENSITY)
      .filter(([id]) => !NO_HYDROCARBONS.has(id))
      .map(([id, [c1, c2, c3, c4]]) => {
        const rho = (T: number): number => (1e3 * c1) / c2 ** (1 + Math.max(0, 1 - T / c3) ** c4);
        return meanDeviation(id, chemicals.get(id)!.zRA!, rho);
      });
    expect(deviations.length).toBe(25);
    expect(mean(deviations)).toBeLessThan(0.006);
    for (const d of deviations) expect(d).toBeLessThan(0.0125);
  });

  test('the constants of Spencer & Danner (1972) meet the densities of the reference equations of state within 1 %', () => {
    const deviations = Object.entries(Z_RA).map(([id, z]) =>
      meanDeviation(id, z, preparePure(chemicals.get(id)!).rhoL!),
    );
    expect(deviations.length).toBe(23);
    expect(mean(deviations)).toBeLessThan(0.005);
    for (const d of deviations) expect(d).toBeLessThan(0.0125);
  });

  test.each(Object.entries(Z_RA))(
    '%s: the constant lies within 0.9 %% of that of Spencer & Danner (1972)',
    (id, z) => {
      expect(Math.abs(chemicals.get(id)!.zRA! / z - 1)).toBeLessThan(0.009);
    },
  );
});

test('the constant gives back the density it was fitted to, for every chemical', () => {
  for (const c of chemicals.values()) {
    const T = fitTemperature_K(c);
    const v = 1 / preparePure(c).rhoL!(T);
    expect(rackettVolume_m3_mol(T, c.Tc_K!, c.Pc_Pa!, c.zRA!) / v).toBeCloseTo(1, 5);
    expect(rackettConstant(T, c.Tc_K!, c.Pc_Pa!, v)).toBeCloseTo(c.zRA!, 6);
  }
});
