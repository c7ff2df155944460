/** Columns from a sketch as typed to streams and results. */
import { describe, expect, test } from 'vitest';
import { makeMemory } from '../../src/engine/network/memory';
import type { ColumnResults } from '../../src/engine/units/column/results';
import type { Sketch } from '../../src/sketch/types';
import { finish, solvedStream, unitResult } from '../network/fixtures';
import { compiled, gapsOf, opened, settingsOf } from '../sketch/help';
import { aromatics, lightTrain, sketchOf } from './sheets';

async function solve(sketch: Sketch) {
  const c = await compiled(sketch);
  expect(gapsOf(c)).toEqual([]);
  const memory = makeMemory(c.basis!);
  return { c, memory, batch: finish(c.problem, memory) };
}

const resultsOf = (batch: Parameters<typeof unitResult>[0], id: string): ColumnResults => {
  const unit = unitResult(batch, id)!;
  if (unit.state !== 'solved') throw new Error(JSON.stringify(unit.reasons));
  return unit.results as unknown as ColumnResults;
};

describe('a whole train from nothing', () => {
  test('light ends off and a benzene cut: both columns solve, closed, with the distillate of stream 1 asked', async () => {
    const { batch } = await solve(opened(aromatics()));
    const feed = solvedStream(batch, 's1');
    expect(solvedStream(batch, 's7').n_mol_s / feed.n_mol_s).toBeCloseTo(0.14, 10);
    expect(solvedStream(batch, 's10').n_mol_s / solvedStream(batch, 's9').n_mol_s).toBeCloseTo(0.45, 10);
    const [first, second] = ['c1', 'c2'].map((id) => resultsOf(batch, id));
    expect(first!.refluxRatio).toBeCloseTo(2.4, 9);
    expect(second!.refluxRatio).toBeCloseTo(2.3, 9);
    expect(second!.condenser!.P_Pa).toBeCloseTo(1.2e5, 6);
    expect(batch.closure!.complete).toBe(true);
    expect(batch.closure!.mass.relative).toBeLessThan(1e-11);
    expect(batch.closure!.energy.relative).toBeLessThan(1e-10);
  });

  test('a light-hydrocarbon train: a purity, two purities, a recovery', async () => {
    const { batch } = await solve(opened(lightTrain()));
    const z = (stream: string, i: number): number => solvedStream(batch, stream).z[i]!;
    expect(z('s4', 1)).toBeCloseTo(0.02, 9);
    expect(z('s6', 3)).toBeCloseTo(0.012, 9);
    expect(z('s7', 2)).toBeCloseTo(0.009, 9);
    const out = solvedStream(batch, 's9');
    const fed = solvedStream(batch, 's8');
    expect((out.n_mol_s * out.z[4]!) / (fed.n_mol_s * fed.z[4]!)).toBeCloseTo(0.988, 9);
    expect(batch.closure!.energy.relative).toBeLessThan(1e-10);
  });

  test('a slide of the share ends where a fresh solve does', async () => {
    const { memory } = await solve(opened(aromatics()));
    for (const share of ['14.2 %', '14.6 %', '15 %', '13 %']) {
      const c = await compiled(opened(aromatics(share)));
      const warm = finish({ ...c.problem, edit: 2, basis: memory.basis.id }, memory);
      const cold = finish(c.problem, makeMemory(c.basis!));
      for (const id of ['s7', 's8', 's10', 's11']) {
        const [a, b] = [solvedStream(warm, id), solvedStream(cold, id)];
        expect(Math.abs(a.T_K - b.T_K)).toBeLessThan(1e-6);
        expect(Math.abs(a.n_mol_s / b.n_mol_s - 1)).toBeLessThan(1e-9);
      }
    }
  });
});

