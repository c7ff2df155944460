import { describe, expect, test } from 'vitest';
import type { ChemicalData } from '../../src/engine/chemicals/types';
import { alphaSlope, OMEGA_A, OMEGA_B, Z_CRITICAL } from '../../src/engine/thermo/peng-robinson/constants';
import { PengRobinson } from '../../src/engine/thermo/peng-robinson/model';
import type { PairKij } from '../../src/engine/thermo/types';
import { specOf } from '../laws/thermoCases';

const made = (id: string, Tc_K: number, Pc_Pa: number, omega: number): ChemicalData => ({
  id,
  name: id,
  MW_g_mol: 40,
  Tc_K,
  Pc_Pa,
  omega,
  corr: { ideal_gas_cp: [{ form: 'monatomic', c: [] }] },
  sources: {},
});
const model = (chemicals: ChemicalData[], pairs: PairKij[] = []): PengRobinson =>
  new PengRobinson(specOf({ kind: 'peng-robinson', pairs }), chemicals);

describe('Peng-Robinson against worked examples', () => {
  // Peng & Robinson, Ind. Eng. Chem. Fundam. 15 (1976) 59, eqs. 8-11: 0.45724, 0.07780, Z_c = 0.307.
  test('the constants are those of the paper, and fulfil the critical conditions to rounding', () => {
    expect(OMEGA_A).toBeCloseTo(0.45724, 5);
    expect(OMEGA_B).toBeCloseTo(0.0778, 5);
    expect(Z_CRITICAL).toBeCloseTo(0.307, 3);
    // Derived: the cubic in Z at the critical point has one triple root.
    const [A, B, Z] = [OMEGA_A, OMEGA_B, Z_CRITICAL];
    expect(1 - B).toBeCloseTo(3 * Z, 15);
    expect(A - 2 * B - 3 * B * B).toBeCloseTo(3 * Z * Z, 15);
    expect(A * B - B * B - B ** 3).toBeCloseTo(Z ** 3, 15);
  });

  // Peng & Robinson 1976, eq. 18, and Robinson & Peng, GPA RR-28 (1978). Hand calculation at omega = 0.2 and 0.6.
  test('the slope of alpha follows the papers', () => {
    expect(alphaSlope('1976', 0.2)).toBeCloseTo(0.37464 + 0.308452 - 0.0107968, 12);
    expect(alphaSlope('1978', 0.2)).toBe(alphaSlope('1976', 0.2));
    expect(alphaSlope('1978', 0.6)).toBeCloseTo(0.379642 + 0.891018 - 0.05919228 + 0.003599856, 12);
    expect(alphaSlope('1976', 0.6)).toBeCloseTo(0.37464 + 0.925356 - 0.0971712, 12);
  });

  // Smith, Van Ness & Abbott, Introduction to Chemical Engineering Thermodynamics, 7th ed., example 3.9 (from memory):
  // saturated n-butane at 350 K, 9.4573 bar by Peng-Robinson: vapour 2486, liquid 112.6 cm3/mol.
  test('n-butane at 350 K and 9.4573 bar has the volumes of the textbook', () => {
    const butane = model([made('n-butane', 425.1, 37.96e5, 0.2)]);
    const out = butane.makeProps();
    butane.evaluate('vapour', 350, 9.4573e5, Float64Array.of(1), 0, out);
    expect(Math.abs(out.v_m3_mol * 1e6 - 2486)).toBeLessThan(1);
    butane.evaluate('liquid', 350, 9.4573e5, Float64Array.of(1), 0, out);
    expect(out.v_m3_mol * 1e6).toBeCloseTo(112.6, 1);
  });

  // Elliott & Lira, Introductory Chemical Engineering Thermodynamics, 2nd ed., argon at 105.6 K, 0.498 MPa
  // (from memory): Z of the vapour 0.896744.
  test('argon at 105.6 K and 4.98 bar has the compressibility of the textbook and boils there', () => {
    const argon = model([made('argon', 150.86, 4.898e6, -0.004)]);
    const out = argon.makeProps();
    argon.evaluate('vapour', 105.6, 0.498e6, Float64Array.of(1), 0, out);
    expect(out.Z).toBeCloseTo(0.896744, 6);
    expect(argon.saturationP_Pa(0, 105.6)! / 0.498e6).toBeCloseTo(1, 2);
  });

  // Derived by hand: two chemicals of the same constants, k12 = 0.1, equal parts: a = a1 (1 - k12/2).
  test('a pair parameter lowers a of the mixture as the mixing rule says', () => {
    const twins = [made('one', 400, 4e6, 0.2), made('two', 400, 4e6, 0.2)];
    const pair: PairKij = { i: 0, j: 1, kij: 0.1, origin: 'given', source: '' };
    const mixed = model(twins, [pair]);
    const out = mixed.makeProps();
    const [T, P] = [420, 2e6];
    mixed.evaluate('vapour', T, P, Float64Array.of(0.5, 0.5), 0, out);
    const R = 8.314462618;
    const b = (OMEGA_B * R * 400) / 4e6;
    const alpha = (1 + alphaSlope('1976', 0.2) * (1 - Math.sqrt(T / 400))) ** 2;
    const a = ((OMEGA_A * (R * 400) ** 2) / 4e6) * alpha * 0.95;
    const v = out.v_m3_mol;
    expect(((R * T) / (v - b) - a / (v * v + 2 * b * v - b * b)) / P).toBeCloseTo(1, 12);
  });
});
