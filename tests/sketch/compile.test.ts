import { describe, expect, test } from 'vitest';
import { makeCompile, neededChemicals } from '../../src/sketch/compile';
import {
  deleteStream,
  moveUnits,
  setModel,
  setSetting,
  setSite,
  setTag,
  setUnitName,
} from '../../src/sketch/edits';
import type { Json, Sketch } from '../../src/sketch/types';
import {
  bankOf,
  codes,
  compiled,
  done,
  feedSketch,
  gapsOf,
  letDown,
  opened,
  s,
  settingsOf,
  TEST_KIND,
  twoFlashes,
  u,
  WITH_MILL,
} from './help';

const BAR = 1e5;

describe('the let-down becomes plain SI data', () => {
  test('quantities, composition, ports and defaults', async () => {
    const { problem, basis, gaps } = await compiled(letDown());
    expect(gaps).toEqual([]);
    expect(problem.units.map((x) => x.settings)).toEqual([
      {
        state: { T: 325.15, vapourFraction: 0 },
        // 150 kmol/h = 150000/3600 mol/s
        flow: { is: 'molar', n_mol_s: 150_000 / 3600 },
        composition: {
          is: 'parts',
          basis: 'mole',
          parts: Float64Array.of(0.22, 0.08, 0.09, 0.1, 0.12, 0.21, 0.18),
        },
      },
      { p: { P: 7 * BAR } },
      { p: { drop: 0 } },
      { to: 'process' },
      { to: 'storage' },
    ]);
    expect(problem.units[2]).toMatchObject({ in: { in1: 's2' }, out: { vapour: 's3', liquid: 's4' } });
    expect(basis?.chemicals.map((c) => c.id)).toEqual(letDown().chemicals);
    expect(basis?.model.pairs).toHaveLength(21);
    expect(problem.basis).toBe(basis?.id);
  });

  test('holds no text of the user and survives cloning', async () => {
    const { problem, basis } = await compiled(letDown());
    expect(structuredClone(problem)).toEqual(problem);
    expect(structuredClone(basis)).toEqual(basis);
  });

  test('every default stands in the register with its place', async () => {
    const { assumptions } = await compiled(letDown());
    expect(assumptions).toEqual([
      {
        no: 'A1',
        path: 'model.liquidVolume',
        value: 'corrected',
        unitText: 'corrected',
        reason: 'Not chosen in the sketch.',
      },
      {
        no: 'A2',
        unit: 'u3',
        path: 'p.drop',
        value: 0,
        unitText: '0 bar',
        reason: 'No pressure drop was given.',
      },
    ]);
  });
});

describe('the two flashes', () => {
  test('compile without a gap; the share of the divide is of what enters it', async () => {
    const { problem, gaps, notes, assumptions } = await compiled(twoFlashes());
    expect([gaps, notes]).toEqual([[], []]);
    expect(problem.units[8]?.settings).toEqual({
      shares: { out2: { is: 'share', share: 0.12, of: 'feed', basis: 'mole' } },
    });
    expect(problem.units[4]?.settings).toEqual({ p: { drop: 0.3 * BAR }, T: 348.15 });
    // The heater's limits may look at the cooling water, the adiabatic drums' do not.
    expect(assumptions.map((a) => a.path)).toEqual([
      'model.liquidVolume',
      'site.coolingWater',
      'p.drop',
      'p.drop',
      'p.drop',
    ]);
  });
});

