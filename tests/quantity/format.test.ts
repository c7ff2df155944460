import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import {
  DIMENSIONS,
  displayUnit,
  formatChange,
  formatDecimals,
  formatDifference,
  formatNumber,
  formatSignificant,
  inPercent,
  type MeasureSet,
  parseQuantity,
  plainNumber,
  show,
  splitAtDecimal,
  traceBelow,
  unitLabel,
} from '../../src/quantity';

const T = '\u2009';

describe('screens show four significant figures', () => {
  test.each<[number | null | undefined, string]>([
    [0, '0'],
    [-0, '0'],
    [71.666, '71.67'],
    [120, '120.0'],
    [7.5, '7.500'],
    [0.28051, '0.2805'],
    [0.00123456, '0.001235'],
    [0.000123456, '0.0001235'],
    [0.0000123456, '1.235 × 10⁻⁵'],
    [999.96, `1${T}000`],
    [7043.4, `7${T}043`],
    [12345.6, `12${T}350`],
    [1234567, `1${T}235${T}000`],
    [9999999, '1.000 × 10⁷'],
    [12345678, '1.235 × 10⁷'],
    [-15, '−15.00'],
    [288.15, '288.2'],
    [1.0005, '1.001'],
    [-1234.5, `−1${T}235`],
    [null, '–'],
    [undefined, '–'],
    [Number.NaN, '–'],
    [Number.POSITIVE_INFINITY, '–'],
    [Number.NEGATIVE_INFINITY, '–'],
  ])('%d as %s', (value, text) => {
    expect(formatNumber(value)).toBe(text);
    expect(formatSignificant(value)).toBe(text);
  });
  test('other counts of figures', () => {
    expect(formatNumber(12345.678, { significant: 7 })).toBe(`12${T}345.68`);
    expect(formatNumber(0.5, { significant: 1 })).toBe('0.5');
  });
});

describe('printed rows have fixed decimals', () => {
  test.each<[number | undefined, number, string]>([
    [0, 2, '0'],
    [15033.04, 2, `15${T}033.04`],
    [0.004, 2, '<0.01'],
    [1.005, 2, '1.01'],
    [0.005001, 2, '0.01'],
    [-0.004, 2, '>−0.01'],
    [1e-300, 3, '<0.001'],
    [0.3, 0, '<1'],
    [1234567.891, 1, `1${T}234${T}567.9`],
    [-2.5, 2, '−2.50'],
    [undefined, 2, '–'],
    [Number.NaN, 2, '–'],
    [2e15, 2, '2.000 × 10¹⁵'],
  ])('%d with %d decimals as %s', (value, decimals, text) => {
    expect(formatDecimals(value, decimals)).toBe(text);
    expect(formatNumber(value, { decimals })).toBe(text);
  });
  test('a trace is named by the last place of the row', () => {
    expect(traceBelow(2)).toBe('<0.01');
    expect(traceBelow(0)).toBe('<1');
    expect(traceBelow(3, true)).toBe('>−0.001');
  });
});

test('changes carry a sign, and no change reads as equal', () => {
  expect(formatChange(0.2)).toBe('+0.20');
  expect(formatChange(-3)).toBe('−3.0');
  expect(formatChange(0)).toBe('=');
  expect(formatChange(undefined)).toBe('–');
  expect(formatChange(0.001, { decimals: 2 })).toBe('<+0.01');
  expect(formatChange(-0.001, { decimals: 2 })).toBe('<−0.01');
});

test('differences of closure stand in powers of ten', () => {
  expect(formatDifference(2.1e-10)).toBe('2 × 10⁻¹⁰');
  expect(formatDifference(-4e-9)).toBe('−4 × 10⁻⁹');
  expect(formatDifference(0)).toBe('0');
  expect(formatDifference(Number.NaN)).toBe('–');
});

test('numbers for scripts are ASCII and read back to the same double', () => {
  fc.assert(
    fc.property(fc.double({ noNaN: true, noDefaultInfinity: true }), (x) => {
      const text = plainNumber(x);
      expect(text).toMatch(/^-?\d+(\.\d+)?(e[+-]\d+)?$/);
      expect(Number(text)).toBe(x === 0 ? 0 : x);
    }),
    { seed: 20268 },
  );
  expect(plainNumber(Number.NaN)).toBe('');
  expect(plainNumber(undefined)).toBe('');
  expect(plainNumber(-0)).toBe('0');
});

test('no double makes a screen show NaN, an exponent letter or a bare zero with decimals', () => {
  fc.assert(
    fc.property(fc.double(), fc.integer({ min: 1, max: 9 }), (x, n) => {
      for (const text of [
        formatSignificant(x, n),
        formatDecimals(x, n),
        formatChange(x),
        formatDifference(x),
      ]) {
        expect(text).not.toMatch(/NaN|Infinity|e|-|^[−+]?0\.0+$/);
        expect(text).not.toBe('');
      }
    }),
    { seed: 20269, numRuns: 1000 },
  );
});

