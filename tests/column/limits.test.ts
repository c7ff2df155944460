/** What is said of a solved column, and of a column that cannot be; scenarios and figures are made up. */
import { describe, expect, test } from 'vitest';
import type { Finding } from '../../src/engine/outcome';
import { preparePure } from '../../src/engine/thermo/pure/pure';
import type { Model } from '../../src/engine/thermo/types';
import type { ColumnSettings, FixedBy } from '../../src/engine/units/column/settings';
import { column } from '../../src/engine/units/column/solve';
import { bankModel } from '../robust/bankModels';
import { callOf, molar, SITE, share, solveCall, streamOf } from './fixtures';

type Inlets = Parameters<typeof callOf>[1];

/** What solving and the limits say together, or why there is no answer. */
function said(
  model: Model,
  inlets: Inlets,
  settings: ColumnSettings,
  limits: Readonly<Record<string, number>> = {},
) {
  const call = callOf(model, inlets, settings, { limits });
  const outcome = column.solve(call);
  if (outcome.state !== 'solved')
    return { codes: outcome.findings.map((f) => f.code), found: outcome.findings, answer: undefined };
  const found: readonly Finding[] = [...outcome.findings, ...column.limits(call, outcome.value, SITE)];
  return { codes: found.map((f) => f.code), found, answer: outcome.value };
}
const evidenceOf = (found: readonly Finding[], code: string, name: string) =>
  found.find((f) => f.code === code)!.evidence.find((e) => e.name === name)!;

const paraffins = await bankModel(['propane', 'n-butane', 'n-hexane']);
const R2: FixedBy = { fix: 'refluxRatio', value: 2 };
const D40: FixedBy = { fix: 'flow', product: 'liquidDistillate', value: share(0.4) };
const plain: ColumnSettings = {
  stages: 14,
  top: { distillate: 'liquid' },
  bottom: { reboiler: true },
  feeds: { feed1: { stage: 7 } },
  pressure: { condenser: 13.8e5, top: 14e5, bottom: 14.3e5 },
  fixedBy: [R2, D40],
};
const boiling = streamOf(paraffins, [40, 35, 25], 50, { P_Pa: 15e5, vapourFraction: 0 });
const of = (more: Partial<ColumnSettings>, limits?: Readonly<Record<string, number>>, feed = boiling) =>
  said(paraffins, { feed1: feed }, { ...plain, ...more }, limits);

