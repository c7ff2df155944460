import { fromText, ONE, over, plus, power, type Ratio, reduced, times } from './exact';
import { SHAPES, type Shape } from './shapes';

/**
 * One unit symbol. SI value = (number + zero) * factor, with `zero` only for a temperature standing alone;
 * `reference` says that a pressure was marked (a) or (g).
 */
export interface UnitSymbol {
  readonly factor: Ratio;
  readonly shape: Shape;
  readonly zero?: Ratio;
  readonly reference?: 'absolute' | 'gauge';
}

/** Molar gas constant, J/(mol K): exact N_A k, printed to ten figures in CODATA 2018 (10.1103/RevModPhys.93.025010). */
export const R_J_molK = 8.314462618;

/** Standard atmosphere, Pa: SI Brochure (9th ed.) and NIST SP 811 (2008), App. B.8. The site pressure when none is given. */
export const STANDARD_ATMOSPHERE_Pa = 101325;

const LENGTH = SHAPES.length;
const MASS: Shape = [0, 1, 0, 0, 0];
const TIME = SHAPES.time;
const AMOUNT: Shape = [0, 0, 0, 0, 1];
const PRESSURE = SHAPES.pressure;
const ENERGY: Shape = [2, 1, -2, 0, 0];
const FORCE: Shape = [1, 1, -2, 0, 0];

const table = new Map<string, UnitSymbol>();
const put = (
  names: string,
  factor: Ratio,
  shape: Shape,
  more: Omit<UnitSymbol, 'factor' | 'shape'> = {},
): void => {
  for (const name of names.split(' ')) table.set(name, { factor: reduced(factor), shape, ...more });
};
const is = fromText;

// Length, time, mass: SI Brochure; foot, inch, pound are exact by definition (NIST SP 811, App. B.6 and B.8).
const FOOT = is('0.3048');
const INCH = is('0.0254');
const POUND = is('0.45359237');
put('m', ONE, LENGTH);
put('km', is('1000'), LENGTH);
put('cm', is('0.01'), LENGTH);
put('mm', is('0.001'), LENGTH);
put('ft', FOOT, LENGTH);
put('in', INCH, LENGTH);
put('L', is('0.001'), [3, 0, 0, 0, 0]);
put('s', ONE, TIME);
put('min', is('60'), TIME);
put('h', is('3600'), TIME);
put('d', is('86400'), TIME);
put('kg', ONE, MASS);
put('g', is('0.001'), MASS);
put('mg', is('0.000001'), MASS);
put('t', is('1000'), MASS);
put('lb', POUND, MASS);

// Amount: a pound-mole is as many moles as a pound has grams.
put('mol', ONE, AMOUNT);
put('kmol', is('1000'), AMOUNT);
put('lbmol', times(POUND, is('1000')), AMOUNT);

// Temperature: degC and degR, degF by definition (SI Brochure 2.3.1; NIST SP 811, App. B.9).
const RANKINE = over(is('5'), is('9'));
put('K', ONE, SHAPES.temperature);
put('degR', RANKINE, SHAPES.temperature);
put('degC °C', ONE, SHAPES.temperature, { zero: is('273.15') });
put('degF °F', RANKINE, SHAPES.temperature, { zero: is('459.67') });

// Force and pressure. Pound-force: 0.45359237 kg under 9.80665 m/s2 (NIST SP 811, App. B.8: 4.448222 N).
const GRAVITY = is('9.80665');
const PSI = over(times(POUND, GRAVITY), power(INCH, 2));
put('N', ONE, FORCE);
put('kN', is('1000'), FORCE);
put('mN', is('0.001'), FORCE);
put('dyn', is('0.00001'), FORCE);
put('kgf', GRAVITY, FORCE);
const pressures: [string, Ratio][] = [
  ['Pa', ONE],
  ['kPa', is('1e3')],
  ['MPa', is('1e6')],
  ['bar', is('1e5')],
  ['mbar', is('100')],
  ['psi', PSI], // NIST SP 811, App. B.8: 6.894757e3 Pa
];
for (const [name, factor] of pressures) {
  put(name, factor, PRESSURE);
  put(`${name}(a)`, factor, PRESSURE, { reference: 'absolute' });
  put(`${name}(g)`, factor, PRESSURE, { reference: 'gauge' });
}
put('bara', is('1e5'), PRESSURE, { reference: 'absolute' });
put('psia', PSI, PRESSURE, { reference: 'absolute' });
put('barg', is('1e5'), PRESSURE, { reference: 'gauge' });
put('psig', PSI, PRESSURE, { reference: 'gauge' });
put('atm', is('101325'), PRESSURE);
// Conventional millimetre of mercury: 13 595.1 kg/m3 under 9.80665 m/s2 (NIST SP 811, App. B.8: 1.333224e2 Pa).
put('mmHg', times(is('13.5951'), GRAVITY), PRESSURE);

