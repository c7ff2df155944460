import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import {
  type Dimension,
  parseQuantity,
  quantityText,
  stepNumber,
  stepSize,
  suggestedUnits,
  withNumber,
} from '../../src/quantity';
import {
  fromDouble,
  fromText,
  minus,
  over,
  plus,
  power,
  times,
  toDouble,
  toText,
} from '../../src/quantity/exact';

const si = (text: string | number, dim: Dimension): number => {
  const q = parseQuantity(text, dim);
  if (!q.ok) throw new Error(`${text}: ${q.code}`);
  return q.si;
};

const decimal = fc
  .tuple(fc.integer({ min: 0, max: 10_000_000 }), fc.integer({ min: 0, max: 6 }))
  .map(([n, d]) => toText({ n: BigInt(n), d: 10n ** BigInt(d) }, d));

describe('the same quantity has the same bits', () => {
  test('equal text, read again after other texts', () => {
    fc.assert(
      fc.property(decimal, fc.constantFrom(...suggestedUnits('molarFlow')), (n, unit) => {
        const first = si(`${n} ${unit}`, 'molarFlow');
        si('17.3 lbmol/d', 'molarFlow');
        expect(Object.is(si(`${n} ${unit}`, 'molarFlow'), first)).toBe(true);
      }),
      { seed: 20262 },
    );
  });
  test('equal amounts in units that differ by powers of ten or by definition', () => {
    fc.assert(
      fc.property(fc.integer({ min: 0, max: 1_000_000 }), (n) => {
        const Pa = si(`${n} Pa`, 'pressure');
        expect(Pa).toBe(n);
        expect(si(`${n}e-3 kPa`, 'pressure')).toBe(Pa);
        expect(si(`${toText({ n: BigInt(n), d: 100000n }, 5)} bar`, 'pressure')).toBe(Pa);
        expect(si(`${n * 60} mol/h`, 'molarFlow')).toBe(si(`${n} mol/min`, 'molarFlow'));
        expect(si(`${n} kcal/(kg K)`, 'heatCapacity')).toBe(si(`${n} BTU/(lb degF)`, 'heatCapacity'));
        expect(si(`${toText({ n: BigInt(n * 18 + 320), d: 10n }, 1)} degF`, 'temperature')).toBe(
          si(`${n} degC`, 'temperature'),
        );
      }),
      { seed: 20263 },
    );
  });
  test('a number without unit is the double that JavaScript reads', () => {
    fc.assert(
      fc.property(fc.double({ noNaN: true, noDefaultInfinity: true, min: -1e300, max: 1e300 }), (x) => {
        fc.pre(x === 0 || Math.abs(x) > 1e-290);
        expect(si(String(x), 'number')).toBe(x === 0 ? 0 : x);
        expect(toDouble(fromDouble(x))).toBe(x === 0 ? 0 : x);
      }),
      { seed: 20264 },
    );
  });
});

describe('exact fractions', () => {
  test('a tie goes to the even double, a hair beyond it to the next', () => {
    // Derived: 2^53 + 1 lies half way between two doubles.
    expect(toDouble(fromText('9007199254740993'))).toBe(9007199254740992);
    expect(toDouble(fromText('9007199254740993.0000000001'))).toBe(9007199254740994);
    expect(toDouble(fromText('-9007199254740993.0000000001'))).toBe(-9007199254740994);
  });
  test('arithmetic is that of fractions', () => {
    const third = over(fromText('1'), fromText('3'));
    expect(toDouble(times(third, fromText('3')))).toBe(1);
    expect(toDouble(minus(plus(fromText('0.1'), fromText('0.2')), fromText('0.3')))).toBe(0);
    expect(toDouble(power(fromText('-2'), -3))).toBe(-0.125);
    expect(toDouble(over(fromText('1'), fromText('-4')))).toBe(-0.25);
  });
  test('text is rounded half away from zero', () => {
    expect(toText(fromText('2.5'), 0)).toBe('3');
    expect(toText(fromText('-2.5'), 0)).toBe('-3');
    expect(toText(fromText('-0.004'), 2)).toBe('0.00');
    expect(toText(fromText('1250'), -2)).toBe('1300');
    expect(toText(fromText('0.045'), 2)).toBe('0.05');
  });
  test('what is no number is our own mistake and thrown', () => {
    expect(() => fromText('1,5')).toThrow();
    expect(() => fromText('')).toThrow();
    expect(() => fromDouble(Number.NaN)).toThrow();
    expect(() => over(fromText('1'), fromText('0'))).toThrow();
  });
});

