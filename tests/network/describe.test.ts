/** Figures of a shown stream against figures from outside; those marked "from memory" are of common handbooks. */
import { beforeAll, describe, expect, test } from 'vitest';
import type { Basis } from '../../src/engine/network/types';
import { basisOf, fresh, molar, parts, problemOf, solvedStream, unit } from './fixtures';

let basis: Basis;
beforeAll(async () => {
  basis = await basisOf(['nitrogen', 'methane', 'n-hexane', 'n-decane']);
});
const shown = (state: object, ...x: number[]) =>
  solvedStream(
    fresh(
      problemOf(basis, [unit('f feed > out=a', { state, flow: molar(10), composition: parts(...x) })]),
      basis,
    ),
    'a',
  );

describe('a shown stream', () => {
  test('of nitrogen at 0 degC and 1 atm has the volume of a nearly ideal gas', () => {
    const s = shown({ T: 273.15, P: 101325 }, 1, 0, 0, 0);
    // CODATA 2018: molar volume of ideal gas at 273.15 K and 101.325 kPa, 22.413969e-3 m3/mol.
    expect(s.volume_m3_s / 10 / 22.413969e-3).toBeCloseTo(1, 2);
    // From memory: heat capacity ratio of nitrogen 1.40, viscosity 16.6 uPa s.
    expect(s.phases[0]!.cpOverCv!).toBeCloseTo(1.4, 2);
    expect(s.phases[0]!.viscosity_Pa_s! / 16.6e-6).toBeCloseTo(1, 1);
    expect(s.phases[0]!.viscosityRule).toBe('viscosity/wilke');
    expect(s.vapourMassFraction).toBe(1);
    // Derived: nitrogen has no liquid at 15 degC.
    expect(s.standardLiquid_m3_s).toBeUndefined();
  });

  test('of hexane at 15 degC has the density of the liquid, which is its standard volume too', () => {
    const s = shown({ T: 288.15, P: 101325 }, 0, 0, 1, 0);
    // From memory: 664 kg/m3 at 15 degC.
    expect(s.phases[0]!.density_kg_m3 / 664).toBeCloseTo(1, 2);
    expect(s.volume_m3_s).toBeCloseTo(s.m_kg_s / s.phases[0]!.density_kg_m3, 12);
    expect(s.standardLiquid_m3_s! / s.volume_m3_s).toBeCloseTo(1, 6);
    expect(s.phases[0]!.cpOverCv).toBeUndefined();
    expect(s.phases[0]!.viscosityRule).toBe('viscosity/log-average');
  });

  test('has a standard liquid volume in spite of a trace of gas by mass; with more of it, it names the gas', () => {
    // Mole fraction of methane (16.043 g/mol) in hexane (86.177 g/mol) that makes a part w of the mass.
    const at = (w: number) => {
      const gas = w / 16.043 / (w / 16.043 + (1 - w) / 86.177);
      return shown({ T: 288.15, P: 101325 }, 0, gas, 1 - gas, 0);
    };
    const hexane = at(0).standardLiquid_m3_s!;
    expect(at(0).noStandardLiquid).toBeUndefined();
    // Derived: the bound is a millionth of the mass; the volume of what is left is that of its hexane.
    expect(at(1e-60).standardLiquid_m3_s! / hexane).toBeCloseTo(1, 12);
    const trace = at(9e-7);
    expect(trace.standardLiquid_m3_s! / (hexane * trace.z[2]!)).toBeCloseTo(1, 12);
    const more = at(1.1e-6);
    expect(more.standardLiquid_m3_s).toBeUndefined();
    // By place in the basis: methane is the second.
    expect(more.noStandardLiquid).toEqual([1]);
    expect(shown({ T: 288.15, P: 101325 }, 1, 1, 1, 0).noStandardLiquid).toEqual([0, 1]);
  });

  test('adds its phases up: amounts, mass, enthalpy, entropy, volume', () => {
    const s = shown({ T: 330, P: 10e5 }, 1, 2, 3, 4);
    expect(s.phases.map((p) => p.kind)).toEqual(['vapour', 'liquid']);
    const over = (of: (p: (typeof s.phases)[number]) => number): number =>
      s.phases.reduce((sum, p) => sum + p.fraction * of(p), 0);
    expect(over(() => 1)).toBeCloseTo(1, 12);
    expect(over((p) => p.MW_g_mol)).toBeCloseTo(s.MW_g_mol, 9);
    expect(over((p) => p.h_J_mol)).toBeCloseTo(s.h_J_mol, 5);
    expect(over((p) => p.s_J_molK!)).toBeCloseTo(s.s_J_molK!, 8);
    expect(over((p) => (p.MW_g_mol / 1e3 / p.density_kg_m3) * s.n_mol_s)).toBeCloseTo(s.volume_m3_s, 12);
    for (const [i, z] of s.z.entries()) expect(over((p) => p.x[i]!)).toBeCloseTo(z, 10);
    expect(s.vapourMassFraction).toBeCloseTo((s.vapourFraction * s.phases[0]!.MW_g_mol) / s.MW_g_mol, 12);
  });

  test('shows enthalpy against the ideal gas at 298.15 K beside the elements’ datum', () => {
    const s = shown({ T: 298.15, P: 1 }, 1, 1, 0, 0);
    // Derived: a gas at 1 Pa and 298.15 K is that datum; against the elements it is the formation enthalpy.
    expect(Math.abs(s.HfromIdeal_W / s.n_mol_s)).toBeLessThan(0.01);
    expect(s.h_J_mol).toBeCloseTo(basis.chemicals[1]!.Hf_J_mol! / 2, 1);
  });
});
