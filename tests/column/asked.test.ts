/** What is asked of a column: counted, compared and refused before anything is solved. */
import { describe, expect, test } from 'vitest';
import { conflictsOf, countMiss, fixedCount, freeCount } from '../../src/engine/units/column/free';
import type { ColumnSettings, FixedBy } from '../../src/engine/units/column/settings';
import { column } from '../../src/engine/units/column/solve';
import { bankModel } from '../robust/bankModels';
import { callOf, molar, share, streamOf } from './fixtures';

const ends = (distillate: string, reboiler: boolean) => ({ top: { distillate }, bottom: { reboiler } });

describe('the number of free quantities', () => {
  test.each([
    ['liquid', true, 2],
    ['vapour', true, 2],
    ['none', true, 1],
    ['liquid', false, 1],
    ['vapour', false, 1],
    ['none', false, 0],
  ] as const)('distillate %s, reboiler %s: %d', (distillate, reboiler, free) => {
    expect(freeCount(ends(distillate, reboiler))).toBe(free);
  });

  test('is not known while the ends are not chosen', () => {
    expect(freeCount({})).toBeUndefined();
    expect(countMiss({ fixedBy: [] })).toBeUndefined();
    expect(fixedCount({ ...ends('liquid', true), fixedBy: [{ fix: 'refluxRatio' }] })).toEqual({
      fixed: 1,
      free: 2,
    });
  });
});

describe('what contradicts itself is refused', () => {
  const codes = (distillate: string, reboiler: boolean, fixedBy: object[], sides = 0): string[] =>
    conflictsOf({ ...ends(distillate, reboiler), fixedBy }, sides).map((f) => f.code);
  const D = { fix: 'flow', product: 'liquidDistillate' };
  const B = { fix: 'flow', product: 'bottoms' };

  test.each([
    ['both products by flow', [D, B], ['column/both-products-fixed']],
    ['the same twice', [D, D], ['column/fixed-twice']],
    [
      'reflux ratio, reflux and distillate',
      [{ fix: 'refluxRatio' }, { fix: 'reflux' }, D],
      ['column/reflux-three-ways'],
    ],
    [
      'one recovery in both products',
      [
        { fix: 'recovery', product: 'liquidDistillate', chemical: 'benzene' },
        { fix: 'recovery', product: 'bottoms', chemical: 'benzene' },
      ],
      ['column/recovery-both'],
    ],
    [
      'a product it does not have',
      [{ fix: 'flow', product: 'vapourDistillate' }],
      ['column/no-such-product'],
    ],
    ['reflux ratio with a distillate', [{ fix: 'refluxRatio' }, D], []],
    [
      'two purities of two chemicals',
      [
        { fix: 'purity', product: 'liquidDistillate', chemical: 'toluene' },
        { fix: 'purity', product: 'bottoms', chemical: 'benzene' },
      ],
      [],
    ],
  ] as const)('%s', (_, fixedBy, want) => {
    expect(codes('liquid', true, fixedBy as unknown as object[])).toEqual(want);
  });

  test('an end that is not there', () => {
    expect(codes('none', true, [{ fix: 'refluxRatio' }])).toEqual(['column/no-such-end']);
    expect(codes('liquid', false, [{ fix: 'boilup' }])).toEqual(['column/no-such-end']);
    expect(codes('liquid', false, [{ fix: 'temperature', stage: 'reboiler' }])).toEqual([
      'column/no-such-end',
    ]);
    expect(codes('none', true, [{ fix: 'duty', at: 'condenser' }])).toEqual(['column/no-such-end']);
  });

  test('a recovery in both ends is no contradiction beside a side draw', () => {
    const both = ['liquidDistillate', 'bottoms'].map((product) => ({
      fix: 'recovery',
      product,
      chemical: 'benzene',
    }));
    expect(codes('liquid', true, both, 1)).toEqual([]);
  });
});

