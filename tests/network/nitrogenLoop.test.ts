/** The nitrogen loop of the examples, against balances made by hand. */
import { beforeAll, describe, expect, test } from 'vitest';
import { worstOf } from '../../src/engine/network/closure';
import { makeMemory } from '../../src/engine/network/memory';
import type { Basis, Problem, ProblemUnit, SolveBatch } from '../../src/engine/network/types';
import { compiled, exampleText, opened } from '../sketch/help';
import { finish, fresh } from './fixtures';

const KMOL_H = 1e3 / 3600;
let basis: Basis;
let problem: Problem;
let tagOf: Map<string, string>;
let numberOf: Map<string, string>;
let batch: SolveBatch;

beforeAll(async () => {
  const sketch = opened(exampleText('nitrogen-loop'));
  const made = await compiled(sketch);
  if (!made.basis) throw new Error('the example has no basis');
  ({ problem } = made);
  basis = made.basis;
  tagOf = new Map(sketch.units.map((u) => [u.id, u.tag]));
  numberOf = new Map(sketch.streams.map((s) => [s.id, s.number]));
  batch = fresh(problem, basis);
});

const stream = (number: string, from: SolveBatch = batch) => {
  const result = from.streams.find(([id]) => numberOf.get(id) === number)?.[1];
  if (result?.state !== 'solved') throw new Error(`stream ${number} is ${result?.state ?? 'absent'}`);
  return result;
};
const kmol_h = (number: string, i: number, from: SolveBatch = batch): number =>
  (stream(number, from).n_mol_s * stream(number, from).z[i]!) / KMOL_H;
const result = (tag: string, from: SolveBatch = batch) =>
  from.units.find(([id]) => tagOf.get(id) === tag)![1];

/** The example with another purge. */
const purged = (purge: number, edit = 1): Problem => ({
  ...problem,
  edit,
  units: problem.units.map(
    (u): ProblemUnit =>
      u.kind === 'divide'
        ? { ...u, settings: { shares: { out2: { is: 'share', share: purge, of: 'feed', basis: 'mole' } } } }
        : u,
  ),
});

describe('the nitrogen loop', () => {
  test('is solved with every unit closed, in few passes', () => {
    expect(batch.units.every(([, u]) => u.state === 'solved')).toBe(true);
    expect(worstOf(batch.closure!)).toBeLessThan(1e-9);
    expect(batch.closure!.complete).toBe(true);
    expect(result('K-301').loop!.passes).toBeLessThanOrEqual(12);
  });

  test('lets nitrogen and oxygen out by the purge, less what dissolves', () => {
    const gas = (number: string) => kmol_h(number, 0) + kmol_h(number, 1);
    // By hand: 0.8 of air and 4.2 of nitrogen enter per hour.
    expect(gas('11') + gas('7') + gas('10')).toBeCloseTo(5, 7);
    expect(gas('11')).toBeLessThan(5);
    expect(gas('11')).toBeGreaterThan(4.9);
    // By hand: 3 % of the gas leaves, 97 % returns.
    expect(gas('14') / gas('11')).toBeCloseTo(97 / 3, 7);
    expect(kmol_h('11', 2) + kmol_h('7', 2) + kmol_h('10', 2)).toBeCloseTo(26, 7);
    // By hand: vapour pressure of hexane at -15 degC from log10(P / mmHg) = 6.87601 - 1171.17 / (224.41 - 15), from memory: 2.56 kPa.
    const inGas = 0.0256 / 1.04;
    expect(Math.abs(kmol_h('11', 2) / (gas('11') * (inGas / (1 - inGas))) - 1)).toBeLessThan(0.1);
  });

  test('is at the temperatures and pressures that were given', () => {
    for (const [number, T_C, P_bar] of [
      ['5', 12, 1.07],
      ['8', -15, 1.04],
      ['14', 72, 1.13],
    ] as const) {
      expect(stream(number).T_K - 273.15).toBeCloseTo(T_C, 6);
      expect(stream(number).P_Pa / 1e5).toBeCloseTo(P_bar, 9);
    }
    expect(stream('13').P_Pa / 1e5).toBeCloseTo(1.16, 9);
    // Derived: (1.16 / 1.04)^(0.4 / 1.4) - 1 over 0.68 of 258.15 K is 12 K for a diatomic gas; hexane makes it a little less.
    expect(stream('13').T_K - stream('12').T_K).toBeGreaterThan(10);
    expect(stream('13').T_K - stream('12').T_K).toBeLessThan(12.1);
  });

  test.each([
    [0.05, 11],
    [0.01, 15],
    [1e-3, 15],
    [1e-4, 15],
  ])('with a purge of %d needs no more than %i passes', (purge, most) => {
    const other = fresh(purged(purge), basis);
    expect(result('K-301', other).loop!.passes).toBeLessThanOrEqual(most);
    expect(worstOf(other.closure!)).toBeLessThan(1e-9);
  });

  test('follows a purge that is slid, to what a solve from nothing gives', () => {
    const memory = makeMemory(basis);
    finish(purged(0.03), memory);
    for (let k = 1; k <= 8; k++) {
      const purge = 0.03 + 0.002 * k;
      const live = finish(purged(purge, k + 1), memory);
      expect(result('K-301', live).loop!.passes).toBeLessThanOrEqual(7);
      const clean = fresh(purged(purge), basis);
      for (const number of ['11', '14', '7'])
        expect(stream(number, live).n_mol_s / stream(number, clean).n_mol_s).toBeCloseTo(1, 8);
    }
  });

  test('without a purge names nitrogen and oxygen, and the gas after the second drum as the place', () => {
    const shut = fresh(purged(0), basis);
    const found = shut.findings.find((f) => f.code === 'network/no-way-out')!;
    const named = found.evidence.filter((e) => e.name === 'chemical').map((e) => e.text);
    expect(named).toEqual(expect.arrayContaining(['nitrogen', 'oxygen']));
    expect(['9', '12', '13', '14']).toContain(numberOf.get(found.at.stream!));
  });
});
