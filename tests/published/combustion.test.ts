/** Combustion against published figures; each names its source and says when it was recalled from memory. */
import { describe, expect, test } from 'vitest';
import type { ChamberResults } from '../../src/engine/units/chamber/types';
import { basisOf, fresh, molar, parts, problemOf, unit, unitResult } from '../network/fixtures';

const GASES = [
  'nitrogen',
  'oxygen',
  'argon',
  'carbon-dioxide',
  'water',
  'sulfur-dioxide',
  'hydrogen-chloride',
];
const T0 = 298.15;

/** One mole a second of a fuel, burnt with 79/21 air of 25 degC. */
async function burn(fuel: string, excess: number): Promise<ChamberResults> {
  const ids = GASES.includes(fuel) ? GASES : [fuel, ...GASES];
  const basis = await basisOf(ids, 'raoult');
  const x = ids.map((id) => (id === fuel ? 1 : 0));
  const units = [
    unit('f feed > out=a', { state: { T: T0, P: 101325 }, flow: molar(1), composition: parts(...x) }),
    unit('c chamber fuel1=a > out=b', {
      air: { excess, T: T0, P: 101325, composition: { is: 'preset', preset: '79/21', relativeHumidity: 0 } },
      p: { drop: 0 },
      heat: { duty: 0 },
    }),
  ];
  const result = unitResult(fresh(problemOf(basis, units), basis), 'c')!;
  expect([fuel, result.state]).toEqual([fuel, 'solved']);
  return result.results as unknown as ChamberResults;
}

describe('heats of combustion at 25 degC, fuel as gas [kJ/mol]', () => {
  // CRC Handbook of Chemistry and Physics, "Heat of combustion" and enthalpies of formation (CODATA where it has them), recalled
  // from memory; hydrogen sulphide to SO2, ammonia to N2, chloromethane to HCl gas by hand from enthalpies of formation there.
  test.each([
    ['methane', 890.7, 802.6],
    ['ethane', 1560.7, 1428.6],
    ['propane', 2219.2, 2043.1],
    ['n-butane', 2877.6, 2657.5],
    ['ethylene', 1411.2, 1323.1],
    ['benzene', 3301.5, 3169.4],
    ['toluene', 3948, 3772],
    ['methanol', 764, 676],
    ['hydrogen', 285.83, 241.826],
    ['carbon-monoxide', 282.98, 282.98],
    ['ammonia', 382.8, 316.8],
    ['hydrogen-sulfide', 562.0, 518.0],
    ['chloromethane', 689.7, 645.7],
  ])('%s: higher %d, lower %d', async (fuel, higher, lower) => {
    const { HHV_W, LHV_W } = await burn(fuel, 3);
    expect(Math.abs(HHV_W / 1e3 / higher - 1)).toBeLessThan(0.003);
    expect(Math.abs(LHV_W / 1e3 / lower - 1)).toBeLessThan(0.003);
  });

  test('of water formed differ by its heat of vaporisation, 44.00 kJ/mol', async () => {
    // CODATA key values: -241.826 and -285.830 kJ/mol (recalled from memory); steam tables 43.99 kJ/mol.
    const { HHV_W, LHV_W } = await burn('propane', 3);
    expect((HHV_W - LHV_W) / 4e3).toBeCloseTo(44.004, 6);
  });
});

/**
 * Enthalpy above 298.15 K [kJ/mol].
 * Source: Chase, NIST-JANAF Thermochemical Tables, 4th ed. (1998): recalled from memory.
 */
const JANAF = {
  1000: { CO2: 33.405, H2O: 26.0, N2: 21.463, O2: 22.703 },
  1200: { CO2: 44.473, H2O: 34.506, N2: 28.109, O2: 29.761 },
  1500: { CO2: 61.705, H2O: 48.151, N2: 38.405, O2: 40.599 },
  1800: { CO2: 79.431, H2O: 62.693, N2: 48.978, O2: 51.673 },
} as const;

describe('flame temperatures of complete, lean combustion from 25 degC', () => {
  // Derived by hand: heat set free = enthalpy of the products, solved for the excess air at a temperature of the tables; the heats
  // of combustion are those above. Below 1800 K dissociation is no matter.
  const FUELS = {
    methane: { C: 1, H: 4, heat: 802.5 },
    propane: { C: 3, H: 8, heat: 2043.1 },
    hydrogen: { C: 0, H: 2, heat: 241.826 },
    benzene: { C: 6, H: 6, heat: 3169.4 },
  } as const;

  const excessFor = (
    { C, H, heat }: (typeof FUELS)[keyof typeof FUELS],
    h: (typeof JANAF)[1000 | 1200 | 1500 | 1800],
  ) => {
    const O2 = C + H / 4;
    const N2 = (O2 * 79) / 21;
    const burnt = C * h.CO2 + (H / 2) * h.H2O + N2 * h.N2;
    return (heat - burnt) / (O2 * h.O2 + N2 * h.N2);
  };

  test.each([
    ['methane', 1000],
    ['methane', 1500],
    ['methane', 1800],
    ['propane', 1200],
    ['propane', 1800],
    ['hydrogen', 1500],
    ['hydrogen', 1800],
  ] as const)('%s ends at %d K', async (fuel, T) => {
    const excess = excessFor(FUELS[fuel], JANAF[T]);
    const { T_K, excess: found } = await burn(fuel, excess);
    expect(found).toBeCloseTo(excess, 10);
    expect(Math.abs(T_K - T)).toBeLessThan(2.5);
  });
});
