import { describe, expect, test } from 'vitest';
import { type Dimension, parseQuantity, R_J_molK } from '../../src/quantity';

const si = (text: string, dim: Dimension): number => {
  const q = parseQuantity(text, dim);
  if (!q.ok) throw new Error(`${text}: ${q.code}`);
  return q.si;
};

// Published: NIST Special Publication 811 (2008), Appendix B.8 and B.9, printed to seven figures (exact ones in bold there).
// The figures were written from memory of the tables.
describe('factors agree with NIST SP 811', () => {
  test.each<[string, Dimension, number]>([
    ['1 atm', 'pressure', 1.01325e5],
    ['1 bar', 'pressure', 1e5],
    ['1 mbar', 'pressure', 1e2],
    ['1 psi', 'pressure', 6.894757e3],
    ['1 mmHg', 'pressure', 1.333224e2],
    ['1 kgf/cm2', 'pressure', 9.80665e4],
    ['1 hp', 'power', 7.456999e2],
    ['1 MMBTU/h', 'power', 2.930711e5],
    ['1 BTU/h', 'power', 2.930711e-1],
    ['1 BTU/s', 'power', 1.055056e3],
    ['1 BTU/lb', 'massEnergy', 2.326e3],
    ['1 BTU/(lb degF)', 'heatCapacity', 4.1868e3],
    ['1 BTU/(h ft degF)', 'thermalConductivity', 1.730735],
    ['1 kcal/s', 'power', 4.1868e3],
    ['1 kcal(th)/s', 'power', 4.184e3],
    ['1 ft', 'length', 3.048e-1],
    ['1 in', 'length', 2.54e-2],
    ['1 ft2', 'area', 9.290304e-2],
    ['1 ft3/s', 'volumeFlow', 2.831685e-2],
    ['1 lb/h', 'massFlow', 1.259979e-4],
    ['1 lb/s', 'massFlow', 4.535924e-1],
    ['1 t/s', 'massFlow', 1e3],
    ['1 lb/ft3', 'density', 1.601846e1],
    ['1 cP', 'viscosity', 1e-3],
    ['1 dyn/cm', 'surfaceTension', 1e-3],
    ['1 d', 'time', 8.64e4],
    ['1 degR', 'temperature', 5 / 9],
    ['1 degF', 'temperatureDifference', 5.555556e-1],
  ])('%s of %s', (text, dim, published) => {
    expect(si(text, dim) / published).toBeCloseTo(1, 6);
    expect(Math.abs(si(text, dim) / published - 1)).toBeLessThan(2.5e-7);
  });
});

// Published: SI Brochure (9th ed.) 2.3.1 for degC; NIST SP 811, B.9: T/K = (t/degF + 459.67)/1.8.
test.each([
  ['0 degC', 273.15],
  ['0 °C', 273.15],
  ['15 degC', 288.15],
  ['-40 degC', 233.15],
  ['-40 degF', 233.15],
  ['32 degF', 273.15],
  ['59 degF', 288.15],
  ['212 degF', 373.15],
  ['491.67 degR', 273.15],
  ['-459.67 degF', 0],
  ['300 K', 300],
])('a thermometer at %s stands at %d K, to the last bit', (text, T_K) => {
  expect(si(text, 'temperature')).toBe(T_K);
});

