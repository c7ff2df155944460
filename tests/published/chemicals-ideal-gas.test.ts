import { describe, expect, test } from 'vitest';
import { bank, loadChemicals } from '../../src/data/bank';
import { prepareIdealGases } from '../../src/engine/thermo/pure/ideal';
import {
  CP_ALY_LEE,
  CP_POLING,
  ENTHALPY,
  HEAT_OF_VAPORISATION,
  LIQUID_DENSITY,
  VAPOUR_PRESSURE,
} from './chemicals-figures';

// Published: second sources, entered from memory (chemicals-figures.ts).

const R = 8.314462618;
const all = await loadChemicals(bank.index.map((entry) => entry.id));
const gases = prepareIdealGases(all);
const at = new Map(all.map((c, i) => [c.id, i]));
const rise = (id: string, T: number): number => gases.h(at.get(id)!, T) - gases.h(at.get(id)!, 298.15);

/** 350 to 800 K: nearer to 298.15 K a difference of enthalpies says little. */
const TEMPERATURES = [350, 400, 450, 500, 550, 600, 650, 700, 750, 800];

describe('ideal-gas enthalpy above 298.15 K', () => {
  test.each(Object.entries(ENTHALPY))('%s agrees with NIST-JANAF (1998) within 0.5 %%', (id, kJ_mol) => {
    kJ_mol.forEach((h, k) => {
      expect(Math.abs(rise(id, 400 + 100 * k) / (1e3 * h) - 1)).toBeLessThan(0.005);
    });
  });

  // Methane stands between its sources: the NIST-JANAF table lies 0.9 % lower at 800 K.
  test.each(Object.entries(CP_POLING))(
    "%s agrees with Poling, Prausnitz & O'Connell (2001) within 0.5 %%",
    (id, a) => {
      const integral = (T: number): number =>
        R * a.reduce((sum, c, k) => sum + (c * [1, 1e-3, 1e-5, 1e-8, 1e-11][k]! * T ** (k + 1)) / (k + 1), 0);
      for (const T of TEMPERATURES) {
        expect(Math.abs(rise(id, T) / (integral(T) - integral(298.15)) - 1)).toBeLessThan(0.005);
      }
    },
  );

  // The polynomial of Poling et al. for benzene lies 1.2 % lower at 400 K. For toluene it lies 0.6 % lower and this
  // one 1.2 % higher there, so toluene is not claimed; nor are ethylene and cyclohexane, at 0.5 to 1 %.
  test.each(Object.entries(CP_ALY_LEE))(
    "%s agrees with Perry's Handbook within 0.5 %%",
    (id, [a, b, c, d, e]) => {
      const integral = (T: number): number =>
        (a * T + (b * c) / Math.tanh(c / T) - d * e * Math.tanh(e / T)) / 1e3;
      for (const T of TEMPERATURES) {
        expect(Math.abs(rise(id, T) / (integral(T) - integral(298.15)) - 1)).toBeLessThan(0.005);
      }
    },
  );

  test('a monatomic gas has 5/2 R T', () => {
    for (const id of ['argon', 'helium']) {
      for (const T of TEMPERATURES) expect(rise(id, T)).toBeCloseTo(2.5 * R * (T - 298.15), 8);
    }
  });

  test('nineteen chemicals have second sources for all four properties', () => {
    const enthalpy = new Set([
      ...Object.keys(ENTHALPY),
      ...Object.keys(CP_POLING),
      ...Object.keys(CP_ALY_LEE),
      'argon',
    ]);
    const four = [...enthalpy].filter(
      (id) =>
        (id in VAPOUR_PRESSURE || id === 'ammonia') &&
        (id in LIQUID_DENSITY || id === 'water') &&
        id in HEAT_OF_VAPORISATION,
    );
    expect(four.sort()).toEqual([
      'ammonia',
      'argon',
      'benzene',
      'carbon-dioxide',
      'carbon-monoxide',
      'ethane',
      'isobutane',
      'methane',
      'methanol',
      'n-butane',
      'n-heptane',
      'n-hexane',
      'n-octane',
      'n-pentane',
      'nitrogen',
      'oxygen',
      'propane',
      'propylene',
      'water',
    ]);
  });
});