describe('settings of a column as typed', () => {
  const feed = [
    'f',
    'FEED-1',
    'feed',
    {
      state: { T: '90 degC', P: '2 bar' },
      flow: '100 kmol/h',
      composition: { basis: 'mole', parts: { benzene: '50 %', toluene: '50 %' } },
    },
  ] as const;
  const sketch = (
    settings: Readonly<Record<string, unknown>>,
    more: readonly (readonly [string, string])[] = [],
  ) =>
    opened(
      sketchOf(
        ['benzene', 'toluene'],
        [feed, ['c', 'C-1', 'column', settings]],
        [['1', 'f.out', 'c.feed1'], ['2', 'c.bottoms'], ...more],
      ),
    );
  const full = {
    stages: 20,
    top: { distillate: 'liquid' },
    bottom: { reboiler: true },
    feeds: { feed1: { stage: 10 } },
    pressure: { top: '1.1 bar', perStage: '7 mbar' },
    fixedBy: [
      { fix: 'refluxRatio', value: '2.5' },
      { fix: 'purity', product: 'bottoms', chemical: 'benzene', value: '1 %', basis: 'mass' },
    ],
  };

  test('compile to SI; what is assumed is listed', async () => {
    const c = await compiled(sketch(full));
    expect(gapsOf(c)).toEqual([]);
    expect(settingsOf(c, 1)).toEqual({
      ...full,
      pressure: { condenser: 1.1e5, top: 1.1e5, perStage: 700 },
      fixedBy: [
        { fix: 'refluxRatio', value: 2.5 },
        { fix: 'purity', product: 'bottoms', chemical: 0, value: 0.01, basis: 'mass' },
      ],
    });
    const assumed = c.assumptions.find((a) => a.path === 'pressure.condenser');
    expect(assumed).toMatchObject({ unitText: '1.1 bar', reason: expect.stringContaining('top stage') });
  });

  test('the ends’ pressures are assumed only where there are ends', async () => {
    const stripper = {
      ...full,
      top: { distillate: 'none' },
      pressure: { top: '1.1 bar', bottom: '1.3 bar' },
    };
    const c = await compiled(sketch({ ...stripper, fixedBy: [full.fixedBy[1]] }));
    expect(gapsOf(c)).toEqual([]);
    const paths = c.assumptions.map((a) => a.path);
    expect(paths).toContain('pressure.reboiler');
    expect(paths).not.toContain('pressure.condenser');
  });

  test.each([
    ['one of two fixed', { fixedBy: [full.fixedBy[0]] }, ['column/fixed-too-few at fixedBy']],
    ['a feed without a stage', { feeds: {} }, ['column/port-without-stage at feeds.feed1.stage']],
    [
      'two pressure drops',
      { pressure: { top: '1 bar', bottom: '1.2 bar', perStage: '5 mbar' } },
      ['sketch/too-many at pressure'],
    ],
    ['no pressure drop', { pressure: { top: '1 bar' } }, ['sketch/needs-one-of at pressure']],
    [
      'both distillates, which this version does not have',
      { top: { distillate: 'both' } },
      ['sketch/unknown-option at top.distillate'],
    ],
  ] as const)('need a value or are refused by place: %s', async (_, changes, want) => {
    expect(gapsOf(await compiled(sketch({ ...full, ...changes })))).toEqual(want);
  });

  test('too many are no missing value: the solver tells the reason', async () => {
    const three = sketch({ ...full, fixedBy: [...full.fixedBy, { fix: 'boilup', value: 2 }] });
    const { batch } = await solve(three);
    expect(unitResult(batch, 'c')!.reasons!.map((r) => r.code)).toContain('column/fixed-too-many');
  });

  test('a distillate that no stream takes still closes the balance', async () => {
    const { batch } = await solve(sketch(full));
    expect(unitResult(batch, 'c')!.state).toBe('solved');
    expect(batch.closure!.mass.relative).toBeLessThan(1e-11);
  });

  test('an opened sketch has a stream for the distillate that the top has', () => {
    const at = (distillate: string): string[] =>
      sketch({ ...full, top: { distillate } }).streams.flatMap((s) =>
        s.from?.[0] === 'c' ? [s.from[1]] : [],
      );
    expect(at('liquid')).toEqual(['bottoms', 'liquidDistillate']);
    expect(at('vapour')).toEqual(['bottoms', 'vapourDistillate']);
    expect(at('none')).toEqual(['bottoms', 'vapourDistillate']);
  });
});

