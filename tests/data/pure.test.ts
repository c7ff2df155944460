import { describe, expect, test } from 'vitest';
import { bank, loadChemicals } from '../../src/data/bank';
import type { ChemicalData, Corr } from '../../src/engine/chemicals/types';
import { makeForm } from '../../src/engine/thermo/pure/forms';
import { prepareIdealGases } from '../../src/engine/thermo/pure/ideal';
import { preparePure } from '../../src/engine/thermo/pure/pure';
import { R_J_molK, T0_K } from '../../src/engine/thermo/types';

const all = await loadChemicals(bank.index.map((entry) => entry.id));
const gases = prepareIdealGases(all);

const own = (corr: ChemicalData['corr']): ChemicalData => ({
  id: 'own',
  name: 'own',
  MW_g_mol: 50,
  Hf_J_mol: -1000,
  S0_J_molK: 200,
  corr,
  sources: {},
});

/** Five-point derivative; error of order step^4. */
const slopeOf = (f: (T: number) => number, T: number, d: number): number =>
  (f(T - 2 * d) - 8 * f(T - d) + 8 * f(T + d) - f(T + 2 * d)) / (12 * d);

describe('every correlation form', () => {
  const rows = new Map<string, Corr>();
  for (const c of all) for (const of of Object.values(c.corr)) for (const r of of) rows.set(r.form, r);
  rows.set('antoine', { form: 'antoine', log: '10', P: 'mmHg', T: 'degC', c: [8.07131, 1730.63, 233.426] });
  rows.set('powers', { form: 'powers', of: 'Cp/R', c: [3, 0.002, -1e-6, 2e-10, -1e-14, 1e-18] });

  test('is present: sixteen in the bank and the two that only own chemicals use', () => {
    expect(rows.size).toBe(18);
  });
  test.each([...rows.keys()])('%s: its slope agrees with differences of its values', (name) => {
    const row = rows.get(name)!;
    const form = makeForm(row);
    const [low, high] = [row.Tmin ?? 280, row.Tmax ?? 370];
    for (const share of [0.15, 0.4, 0.6, 0.85]) {
      const T = low + share * (high - low);
      const d = 1e-3 * T;
      const scale = Math.abs(form.slope(T)) + 1e-6 * Math.abs(form.at(T)) + 1e-300;
      expect(Math.abs(slopeOf(form.at, T, d) - form.slope(T)) / scale).toBeLessThan(2e-6);
    }
  });
});

describe('ideal gas, all chemicals of the bank', () => {
  test('stands at its formation enthalpy and standard entropy at 298.15 K', () => {
    all.forEach((c, i) => {
      expect(Math.abs(gases.h(i, T0_K) - c.Hf_J_mol!)).toBeLessThan(1e-6);
      expect(Math.abs(gases.s(i, T0_K) - (c.S0_J_molK ?? 0))).toBeLessThan(1e-9);
    });
  });

  test('dH = Cp dT and dS = Cp/T dT from 20 to 3000 K, also across joins and outside the range', () => {
    all.forEach((_, i) => {
      for (const T of [25, 60, 150, 190, 260, 298.15, 420, 777, 1200, 1800, 2900]) {
        const d = 1e-3 * T;
        const cp = gases.cp(i, T);
        expect(Math.abs(slopeOf((t) => gases.h(i, t), T, d) / cp - 1)).toBeLessThan(1e-6);
        expect(Math.abs((slopeOf((t) => gases.s(i, t), T, d) * T) / cp - 1)).toBeLessThan(1e-6);
      }
    });
  });

  test('enthalpy has no step where rows meet, and rises everywhere', () => {
    all.forEach((c, i) => {
      for (const row of c.corr.ideal_gas_cp!) {
        for (const T of [row.Tmin!, row.Tmax!]) {
          const jump = gases.h(i, T * (1 + 1e-12)) - gases.h(i, T * (1 - 1e-12));
          expect(Math.abs(jump)).toBeLessThan(1e-5);
        }
      }
      for (let T = 5; T < 6500; T *= 1.1) expect(gases.h(i, T * 1.1)).toBeGreaterThan(gases.h(i, T));
    });
  });

  test('all at once gives the same bits as one by one', () => {
    const [cp, h, s] = [0, 0, 0].map(() => new Float64Array(all.length)) as [
      Float64Array,
      Float64Array,
      Float64Array,
    ];
    gases.allOf(431.7, cp, h, s);
    all.forEach((_, i) => {
      expect([cp[i], h[i], s[i]]).toEqual([gases.cp(i, 431.7), gases.h(i, 431.7), gases.s(i, 431.7)]);
    });
  });

  test('a monatomic gas has 5/2 R, and a constant Cp outside a range is the value at its end', () => {
    const helium = all.findIndex((c) => c.id === 'helium');
    expect(gases.cp(helium, 1234)).toBe(2.5 * R_J_molK);
    const pure = preparePure(own({ ideal_gas_cp: [{ form: 'poly5', Tmin: 300, Tmax: 500, c: [20, 0.1] }] }));
    expect(pure.cpIdeal!(100)).toBeCloseTo(50, 12);
    expect(pure.cpIdeal!(900)).toBeCloseTo(70, 12);
    // By hand: Cp = 50 to 300 K; 20 + 0.1 T to 500 K; 70 above.
    const h = -1000 + 50 * (300 - 298.15) + 20 * 200 + 0.05 * (500 ** 2 - 300 ** 2) + 70 * 100;
    expect(pure.hIdeal!(600)).toBeCloseTo(h, 8);
    const s = 200 + 50 * Math.log(300 / 298.15) + 20 * Math.log(5 / 3) + 0.1 * 200 + 70 * Math.log(1.2);
    expect(pure.sIdeal!(600)).toBeCloseTo(s, 10);
  });

  test('rows that leave a gap keep the last value across it, given in any order', () => {
    const pure = preparePure(
      own({
        ideal_gas_cp: [
          { form: 'poly5', Tmin: 500, Tmax: 600, c: [80] },
          { form: 'poly5', Tmin: 200, Tmax: 400, c: [10, 0.1] },
        ],
      }),
    );
    expect(pure.cpIdeal!(450)).toBeCloseTo(50, 12);
    expect(pure.cpIdeal!(501)).toBe(80);
    expect(pure.outside_K('ideal_gas_cp', 460)).toBe(40);
  });
});

