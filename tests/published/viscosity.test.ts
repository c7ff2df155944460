import { describe, expect, test } from 'vitest';
import type { ChemicalData, Corr } from '../../src/engine/chemicals/types';
import { prepareViscosities } from '../../src/engine/thermo/transport';

/** A chemical of constant viscosities. */
const made = (id: string, MW_g_mol: number, gas?: number, liquid?: number): ChemicalData => {
  const flat = (value: number | undefined): { c: number[]; form: Corr['form'] }[] =>
    value === undefined ? [] : [{ form: 'poly5', c: [value] }];
  return {
    id,
    name: id,
    MW_g_mol,
    corr: { gas_viscosity: flat(gas), liquid_viscosity: flat(liquid) },
    sources: {},
  };
};

describe('viscosity of mixtures', () => {
  // Bird, Stewart & Lightfoot, Transport Phenomena, 2nd ed., example 1.4-2 (from memory): CO2, O2, N2 at 1 atm, 293 K
  // with 1462, 2031 and 1754 e-8 Pa s give 1714e-8 Pa s.
  test("Wilke's rule gives the textbook's mixture of carbon dioxide, oxygen and nitrogen", () => {
    const mixture = prepareViscosities([
      made('carbon-dioxide', 44.01, 1462e-8),
      made('oxygen', 32, 2031e-8),
      made('nitrogen', 28.01, 1754e-8),
    ]);
    const found = mixture.gas_Pa_s(293, Float64Array.of(0.133, 0.039, 0.828));
    expect(found?.rule).toBe('wilke');
    expect(Math.abs(found!.value / 1714e-8 - 1)).toBeLessThan(1e-3);
  });

  test('equal chemicals stay what they are', () => {
    const same = prepareViscosities([made('a', 30, 1e-5, 3e-4), made('b', 30, 1e-5, 3e-4)]);
    const x = Float64Array.of(0.3, 0.7);
    expect(same.gas_Pa_s(300, x)?.value).toBeCloseTo(1e-5, 15);
    expect(same.liquid_Pa_s(300, x)?.value).toBeCloseTo(3e-4, 15);
  });

  // Derived: sqrt(2e-4 * 8e-4) = 4e-4.
  test('a liquid takes the mean of the logarithms', () => {
    const mixture = prepareViscosities([made('a', 30, 1e-5, 2e-4), made('b', 60, 1e-5, 8e-4)]);
    expect(mixture.liquid_Pa_s(300, Float64Array.of(0.5, 0.5))?.value).toBeCloseTo(4e-4, 12);
  });

  test('a chemical without a correlation leaves the mixture without a value, unless it is absent', () => {
    const mixture = prepareViscosities([made('a', 30, 1e-5, 2e-4), made('b', 60)]);
    expect(mixture.gas_Pa_s(300, Float64Array.of(0.5, 0.5))).toBeUndefined();
    expect(mixture.liquid_Pa_s(300, Float64Array.of(0.5, 0.5))).toBeUndefined();
    expect(mixture.gas_Pa_s(300, Float64Array.of(1, 0))?.value).toBeCloseTo(1e-5, 12);
  });
});
