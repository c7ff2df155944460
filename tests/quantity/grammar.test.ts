import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import {
  DIMENSIONS,
  type Dimension,
  parseQuantity,
  QUANTITY_PATTERN,
  suggestedUnits,
  unitRefusal,
} from '../../src/quantity';

describe('a quantity is read as typed', () => {
  test('the digits and the unit are kept', () => {
    expect(parseQuantity('10.500 bar', 'pressure')).toEqual({
      ok: true,
      si: 1.05e6,
      dim: 'pressure',
      unit: 'bar',
      number: '10.500',
    });
  });
  test.each<[string, Dimension, string]>([
    ['15 °C', 'temperature', 'degC'],
    ['1 m^3/h', 'volumeFlow', 'm3/h'],
    ['1 m³/h', 'volumeFlow', 'm3/h'],
    ['1 Nm³/h', 'molarFlow', 'Nm3/h'],
    ['1 J/(mol·K)', 'molarEntropy', 'J/(mol K)'],
    ['1 J/(mol K)', 'molarEntropy', 'J/(mol K)'],
    ['1 mPa·s', 'viscosity', 'mPa s'],
    ['1 kg s^-1', 'massFlow', 'kg s-1'],
    ['1 kg s⁻¹', 'massFlow', 'kg s-1'],
    ['1 BTU/(lb °F)', 'heatCapacity', 'BTU/(lb degF)'],
    ['1 kg/(m s)', 'viscosity', 'kg/(m s)'],
    ['1 kg / h', 'massFlow', 'kg/h'],
    ['1 kJ / (kg °C)', 'heatCapacity', 'kJ/(kg degC)'],
    ['1 kcal(th)/h', 'power', 'kcal(th)/h'],
  ])('%s has one spelling', (text, dim, unit) => {
    expect(parseQuantity(text, dim)).toMatchObject({ ok: true, dim, unit });
  });
  test.each([
    ['1e3 Pa', 1000],
    ['1E3 Pa', 1000],
    ['1.5e-2 Pa', 0.015],
    ['+2e+1 Pa', 20],
    ['.5 Pa', 0.5],
    ['5. Pa', 5],
    [' 5 Pa ', 5],
    ['5Pa', 5],
    ['5\u2009Pa', 5],
  ])('%j has a number', (text, value) => {
    expect(parseQuantity(text, 'pressure')).toMatchObject({ ok: true, si: value });
  });
  test('a true minus is a minus', () => {
    expect(parseQuantity('−15 degC', 'temperature')).toMatchObject({ si: 258.15, number: '−15' });
  });
  test('a plain number, typed or from a file, stands where nothing has a unit', () => {
    expect(parseQuantity(0.75, 'fraction')).toMatchObject({ ok: true, si: 0.75, unit: '', number: '0.75' });
    expect(parseQuantity('2.4', 'number')).toMatchObject({ ok: true, si: 2.4, unit: '' });
    expect(parseQuantity(1e-7, ['fraction'])).toMatchObject({ ok: true, si: 1e-7 });
  });
  test('the first wanted dimension that shares the unit counts', () => {
    expect(parseQuantity('5 K', ['temperatureDifference', 'temperature'])).toMatchObject({
      dim: 'temperatureDifference',
    });
    expect(parseQuantity('5 degC', ['temperature', 'temperatureDifference'])).toMatchObject({
      dim: 'temperature',
      si: 278.15,
    });
    expect(parseQuantity('5 barg', ['pressureDifference', 'pressure'])).toMatchObject({
      dim: 'pressure',
      si: 601325,
    });
    expect(parseQuantity('5 kg/h', ['molarFlow', 'massFlow'])).toMatchObject({ dim: 'massFlow' });
    expect(parseQuantity('5 Nm3/h', ['massFlow', 'molarFlow'])).toMatchObject({ dim: 'molarFlow' });
  });
});

