/**
 * Vapour-liquid equilibria of mixtures against printed figures. The figures are from memory of the named sources, so
 * tolerances are wide; they catch a wrong phase, a lost pair parameter or a wrong unit, not a wrong fourth digit.
 */
import { describe, expect, test } from 'vitest';
import { flash, makeFlashWork } from '../../src/engine/equilibrium/flash';
import type { Condition, FlashAnswer } from '../../src/engine/equilibrium/types';
import type { ModelSpec } from '../../src/engine/thermo/types';
import { bankModel } from '../robust/bankModels';

async function state(
  ids: readonly string[],
  z: readonly number[],
  at: Condition,
  kind: ModelSpec['kind'] = 'peng-robinson',
): Promise<FlashAnswer> {
  const model = (await bankModel(ids, kind)).of(ids.map((_, i) => i));
  const outcome = flash(model, Float64Array.from(z), at, makeFlashWork(model));
  if (outcome.state !== 'solved') throw new Error(outcome.findings[0].code);
  return outcome.value;
}
const psi = 6894.757;

describe('mixtures against printed figures', () => {
  // Perry's Chemical Engineers' Handbook, 7th ed., sec. 13, benzene-toluene at 1 atm: x = 0.5 boils at 92.1 degC with
  // y = 0.71. From memory.
  test.each(['peng-robinson', 'raoult'] as const)(
    'benzene with as much toluene boils at 92.1 degC: %s',
    async (kind) => {
      const { T_K, phases } = await state(
        ['benzene', 'toluene'],
        [0.5, 0.5],
        { P_Pa: 101325, vapourFraction: 0 },
        kind,
      );
      expect(Math.abs(T_K - 365.25)).toBeLessThan(0.4);
      expect(Math.abs(phases[0]!.x[0]! - 0.713)).toBeLessThan(0.012);
    },
  );

  // Smith, Van Ness & Abbott, Introduction to Chemical Engineering Thermodynamics, 6th ed., example 10.4 (K-values of
  // the DePriester charts, which are read to some per cent): 10 % methane, 20 % ethane, 70 % propane at 50 degF has its
  // dew point at 126 psia and its bubble point at 385 psia. From memory.
  test('methane, ethane and propane at 50 degF have the dew and bubble pressures of the charts', async () => {
    const ids = ['methane', 'ethane', 'propane'];
    const z = [0.1, 0.2, 0.7];
    const dew = await state(ids, z, { T_K: 283.15, vapourFraction: 1 });
    const bubble = await state(ids, z, { T_K: 283.15, vapourFraction: 0 });
    expect(Math.abs(dew.P_Pa / (126 * psi) - 1)).toBeLessThan(0.04);
    expect(Math.abs(bubble.P_Pa / (385 * psi) - 1)).toBeLessThan(0.07);
  });

  // Lemmon, Jacobsen, Penoncello & Friend, J. Phys. Chem. Ref. Data 29 (2000) 331: air of 78.12 % N2, 20.96 % O2 and
  // 0.92 % Ar boils at 78.90 K and condenses at 81.72 K under 101325 Pa. From memory.
  test('air boils at 78.9 K and condenses at 81.7 K', async () => {
    const ids = ['nitrogen', 'oxygen', 'argon'];
    const z = [0.7812, 0.2096, 0.0092];
    const bubble = await state(ids, z, { P_Pa: 101325, vapourFraction: 0 });
    const dew = await state(ids, z, { P_Pa: 101325, vapourFraction: 1 });
    expect(Math.abs(bubble.T_K - 78.9)).toBeLessThan(0.3);
    expect(Math.abs(dew.T_K - 81.72)).toBeLessThan(0.3);
  });

  // Sage, Hicks & Lacey, Ind. Eng. Chem. 32 (1940) 1085, methane-n-butane at 100 degF: at 1000 psia the liquid holds
  // about a third of methane and the vapour about 0.88 to 0.91. From memory, hence the width.
  test('methane dissolves in n-butane as measured at 100 degF and 1000 psia', async () => {
    const { phases } = await state(['methane', 'n-butane'], [0.5, 0.5], { T_K: 310.93, P_Pa: 1000 * psi });
    expect(Math.abs(phases[1]!.x[0]! - 0.325)).toBeLessThan(0.025);
    expect(Math.abs(phases[0]!.x[0]! - 0.89)).toBeLessThan(0.025);
  });

  // Fredenslund & Mollerup, J. Chem. Soc. Faraday Trans. I 70 (1974) 1653: carbon dioxide and ethane at 250 K have an
  // azeotrope of maximum pressure near 0.67 carbon dioxide, some 2.1 MPa (pure: 1.79 and 1.30). From memory.
  test('carbon dioxide and ethane boil together at two thirds of carbon dioxide at 250 K', async () => {
    const ids = ['carbon-dioxide', 'ethane'];
    const gap = async (x: number): Promise<number> => {
      const { phases } = await state(ids, [x, 1 - x], { T_K: 250, vapourFraction: 0 });
      return phases[0]!.x[0]! - x;
    };
    expect(await gap(0.6)).toBeGreaterThan(0.01);
    expect(await gap(0.75)).toBeLessThan(-0.01);
    const { P_Pa } = await state(ids, [0.67, 0.33], { T_K: 250, vapourFraction: 0 });
    expect(Math.abs(P_Pa / 2.13e6 - 1)).toBeLessThan(0.03);
  });

  // CRC Handbook of Chemistry and Physics, table of azeotropes: n-hexane and water boil together at 61.6 degC under
  // 1 atm, 5.6 % by mass (21 mol %) of water in the vapour. From memory. Enthalpy fixed: three phases meet there.
  test('n-hexane and water boil together near 61.6 degC, and the second liquid is said', async () => {
    const ids = ['water', 'n-hexane'];
    const cold = await state(ids, [0.5, 0.5], { T_K: 320, P_Pa: 101325 });
    const hot = await state(ids, [0.5, 0.5], { T_K: 345, P_Pa: 101325 });
    const between = await state(ids, [0.5, 0.5], {
      P_Pa: 101325,
      h_J_mol: 0.6 * cold.h_J_mol + 0.4 * hot.h_J_mol,
    });
    expect(Math.abs(between.T_K - 334.75)).toBeLessThan(0.8);
    expect(Math.abs(between.phases[0]!.x[0]! - 0.21)).toBeLessThan(0.03);
    expect(between.hiddenLiquid).toBeDefined();
    expect(between.vapourFraction).toBeGreaterThan(0);
    expect(between.vapourFraction).toBeLessThan(1);
  });
});

