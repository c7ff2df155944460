import { describe, expect, test } from 'vitest';
import { bank, loadChemicals } from '../../src/data/bank';
import type { Corr, CorrProperty } from '../../src/engine/chemicals/types';
import { corrFault } from '../../src/engine/thermo/pure/usable';

describe('correlation rows that a user brings', () => {
  test.each<[string, CorrProperty, Corr[], object | undefined]>([
    ['a polynomial', 'ideal_gas_cp', [{ form: 'poly5', Tmin: 200, Tmax: 900, c: [20, 0.1] }], undefined],
    ['a monatomic gas', 'ideal_gas_cp', [{ form: 'monatomic', c: [] }], undefined],
    [
      'an Antoine row without a range',
      'vapor_pressure',
      [{ form: 'antoine', log: '10', P: 'bar', T: 'K', c: [4, 1200, -50] }],
      undefined,
    ],
    [
      'two rows in any order',
      'liquid_cp',
      [
        { form: 'poly5', Tmin: 400, Tmax: 500, c: [90] },
        { form: 'poly5', Tmin: 300, Tmax: 400, c: [80] },
      ],
      undefined,
    ],
    [
      'a vapour pressure as a heat capacity',
      'ideal_gas_cp',
      [{ form: 'wagner25', c: [-7, 1, -2, -3, 500, 4e6] }],
      { fault: 'form', row: 0 },
    ],
    [
      'a Wagner row without its critical point',
      'vapor_pressure',
      [{ form: 'wagner25', c: [-7, 1, -2, -3] }],
      { fault: 'coefficients', row: 0 },
    ],
    [
      'a critical temperature of zero',
      'vapor_pressure',
      [{ form: 'wagner36', c: [-7, 1, -2, -3, 0, 4e6] }],
      { fault: 'coefficients', row: 0 },
    ],
    [
      'a coefficient that is not a number',
      'liquid_cp',
      [{ form: 'poly5', c: [Number.NaN] }],
      { fault: 'coefficients', row: 0 },
    ],
    ['no coefficients', 'liquid_cp', [{ form: 'powers', c: [] }], { fault: 'coefficients', row: 0 }],
    [
      'a range the wrong way round',
      'liquid_cp',
      [{ form: 'poly5', Tmin: 400, Tmax: 300, c: [80] }],
      { fault: 'range', row: 0 },
    ],
    [
      'a range that starts below zero',
      'liquid_cp',
      [{ form: 'poly5', Tmin: -10, Tmax: 300, c: [80] }],
      { fault: 'range', row: 0 },
    ],
    [
      'two rows for one temperature',
      'liquid_cp',
      [
        { form: 'poly5', Tmin: 300, Tmax: 410, c: [80] },
        { form: 'poly5', Tmin: 400, Tmax: 500, c: [90] },
      ],
      { fault: 'overlap', row: 1 },
    ],
    [
      'two rows without ranges',
      'liquid_cp',
      [
        { form: 'poly5', c: [80] },
        { form: 'poly5', c: [90] },
      ],
      { fault: 'overlap', row: 1 },
    ],
    [
      'a heat capacity that turns negative',
      'ideal_gas_cp',
      [{ form: 'poly5', Tmin: 200, Tmax: 600, c: [50, -0.1] }],
      { fault: 'value', row: 0, T_K: 500 },
    ],
    [
      'a vapour pressure that falls',
      'vapor_pressure',
      [{ form: 'dippr101', Tmin: 300, Tmax: 400, c: [5, 1000] }],
      { fault: 'falling', row: 0, T_K: 300 },
    ],
  ])('%s', (_, of, rows, expected) => {
    expect(corrFault(of, rows)).toEqual(expected);
  });

  test('those of the bank can all be used, joined rows too', async () => {
    for (const c of await loadChemicals(bank.index.map((entry) => entry.id))) {
      for (const [of, rows] of Object.entries(c.corr)) {
        expect(corrFault(of as CorrProperty, rows), `${c.id} ${of}`).toBeUndefined();
      }
    }
  });
});