describe('gas volumes at a reference state count as amounts of ideal gas', () => {
  // Published: CODATA 2018, molar volume of ideal gas at 273.15 K and 101.325 kPa: 22.41396954e-3 m3/mol.
  test('a normal cubic metre holds 1/22.413 969 54 kmol', () => {
    expect(si('22.41396954 Nm3/s', 'molarFlow')).toBeCloseTo(1000, 6);
  });
  // Published: 23.645 m3/kmol at 15 degC and 101.325 kPa, the figure in use for natural gas (ISO 13443 conditions); from memory.
  test('a standard cubic metre holds 273.15/288.15 of a normal one', () => {
    expect(si('1 Sm3/h', 'molarFlow') / si('1 Nm3/h', 'molarFlow')).toBeCloseTo(273.15 / 288.15, 14);
    expect(1000 / si('1 Sm3/s', 'molarFlow')).toBeCloseTo(23.645, 3);
  });
  // Published, common engineering figure: 379.5 scf/lbmol at 60 degF and 14.696 psi.
  test('a pound-mole fills 379.5 standard cubic feet', () => {
    expect(si('1 lbmol/h', 'molarFlow') / si('1 scf/h', 'molarFlow')).toBeCloseTo(379.48, 1);
  });
  // Derived: n = P V / (R T) by hand.
  test('each follows n = P V / (R T)', () => {
    expect(si('1 Nm3/s', 'molarFlow')).toBeCloseTo(101325 / (R_J_molK * 273.15), 11);
    const T_K = (60 + 459.67) / 1.8;
    const P_Pa = (14.696 * 0.45359237 * 9.80665) / 0.0254 ** 2;
    expect(si('1 scf/s', 'molarFlow')).toBeCloseTo((P_Pa * 0.3048 ** 3) / (R_J_molK * T_K), 12);
  });
});

// Derived by hand from the definitions; each must be exact.
test.each<[string, Dimension, number]>([
  ['100 kmol/h', 'molarFlow', 100000 / 3600],
  ['4.35 bar', 'pressure', 435000],
  ['0.3 bar', 'pressureDifference', 30000],
  ['75 %', 'fraction', 0.75],
  ['300 ppm', 'fraction', 0.0003],
  ['0.07 %', 'fraction', 0.0007],
  ['2.4', 'number', 2.4],
  ['3.6 MJ/h', 'power', 1000],
  ['1.5 MW', 'power', 1.5e6],
  ['74.81 kJ/mol', 'molarEnergy', 74810],
  ['45 kJ/kmol', 'molarEnergy', 45],
  ['1 kcal/mol', 'molarEnergy', 4186.8],
  ['1 BTU/lbmol', 'molarEnergy', 2.326],
  ['30 J/(mol K)', 'molarEntropy', 30],
  ['30 kJ/(kmol K)', 'molarEntropy', 30],
  ['44.1 g/mol', 'molarMass', 0.0441],
  ['89 cm3/mol', 'molarVolume', 89e-6],
  ['12 kW/K', 'conductance', 12000],
  ['0.89 mPa s', 'viscosity', 0.00089],
  ['72 mN/m', 'surfaceTension', 0.072],
  ['1.8 degF', 'temperatureDifference', 1],
  ['10 degC', 'temperatureDifference', 10],
  ['1e3 kg/h', 'massFlow', 1000 / 3600],
  ['2 t/d', 'massFlow', 2000 / 86400],
])('%s as %s is %d in SI exactly', (text, dim, value) => {
  expect(si(text, dim)).toBe(value);
});

describe('gauge pressures count from the site', () => {
  test.each([
    ['3.5 barg', 451325],
    ['3.5 bar(g)', 451325],
    ['0 psig', 101325],
    ['350 kPa(g)', 451325],
    ['-0.5 bar(g)', 51325],
  ])('%s at the standard site is %d Pa', (text, P_Pa) => {
    expect(parseQuantity(text, 'pressure')).toMatchObject({ ok: true, si: P_Pa, gauge: true });
  });
  test('a site of 850 mbar makes 1 bar(g) 1.85 bar(a)', () => {
    expect(parseQuantity('1 bar(g)', 'pressure', { P_Pa: 85000 })).toMatchObject({ ok: true, si: 185000 });
  });
  test.each(['2 bar', '2 bar(a)', '2 bara'])('%s does not depend on the site', (text) => {
    const q = parseQuantity(text, 'pressure', { P_Pa: 85000 });
    expect(q).toMatchObject({ ok: true, si: 200000 });
    expect(q).not.toHaveProperty('gauge');
  });
  test('14.696 psi(a) and 0 psi(g) differ by less than 1 Pa', () => {
    expect(Math.abs(si('14.696 psi(a)', 'pressure') - si('0 psi(g)', 'pressure'))).toBeLessThan(1);
  });
});