// Derived: with an ideal vapour and an ideal liquid P_bubble = Sum x_i Psat_i and y_i = x_i Psat_i / P, and
// 1/P_dew = Sum y_i / Psat_i (Raoult 1887).
describe("Raoult's law by hand", () => {
  test('bubble and dew pressures are the arithmetic and the harmonic mean of the vapour pressures', async () => {
    const ids = ['benzene', 'toluene', 'ethylbenzene'];
    const z = [0.2, 0.5, 0.3];
    const model = (await bankModel(ids, 'raoult')).of([0, 1, 2]);
    const T_K = 360;
    const psat = ids.map((_, i) => model.saturationP_Pa(i, T_K)!);
    const bubble = await state(ids, z, { T_K, vapourFraction: 0 }, 'raoult');
    const dew = await state(ids, z, { T_K, vapourFraction: 1 }, 'raoult');
    const arithmetic = z.reduce((sum, x, i) => sum + x * psat[i]!, 0);
    const harmonic = 1 / z.reduce((sum, y, i) => sum + y / psat[i]!, 0);
    expect(bubble.P_Pa / arithmetic - 1).toBeCloseTo(0, 10);
    expect(dew.P_Pa / harmonic - 1).toBeCloseTo(0, 10);
    z.forEach((x, i) => {
      expect(bubble.phases[0]!.x[i]!).toBeCloseTo((x * psat[i]!) / arithmetic, 10);
    });
  });

  test('half way between them the split solves the mole balance by hand', async () => {
    // One equation for two chemicals: x = (P - P2)/(P1 - P2), y = x P1/P, beta = (z - x)/(y - x).
    const ids = ['benzene', 'toluene'];
    const model = (await bankModel(ids, 'raoult')).of([0, 1]);
    const T_K = 365;
    const [P1, P2] = [model.saturationP_Pa(0, T_K)!, model.saturationP_Pa(1, T_K)!];
    const P_Pa = 98000;
    const x = (P_Pa - P2) / (P1 - P2);
    const y = (x * P1) / P_Pa;
    const answer = await state(ids, [0.5, 0.5], { T_K, P_Pa }, 'raoult');
    expect(answer.vapourFraction).toBeCloseTo((0.5 - x) / (y - x), 10);
    expect(answer.phases[1]!.x[0]!).toBeCloseTo(x, 12);
  });
});
