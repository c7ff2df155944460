import { describe, expect, test } from 'vitest';
import { bank, loadChemicals, loadPairTables } from '../../src/data/bank';
import { predictedKij } from '../../src/engine/thermo/pairs/ppr78';
import { resolvePairs } from '../../src/engine/thermo/pairs/resolve';

const tables = await loadPairTables();
const all = await loadChemicals(bank.index.map((entry) => entry.id));
const resolve = async (
  ids: readonly string[],
  pairs: readonly { i: string; j: string; kij: number }[] = [],
  bankPairs = true,
) => bank.pairsFor(await loadChemicals(ids), { bankPairs, pairs });

describe('every pair gets one parameter and says where it is from', () => {
  test('given comes before fitted, fitted before predicted, and the rest is none', async () => {
    const pairs = await resolve(
      ['methane', 'ethane', 'propane', 'n-undecane', 'ethanol'],
      [{ i: 'propane', j: 'methane', kij: 0.5 }],
    );
    expect(pairs.map(({ i, j, origin }) => [i, j, origin])).toEqual([
      [0, 1, 'fitted'],
      [0, 2, 'given'],
      [0, 3, 'predicted'],
      [0, 4, 'none'],
      [1, 2, 'fitted'],
      [1, 3, 'predicted'],
      [1, 4, 'none'],
      [2, 3, 'predicted'],
      [2, 4, 'none'],
      [3, 4, 'none'],
    ]);
    expect(pairs[0]).toMatchObject({ kij: -0.0026 });
    expect(pairs[0]!.source).toContain('Knapp');
    expect(pairs[1]).toMatchObject({ kij: 0.5, source: 'given in the sketch' });
    expect(pairs[2]!.source).toContain('298.15 K');
    expect(pairs[3]!.kij).toBe(0);
    expect(pairs.every((p) => p.source !== '')).toBe(true);
  });

  test('without the pairs of the bank only what was given counts', async () => {
    const pairs = await resolve(
      ['methane', 'ethane', 'n-undecane'],
      [{ i: 'ethane', j: 'n-undecane', kij: 0 }],
      false,
    );
    expect(pairs.map((p) => [p.kij, p.origin])).toEqual([
      [0, 'none'],
      [0, 'none'],
      [0, 'given'],
    ]);
  });

  test('the order of the chemicals does not matter', async () => {
    const [there] = await resolve(['carbon-dioxide', 'n-dodecane']);
    const [back] = await resolve(['n-dodecane', 'carbon-dioxide']);
    expect(back!.kij).toBeCloseTo(there!.kij, 12);
  });

  // The fitted constant in the source, -0.0056, stands against its neighbours of 0.013 to 0.026.
  test('methane and isopentane take the predicted value, 0.024', async () => {
    const [pair] = await resolve(['methane', 'isopentane']);
    expect(pair!.origin).toBe('predicted');
    expect(pair!.kij).toBeCloseTo(0.0244, 2);
  });

  test('the predicted value is that of 298.15 K', async () => {
    const [a, b] = await loadChemicals(['hydrogen', 'methane']);
    const [pair] = await resolve(['hydrogen', 'methane']);
    expect(pair!.kij).toBe(predictedKij(a!, b!, tables.groups, 298.15));
    expect(pair!.kij).not.toBeCloseTo(predictedKij(a!, b!, tables.groups, 250)!, 3);
  });

  test('a chemical of the sketch itself uses its own groups, and a fitted constant by its CAS number', async () => {
    const [methane, hexane] = await loadChemicals(['methane', 'n-hexane']);
    const { cas: _, ...bare } = hexane!;
    const own = { ...bare, id: 'mine', own: true };
    const choice = { bankPairs: true, pairs: [] };
    const [byGroups] = resolvePairs([methane!, own], choice, tables);
    expect(byGroups).toMatchObject({ origin: 'predicted' });
    const [byCas] = resolvePairs([methane!, { ...own, cas: '110-54-3' }], choice, tables);
    expect(byCas).toMatchObject({ origin: 'fitted', kij: 0.0422 });
    const { ppr78: __, ...unknown } = own;
    expect(resolvePairs([methane!, unknown], choice, tables)[0]).toMatchObject({ kij: 0, origin: 'none' });
  });
});

describe('the tables of pairs', () => {
  test('hold 92 fitted constants in use, none twice, and 355 group interactions', () => {
    expect(tables.fitted.size).toBe(92);
    expect([...tables.fitted.values()].reduce((sum, row) => sum + row.kij, 0)).toBeCloseTo(3.4727, 10);
    expect(tables.groups.size).toBe(355);
  });

  test('a row that is not to be used counts as missing', () => {
    const has = (a: string, b: string) => tables.groups.has(a < b ? `${a}|${b}` : `${b}|${a}`);
    expect(has('C', 'CF2')).toBe(false);
    expect(has('CH', 'CHCcycloalkenic')).toBe(false);
    expect(has('CH3', 'CH2')).toBe(true);
  });

  test('every group of every chemical is known, and the atoms of its groups make up its formula', async () => {
    const { groups } = (await import('../../src/data/bank/ppr78.json')).default;
    const atoms = new Map(groups.map((g) => [g.group, g.atoms]));
    let checked = 0;
    for (const c of all.filter((x) => x.ppr78)) {
      const sum: Record<string, number> = {};
      const parts = Object.entries(c.ppr78!);
      for (const [group] of parts) expect(atoms.has(group), `${c.id}: ${group}`).toBe(true);
      // Groups that stand for two kinds of atom list none.
      if (parts.some(([group]) => atoms.get(group) === '')) continue;
      for (const [group, count] of parts) {
        for (const part of atoms.get(group)!.split(' ')) {
          const [, symbol, number] = /^([A-Z][a-z]?)(\d+)$/.exec(part)!;
          sum[symbol!] = (sum[symbol!] ?? 0) + count * Number(number);
        }
      }
      expect(sum, c.id).toEqual(c.elements);
      checked += 1;
    }
    expect(checked).toBeGreaterThan(60);
  });

  test('109 chemicals have groups, and 4607 of their 5886 pairs a predicted value', () => {
    const grouped = all.filter((c) => c.ppr78);
    let known = 0;
    grouped.forEach((a, i) => {
      for (const b of grouped.slice(i + 1)) if (predictedKij(a, b, tables.groups) !== undefined) known += 1;
    });
    expect([grouped.length, known]).toEqual([109, 4607]);
  });

  test('every predicted value is below 2, so that the attraction of any binary mixture stays positive', () => {
    const grouped = all.filter((c) => c.ppr78);
    const values = grouped.flatMap((a, i) =>
      grouped.slice(i + 1).flatMap((b) => predictedKij(a, b, tables.groups) ?? []),
    );
    expect(Math.max(...values)).toBeLessThan(2);
    expect(Math.min(...values)).toBeGreaterThan(-1.1);
  });
});