describe('what is missing or does not fit is a gap at its place, and the unit has no settings', () => {
  const withFeed = async (settings: Readonly<Record<string, Json>>): Promise<string[]> => {
    const c = await compiled(feedSketch(settings));
    if (c.gaps.length > 0) expect(settingsOf(c)).toBeNull();
    return gapsOf(c);
  };
  test.each<[string, Readonly<Record<string, Json>>, readonly string[]]>([
    ['no flow', { flow: null }, ['sketch/needs-value at flow']],
    ['blank text', { flow: ' ' }, ['sketch/needs-value at flow']],
    ['one condition', { state: { T: '40 degC' } }, ['sketch/needs-one-of at state']],
    ['no conditions', { state: {} }, ['sketch/needs-one-of at state']],
    [
      'three conditions',
      { state: { T: '40 degC', P: '1 bar', enthalpy: '1 kJ/mol' } },
      ['sketch/too-many at state'],
    ],
    [
      'an unknown condition',
      { state: { T: '40 degC', P: '1 bar', V: 3 } },
      ['sketch/unknown-setting at state.V'],
    ],
    ['an unknown setting', { flows: 3 }, ['sketch/unknown-setting at flows']],
    ['a wrong unit', { state: { T: '40 bar', P: '1 bar' } }, ['sketch/not-a-quantity at state.T']],
    ['a bare number', { state: { T: 40, P: '1 bar' } }, ['sketch/not-a-quantity at state.T']],
    ['a list for a number', { state: { T: [40], P: '1 bar' } }, ['sketch/wrong-type at state.T']],
    ['a volume flow', { flow: '10 m3/h' }, ['sketch/not-a-quantity at flow']],
    [
      'a fraction above one',
      { state: { T: '1 degC', vapourFraction: '110 %' } },
      ['sketch/above-maximum at state.vapourFraction'],
    ],
    ['text for a group', { state: '40 degC' }, ['sketch/wrong-type at state']],
    [
      'several at once',
      { flow: 'x', state: { T: 'y', P: '1 bar' } },
      ['sketch/not-a-quantity at state.T', 'sketch/not-a-quantity at flow'],
    ],
  ])('%s', async (_, settings, gaps) => {
    expect(await withFeed(settings)).toEqual(gaps);
  });

  test('a refused text says what was typed, why, and what would fit', async () => {
    const { gaps } = await compiled(feedSketch({ flow: '10 m3/h' }));
    expect(Object.fromEntries(gaps[0]?.evidence.map((e) => [e.name, e.text]) ?? [])).toMatchObject({
      typed: '10 m3/h',
      why: 'quantity/volume-flow',
      fits: 'kmol/h, kg/h, Nm3/h',
    });
  });

  test('everything else is compiled all the same', async () => {
    const sketch = done(setSetting(letDown(), u('u2'), 'p.P', '')).sketch;
    const c = await compiled(sketch);
    expect(gapsOf(c)).toEqual(['sketch/needs-one-of at p']);
    expect(c.problem.units.map((x) => x.settings === null)).toEqual([false, true, false, false, false]);
  });

  test('open ports are gaps: an inlet without a stream, a stream without a source, a divide without outlets', async () => {
    const sketch = opened({
      format: 'splitwright.sketch',
      version: 1,
      chemicals: ['methane'],
      model: { kind: 'peng-robinson' },
      units: [
        { id: 'u1', tag: 'V-1', kind: 'drum', settings: {} },
        { id: 'u2', tag: 'D-1', kind: 'divide', settings: {} },
      ],
      streams: [{ id: 's1', number: '1', to: ['u2', 'in'] }],
    });
    expect(gapsOf(await compiled(sketch))).toEqual([
      'sketch/needs-inlet at in1',
      'sketch/needs-outlet at out1',
      'sketch/needs-source at in',
    ]);
  });

  test('an outlet without a target is noted and hinders nothing', async () => {
    const c = await compiled(feedSketch({}));
    expect([codes(c.gaps), codes(c.notes)]).toEqual([[], ['sketch/loose-end']]);
  });

  test('a kind that is not in this version', async () => {
    const sketch = opened({
      ...letDown(),
      units: [{ id: 'u1', tag: 'R-1', kind: 'of-tomorrow', settings: { a: 1 } }],
      streams: [],
    });
    const c = await compiled(sketch);
    expect(codes(c.gaps)).toEqual(['sketch/kind-not-available']);
    expect(c.problem.units[0]).toMatchObject({ kind: 'of-tomorrow', settings: null });
  });
});

