import { describe, expect, test } from 'vitest';
import { buildReport } from '../../src/report/model';
import type { MeasureSet } from '../../src/sketch/types';
import { solvedExample } from './solved';

/** Stream 2 of the let-down, two-phase: the amount of its vapour and the printed row of its gas flow. */
async function gasRow(set: MeasureSet) {
  const input = await solvedExample('let-down.sketch.json');
  const stream = input.sketch.streams.find(({ number }) => number === '2')!;
  const result = input.streams.get(stream.id);
  if (result?.state !== 'solved') throw new Error('stream 2 is not solved');
  const table = buildReport({
    ...input,
    sketch: { ...input.sketch, display: { ...input.sketch.display, set } },
  }).streams;
  const row = table.rows.find(({ key }) => key === 'normal')!;
  const at = table.columns.findIndex(({ key }) => key === stream.id);
  const cell = row.cells[at];
  if (cell?.is !== 'number') throw new Error('no figure');
  return {
    vapour_mol_s: result.vapourFraction * result.n_mol_s,
    value: cell.value,
    unit: row.unit,
    notes: table.notes.join(' '),
  };
}

describe('the gas flow at a reference state says which one, and counts the vapour alone', () => {
  test('metric: 0 °C and 1 atm, as its unit says', async () => {
    const { vapour_mol_s, value, unit, notes } = await gasRow('metric');
    expect(unit).toBe('Nm³/h');
    // CODATA 2018: molar volume of ideal gas at 273.15 K and 101.325 kPa, 22.413969e-3 m3/mol.
    expect(value / (vapour_mol_s * 3600 * 22.413969e-3)).toBeCloseTo(1, 7);
    expect(notes).toContain('the vapour alone, as ideal gas at 0 °C and 101.325 kPa(a)');
  });

  test('US: standard cubic feet at 60 °F, not normal ones in feet', async () => {
    const { vapour_mol_s, value, unit, notes } = await gasRow('US');
    expect(unit).toBe('scf/h');
    // From memory: 379.48 standard cubic feet in a pound-mole; 453.59237 mol in a pound-mole.
    expect(value / (((vapour_mol_s * 3600) / 453.59237) * 379.48)).toBeCloseTo(1, 4);
    expect(notes).toContain('60 °F and 14.696 psi(a)');
  });
});