describe('outside a stated range', () => {
  test('ln P of a vapour pressure goes on straight in 1/T with the slope of the end, without a step', () => {
    for (const c of all) {
      const { lnPsat, dlnPsat_dT, range } = preparePure(c);
      const { Tmin, Tmax } = range('vapor_pressure')!;
      for (const [end, beyond] of [
        [Tmin!, Tmin! * 0.7],
        [
          Math.min(
            Tmax!,
            c.corr.vapor_pressure![0]!.form === 'dippr101' ? 1e9 : c.corr.vapor_pressure![0]!.c[4]!,
          ),
          0,
        ],
      ] as const) {
        const T = beyond || end * 1.3;
        const B = -dlnPsat_dT!(end) * end * end;
        expect(B).toBeLessThan(0);
        expect(lnPsat!(T)).toBeCloseTo(lnPsat!(end) + B * (1 / T - 1 / end), 7);
        expect(dlnPsat_dT!(T)).toBeCloseTo(-B / (T * T), 8);
      }
    }
  });

  test('a vapour pressure rises with temperature from a third of Tc to twice Tc', () => {
    for (const c of all) {
      const { lnPsat } = preparePure(c);
      for (let T = c.Tc_K! / 3; T < 2 * c.Tc_K!; T += c.Tc_K! / 60) {
        expect(lnPsat!(T + c.Tc_K! / 60), `${c.id} at ${T}`).toBeGreaterThan(lnPsat!(T));
      }
    }
  });

  test('other properties keep the value at the nearer end, and the distance is told in kelvins', () => {
    const water = preparePure(all.find((c) => c.id === 'water')!);
    const { Tmin, Tmax } = water.range('liquid_cp')!;
    expect(water.cpL!(Tmin! - 30)).toBe(water.cpL!(Tmin!));
    expect(water.cpL!(Tmax! + 30)).toBe(water.cpL!(Tmax!));
    expect(water.outside_K('liquid_cp', Tmax! + 30)).toBeCloseTo(30, 9);
    expect(water.outside_K('liquid_cp', 300)).toBe(0);
    expect(water.hvap!(700)).toBe(0);
  });

  test('a property without data is absent, not a guess', () => {
    const pure = preparePure(own({ ideal_gas_cp: [{ form: 'monatomic', c: [] }] }));
    expect([pure.psat, pure.hvap, pure.rhoL, pure.range('vapor_pressure')]).toEqual([
      undefined,
      undefined,
      undefined,
      undefined,
    ]);
    expect(pure.outside_K('ideal_gas_cp', 1)).toBe(0);
  });
});

test('a heat capacity may be a polynomial of any length', () => {
  const c = [20, 0.05, -1e-5, 2e-9, 1e-12, -3e-16, 2e-19, 1e-23];
  const pure = preparePure(own({ ideal_gas_cp: [{ form: 'powers', of: 'Cp', c }] }));
  const T = 700;
  const cp = c.reduce((sum, a, k) => sum + a * T ** k, 0);
  const h = c.reduce((sum, a, k) => sum + (a * (T ** (k + 1) - T0_K ** (k + 1))) / (k + 1), -1000);
  const s = c.reduce(
    (sum, a, k) => sum + (k === 0 ? a * Math.log(T / T0_K) : (a * (T ** k - T0_K ** k)) / k),
    200,
  );
  expect(pure.cpIdeal!(T)).toBeCloseTo(cp, 10);
  expect(pure.hIdeal!(T)).toBeCloseTo(h, 8);
  expect(pure.sIdeal!(T)).toBeCloseTo(s, 10);
});

// Published: water between 1 and 100 degC, log10(P/mmHg) = 8.07131 - 1730.63/(233.426 + t/degC); Dortmund Data Bank
// constants as widely printed, from memory. At 100 degC they give 760.09 mmHg by hand.
test('an Antoine row keeps its own units, and stays finite below its pole', () => {
  const psat = preparePure(
    own({
      vapor_pressure: [{ form: 'antoine', log: '10', P: 'mmHg', T: 'degC', c: [8.07131, 1730.63, 233.426] }],
    }),
  );
  expect(psat.psat!(373.15) / 133.322368).toBeCloseTo(760.09, 1);
  for (const T of [1, 20, 39.7, 41, 60]) expect(psat.lnPsat!(T)).toBeLessThan(psat.lnPsat!(T + 1));
});
