import { describe, expect, test } from 'vitest';
import { neededChemicals } from '../../src/sketch/compile';
import type { Json } from '../../src/sketch/types';
import { codes, compiled, feedSketch, gapsOf, settingsOf } from './help';

const withParts = (parts: Json, basis: Json = 'mole') =>
  compiled(feedSketch({ composition: { basis, parts } }));
const partsOf = (settings: unknown): number[] => [
  ...(settings as { composition: { parts: Float64Array } }).composition.parts,
];

describe('parts', () => {
  test('per cent, ppm and plain numbers may stand side by side; who is not named is absent', async () => {
    const c = await withParts({ methane: '99.98 %', 'n-decane': '200 ppm' });
    expect(gapsOf(c)).toEqual([]);
    expect(partsOf(settingsOf(c))).toEqual([0.9998, 0, 0.0002]);
  });
  test('a sum within 0.05 % is brought to 1, with a note that tells the sum', async () => {
    const c = await withParts({ methane: 0.3, 'n-butane': 0.4, 'n-decane': 0.3004 });
    expect(codes(c.notes)).toContain('sketch/parts-normalised');
    expect(c.notes[0]?.evidence[0]?.value).toBeCloseTo(1.0004, 12);
    expect(partsOf(settingsOf(c)).reduce((a, b) => a + b)).toBeCloseTo(1, 15);
  });
  test('a sum that is 1 but for rounding is not worth a note', async () => {
    const c = await withParts({ methane: 0.1, 'n-butane': 0.2, 'n-decane': 0.7 });
    expect(codes(c.notes)).toEqual(['sketch/loose-end']);
  });
  test.each([
    [1.0005, []],
    [0.9995, []],
    [1.0006, ['sketch/parts-sum-near at composition.parts']],
    [1.02, ['sketch/parts-sum-near at composition.parts']],
    [0.98, ['sketch/parts-sum-near at composition.parts']],
    [1.021, ['sketch/parts-sum at composition.parts']],
    [0.5, ['sketch/parts-sum at composition.parts']],
    [100, ['sketch/parts-sum at composition.parts']],
    [0, ['sketch/parts-sum at composition.parts']],
  ])('a sum of %f: normalised within 0.05 %%, asked about within 2 %%, refused beyond', async (sum, gaps) => {
    expect(gapsOf(await withParts({ methane: sum }))).toEqual(gaps);
  });
  test.each<[string, Json, Json, string]>([
    [
      'a negative part',
      { methane: -0.1, 'n-butane': 1.1 },
      'mole',
      'sketch/negative-part at composition.parts.methane',
    ],
    ['a stranger', { gold: 1 }, 'mole', 'sketch/unknown-chemical at composition.parts.gold'],
    [
      'a name of Object',
      { constructor: 1 },
      'mole',
      'sketch/unknown-chemical at composition.parts.constructor',
    ],
    [
      'a unit that is no share',
      { methane: '1 kg/h' },
      'mole',
      'sketch/not-a-quantity at composition.parts.methane',
    ],
    ['no parts', {}, 'mole', 'sketch/needs-value at composition.parts'],
    ['parts in a list', [1], 'mole', 'sketch/wrong-type at composition.parts'],
    ['no basis', { methane: 1 }, null, 'sketch/needs-value at composition.basis'],
    ['a basis nobody knows', { methane: 1 }, 'volume', 'sketch/unknown-option at composition.basis'],
  ])('%s', async (_, parts, basis, gap) => {
    expect(gapsOf(await withParts(parts, basis))).toEqual([gap]);
  });
});

describe('component flows', () => {
  test('molar and mass flows become mol/s, and there is no flow beside them', async () => {
    const flows = { methane: '36 kmol/h', 'n-decane': '142.286 kg/h' };
    const c = await compiled(feedSketch({ flow: null, composition: { flows } }));
    expect(gapsOf(c)).toEqual([]);
    const { composition } = settingsOf(c) as { composition: { is: string; n_mol_s: Float64Array } };
    expect(composition.is).toBe('flows');
    // n-decane: C10H22, 10 * 12.011 + 22 * 1.008 = 142.286 g/mol, so 1 kmol/h.
    expect([...composition.n_mol_s]).toEqual([10, 0, expect.closeTo(1000 / 3600, 12)]);
  });
  test('a flow beside them is refused, as is a negative one', async () => {
    expect(gapsOf(await compiled(feedSketch({ composition: { flows: { methane: '1 kmol/h' } } })))).toEqual([
      'sketch/without-meaning at flow',
    ]);
    expect(
      gapsOf(await compiled(feedSketch({ flow: null, composition: { flows: { methane: '-1 kmol/h' } } }))),
    ).toEqual(['sketch/below-minimum at composition.flows.methane']);
  });
  test('forms are not mixed', async () => {
    const mixed = { basis: 'mole', parts: { methane: 1 }, preset: 'dry air' };
    expect(gapsOf(await compiled(feedSketch({ composition: mixed })))).toEqual([
      'sketch/not-together at composition.preset',
    ]);
    expect(gapsOf(await compiled(feedSketch({ composition: { of: 1 } })))).toEqual([
      'sketch/unknown-setting at composition.of',
    ]);
  });
});