describe('choices between settings', () => {
  const heater = async (settings: Readonly<Record<string, Json>>) => {
    const sketch = twoFlashes();
    return compiled({
      ...sketch,
      units: sketch.units.map((x) => (x.tag === 'E-101' ? { ...x, settings } : x)),
    });
  };
  test('none, two that exclude each other, and the pair that is allowed', async () => {
    expect(gapsOf(await heater({}))).toEqual(['sketch/needs-one-of at ']);
    expect(gapsOf(await heater({ T: '80 degC', duty: '3 kW' }))).toEqual(['sketch/too-many at ']);
    const both = await heater({ T: '80 degC', vapourFraction: '50 %' });
    expect(gapsOf(both)).toEqual([]);
    // The pressure is the result then: no drop is assumed.
    expect(both.problem.units[4]?.settings).toEqual({ T: 353.15, vapourFraction: 0.5 });
  });
  test('a setting that lost its meaning is refused, not ignored', async () => {
    const c = await heater({ T: '80 degC', vapourFraction: '50 %', p: { drop: '1 bar' } });
    expect(gapsOf(c)).toEqual(['sketch/without-meaning at p']);
  });
  test('a drum takes one or two heat settings, two only together as temperature and vapour fraction', async () => {
    const drum = (h: Json): Promise<string[]> =>
      compiled(done(setSetting(letDown(), u('u3'), 'h', h)).sketch).then(gapsOf);
    expect(await drum({ T: '40 degC' })).toEqual([]);
    expect(await drum({ T: '40 degC', vapourFraction: 0.3 })).toEqual([]);
    expect(await drum({ T: '40 degC', duty: '3 kW' })).toEqual(['sketch/not-together at h']);
    expect(await drum({})).toEqual(['sketch/needs-one-of at h']);
  });
});

describe('gauge pressures count from the site', () => {
  const gauge = (sketch: Sketch): Sketch => done(setSetting(sketch, u('u2'), 'p.P', '6 barg')).sketch;
  test('from the standard atmosphere as an assumption', async () => {
    const c = await compiled(gauge(letDown()));
    expect(c.problem.units[1]?.settings).toEqual({ p: { P: 6 * BAR + 101_325 } });
    expect(c.assumptions.map((a) => a.path)).toContain('site.pressure');
    expect((await compiled(letDown())).assumptions.map((a) => a.path)).not.toContain('site.pressure');
  });
  test('from what the site says, which is then no assumption', async () => {
    const c = await compiled(done(setSite(gauge(letDown()), 'pressure', '0.9 bar')).sketch);
    expect(c.problem.units[1]?.settings).toEqual({ p: { P: 6.9 * BAR } });
    expect(c.problem.site.pressure_Pa).toBe(90_000);
    expect(c.assumptions.map((a) => a.path)).not.toContain('site.pressure');
  });
  test('a site pressure that cannot be read leaves them without a value', async () => {
    const broken = done(setSite(gauge(letDown()), 'pressure', 'high')).sketch;
    expect(gapsOf(await compiled(broken))).toEqual([
      'sketch/not-a-quantity at site.pressure',
      'sketch/needs-site-pressure at p.P',
    ]);
    const circular = done(setSite(letDown(), 'pressure', '0 barg')).sketch;
    expect(gapsOf(await compiled(circular))).toEqual(['sketch/gauge-at-site at site.pressure']);
  });
});