// Energy and power. Btu and calorie are those of the International Table (NIST SP 811, App. B.8, footnote 9:
// 1 Btu_IT = 1055.05585262 J, 1 cal_IT = 4.1868 J), so that 1 kcal/(kg K) is exactly 1 BTU/(lb degF).
// The thermochemical kilocalorie (4184 J, same source) is to be asked for by name.
const BTU = is('1055.05585262');
put('J', ONE, ENERGY);
put('kJ', is('1e3'), ENERGY);
put('MJ', is('1e6'), ENERGY);
put('GJ', is('1e9'), ENERGY);
put('kcal kcal(IT)', is('4186.8'), ENERGY);
put('kcal(th)', is('4184'), ENERGY);
put('BTU BTU(IT)', BTU, ENERGY);
put('MMBTU', times(BTU, is('1e6')), ENERGY);
put('Wh', is('3600'), ENERGY);
put('kWh', is('3.6e6'), ENERGY);
put('W', ONE, SHAPES.power);
put('kW', is('1e3'), SHAPES.power);
put('MW', is('1e6'), SHAPES.power);
put('mW', is('0.001'), SHAPES.power);
// Horsepower of 550 ft lbf/s (NIST SP 811, App. B.8: 7.456999e2 W); the metric one, 735.5 W, is another unit and not taken.
put('hp', times(times(is('550'), FOOT), times(POUND, GRAVITY)), SHAPES.power);

// Viscosity: 1 cP = 1 mPa s (NIST SP 811, App. B.8).
put('mPa', is('0.001'), PRESSURE);
put('cP', is('0.001'), SHAPES.viscosity);

// Gas volumes at a reference state, counted as amount of ideal gas: n = P V / (R T).
const gas = (volume_m3: Ratio, P_Pa: Ratio, T_K: Ratio): Ratio =>
  over(times(P_Pa, volume_m3), times(is(String(R_J_molK)), T_K));
const ATMOSPHERE = is(String(STANDARD_ATMOSPHERE_Pa));
put('Nm3', gas(ONE, ATMOSPHERE, is('273.15')), AMOUNT); // 0 degC, 101325 Pa
put('Sm3', gas(ONE, ATMOSPHERE, is('288.15')), AMOUNT); // 15 degC, 101325 Pa (ISO 13443)
// 60 degF and 14.696 psi.
put(
  'scf',
  gas(power(FOOT, 3), times(is('14.696'), PSI), times(plus(is('60'), is('459.67')), RANKINE)),
  AMOUNT,
);

put('%', is('0.01'), SHAPES.number);
put('ppm', is('0.000001'), SHAPES.number);

/** Every accepted symbol. Case counts. */
export const SYMBOLS: ReadonlyMap<string, UnitSymbol> = table;

/** Spellings that are not accepted, with the one that is. Ambiguous ones ("MM") stay out. */
const MEANT: Readonly<Record<string, string>> = {
  c: 'degC',
  f: 'degF',
  r: 'degR',
  kelvin: 'K',
  celsius: 'degC',
  fahrenheit: 'degF',
  hr: 'h',
  hour: 'h',
  hours: 'h',
  sec: 's',
  day: 'd',
  days: 'd',
  lbs: 'lb',
  lbm: 'lb',
  kgmol: 'kmol',
  kgmole: 'kmol',
  lbmole: 'lbmol',
  tonne: 't',
  ton: 't',
  percent: '%',
  'mol%': '%',
  'mass%': '%',
  'wt%': '%',
  'vol%': '%',
  ppmv: 'ppm',
  ppmw: 'ppm',
  inch: 'in',
  feet: 'ft',
  foot: 'ft',
  metre: 'm',
  meter: 'm',
  barabs: 'bar(a)',
  baro: 'bar(g)',
  kpaa: 'kPa(a)',
  kpag: 'kPa(g)',
  ncm: 'Nm3',
  scm: 'Sm3',
};

/** The accepted symbol that a reader most likely meant by an unknown one, if any: "KPA" -> "kPa", "hr" -> "h". */
export function nearestSymbol(text: string): string | undefined {
  const low = text.toLowerCase();
  for (const name of SYMBOLS.keys()) if (name.toLowerCase() === low) return name;
  return MEANT[low];
}
