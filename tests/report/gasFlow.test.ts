import { describe, expect, test } from 'vitest';
import type { Measures } from '../../src/quantity';
import { writeCsv } from '../../src/report/csv';
import { buildReport } from '../../src/report/model';
import { resultsJson } from '../../src/report/resultsJson';
import { vapourAsGas } from '../../src/report/volumeFlows';
import { writeXlsx } from '../../src/report/xlsx';
import type { MeasureSet } from '../../src/sketch/types';
import { readXlsx } from './readXlsx';
import { solvedExample } from './solved';

/** The let-down with its streams told in some units. */
async function letDown(set: MeasureSet, units: Measures['units'] = {}) {
  const input = await solvedExample('let-down.sketch.json', (sketch) => ({
    ...sketch,
    display: { ...sketch.display, set, units },
  }));
  const stream = input.sketch.streams.find(({ number }) => number === '2')!;
  const result = input.streams.get(stream.id);
  if (result?.state !== 'solved') throw new Error('stream 2 is not solved');
  return { input, stream, result };
}

/** Stream 2, two-phase: the amount of its vapour and the printed row of its gas flow. */
async function gasRow(set: MeasureSet, units: Measures['units'] = {}) {
  const { input, stream, result } = await letDown(set, units);
  const report = buildReport(input);
  const row = report.streams.rows.find(({ key }) => key === 'normal')!;
  const at = report.streams.columns.findIndex(({ key }) => key === stream.id);
  const cell = row.cells[at];
  if (cell?.is !== 'number') throw new Error('no figure');
  return { vapour_mol_s: result.vapourFraction * result.n_mol_s, value: cell.value, row, at, report, input };
}

describe('the gas flow at a reference state is the vapour alone, and its name says the state', () => {
  test('metric: 0 °C and 1.01325 bar in Nm³/h', async () => {
    const { vapour_mol_s, value, row } = await gasRow('metric');
    expect([row.label, row.unit]).toEqual(['Vapour as ideal gas, 0 °C, 1.01325 bar', 'Nm³/h']);
    // CODATA 2018: molar volume of ideal gas at 273.15 K and 101.325 kPa, 22.413969e-3 m3/mol.
    expect(value / (vapour_mol_s * 3600 * 22.413969e-3)).toBeCloseTo(1, 7);
  });

  test('US: standard cubic feet at 60 °F, not normal ones in feet', async () => {
    const { vapour_mol_s, value, row } = await gasRow('US');
    expect([row.label, row.unit]).toEqual(['Vapour as ideal gas, 60 °F, 14.696 psi', 'scf/h']);
    // From memory: 379.48 standard cubic feet in a pound-mole; 453.59237 mol in a pound-mole.
    expect(value / (((vapour_mol_s * 3600) / 453.59237) * 379.48)).toBeCloseTo(1, 4);
  });

  test('a gas volume chosen for molar flows is kept, with the state that it stands for', async () => {
    const { vapour_mol_s, value, row } = await gasRow('metric', { molarFlow: 'Sm3/d' });
    expect([row.label, row.unit]).toEqual(['Vapour as ideal gas, 15 °C, 1.01325 bar', 'Sm³/d']);
    // ISO 13443: 15 °C and 101.325 kPa; 23.6448e-3 m3/mol by R T / P.
    expect(value / (vapour_mol_s * 86400 * 23.6448e-3)).toBeCloseTo(1, 5);
    // Any other unit chosen for molar flows is no gas volume.
    expect((await gasRow('US', { molarFlow: 'mol/s' })).row.unit).toBe('scf/h');
  });

  test('table, CSV, spreadsheet and results file tell one figure', async () => {
    const { value, row, at, report, input } = await gasRow('metric');
    const line = writeCsv(report)
      .split('\r\n')
      .find((text) => text.startsWith(`"${row.label}"`))!;
    expect(Number(line.replace(/^"[^"]*"/, '').split(',')[2 + at])).toBe(value);
    const sheet = readXlsx(await writeXlsx(report)).find(({ name }) => name === 'Stream summary')!;
    const [address] = [...sheet.cells].find(([, cell]) => cell.value === row.label)!;
    expect(sheet.cells.get(`${String.fromCharCode(67 + at)}${address.slice(1)}`)?.value).toBe(value);
    const { streams } = resultsJson(input, 0) as unknown as {
      readonly streams: Readonly<Record<string, { readonly vapourIdealGas_m3_s?: number }>>;
    };
    expect(streams['2']!.vapourIdealGas_m3_s! * 3600).toBeCloseTo(value, 7);
    // A liquid has none.
    const liquid = input.sketch.streams.find((s) => {
      const result = input.streams.get(s.id);
      return result?.state === 'solved' && result.vapourFraction === 0;
    })!;
    expect(streams[liquid.number]).not.toHaveProperty('vapourIdealGas_m3_s');
  });

  test('the state stands in the label of every set', () => {
    for (const set of ['SI', 'metric', 'US'] as const)
      expect(vapourAsGas({ set }).label).toMatch(/^Vapour as ideal gas, \d+ °[CF], [\d.]+ (bar|psi)$/);
  });
});