describe('chemicals and model', () => {
  test('a name that the bank does not know leaves no basis, and every unit waits', async () => {
    const sketch = { ...letDown(), chemicals: [...letDown().chemicals, 'unobtainium'] };
    const c = await compiled(sketch);
    expect(gapsOf(c)).toEqual(['sketch/chemical-not-in-bank at chemicals.7']);
    expect([c.basis, c.problem.basis]).toEqual([undefined, '']);
    expect(c.problem.units.every((x) => x.settings === null)).toBe(true);
  });
  test('a mass flow of a chemical without data has a reason too', async () => {
    const c = await compiled(
      feedSketch(
        { flow: null, composition: { flows: { unobtainium: '3 kg/h' } } },
        { chemicals: ['unobtainium'] },
      ),
    );
    expect(codes(c.gaps)).toContain('sketch/chemical-not-in-bank');
  });
  test('a model or a choice that is not in this version leaves no basis', async () => {
    expect(gapsOf(await compiled(done(setModel(letDown(), { kind: 'wilson' })).sketch))).toEqual([
      'sketch/model-not-available at model.kind',
    ]);
    const odd = { ...letDown(), model: { ...letDown().model, alpha: '1977' as never } };
    expect(gapsOf(await compiled(odd))).toEqual(['sketch/unknown-option at model.alpha']);
  });
  test('choices that were not made are assumptions of the models that look at them', async () => {
    const paths = async (kind: string): Promise<string[]> =>
      (await compiled({ ...letDown(), model: { kind } })).assumptions.flatMap((a) =>
        a.path.startsWith('model') ? [a.path] : [],
      );
    expect(await paths('peng-robinson')).toEqual([
      'model.alpha',
      'model.liquidVolume',
      'model.bankPairs',
      'model.pairs',
    ]);
    expect(await paths('raoult')).toEqual([
      'model.liquidH',
      'model.liquidVolume',
      'model.vapour',
      'model.poynting',
    ]);
  });
  test('pairs: given before fitted, switched off, in either order, strangers kept and told', async () => {
    const withPairs = (pairs: readonly Json[], bankPairs = true): Sketch =>
      feedSketch({}, { model: { kind: 'peng-robinson', alpha: '1976', bankPairs, pairs } });
    const kij = (c: Awaited<ReturnType<typeof compiled>>): unknown =>
      c.basis?.model.pairs.map((p) => [p.i, p.j, p.kij, p.origin]);
    expect(kij(await compiled(withPairs([{ i: 'n-decane', j: 'methane', kij: 0.05 }])))).toEqual([
      [0, 1, 0.0133, 'fitted'],
      [0, 2, 0.05, 'given'],
      [1, 2, 0.0078, 'fitted'],
    ]);
    expect(kij(await compiled(withPairs([], false)))).toEqual([
      [0, 1, 0, 'none'],
      [0, 2, 0, 'none'],
      [1, 2, 0, 'none'],
    ]);
    const strange = await compiled(withPairs([{ i: 'methane', j: 'water', kij: 0.5 }]));
    expect([codes(strange.gaps), codes(strange.notes)]).toEqual([
      [],
      ['sketch/pair-unused', 'sketch/loose-end'],
    ]);
    expect(gapsOf(await compiled(withPairs([{ i: 'methane', kij: 0.5 }])))).toEqual([
      'sketch/pair-not-read at model.pairs.0',
    ]);
  });
  test('a pair that is given twice: the last counts, with a caution', async () => {
    const pairs = [
      { i: 'methane', j: 'n-decane', kij: 0.05 },
      { i: 'n-decane', j: 'methane', kij: 0.06 },
    ];
    const c = await compiled(feedSketch({}, { model: { kind: 'peng-robinson', pairs } }));
    expect(codes(c.notes)).toContain('sketch/repeated-pair');
    expect(c.basis?.model.pairs[1]).toMatchObject({ kij: 0.06, origin: 'given' });
  });
  test('a sketch without chemicals says so', async () => {
    const c = await compiled(feedSketch({}, { chemicals: [] }));
    expect(codes(c.gaps)).toContain('sketch/no-chemicals');
    expect(c.basis).toBeUndefined();
  });
});

describe('own chemicals', () => {
  const oil = {
    name: 'Heat oil',
    cas: '8012-95-1',
    formula: 'C20H42',
    MW: 282.55,
    Tc: 768,
    Pc: 1.16e6,
    omega: 0.907,
    Cp: [{ form: 'poly5', c: [100, 1.2], Tmin: 250, Tmax: 900 }],
    groups: { ppr78: { CH3: 2, CH2: 18 } },
  };
  const withOil = (own: object): Sketch =>
    feedSketch(
      { composition: { basis: 'mass', parts: { oil: 1 } } },
      { chemicals: ['methane', { id: 'oil', own }] },
    );

  test('become data with their source; without Hf the enthalpy starts at 0, an assumption', async () => {
    const c = await compiled(withOil(oil));
    expect(c.basis?.chemicals[1]).toMatchObject({
      id: 'oil',
      MW_g_mol: 282.55,
      Tc_K: 768,
      elements: { C: 20, H: 42 },
      ppr78: { CH3: 2, CH2: 18 },
      own: true,
      sources: { Tc_K: 'given in the sketch' },
      corr: { ideal_gas_cp: [{ form: 'poly5', c: [100, 1.2], source: 'given in the sketch' }] },
    });
    expect(c.basis?.chemicals[1]).not.toHaveProperty('Hf_J_mol');
    expect(c.assumptions.find((a) => a.path === 'chemicals.1.Hf')).toMatchObject({ value: 0 });
    expect(
      (await compiled(withOil({ ...oil, Hf: -4e5 }))).assumptions.some((a) => a.path.endsWith('Hf')),
    ).toBe(false);
  });
  test('a constant that the model needs and that is not there is named', async () => {
    const { omega: _, ...rest } = oil;
    const c = await compiled(withOil(rest));
    expect(gapsOf(c)).toEqual(['sketch/chemical-lacks at chemicals.1']);
    expect(c.gaps[0]?.evidence.map((e) => e.text)).toEqual(['oil', 'omega']);
  });
  test('a formula that cannot be read is told, and elements are not claimed', async () => {
    const c = await compiled(withOil({ ...oil, formula: 'Oil20' }));
    expect(codes(c.notes)).toContain('sketch/formula-not-read');
    expect(c.basis?.chemicals[1]).not.toHaveProperty('elements');
  });
});