describe('what is not a quantity is refused with code, place and what fits', () => {
  test.each<[string | number, Dimension, string, number, string]>([
    ['', 'pressure', 'empty', 0, ''],
    ['   ', 'pressure', 'empty', 0, ''],
    ['bar', 'pressure', 'not-a-number', 0, 'bar'],
    ['ten bar', 'pressure', 'not-a-number', 0, 'ten bar'],
    ['1.2.3 bar', 'pressure', 'not-a-number', 3, '.'],
    ['NaN', 'number', 'not-a-number', 0, 'NaN'],
    [Number.NaN, 'number', 'not-a-number', 0, 'NaN'],
    [Number.POSITIVE_INFINITY, 'number', 'not-a-number', 0, 'Infinity'],
    ['3,5 bar', 'pressure', 'decimal-comma', 0, '3,5'],
    ['1,000 bar', 'pressure', 'digit-grouping', 0, '1,000'],
    ['1,000.5 bar', 'pressure', 'digit-grouping', 0, '1,000.5'],
    ['1 000 bar', 'pressure', 'digit-grouping', 0, '1 000'],
    ['1\u2009000 bar', 'pressure', 'digit-grouping', 0, '1\u2009000'],
    ['1.5 000 bar', 'pressure', 'digit-grouping', 0, '1.5 0'],
    ['10 bar(b)', 'pressure', 'unit-syntax', 6, '('],
    ['10 (bar)', 'pressure', 'unit-syntax', 3, '('],
    ['5 /h', 'massFlow', 'unit-syntax', 2, '/'],
    ["1'000 bar", 'pressure', 'digit-grouping', 0, "1'000"],
    ['1e400 bar', 'pressure', 'out-of-range', 0, '1e400'],
    ['1e999999999 bar', 'pressure', 'out-of-range', 0, '1e999999999'],
    ['10', 'pressure', 'no-unit', 2, ''],
    [10, 'pressure', 'no-unit', 2, ''],
    ['10 bra', 'pressure', 'unknown-unit', 3, 'bra'],
    ['10 Bar', 'pressure', 'unknown-unit', 3, 'Bar'],
    ['10 kmol/hr', 'molarFlow', 'unknown-unit', 8, 'hr'],
    ['10 kg/', 'massFlow', 'unit-syntax', 6, ''],
    ['10 J/(mol K', 'molarEntropy', 'unit-syntax', 11, ''],
    ['10 kg/h)', 'massFlow', 'unit-syntax', 7, ')'],
    ['10 kg m0', 'massFlow', 'unit-syntax', 7, '0'],
    ['10 kg/m3/h', 'massFlow', 'second-slash', 8, '/'],
    ['10 J/mol K', 'molarEntropy', 'unbracketed', 9, 'K'],
    ['10 barg/h', 'pressure', 'reference-in-compound', 3, 'barg'],
    ['10 kg/h', 'pressure', 'wrong-dimension', 3, 'kg/h'],
    ['10 bar', 'fraction', 'wrong-dimension', 3, 'bar'],
    ['10 degC', 'pressureDifference', 'wrong-dimension', 3, 'degC'],
    ['10 m3/h', 'molarFlow', 'volume-flow', 3, 'm3/h'],
    ['10 ft3/h', 'massFlow', 'volume-flow', 3, 'ft3/h'],
    ['0.3 barg', 'pressureDifference', 'drop-has-no-reference', 4, 'barg'],
    ['0.3 bar(a)', 'pressureDifference', 'drop-has-no-reference', 4, 'bar(a)'],
    ['-1 K', 'temperature', 'below-absolute-zero', 0, '-1'],
    ['-280 degC', 'temperature', 'below-absolute-zero', 0, '-280'],
    ['-1 bar', 'pressure', 'below-vacuum', 0, '-1'],
    ['-2 barg', 'pressure', 'below-vacuum', 0, '-2'],
  ])('%j as %s: %s', (text, dim, code, at, found) => {
    const q = parseQuantity(text, dim);
    expect(q).toMatchObject({ ok: false, code: `quantity/${code}`, at, found });
    if (!q.ok) expect(q.fits.length > 0 || dim === 'number').toBe(true);
  });

  test.each<[string, Dimension, string]>([
    ['10 Bar', 'pressure', 'bar'],
    ['10 KPA', 'pressure', 'kPa'],
    ['10 Psig', 'pressure', 'psig'],
    ['10 C', 'temperature', 'degC'],
    ['10 kmol/hr', 'molarFlow', 'h'],
    ['10 Btu/h', 'power', 'BTU'],
    ['3,5 bar', 'pressure', '3.5'],
    ['1,000.5 bar', 'pressure', '1000.5'],
    ['12 345.6 kg/h', 'massFlow', '12345.6'],
    ['10 J/mol K', 'molarEntropy', 'J/(mol K)'],
    ['0.3 barg', 'pressureDifference', 'bar'],
    ['0.3 kPa(g)', 'pressureDifference', 'kPa'],
    ['10 bar (a)', 'pressure', 'bar(a)'],
    ['10 W/m/K', 'thermalConductivity', 'W/(m K)'],
    ['10 mol%', 'fraction', '%'],
  ])('%s as %s names what was meant: %s', (text, dim, near) => {
    expect(parseQuantity(text, dim)).toMatchObject({ ok: false, near });
  });

  test('a volume flow leads to the three ways to say it, in the same time and kind of measure', () => {
    const ways = (text: string) => {
      const q = parseQuantity(text, ['molarFlow', 'massFlow']);
      return q.ok ? [] : q.fits;
    };
    expect(ways('10 m3/h')).toEqual(['kmol/h', 'kg/h', 'Nm3/h']);
    expect(ways('10 m3/s')).toEqual(['kmol/s', 'kg/s', 'Nm3/s']);
    expect(ways('10 ft3/min')).toEqual(['lbmol/min', 'lb/min', 'scf/min']);
    expect(ways('10 m3 h-1')).toEqual(['kmol/h', 'kg/h', 'Nm3/h']);
  });

  test('no text at all makes it throw or return something that is not finite', () => {
    const piece = fc.constantFrom(
      ...'0123456789.eE+-−,/()^·  %°³⁻¹'.split(''),
      'bar',
      'bar(g)',
      'degC',
      'kmol',
      'm',
      'K',
      'Nm3',
      'h',
    );
    const text = fc.oneof(
      fc.string(),
      fc.array(piece, { maxLength: 10 }).map((p) => p.join('')),
    );
    fc.assert(
      fc.property(text, fc.constantFrom(...DIMENSIONS), (t, dim) => {
        const q = parseQuantity(t, dim);
        if (q.ok) expect(Number.isFinite(q.si)).toBe(true);
        else expect(q.code).toMatch(/^quantity\//);
      }),
      { seed: 20261, numRuns: 3000 },
    );
  });
});

test('the outline for a schema lets through what can be read, and stops commas, groups and words', () => {
  const outline = new RegExp(QUANTITY_PATTERN, 'u');
  for (const dim of DIMENSIONS) {
    for (const unit of suggestedUnits(dim)) expect(`-1.5e3 ${unit}`).toMatch(outline);
  }
  for (const text of ['15 °C', '75%', '.5', '5. Pa', '−15 degC', ' 3 ', '3 bar\n'])
    expect(text).toMatch(outline);
  for (const text of ['', 'bar', '1,000 bar', '1 000 bar', 'ten bar', '1.2.3'])
    expect(text).not.toMatch(outline);
});

describe('units offered are units accepted', () => {
  test.each(DIMENSIONS)('for %s', (dim) => {
    for (const unit of suggestedUnits(dim)) {
      expect(parseQuantity(`300 ${unit}`, dim), unit).toMatchObject({ ok: true, dim, unit });
      expect(unitRefusal(unit, dim)).toBeUndefined();
    }
  });
  test('for several dimensions each once', () => {
    const units = suggestedUnits(['molarFlow', 'massFlow']);
    expect(units).toContain('kmol/h');
    expect(units).toContain('kg/h');
    expect(new Set(units).size).toBe(units.length);
  });
  test('a unit alone is refused like a quantity', () => {
    expect(unitRefusal('kg/h', 'pressure')).toMatchObject({ code: 'quantity/wrong-dimension' });
    expect(unitRefusal('bar(g)', 'pressureDifference')).toMatchObject({
      code: 'quantity/drop-has-no-reference',
    });
    expect(unitRefusal('furlong', 'length')).toMatchObject({ code: 'quantity/unknown-unit', at: 0 });
    expect(unitRefusal('', 'length')).toMatchObject({ code: 'quantity/no-unit' });
    expect(unitRefusal('', 'number')).toBeUndefined();
  });
});

describe('every unit of the published list is accepted', () => {
  const all: Partial<Record<Dimension, string>> = {
    temperature: 'K,degC,degF,degR,°C',
    temperatureDifference: 'K,degC,degF',
    pressure: 'Pa,kPa,MPa,bar,mbar,atm,psi,mmHg,barg,psig,bar(a),bar(g),psi(a),psi(g),kPa(a)',
    pressureDifference: 'Pa,kPa,MPa,bar,mbar,atm,psi,mmHg',
    molarFlow: ['mol', 'kmol', 'lbmol', 'Nm3', 'Sm3', 'scf']
      .flatMap((a) => ['s', 'min', 'h', 'd'].map((t) => `${a}/${t}`))
      .join(),
    massFlow: ['g', 'kg', 't', 'lb'].flatMap((a) => ['s', 'min', 'h', 'd'].map((t) => `${a}/${t}`)).join(),
    power: `W,kW,MW,${['J', 'kJ', 'MJ', 'kcal', 'BTU'].flatMap((e) => ['s', 'min', 'h', 'd'].map((t) => `${e}/${t}`)).join()}`,
    molarEnergy: 'J/mol,kJ/mol,kJ/kmol,kcal/mol,BTU/lbmol',
    molarEntropy: 'J/(mol K),kJ/(kmol K)',
    length: 'm,cm,mm,ft,in',
    density: 'kg/m3,lb/ft3',
    conductance: 'W/K,kW/K',
    fraction: '%,ppm',
    viscosity: 'mPa s,cP,Pa s',
  };
  test.each(Object.entries(all) as [Dimension, string][])('%s: %s', (dim, units) => {
    for (const unit of units.split(','))
      expect(parseQuantity(`300 ${unit}`, dim), unit).toMatchObject({ ok: true, dim });
  });
});
