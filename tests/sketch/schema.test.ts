import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, test } from 'vitest';
import { KNOWN_KINDS } from '../../src/sketch/registry';
import { schemaText, sketchSchema } from '../../src/sketch/schema';
import type { Json } from '../../src/sketch/types';
import { exampleText, loose, root, WITH_MILL } from './help';
import { faults } from './validator';

const schema = sketchSchema();

test('the published schema is the generated one (npx tsx src/sketch/writeSchema.ts)', () => {
  expect(readFileSync(join(root, 'public/schema/sketch.schema.json'), 'utf8')).toBe(schemaText());
});

test.each(['let-down', 'condensate-flash'])('%s fits the schema', (name) => {
  expect(faults(schema, JSON.parse(exampleText(name)))).toEqual([]);
});

test('the smallest sketch fits the schema', () => {
  const least = {
    format: 'splitwright.sketch',
    version: 1,
    chemicals: [],
    model: { kind: 'raoult' },
    units: [],
    streams: [],
  };
  expect(faults(schema, least)).toEqual([]);
});

test('every kind has its settings in the schema', () => {
  for (const kind of Object.keys(KNOWN_KINDS)) expect(schema.$defs).toHaveProperty([`settings.${kind}`]);
});

describe('what opening or compiling refuses does not fit either', () => {
  const settings = (kind: string, value: Json): unknown => ({
    ...loose(),
    units: [{ id: 'u1', tag: 'X-1', kind, settings: value }],
    streams: [],
  });
  const composition = (value: Json): unknown => settings('feed', { composition: value });
  test.each<[string, unknown]>([
    ['another format', { ...loose(), format: 'x' }],
    ['a newer version', { ...loose(), version: 2 }],
    ['no units', { ...loose(), units: undefined }],
    ['a unit without a tag', { ...loose(), units: [{ id: 'u1', kind: 'feed', settings: {} }] }],
    [
      'a place of three numbers',
      { ...loose(), units: [{ id: 'u', tag: 'T', kind: 'x', settings: {}, at: [1, 2, 3] }] },
    ],
    ['an unknown setting', settings('valve', { q: '1 bar' })],
    ['a bare number for a pressure', settings('valve', { p: { P: 3 } })],
    ['text that is no quantity', settings('valve', { p: { P: 'high' } })],
    ['a comma in a number', settings('valve', { p: { P: '1,000 bar' } })],
    ['two of one group', settings('valve', { p: { P: '3 bar', drop: '1 bar' } })],
    ['two that exclude each other', settings('heater', { T: '3 degC', duty: '1 kW' })],
    [
      'a setting without meaning',
      settings('heater', { T: '3 degC', vapourFraction: 0.5, p: { drop: '1 bar' } }),
    ],
    [
      'a drum with a meaningless pressure',
      settings('drum', { h: { T: '3 degC', vapourFraction: 0.5 }, p: { drop: '1 bar' } }),
    ],
    ['an odd pair of heat settings', settings('drum', { h: { T: '3 degC', duty: '1 kW' } })],
    ['three conditions', settings('feed', { state: { T: '1 K', P: '1 bar', vapourFraction: 1 } })],
    ['a vapour fraction above one', settings('feed', { state: { vapourFraction: 1.2 } })],
    ['an unknown option', settings('product', { to: 'moon' })],
    ['parts and flows together', composition({ parts: { methane: 1 }, flows: { methane: '1 mol/s' } })],
    [
      'a flow beside component flows',
      settings('feed', { flow: '1 mol/s', composition: { flows: { methane: '1 mol/s' } } }),
    ],
    ['an unknown air', composition({ preset: 'sea air' })],
    ['a negative part', composition({ basis: 'mole', parts: { methane: -1 } })],
    ['a share of a share', settings('divide', { shares: { out1: { share: '1 %', of: 'all' } } })],
    ['an own chemical without Cp', { ...loose(), chemicals: [{ id: 'x', own: { name: 'X', MW: 1 } }] }],
    [
      'too few coefficients',
      { ...loose(), chemicals: [{ id: 'x', own: { name: 'X', MW: 1, Cp: [{ form: 'poly5', c: [] }] } }] },
    ],
  ])('%s', (_, value) => {
    expect(faults(schema, value)).not.toEqual([]);
  });
  test('what is allowed side by side fits', () => {
    for (const [kind, value] of [
      ['heater', { T: '3 degC', vapourFraction: 0.5 }],
      ['drum', { h: { T: '3 degC', vapourFraction: '50 %' } }],
      ['valve', {}],
      [
        'divide',
        {
          shares: { out2: '8 %', out3: '3 kg/s', out4: { share: 0.1, of: { stream: 's1' }, basis: 'mole' } },
        },
      ],
      ['of-tomorrow', { anything: [1] }],
      ['feed', { state: { T: '−3 degC' }, composition: { preset: 'humid air', relativeHumidity: '55 %' } }],
    ] as const)
      expect(faults(schema, settings(kind, value as Json))).toEqual([]);
  });
});

describe('a kind that only this test knows', () => {
  const wide = sketchSchema(WITH_MILL);
  const mill = (settings: Json): string[] =>
    faults(wide, {
      ...loose(),
      units: [{ id: 'u1', tag: 'M-1', kind: 'mill', settings }],
      streams: [],
    });
  test('is described in full', () => {
    expect(
      mill({
        stages: 12,
        ends: { top: 'open', bottom: false },
        feeds: { feed1: { stage: 3 }, feed2: { stage: 'condenser' } },
        split: { methane: '90 %' },
        fixedBy: [
          { fix: 'ratio', value: 2.4 },
          { fix: 'flow', product: 'main', value: { share: '14 %', of: 'feed', basis: 'mass' } },
        ],
        warm: '80 degC',
      }),
    ).toEqual([]);
  });
  test.each<[string, Json]>([
    ['half a stage', { stages: 1.5 }],
    ['a case with a stranger', { fixedBy: [{ fix: 'ratio', value: 2, x: 1 }] }],
    ['a case nobody knows', { fixedBy: [{ fix: 'luck' }] }],
    ['three items of two', { fixedBy: [{}, {}, {}] }],
    ['a stage in words', { feeds: { feed1: { stage: 'middle' } } }],
    ['both of a choice', { warm: '1 degC', cold: '1 degC' }],
  ])('%s does not fit', (_, settings) => {
    expect(mill(settings)).not.toEqual([]);
  });
});