describe('every form of a setting, by a kind that only this test knows', () => {
  const good: Readonly<Record<string, Json>> = {
    stages: 12,
    ends: { top: 'open' },
    feeds: { feed1: { stage: 3 }, feed2: { stage: 'condenser' } },
    split: { methane: '90 %', 'n-butane': 0.2 },
    fixedBy: [
      { fix: 'ratio', value: 2.4 },
      {
        fix: 'flow',
        product: 'main',
        value: { share: '14 %', of: { stream: 's1' }, basis: 'mass', chemical: 'methane' },
      },
    ],
    warm: '80 degC',
  };
  const mill = (settings: Readonly<Record<string, Json>>): Sketch => {
    const feed = feedSketch({}).units[0];
    return opened(
      {
        ...feedSketch({}),
        units: [
          feed,
          { ...feed, id: 'u2', tag: 'FEED-2' },
          { id: 'u3', tag: 'M-1', kind: 'mill', settings: { ...good, ...settings } },
        ],
        streams: [
          { id: 's1', number: '1', from: ['u1', 'out'], to: ['u3', 'feed1'] },
          { id: 's2', number: '2', from: ['u2', 'out'], to: ['u3', 'feed2'] },
        ],
      },
      WITH_MILL,
    );
  };
  const gapsWith = async (settings: Readonly<Record<string, Json>>): Promise<string[]> =>
    gapsOf(await compiled(mill(settings), WITH_MILL));

  test('compiles, with a read for the share of a stream and an assumption for each default', async () => {
    const c = await compiled(mill({}), WITH_MILL);
    expect(c.gaps).toEqual([]);
    expect(settingsOf(c, 2)).toEqual({
      stages: 12,
      ends: { top: 'open', bottom: true },
      feeds: { feed1: { stage: 3 }, feed2: { stage: 'condenser' } },
      split: [
        { chemical: 0, value: 0.9 },
        { chemical: 1, value: 0.2 },
      ],
      fixedBy: [
        { fix: 'ratio', value: 2.4 },
        {
          fix: 'flow',
          product: 'main',
          value: { is: 'share', share: 0.14, of: { stream: 's1' }, basis: 'mass', chemical: 0 },
        },
      ],
      efficiency: 0.75,
      warm: 353.15,
    });
    expect(c.problem.reads).toEqual([
      { unit: 'u3', path: 'fixedBy.1.value', stream: 's1', of: 'mass', chemical: 0 },
    ]);
    expect(c.assumptions.filter((a) => a.unit === 'u3')).toEqual([
      {
        no: 'A1',
        unit: 'u3',
        path: 'ends.bottom',
        value: 'yes',
        unitText: 'yes',
        reason: 'The foot is usually heated.',
      },
      { no: 'A2', unit: 'u3', path: 'efficiency', value: 0.75, unitText: '75 %', reason: 'A usual figure.' },
    ]);
  });

  test.each<[string, Readonly<Record<string, Json>>, readonly string[]]>([
    ['half a stage', { stages: 1.5 }, ['sketch/wrong-type at stages']],
    ['no stage', { stages: 0 }, ['sketch/below-minimum at stages']],
    ['too many stages', { stages: 51 }, ['sketch/above-maximum at stages']],
    ['an option nobody knows', { ends: { top: 'ajar' } }, ['sketch/unknown-option at ends.top']],
    ['an empty group asks for its parts', { ends: {} }, ['sketch/needs-value at ends.top']],
    ['an absent group asks for its parts', { ends: null }, ['sketch/needs-value at ends.top']],
    ['yes in words', { ends: { top: 'open', bottom: 'yes' } }, ['sketch/wrong-type at ends.bottom']],
    ['a port nobody knows', { feeds: { food1: { stage: 1 } } }, ['sketch/unknown-port at feeds.food1']],
    ['a stage below', { feeds: { feed1: { stage: 0 } } }, ['sketch/wrong-type at feeds.feed1.stage']],
    ['a chemical nobody knows', { split: { gold: 1 } }, ['sketch/unknown-chemical at split.gold']],
    ['an empty list', { fixedBy: [] }, ['sketch/too-few at fixedBy']],
    ['a list too long', { fixedBy: [1, 2, 3] }, ['sketch/too-many at fixedBy']],
    ['an item of nothing', { fixedBy: [null] }, ['sketch/needs-value at fixedBy.0']],
    ['a case nobody knows', { fixedBy: [{ fix: 'luck' }] }, ['sketch/unknown-option at fixedBy.0.fix']],
    [
      'a case by a name of Object',
      { fixedBy: [{ fix: 'toString' }] },
      ['sketch/unknown-option at fixedBy.0.fix'],
    ],
    ['no case', { fixedBy: [{ value: 2 }] }, ['sketch/needs-value at fixedBy.0.fix']],
    [
      'a case with a stranger',
      { fixedBy: [{ fix: 'ratio', value: 2, x: 1 }] },
      ['sketch/unknown-setting at fixedBy.0.x'],
    ],
    [
      'an inlet as product',
      { fixedBy: [{ fix: 'flow', product: 'feed1', value: '1 kg/s' }] },
      ['sketch/unknown-port at fixedBy.0.product'],
    ],
    [
      'a purity of what is not there',
      { fixedBy: [{ fix: 'purity', chemical: 'gold', value: 1 }] },
      ['sketch/unknown-chemical at fixedBy.0.chemical'],
    ],
    [
      'a share without its basis',
      { fixedBy: [{ fix: 'flow', product: 'main', value: { share: 1 } }] },
      ['sketch/needs-value at fixedBy.0.value.of', 'sketch/needs-value at fixedBy.0.value.basis'],
    ],
    [
      'a share of a stream that is not there',
      {
        fixedBy: [{ fix: 'flow', product: 'main', value: { share: 1, of: { stream: 's9' }, basis: 'mole' } }],
      },
      ['sketch/unknown-stream at fixedBy.0.value'],
    ],
    [
      'a bare share where none is allowed',
      { fixedBy: [{ fix: 'flow', product: 'main', value: '14 %' }] },
      ['sketch/not-a-quantity at fixedBy.0.value'],
    ],
    ['both of a choice', { cold: '1 degC' }, ['sketch/too-many at ']],
    ['neither of a choice', { warm: null }, ['sketch/needs-one-of at ']],
  ])('%s', async (_, settings, gaps) => {
    expect(await gapsWith(settings)).toEqual(gaps);
  });

  test('settings of a port without a stream are kept, left out and told', async () => {
    const c = await compiled(mill({ feeds: { feed1: { stage: 3 }, feed3: { stage: 4 } } }), WITH_MILL);
    expect(settingsOf(c, 2)).toMatchObject({ feeds: { feed1: { stage: 3 } } });
    expect(codes(c.notes)).toContain('sketch/setting-of-unused-port');
    expect(TEST_KIND.ports[0]?.numbered?.max).toBe(3);
  });
});