describe('ready-made air', () => {
  const air = (composition: Json, chemicals: readonly Json[]) => feedSketch({ composition }, { chemicals });
  const placed = (c: Awaited<ReturnType<typeof compiled>>): unknown =>
    (settingsOf(c) as { composition: { at: unknown } }).composition.at;

  test('brings in what the list lacks, at its end, as an assumption', async () => {
    const sketch = air({ preset: 'dry air' }, ['methane', 'carbon-dioxide', 'oxygen']);
    expect(neededChemicals(sketch)).toEqual(['methane', 'carbon-dioxide', 'oxygen', 'nitrogen', 'argon']);
    const c = await compiled(sketch);
    expect(gapsOf(c)).toEqual([]);
    expect(placed(c)).toMatchObject({ N2: 3, O2: 2, Ar: 4, CO2: 1, H2O: -1 });
    expect(c.basis?.chemicals.map((x) => x.assumed ?? false)).toEqual([false, false, false, true, true]);
    expect(c.assumptions.map((a) => [a.path, a.value])).toEqual([
      ['chemicals.3', 'nitrogen'],
      ['chemicals.4', 'argon'],
    ]);
    expect(c.basis?.model.pairs).toHaveLength(10);
  });
  test('the two-gas kind needs two, the humid kind water and its humidity', async () => {
    expect(neededChemicals(air({ preset: '79/21' }, []))).toEqual(['nitrogen', 'oxygen']);
    const humid = { preset: 'humid air', relativeHumidity: '55 %' };
    const c = await compiled(air(humid, ['water']));
    expect(placed(c)).toMatchObject({ N2: 1, O2: 2, Ar: 3, CO2: 4, H2O: 0 });
    expect(settingsOf(c)).toMatchObject({ composition: { relativeHumidity: 0.55 } });
    expect(gapsOf(await compiled(air({ preset: 'humid air' }, [])))).toEqual([
      'sketch/needs-value at composition.relativeHumidity',
    ]);
    expect(gapsOf(await compiled(air({ preset: 'dry air', relativeHumidity: 0.5 }, [])))).toEqual([
      'sketch/without-meaning at composition.relativeHumidity',
    ]);
    expect(gapsOf(await compiled(air({ preset: 'sea air' }, ['methane'])))).toEqual([
      'sketch/unknown-option at composition.preset',
    ]);
  });
  test('an own chemical serves by its CAS number, else by its formula in any spelling', async () => {
    const gas = { name: 'Gas', MW: 28, Tc: 126, Pc: 3.4e6, omega: 0.04, Cp: [{ form: 'poly5', c: [29] }] };
    const own = (id: string, more: object): Json => ({ id, own: { ...gas, ...more } }) as Json;
    const c = await compiled(
      air({ preset: 'dry air' }, [
        own('mine', { cas: '7727-37-9' }),
        own('coal-gas', { formula: 'O2C', Hf: 0 }),
        own('other', { formula: 'CO2', cas: '1-1-1' }),
        'oxygen',
        'argon',
      ]),
    );
    expect(placed(c)).toMatchObject({ N2: 0, O2: 3, Ar: 4, CO2: 1, H2O: -1 });
    expect(gapsOf(c)).toEqual([]);
  });
  test('an own chemical that took the name of an air gas and is something else is told', async () => {
    const tar = {
      name: 'Tar',
      cas: '1-1-1',
      MW: 300,
      Tc: 900,
      Pc: 1e6,
      omega: 1,
      Cp: [{ form: 'poly5', c: [300] }],
    };
    const c = await compiled(air({ preset: '79/21' }, [{ id: 'nitrogen', own: tar } as Json, 'oxygen']));
    expect(gapsOf(c)).toEqual(['sketch/unknown-chemical at composition.preset']);
  });
});