test('an ordinary column is told nothing of its stages, its pressures or its ends', () => {
  expect(of({}).codes.filter((c) => /^(column|pressure)\//.test(c))).toEqual([]);
});

test('a column above the critical point of what is fed says so among its reasons', () => {
  // 60 bar lies above the critical pressure of propane, the highest of the three: 42.5 bar; mixtures of them reach about 50.
  const hot = streamOf(paraffins, [40, 35, 25], 50, { T_K: 430, P_Pa: 61e5 });
  const { codes, found } = of({ pressure: { top: 60e5, bottom: 60e5 } }, {}, hot);
  expect(codes[0]).toBe('column/one-phase');
  expect(evidenceOf(found, 'column/one-phase', 'place').text).toBe('stage 7');
  // An ordinary column that cannot be has another reason.
  const dry = of({ fixedBy: [{ fix: 'refluxRatio', value: 1e-4 }, D40] });
  expect(dry.answer).toBeUndefined();
  expect(dry.codes).not.toContain('column/one-phase');
});

test('an absorber whose feeds make one phase together says so', async () => {
  const model = await bankModel(['n-butane', 'n-pentane', 'n-decane']);
  const settings: ColumnSettings = {
    stages: 10,
    top: { distillate: 'none' },
    bottom: { reboiler: false },
    feeds: { feed1: { stage: 1 }, feed2: { stage: 10 } },
    pressure: { top: 30e5, bottom: 30e5 },
  };
  // Butane boils at about 3 bar here: at 31 bar it is no gas.
  const oil = streamOf(model, [0, 0, 1], 60, { T_K: 300, P_Pa: 31e5 });
  const liquid = streamOf(model, [9, 1, 0], 100, { T_K: 310, P_Pa: 31e5 });
  const { answer, codes, found } = said(model, { feed1: oil, feed2: liquid }, settings);
  expect(answer).toBeUndefined();
  expect(codes[0]).toBe('column/feeds-one-phase');
  expect(evidenceOf(found, 'column/feeds-one-phase', 'phase').text).toBe('liquid');
});

describe('water in a column', async () => {
  const model = await bankModel(['n-pentane', 'n-hexane', 'n-heptane', 'water']);
  const settings: ColumnSettings = {
    stages: 20,
    top: { distillate: 'vapour' },
    bottom: { reboiler: true },
    feeds: { feed1: { stage: 10 } },
    pressure: { condenser: 1.5e5, top: 1.6e5, bottom: 1.9e5 },
    fixedBy: [R2, { fix: 'flow', product: 'vapourDistillate', value: share(0.3) }],
  };
  const wet = (water: number) =>
    streamOf(model, [45, 30, 25, water], 100 + water, { T_K: 343.15, P_Pa: 3e5 });
  const water = preparePure(model.chemicals[3]!);

  test.each([
    [0.5, false],
    [4, true],
  ])('%d in 100 part off in the condenser: %s, as its vapour pressure has it', (amount, parts) => {
    const { answer, found, codes } = said(model, { feed1: wet(amount) }, settings);
    const top = answer!.out.vapourDistillate!;
    // Derived: beyond its own vapour pressure water condenses by itself, since hydrocarbons dissolve next to none of it.
    const y = top.n_mol_s[3]! / top.n_mol_s.reduce((a, b) => a + b, 0);
    const saturation = (y * top.P_Pa) / water.psat!(top.T_K)!;
    expect(saturation > 1).toBe(parts);
    expect(Math.abs(Math.log(saturation))).toBeGreaterThan(0.2);
    expect(codes.includes('column/second-liquid')).toBe(parts);
    if (!parts) return;
    expect(evidenceOf(found, 'column/second-liquid', 'place').text).toBe('the condenser');
    expect(evidenceOf(found, 'column/second-liquid', 'chemical').text).toBe('water');
  });

  test('that a liquid distillate cannot hold is named among the reasons why there is no answer', () => {
    const { codes, found, answer } = said(
      model,
      { feed1: streamOf(model, [45, 30, 25, 0.1], 100, { T_K: 343.15, P_Pa: 3e5 }) },
      {
        ...settings,
        top: { distillate: 'liquid' },
        fixedBy: [R2, { fix: 'flow', product: 'liquidDistillate', value: share(0.45) }],
      },
    );
    expect(answer).toBeUndefined();
    expect(codes[0]).toBe('column/feed-in-two-liquids');
    expect(evidenceOf(found, 'column/feed-in-two-liquids', 'chemical').text).toBe('water');
  });
});

test('liquid and vapour of nearly one density are looked for in the reboiler too, where they are nearest', () => {
  const { found, answer } = of({}, { 'column/near-critical': 40 });
  const { stages, reboiler } = answer!.results;
  expect(reboiler!.densityRatio).toBeLessThan(Math.min(...stages.densityRatio));
  expect(evidenceOf(found, 'column/near-critical', 'densityRatio').value).toBe(reboiler!.densityRatio);
  expect(evidenceOf(found, 'column/near-critical', 'place').text).toBe('the reboiler');
});

test.each([
  ['condenser above the top stage', { condenser: 14.5e5, top: 14e5, bottom: 14.3e5 }, 0.5e5],
  ['bottom below the top', { top: 14e5, bottom: 13.4e5 }, 0.6e5],
  ['reboiler below the bottom stage', { top: 14e5, bottom: 14.3e5, reboiler: 14.1e5 }, 0.2e5],
])('vapour does not rise uphill without a word: %s', (_, pressure, fall) => {
  const { found } = of({ pressure });
  const code = 'column/pressure-falls-downwards';
  const figure = (name: string): number => evidenceOf(found, code, name).value;
  expect(figure('upperPressure') - figure('lowerPressure')).toBeCloseTo(fall, 6);
  expect(found.find((f) => f.code === code)!.weight).toBe('beyond-limit');
});

test('an overhead vapour that an efficiency leaves below its dew point says by how much', () => {
  const settings: ColumnSettings = {
    stages: 10,
    top: { distillate: 'none' },
    bottom: { reboiler: true },
    feeds: { feed1: { stage: 1 } },
    pressure: { top: 14e5, bottom: 14.3e5 },
    fixedBy: [{ fix: 'purity', product: 'bottoms', chemical: 0, value: 0.01, basis: 'mole' }],
  };
  const code = 'column/vapour-below-dew-point';
  const { codes } = said(paraffins, { feed1: boiling }, settings);
  expect(codes).not.toContain(code);
  const { found, answer } = said(
    paraffins,
    { feed1: boiling },
    { ...settings, murphree: [{ from: 1, to: 10, value: 0.5 }] },
  );
  const top = answer!.out.vapourDistillate!;
  // The stream is flashed anew, at its pressure and enthalpy: two phases, warmer than the stage.
  const total = top.n_mol_s.reduce((a, b) => a + b, 0);
  const flashed = streamOf(paraffins, [...top.n_mol_s], total, { P_Pa: top.P_Pa, H_W: top.H_W });
  expect(flashed.vapourFraction).toBeLessThan(0.999);
  expect(flashed.T_K).toBeGreaterThan(top.T_K);
  const below = evidenceOf(found, code, 'below').value;
  expect(below).toBeGreaterThan(flashed.T_K - top.T_K);
  expect(below).toBeLessThan(20);
});

describe('stages that do little or hardly work', () => {
  test('are named as a pinch, from where to where', () => {
    const { found, answer } = of({ stages: 60, feeds: { feed1: { stage: 30 } }, fixedBy: [R2, D40] });
    const [from, to] = ['from', 'to'].map((name) => evidenceOf(found, 'column/pinch', name).value);
    const T = answer!.results.stages.T_K.slice(from! - 1, to!);
    expect(T.length).toBeGreaterThan(5);
    expect(Math.max(...T) - Math.min(...T)).toBeLessThanOrEqual(0.1);
  });

  test('are named when next to no liquid runs over them', async () => {
    const model = await bankModel(['methane', 'n-butane', 'n-decane']);
    const gas = streamOf(model, [95, 5, 0], 100, { T_K: 305, P_Pa: 20.5e5 });
    const oil = (n: number) => streamOf(model, [0, 0, 1], n, { T_K: 300, P_Pa: 20.5e5 });
    const settings: ColumnSettings = {
      stages: 4,
      top: { distillate: 'none' },
      bottom: { reboiler: false },
      feeds: { feed1: { stage: 1 }, feed2: { stage: 4 } },
      pressure: { top: 20e5, bottom: 20.1e5 },
    };
    const { found } = said(model, { feed1: oil(0.5), feed2: gas }, settings);
    expect(evidenceOf(found, 'column/stage-dries', 'share').value).toBeLessThan(0.01);
    expect(evidenceOf(found, 'column/stage-dries', 'phase').text).toBe('liquid');
    expect(said(model, { feed1: oil(20), feed2: gas }, settings).codes).not.toContain('column/stage-dries');
  });
});

test('a feed far colder than its stage, or below its pressure, is named with both figures', () => {
  const cold = streamOf(paraffins, [40, 35, 25], 50, { T_K: 290, P_Pa: 13e5 });
  const { found, answer } = of({}, {}, cold);
  expect(evidenceOf(found, 'column/feed-off-stage', 'feedTemperature').value).toBe(290);
  expect(evidenceOf(found, 'column/feed-off-stage', 'stageTemperature').value).toBe(
    answer!.results.stages.T_K[6],
  );
  expect(evidenceOf(found, 'pressure/enters-below', 'unitPressure').value).toBeCloseTo(
    14e5 + 6 * (0.3e5 / 13),
    3,
  );
});

describe('settings of an end that the column does not have', () => {
  const idle = ({ found }: ReturnType<typeof said>) =>
    found.filter((f) => f.code === 'column/setting-idle').map((f) => f.at.path);
  const V: FixedBy = { fix: 'flow', product: 'vapourDistillate', value: share(0.4) };

  test('are named and change nothing', () => {
    const vapour: Partial<ColumnSettings> = { top: { distillate: 'vapour' }, fixedBy: [R2, V] };
    const [with_, without] = [of({ ...vapour, subcooling: 10 }), of(vapour)];
    expect(idle(with_)).toEqual(['subcooling']);
    expect(idle(without)).toEqual([]);
    expect(with_.answer!.results.condenserDuty_W).toBe(without.answer!.results.condenserDuty_W);
  });

  test('are quiet where the end is there', () => {
    expect(idle(of({ subcooling: 10 }))).toEqual([]);
  });
});

describe('a duty the wrong way round', () => {
  const duty = (at: 'condenser' | 'reboiler', value: number): FixedBy => ({ fix: 'duty', at, value });

  test.each([
    ['condenser', 5e5, 'added'],
    ['reboiler', -5e5, 'removed'],
  ] as const)('is refused before solving: %s', (at, value, sense) => {
    const { codes, found } = of({ fixedBy: [R2, duty(at, value)] });
    expect(codes).toEqual(['column/duty-wrong-way']);
    expect(found[0]!.at.path).toBe('fixedBy.1');
    expect(evidenceOf(found, codes[0]!, 'sense').text).toBe(sense);
    expect(evidenceOf(found, codes[0]!, 'asked').value).toBe(5e5);
  });

  test('the right way round it is solved', () => {
    const { results } = solveCall(callOf(paraffins, { feed1: boiling }, plain));
    const { answer } = of({ fixedBy: [R2, duty('condenser', results.condenserDuty_W!)] });
    expect(answer!.out.liquidDistillate!.n_mol_s.reduce((a, b) => a + b, 0)).toBeCloseTo(20, 6);
  });
});

test('a distillate of all that is fed is refused by the balance, however its share is rounded', () => {
  for (const value of [share(1), molar(50), molar(49.99999999999999)])
    expect(of({ fixedBy: [R2, { fix: 'flow', product: 'liquidDistillate', value }] }).codes).toEqual([
      'column/product-above-feed',
    ]);
});

describe('what fixes nothing is refused, since any column would meet it', () => {
  test('the flow of a side draw, which is given with the draw', () => {
    const sides = { side1: { stage: 4, phase: 'liquid', flow: molar(5) } } as const;
    const twice = of({ sides, fixedBy: [R2, { fix: 'flow', product: 'side1', value: molar(5) }] });
    expect(twice.codes).toEqual(['column/draw-flow-given']);
    expect(twice.found[0]!.at.path).toBe('fixedBy.1');
    expect(of({ sides, fixedBy: [R2, D40] }).answer).toBeDefined();
  });

  test('a temperature or a purity where one chemical is fed, a second purity of a product where two are', () => {
    const fed = (parts: number[]) => streamOf(paraffins, parts, 50, { P_Pa: 15e5, vapourFraction: 0 });
    const purity = (chemical: number, value: number): FixedBy => ({
      fix: 'purity',
      product: 'liquidDistillate',
      chemical,
      value,
      basis: 'mole',
    });
    const codes = (parts: number[], fixedBy: readonly FixedBy[]) => of({ fixedBy }, {}, fed(parts)).codes;
    expect(codes([0, 1, 0], [R2, { fix: 'temperature', stage: 'condenser', value: 380 }])).toEqual([
      'column/follows-already',
    ]);
    expect(codes([0, 1, 1], [purity(1, 0.9), purity(2, 0.1)])).toEqual(['column/follows-already']);
    expect(codes([1, 1, 1], [purity(0, 0.6), purity(2, 0.02)])).not.toContain('column/follows-already');
    expect(of({ fixedBy: [R2, D40] }, {}, fed([0, 1, 0])).answer).toBeDefined();
  });
});