test('columns are cut at the decimal sign', () => {
  expect(splitAtDecimal(`12${T}345.60`)).toEqual([`12${T}345`, '.60']);
  expect(splitAtDecimal('<0.01')).toEqual(['<0', '.01']);
  expect(splitAtDecimal('–')).toEqual(['–', '']);
  expect(splitAtDecimal('2 × 10⁻¹⁰')).toEqual(['2', ' × 10⁻¹⁰']);
});

describe('measures', () => {
  test('one pressure in three sets, each saying absolute', () => {
    expect(show(1e6, 'pressure', 'SI')).toEqual({ number: `1${T}000`, unit: 'kPa(a)' });
    expect(show(1e6, 'pressure', 'metric')).toEqual({ number: '10.00', unit: 'bar(a)' });
    expect(show(1e6, 'pressure', 'US')).toEqual({ number: '145.0', unit: 'psi(a)' });
    expect(show(30000, 'pressureDifference', 'metric')).toEqual({ number: '0.3000', unit: 'bar' });
  });
  test('a gauge pressure counts from the site', () => {
    const measures = { set: 'metric', units: { pressure: 'bar(g)' }, site: { P_Pa: 85000 } } as const;
    expect(show(185000, 'pressure', measures)).toEqual({ number: '1.000', unit: 'bar(g)' });
    expect(displayUnit('pressure', measures).fromDisplay(1)).toBe(185000);
  });
  test.each([
    ['kPa', 'kPa(a)'],
    ['barg', 'bar(g)'],
    ['psia', 'psi(a)'],
    ['mmHg', 'mmHg(a)'],
    ['bar(a)', 'bar(a)'],
  ])('a pressure shown in %s is marked %s', (unit, label) => {
    expect(show(1e5, 'pressure', { set: 'SI', units: { pressure: unit } }).unit).toBe(label);
  });
  test('temperatures, flows, heat', () => {
    expect(show(288.15, 'temperature', 'metric')).toEqual({ number: '15.00', unit: '°C' });
    expect(show(288.15, 'temperature', 'US')).toEqual({ number: '59.00', unit: '°F' });
    expect(show(288.15, 'temperature', 'SI')).toEqual({ number: '288.2', unit: 'K' });
    expect(show(10, 'temperatureDifference', 'US')).toEqual({ number: '18.00', unit: '°F' });
    expect(show(100000 / 3600, 'molarFlow', 'metric')).toEqual({ number: '100.0', unit: 'kmol/h' });
    expect(show(1.307e6, 'power', 'metric')).toEqual({ number: `1${T}307`, unit: 'kW' });
    expect(show(1, 'volumeFlow', 'metric')).toEqual({ number: `3${T}600`, unit: 'm³/h' });
  });
  test('what is missing is a dash with its unit', () => {
    expect(show(undefined, 'temperature', 'metric')).toEqual({ number: '–', unit: '°C' });
    expect(show(Number.NaN, 'temperature', 'metric').number).toBe('–');
  });
  test('labels are typeset', () => {
    expect(unitLabel('BTU/(lb degF)')).toBe('BTU/(lb °F)');
    expect(unitLabel('Nm3/h')).toBe('Nm³/h');
    expect(unitLabel('kg s-1')).toBe('kg s⁻¹');
  });
  test('every dimension has a unit in every set that can be typed back, and converts both ways', () => {
    for (const set of ['SI', 'metric', 'US'] satisfies MeasureSet[]) {
      for (const dim of DIMENSIONS) {
        const { unit, label, toDisplay, fromDisplay } = displayUnit(dim, set);
        const typed = parseQuantity(`12.5 ${unit}`, dim);
        expect(typed.ok && typed.si / fromDisplay(12.5), `${set} ${dim}`).toBeCloseTo(1, 14);
        expect(toDisplay(fromDisplay(12.5))).toBeCloseTo(12.5, 10);
        if (label !== '') expect(parseQuantity(`12.5 ${label}`, dim).ok, label).toBe(true);
        if (dim === 'pressure') expect(label).toMatch(/\(a\)$/);
      }
    }
  });
  test('a unit that does not measure the dimension is our own mistake and thrown', () => {
    expect(() => displayUnit('pressure', { set: 'SI', units: { pressure: 'kg' } })).toThrow();
    expect(() =>
      displayUnit('pressureDifference', { set: 'SI', units: { pressureDifference: 'barg' } }),
    ).toThrow();
  });
});

test('fractions are shown in per cent where that is asked, unless a unit was chosen for them', () => {
  expect(show(1.2, 'fraction', 'metric')).toEqual({ number: '1.200', unit: '' });
  expect(show(1.2, 'fraction', inPercent('metric'))).toEqual({ number: '120.0', unit: '%' });
  expect(show(0.000343, 'fraction', inPercent({ set: 'US', units: { fraction: 'ppm' } }))).toEqual({
    number: '343.0',
    unit: 'ppm',
  });
});