describe('the number inside the text is rewritten and the rest stays', () => {
  test.each<[string | number, number, Dimension, string]>([
    ['10 barg', 601325, 'pressure', '5 barg'],
    ['10  bar(a)', 4.35e5, 'pressure', '4.35  bar(a)'],
    ['20 °C', 290.15, 'temperature', '17 °C'],
    ['20 °C', 273.15, 'temperature', '0 °C'],
    ['68 degF', 288.15, 'temperature', '59 degF'],
    ['5 degC', 12, 'temperatureDifference', '12 degC'],
    ['1 m^3/h', 1, 'volumeFlow', '3600 m^3/h'],
    ['75 %', 0.8, 'fraction', '80 %'],
    ['75%', 0.8, 'fraction', '80%'],
    [0.75, 0.8, 'fraction', '0.8'],
    ['1 ppm', 1e-16, 'fraction', '1e-10 ppm'],
    ['1 Pa', 1e25, 'pressure', '1e25 Pa'],
    ['1 Pa', 0, 'pressure', '0 Pa'],
  ])('%j to %d: %s -> %s', (text, value, dim, expected) => {
    expect(withNumber(text, value, dim)).toBe(expected);
  });
  test('the site counts for a gauge pressure', () => {
    expect(withNumber('1 bar(g)', 185000, 'pressure', { P_Pa: 85000 })).toBe('1 bar(g)');
  });
  test('a hand on a ruler gets sensible figures', () => {
    expect(withNumber('10 bar', 734512.3, 'pressure', undefined, { figures: 3 })).toBe('7.35 bar');
    expect(withNumber('10 bar', 734512.3, 'pressure', undefined, { decimals: 1 })).toBe('7.3 bar');
    expect(withNumber('100 kmol/h', 33.333333, 'molarFlow', undefined, { figures: 3 })).toBe('120 kmol/h');
  });
  test('there is nothing to rewrite in a text that is no such quantity', () => {
    expect(withNumber('ten bar', 1e5, 'pressure')).toBeUndefined();
    expect(withNumber('10 kg/h', 1e5, 'pressure')).toBeUndefined();
    expect(withNumber('10 bar', Number.NaN, 'pressure')).toBeUndefined();
    expect(quantityText(1e5, 'pressure', 'kg')).toBeUndefined();
    expect(quantityText(1e5, 'pressure', '')).toBeUndefined();
    expect(quantityText(Number.POSITIVE_INFINITY, 'pressure', 'bar')).toBeUndefined();
  });
  test('quantity text names value and unit', () => {
    expect(quantityText(350000, 'pressure', 'bar(a)')).toBe('3.5 bar(a)');
    expect(quantityText(0.3, 'fraction', '')).toBe('0.3');
    expect(quantityText(1.2, 'length', 'm', undefined, { decimals: 3 })).toBe('1.200 m');
  });
  test('what was rewritten reads back to the same bits, in every unit on offer', () => {
    const dims: Dimension[] = [
      'pressure',
      'temperature',
      'molarFlow',
      'power',
      'molarEntropy',
      'density',
      'fraction',
      'temperatureDifference',
    ];
    fc.assert(
      fc.property(
        fc
          .constantFrom(...dims)
          .chain((dim) => fc.tuple(fc.constant(dim), fc.constantFrom(...suggestedUnits(dim)))),
        fc.double({ min: 1e-3, max: 1e8, noNaN: true }),
        ([dim, unit], value) => {
          const text = withNumber(`300 ${unit}`, value, dim);
          expect(text?.endsWith(` ${unit}`)).toBe(true);
          expect(si(text ?? '', dim)).toBe(value);
        },
      ),
      { seed: 20265, numRuns: 500 },
    );
  });
  test('rewriting with the value it has changes nothing but needless digits', () => {
    fc.assert(
      fc.property(decimal, fc.constantFrom('bar', 'psi', 'kPa(g)', 'degF', 'degC'), (n, unit) => {
        const dim: Dimension = unit.startsWith('deg') ? 'temperature' : 'pressure';
        const text = withNumber(`${n} ${unit}`, si(`${n} ${unit}`, dim), dim) ?? '';
        expect(Number(text.split(' ')[0])).toBe(Number(n));
      }),
      { seed: 20266 },
    );
  });
});

describe('a slide steps the typed number', () => {
  test.each<[string, number, 0.1 | 1 | 10, string]>([
    ['40 degC', 3, 1, '40.3 degC'],
    ['40 degC', 3, 10, '43 degC'],
    ['40 degC', -3, 0.1, '39.97 degC'],
    ['7.0 bar', 10, 1, '7.1 bar'],
    ['7.0 bar', 0, 1, '7.0 bar'],
    ['7.0 bar', 100, 1, '8.0 bar'],
    ['7.0 bar', -5, 1, '6.95 bar'],
    ['100 kmol/h', -1, 1, '99 kmol/h'],
    ['0.1', 2, 1, '0.102'],
    ['1000 kW', 1, 1, '1010 kW'],
    ['-15 degC', 1, 1, '-14.9 degC'],
    ['0 kW', 1, 1, '1 kW'],
    ['0.0 kW', -1, 1, '-0.1 kW'],
    ['75 %', 10, 1, '76 %'],
    ['1e3 Pa', 1, 1, '1010 Pa'],
    ['20 °C', 1, 10, '21 °C'],
  ])('%s by %d steps of %d: %s', (text, steps, times, expected) => {
    expect(stepNumber(text, steps, times)).toBe(expected);
  });
  test('the step is a power of ten near a thousandth to a hundredth of the number', () => {
    expect(stepSize('40 degC')).toBeCloseTo(0.1, 15);
    expect(stepSize('100 kmol/h')).toBe(1);
    expect(stepSize('ten')).toBeUndefined();
    expect(stepNumber('ten', 1)).toBeUndefined();
  });
  test('there and back from the start of the gesture is where it began', () => {
    fc.assert(
      fc.property(decimal, fc.integer({ min: -500, max: 500 }), (n, steps) => {
        fc.pre(Number(n) > 0);
        const out = Number(stepNumber(`${n} bar`, steps)?.split(' ')[0]);
        expect(out).toBeCloseTo(Number(n) + steps * (stepSize(n) ?? 0), 6);
        expect(Number(stepNumber(`${n} bar`, 0)?.split(' ')[0])).toBe(Number(n));
      }),
      { seed: 20267 },
    );
  });
});
