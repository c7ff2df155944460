import { describe, expect, test } from 'vitest';
import { bank, loadChemicals } from '../../src/data/bank';
import { isCas } from '../../src/engine/chemicals/cas';
import { elementCounts, molarMass_g_mol, sameElements } from '../../src/engine/chemicals/elements';

const all = await loadChemicals(bank.index.map((entry) => entry.id));

describe('CAS numbers', () => {
  // Published: CAS, "Check Digit Verification of CAS Registry Numbers", whose worked example is caffeine.
  test.each(['58-08-2', '107-07-3', '7732-18-5', '74-82-8', '71-43-2'])(
    '%s has a right check digit',
    (cas) => {
      expect(isCas(cas)).toBe(true);
    },
  );
  test.each(['58-08-3', '7732-81-5', '71-43-', '071432', '71-43-2 ', ''])('"%s" is refused', (cas) => {
    expect(isCas(cas)).toBe(false);
  });
  test('every chemical of the bank has a number of its own with a right check digit', () => {
    expect(all.filter((c) => !isCas(c.cas!))).toEqual([]);
    expect(new Set(all.map((c) => c.cas)).size).toBe(all.length);
  });
});

describe('formulas', () => {
  test.each([
    ['C2H6O', { C: 2, H: 6, O: 1 }],
    ['CH3CH2OH', { C: 2, H: 6, O: 1 }],
    ['(CH3)2SO', { C: 2, H: 6, S: 1, O: 1 }],
    ['CH3[CH2]16COOH', { C: 18, H: 36, O: 2 }],
    ['Ca(OH)2', { Ca: 1, O: 2, H: 2 }],
    ['C(CH2(OH))4', { C: 5, H: 12, O: 4 }],
    ['CO', { C: 1, O: 1 }],
    ['HCl', { H: 1, Cl: 1 }],
  ])('%s is counted', (formula, counts) => {
    expect(elementCounts(formula)).toEqual(counts);
  });
  test.each(['', 'Xx2', 'c6h6', 'C2H6)', '(CH3', '(CH3]2', '()2C', '2C', 'C2 H6', 'H2O!', 'CH0', 'C2.5'])(
    '"%s" is no formula',
    (formula) => {
      expect(elementCounts(formula)).toBeUndefined();
    },
  );
  test('are compared by their atoms, not by their letters', () => {
    expect(sameElements({ H: 1, Cl: 1 }, { Cl: 1, H: 1, O: 0 })).toBe(true);
    expect(sameElements({ C: 1, O: 1 }, { C: 1, O: 2 })).toBe(false);
    expect(sameElements({ C: 1 }, { C: 1, H: 4 })).toBe(false);
    expect(sameElements({ C: 1, H: 4 }, { C: 1 })).toBe(false);
  });
  test('every chemical has the atoms of its formula and their molar mass', () => {
    for (const c of all) {
      const counts = elementCounts(c.formula!)!;
      expect(sameElements(counts, c.elements!), c.id).toBe(true);
      expect(Math.abs(molarMass_g_mol(counts)! / c.MW_g_mol - 1), c.id).toBeLessThan(1e-5);
    }
  });
  // Published: CRC Handbook of Chemistry and Physics, 95th ed., physical constants, from memory; two decimals.
  test.each([
    ['water', 18.02],
    ['methane', 16.04],
    ['benzene', 78.11],
    ['sulfur-dioxide', 64.06],
    ['carbon-tetrachloride', 153.82],
    ['r134a', 102.03],
    ['monoethanolamine', 61.08],
    ['dmso', 78.13],
    ['n-eicosane', 282.55],
  ])('%s weighs %d g/mol', (id, MW) => {
    expect(Math.abs(all.find((c) => c.id === id)!.MW_g_mol - MW)).toBeLessThan(0.0101);
  });
});