describe('what balances forbid is refused with the figures', async () => {
  const model = await bankModel(['benzene', 'toluene', 'm-xylene']);
  const feed = streamOf(model, [40, 30, 0], 70, { T_K: 370, P_Pa: 1.4e5 });
  const base: ColumnSettings = {
    stages: 12,
    top: { distillate: 'liquid' },
    bottom: { reboiler: true },
    feeds: { feed1: { stage: 6 } },
    pressure: { top: 1.1e5, bottom: 1.2e5 },
    fixedBy: [],
  };
  const R: FixedBy = { fix: 'refluxRatio', value: 2 };
  const codesOf = (fixedBy: readonly FixedBy[], more: Partial<ColumnSettings> = {}): string[] => {
    const call = callOf(model, { feed1: feed }, { ...base, ...more, fixedBy });
    const outcome = column.solve(call);
    return outcome.state === 'solved' ? [] : outcome.findings.map((f) => f.code);
  };
  const purity = (product: string, chemical: number, value: number): FixedBy => ({
    fix: 'purity',
    product,
    chemical,
    value,
    basis: 'mole',
  });

  test.each([
    [
      'distillate above the feed',
      [R, { fix: 'flow', product: 'liquidDistillate', value: molar(75) }],
      'column/product-above-feed',
    ],
    [
      'all of the feed as distillate',
      [R, { fix: 'flow', product: 'liquidDistillate', value: share(1) }],
      'column/product-above-feed',
    ],
    ['a purity of one', [R, purity('bottoms', 0, 1)], 'column/not-a-share'],
    [
      'a reflux ratio of zero',
      [{ fix: 'refluxRatio', value: 0 }, purity('bottoms', 0, 0.01)],
      'column/not-positive',
    ],
    ['a chemical that is not fed', [R, purity('bottoms', 2, 0.01)], 'column/chemical-absent'],
    [
      'more benzene in the distillate than is fed',
      [{ fix: 'flow', product: 'liquidDistillate', value: molar(50) }, purity('liquidDistillate', 0, 0.95)],
      'column/more-than-fed',
    ],
    [
      'both products richer than the feed',
      [purity('liquidDistillate', 0, 0.9), purity('bottoms', 0, 0.6)],
      'column/purities-apart',
    ],
    [
      'a recovery above the product',
      [
        { fix: 'flow', product: 'liquidDistillate', value: molar(30) },
        { fix: 'recovery', product: 'liquidDistillate', chemical: 0, value: 0.9 },
      ],
      'column/product-above-feed',
    ],
    ['a stage beyond the last', [R, { fix: 'temperature', stage: 13, value: 380 }], 'column/no-such-stage'],
    ['one quantity of two', [R], 'column/fixed-too-few'],
    [
      'three quantities of two',
      [R, purity('bottoms', 0, 0.01), { fix: 'boilup', value: 2 }],
      'column/fixed-too-many',
    ],
  ] as const)('%s', (_, fixedBy, code) => {
    const found = codesOf(fixedBy as unknown as FixedBy[]);
    expect(found).toContain(code);
  });

  test('a feed stage beyond the last, a draw without a stream, a feed without a stage', () => {
    const fixed = [R, purity('bottoms', 0, 0.01)];
    expect(codesOf(fixed, { feeds: { feed1: { stage: 13 } } })).toContain('column/no-such-stage');
    expect(codesOf(fixed, { feeds: {} })).toContain('column/port-without-stage');
    const call = callOf(
      model,
      { feed1: feed },
      { ...base, fixedBy: fixed, sides: { side1: { stage: 3, phase: 'liquid', flow: molar(1) } } },
      { outPorts: ['liquidDistillate', 'bottoms'] },
    );
    const outcome = column.solve(call);
    expect(outcome.state === 'solved' ? [] : outcome.findings.map((f) => f.code)).toContain(
      'column/side-without-stream',
    );
  });

  test('nothing fed', () => {
    const nothing = streamOf(model, [40, 30, 0], 0, { T_K: 370, P_Pa: 1.4e5 });
    const outcome = column.solve(
      callOf(model, { feed1: nothing }, { ...base, fixedBy: [R, purity('bottoms', 0, 0.01)] }),
    );
    expect(outcome.state === 'solved' ? '' : outcome.findings[0].code).toBe('column/no-feed');
  });

  test('out of reach: a purity that no reflux gives with so few stages', () => {
    const found = column.solve(
      callOf(
        model,
        { feed1: feed },
        {
          ...base,
          stages: 6,
          feeds: { feed1: { stage: 2 } },
          fixedBy: [purity('liquidDistillate', 1, 0.02), purity('bottoms', 0, 0.02)],
        },
      ),
    );
    expect(found.state).toBe('no-solution');
    const reason = found.findings[0]!;
    expect(reason.code).toBe('column/out-of-reach');
    expect(reason.at.path).toMatch(/^fixedBy\.[01]$/);
    const figure = (name: string): number => reason.evidence.find((e) => e.name === name)!.value;
    expect(figure('asked')).toBe(0.02);
    expect(figure('reached')).toBeGreaterThan(0.02);
    expect(reason.evidence.filter((e) => e.name === 'tried').length).toBeGreaterThan(1);
  });

  test('more vapour fed than reflux and distillate carry', () => {
    const vapour = streamOf(model, [40, 30, 0], 70, { P_Pa: 1.4e5, vapourFraction: 1 });
    const found = column.solve(
      callOf(
        model,
        { feed1: vapour },
        {
          ...base,
          fixedBy: [
            { fix: 'refluxRatio', value: 0.5 },
            { fix: 'flow', product: 'liquidDistillate', value: molar(15) },
          ],
        },
      ),
    );
    expect(found.state).toBe('no-solution');
    expect(found.findings[0]!.code).toBe('column/feed-vapour-above-top');
  });

  test('both duties are solved with a note that this is ill-posed, or told to be out of reach', () => {
    const plain = column.solve(
      callOf(
        model,
        { feed1: feed },
        { ...base, fixedBy: [R, { fix: 'flow', product: 'liquidDistillate', value: molar(38) }] },
      ),
    );
    if (plain.state !== 'solved') throw new Error('no plain column');
    const { condenserDuty_W, reboilerDuty_W } = plain.value.results;
    const both = column.solve(
      callOf(
        model,
        { feed1: feed },
        {
          ...base,
          fixedBy: [
            { fix: 'duty', at: 'condenser', value: condenserDuty_W! },
            { fix: 'duty', at: 'reboiler', value: reboilerDuty_W! },
          ],
        },
      ),
    );
    expect(both.state).toBe('solved');
    expect(both.findings.map((f) => f.code)).toContain('column/both-duties');
  });
});
