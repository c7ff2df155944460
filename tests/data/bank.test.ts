import { readdirSync, statSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, test } from 'vitest';
import { bank, loadChemicals, loadIndex } from '../../src/data/bank';
import leftOut from '../../src/data/bank/left-out.json';
import pairs from '../../src/data/bank/pairs-pr.json';
import ppr78 from '../../src/data/bank/ppr78.json';
import { chemicalFaults, rowFaults } from '../../src/data/checks';
import { readCsv } from '../../src/data/csv';
import { chunkOf } from '../../src/data/families';
import type { ChemicalData, CorrProperty } from '../../src/engine/chemicals/types';

const all = await loadChemicals(bank.index.map((entry) => entry.id));
const sources = await bank.sources();

describe('the loader', () => {
  test('hands out the index at once and chemicals in the order asked for', async () => {
    expect(loadIndex()).toBe(bank.index);
    const ids = ['n-decane', 'water', 'acetone', 'benzene', 'methane', 'chloroform'];
    expect((await loadChemicals(ids)).map((c) => c.id)).toEqual(ids);
  });

  test('an unknown id is absent from the map, and an error where it is demanded', async () => {
    expect([...(await bank.chemicals(['nothing', 'water'])).keys()]).toEqual(['water']);
    await expect(loadChemicals(['nothing'])).rejects.toThrow('nothing');
  });

  test('index and data say the same, and every chemical lies in the file of its family', async () => {
    all.forEach((c, k) => {
      const { id, name, formula, cas, family, MW_g_mol } = c;
      expect(bank.index[k]).toEqual({ id, name, formula, cas, family, MW_g_mol });
    });
    expect(new Set(all.map((c) => chunkOf(c.family!))).size).toBe(5);
  });

  test('the index is small, and no file of the bank is large', () => {
    const folder = join(import.meta.dirname, '../../src/data/bank');
    expect(statSync(join(folder, 'index.json')).size).toBeLessThan(32_000);
    for (const name of readdirSync(folder)) expect(statSync(join(folder, name)).size).toBeLessThan(200_000);
  });
});

// Snapshot: number of values and their sum, so that an edit of the tables shows.
describe('the tables', () => {
  test.each([
    ['MW_g_mol', 235, 21156.0845],
    ['Tb_K', 235, 84564.2138],
    ['Tc_K', 235, 127066.4429],
    ['Pc_Pa', 235, 1034128375.1],
    ['omega', 235, 79.0776],
    ['Hf_J_mol', 235, -40267493.9],
    ['S0_J_molK', 232, 81278.241],
    ['zRA', 235, 61.1853],
  ] as const)('%s: %d values with the sum %d', (field, count, sum) => {
    const values = all.flatMap((c) => c[field] ?? []);
    expect(values.length).toBe(count);
    expect(values.reduce((a, b) => a + b, 0) / sum).toBeCloseTo(1, 5);
  });

  test('hold 2359 correlation rows, 93 tabulated pairs, 40 groups and 358 interactions', () => {
    const rows: Record<string, number> = {};
    for (const c of all)
      for (const [of, list] of Object.entries(c.corr)) rows[of] = (rows[of] ?? 0) + list.length;
    expect(rows).toEqual({
      ideal_gas_cp: 383,
      vapor_pressure: 235,
      enthalpy_of_vaporization: 235,
      liquid_density: 235,
      liquid_cp: 239,
      liquid_viscosity: 213,
      gas_viscosity: 207,
      liquid_conductivity: 207,
      gas_conductivity: 207,
      surface_tension: 198,
    });
    expect([pairs.length, ppr78.groups.length, ppr78.interactions.length]).toEqual([93, 40, 358]);
    expect(ppr78.interactions.reduce((sum, row) => sum + row.A_MPa, 0)).toBeCloseTo(92163.099, 6);
    expect(ppr78.interactions.reduce((sum, row) => sum + row.B_MPa, 0)).toBeCloseTo(173058.239, 6);
  });

  test('only sulfolane was left out: it has neither an ideal-gas heat capacity nor a formation enthalpy', () => {
    expect(leftOut.map((entry) => entry.id)).toEqual(['sulfolane']);
  });
});

describe('every chemical', () => {
  test('has data that agree with each other', () => {
    for (const c of all) expect(chemicalFaults(c), c.id).toEqual([]);
  });

  test('has usable correlation rows', () => {
    for (const c of all) {
      for (const [of, rows] of Object.entries(c.corr)) {
        for (const row of rows) expect(rowFaults(of as CorrProperty, row), `${c.id} ${of}`).toEqual([]);
      }
    }
  });

  test('has a source on every value, and every source tag has its citation', () => {
    const used = new Set<string>(pairs.map((p) => p.source));
    for (const c of all) {
      const {
        id,
        name,
        formula,
        cas,
        family,
        elements,
        corr,
        ppr78: _,
        sources: own,
        MW_g_mol,
        zRA,
        zRASource,
        ...rest
      } = c;
      expect(Object.keys(own).sort(), id).toEqual(Object.keys(rest).sort());
      expect(zRASource).toMatch(/^one density at \d+\.\d\d K \(/);
      for (const tag of Object.values(own)) used.add(tag);
      for (const rows of Object.values(corr)) for (const row of rows) used.add(row.source!);
    }
    expect([...used].sort()).toEqual(Object.keys(sources).sort());
    for (const text of Object.values(sources)) expect(text.length).toBeGreaterThan(5);
  });

  test('survives a structured clone', () => {
    expect(structuredClone(all)).toEqual(all);
  });
});

describe('the checks themselves', () => {
  const water = all.find((c) => c.id === 'water') as ChemicalData;
  const with_ = (change: Partial<ChemicalData>): string[] => chemicalFaults({ ...water, ...change });
  test.each<[string, Partial<ChemicalData>]>([
    ['CAS number', { cas: '7732-18-4' }],
    ['formula', { elements: { H: 2, O: 2 } }],
    ['molar mass', { MW_g_mol: 18.1 }],
    ['vapour pressure at the boiling point', { Tb_K: 374 }],
    ['vapour pressure at the critical point', { Tc_K: 655 }],
    ['acentric factor', { omega: 0.4 }],
    ['critical compressibility', { Vc_m3_mol: 1e-4 }],
    ['no ideal-gas heat capacity', { corr: { ...water.corr, ideal_gas_cp: [] } }],
  ])('find a wrong value: %s', (reason, change) => {
    expect(with_(change)).toContain(reason);
  });
  test('find a heat of vaporisation that does not follow from the slope, and a row that turns negative', () => {
    const rows = water.corr.enthalpy_of_vaporization!.map((r) => ({
      ...r,
      c: r.c.map((a, k) => (k < 5 ? 1.05 * a : a)),
    }));
    expect(with_({ corr: { ...water.corr, enthalpy_of_vaporization: rows } })).toContain(
      'heat of vaporisation against slope',
    );
    expect(rowFaults('liquid_cp', { form: 'poly5', Tmin: 300, Tmax: 400, c: [70, -0.2] })[0]).toContain(
      '350',
    );
  });
});

test('a table with commas and quotes inside its fields is read, and a short line refused', () => {
  expect(readCsv('a,b\n"x, ""y""",2\n')).toEqual([{ a: 'x, "y"', b: '2' }]);
  expect(() => readCsv('a,b\n1\n')).toThrow('line 2');
});