describe('two gases at the lowest stage, which has an efficiency', () => {
  const ids = ['methane', 'propane', 'n-butane', 'n-decane'];
  const feed = (flow: string, T: string, percent: readonly number[]) => ({
    state: { T, P: '20 bar' },
    flow,
    composition: { basis: 'mole', parts: Object.fromEntries(ids.map((id, i) => [id, `${percent[i]} %`])) },
  });
  const oil = feed('50 kmol/h', '300 K', [0, 0, 0, 100]);
  const lean = feed('80 kmol/h', '320 K', [90, 8, 2, 0]);
  const rich = feed('20 kmol/h', '340 K', [50, 40, 10, 0]);
  const absorber = (stages: Readonly<Record<string, number>>) => ({
    stages: 4,
    top: { distillate: 'none' },
    bottom: { reboiler: false },
    feeds: Object.fromEntries(Object.entries(stages).map(([port, stage]) => [port, { stage }])),
    pressure: { top: '20 bar', perStage: '0 bar' },
    murphree: [{ from: 1, to: 4, value: 0.6 }],
    fixedBy: [],
  });
  type Feed = ReturnType<typeof feed>;
  const apart = (one: Feed, other: Feed): unknown =>
    sketchOf(
      ids,
      [
        ['f1', 'F-1', 'feed', oil],
        ['f2', 'F-2', 'feed', one],
        ['f3', 'F-3', 'feed', other],
        ['c', 'C-1', 'column', absorber({ feed1: 1, feed2: 4, feed3: 4 })],
      ],
      [
        ['1', 'f1.out', 'c.feed1'],
        ['2', 'f2.out', 'c.feed2'],
        ['3', 'f3.out', 'c.feed3'],
        ['4', 'c.vapourDistillate'],
        ['5', 'c.bottoms'],
      ],
    );
  const joined = sketchOf(
    ids,
    [
      ['f1', 'F-1', 'feed', oil],
      ['f2', 'F-2', 'feed', lean],
      ['f3', 'F-3', 'feed', rich],
      ['j', 'J-1', 'join', {}],
      ['c', 'C-1', 'column', absorber({ feed1: 1, feed2: 4 })],
    ],
    [
      ['1', 'f1.out', 'c.feed1'],
      ['2', 'f2.out', 'j.in1'],
      ['3', 'f3.out', 'j.in2'],
      ['6', 'j.out', 'c.feed2'],
      ['4', 'c.vapourDistillate'],
      ['5', 'c.bottoms'],
    ],
  );

  test.each([
    ['as they are', apart(lean, rich)],
    ['the other way round', apart(rich, lean)],
  ])('rise as one, %s', async (_, doc) => {
    const want = solvedStream((await solve(opened(joined))).batch, 's4');
    const got = solvedStream((await solve(opened(doc))).batch, 's4');
    expect(got.n_mol_s / want.n_mol_s).toBeCloseTo(1, 8);
    for (const i of ids.keys()) expect(got.z[i]! / want.z[i]!).toBeCloseTo(1, 6);
  });

  test('a liquid at its bubble point brings no vapour there', async () => {
    const boiling = { ...rich, state: { P: '20 bar', vapourFraction: 0 } } as unknown as Feed;
    const { batch } = await solve(opened(apart(boiling, boiling)));
    expect(unitResult(batch, 'c')!.reasons!.map((r) => r.code)).toEqual(['column/efficiency-needs-vapour']);
  });
});