describe('limits that the sketch overrides', () => {
  test('are read in the dimension of their threshold; unknown codes are told', async () => {
    const sketch = { ...letDown(), limits: { 'valve/cools': '36 degF', 'valve/colour': 3 } };
    const c = await compiled(sketch);
    expect(c.problem.limits).toEqual({ 'valve/cools': 20 });
    expect(gapsOf(c)).toEqual(['sketch/unknown-limit at limits.valve/colour']);
  });
  test.each([
    'stream/second-liquid',
    'stream/liquids-together',
    'column/second-liquid',
    'drum/dense',
    'model/pair-predicted',
  ])('a threshold is told for %s, which is found or not', async (code) => {
    const c = await compiled({ ...letDown(), limits: { [code]: 1 } });
    expect(c.problem.limits).toEqual({});
    expect(gapsOf(c)).toEqual([`sketch/unknown-limit at limits.${code}`]);
  });
  test('text that is no quantity is a gap', async () => {
    const c = await compiled({ ...letDown(), limits: { 'valve/cools': 'much' } });
    expect(gapsOf(c)).toEqual(['sketch/not-a-quantity at limits.valve/cools']);
  });
  test('a gauge threshold counts from the site, like every gauge pressure', async () => {
    const vacuum = (sketch: Sketch): Sketch => ({ ...sketch, limits: { 'stream/vacuum': '0.1 barg' } });
    const high = await compiled(vacuum(done(setSite(letDown(), 'pressure', '0.8 bar')).sketch));
    expect(high.problem.limits['stream/vacuum']).toBeCloseTo(0.9 * BAR, 6);
    const standard = await compiled(vacuum(letDown()));
    expect(standard.problem.limits['stream/vacuum']).toBeCloseTo(0.1 * BAR + 101_325, 6);
    expect(standard.assumptions.map((a) => a.path)).toContain('site.pressure');
    const broken = await compiled(vacuum(done(setSite(letDown(), 'pressure', 'high')).sketch));
    expect(gapsOf(broken)).toContain('sketch/needs-site-pressure at limits.stream/vacuum');
  });
});

describe('what did not change keeps its identity', () => {
  test('moving, naming and numbering post nothing', async () => {
    const sketch = letDown();
    const bank = await bankOf(sketch);
    const step = makeCompile();
    const first = step(sketch, bank, 1);
    const moved = done(moveUnits(sketch, new Map([[u('u2'), [0, 0]]]))).sketch;
    const named = done(setUnitName(done(setTag(moved, u('u2'), 'PV-9')).sketch, u('u3'), 'Drum')).sketch;
    const second = step(named, bank, 2);
    expect(second.problem).toBe(first.problem);
    expect(second.problem.edit).toBe(1);
    expect([second.basis, second.gaps, second.notes, second.assumptions]).toEqual([
      first.basis,
      first.gaps,
      first.notes,
      first.assumptions,
    ]);
    expect(second.assumptions).toBe(first.assumptions);
  });

  test('one setting changes one record', async () => {
    const sketch = letDown();
    const bank = await bankOf(sketch);
    const step = makeCompile();
    const first = step(sketch, bank, 1);
    const second = step(done(setSetting(sketch, u('u2'), 'p.P', '8 bar')).sketch, bank, 2);
    expect(second.problem.edit).toBe(2);
    expect(second.basis).toBe(first.basis);
    expect(second.problem.units.map((x, k) => x === first.problem.units[k])).toEqual([
      true,
      false,
      true,
      true,
      true,
    ]);
  });

  test('the same quantity in another unit is a new record of equal content', async () => {
    const sketch = letDown();
    const c = await compiled(done(setSetting(sketch, u('u2'), 'p.P', '700 kPa')).sketch);
    expect(c.problem).toEqual((await compiled(sketch)).problem);
  });

  test('another model or list of chemicals makes another basis; undone it is the old one', async () => {
    const sketch = letDown();
    const bank = await bankOf(sketch);
    const step = makeCompile();
    const first = step(sketch, bank, 1);
    const other = step(done(setModel(sketch, { alpha: '1978' })).sketch, bank, 2);
    expect(other.basis?.id).not.toBe(first.basis?.id);
    expect(step(sketch, bank, 3).basis?.id).toBe(first.basis?.id);
  });

  test('a stream that loses its target changes the units at its ends only', async () => {
    const sketch = letDown();
    const bank = await bankOf(sketch);
    const step = makeCompile();
    const first = step(sketch, bank, 1);
    const second = step(done(deleteStream(sketch, s('s3'))).sketch, bank, 2);
    expect(second.problem.units.map((x, k) => x === first.problem.units[k])).toEqual([
      true,
      true,
      true,
      false,
      true,
    ]);
    expect(gapsOf(second)).toEqual(['sketch/needs-inlet at in']);
  });
});

test('needed chemicals are those of the bank, each once, with what air brings in', () => {
  expect(neededChemicals(letDown())).toEqual(letDown().chemicals);
});
