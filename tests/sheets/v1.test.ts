import { readdirSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, test } from 'vitest';
import { openSketch } from '../../src/sketch/read';
import { sketchSchema } from '../../src/sketch/schema';
import { writeSketch } from '../../src/sketch/write';
import { lossesOf } from '../robust/loss';
import { compiled, gapsOf, opened } from '../sketch/help';
import { faults } from '../sketch/validator';

const folder = join(import.meta.dirname, 'v1');
const text = (name: string): string => readFileSync(join(folder, name), 'utf8');

const files = readdirSync(folder);
const isOdd = (name: string): boolean => name.startsWith('odd-');

// Files of version 1 as they were written then. They must open for ever: never change one, only add.
describe.each(files)('version 1, %s', (name) => {
  test('opens, and what is saved of it has all that stood in it', () => {
    const result = openSketch(new Uint8Array(readFileSync(join(folder, name))));
    if (!result.ok) throw new Error(JSON.stringify(result.problems));
    const saved = writeSketch(result.sketch);
    expect(lossesOf(text(name), saved, result.notes)).toEqual([]);
    expect(writeSketch(opened(saved))).toBe(saved);
  });
  test('fits the schema', () => {
    expect(faults(sketchSchema(), JSON.parse(text(name)))).toEqual([]);
  });
  test.skipIf(isOdd(name))('compiles without a gap', async () => {
    expect(gapsOf(await compiled(opened(text(name))))).toEqual([]);
  });
});

test('an odd file keeps what this version does not know, and says what it is', () => {
  const result = openSketch(text('odd-unknown.sketch.json'));
  expect(result.ok && result.notes.map((note) => note.code)).toEqual([
    'sketch/kind-not-available',
    'sketch/model-not-available',
    'sketch/stream-without-ends',
  ]);
});

test('an odd file with texts of every kind compiles: its numbers are read as they were typed', async () => {
  const { problem, ...rest } = await compiled(opened(text('odd-texts.sketch.json')));
  expect(gapsOf({ problem, ...rest })).toEqual([]);
  // 1000 lb/h of 78.1118 g/mol and so on; 5 barg over 1.01325 bar; -10 degC.
  expect(problem.units[0]?.settings).toMatchObject({
    state: { T: expect.closeTo(263.15, 9), P: expect.closeTo(601_325, 3) },
  });
});

test('a file with every field of version 1 comes back with all of them, and in the same order', () => {
  const before: unknown = JSON.parse(text('every-field.sketch.json'));
  const after = writeSketch(opened(text('every-field.sketch.json')));
  expect(JSON.stringify(JSON.parse(after))).toBe(JSON.stringify(before));
});

test('what stands in it means what it meant', async () => {
  const { problem, basis, assumptions } = await compiled(opened(text('every-field.sketch.json')));
  expect(problem.site).toEqual({ pressure_Pa: 98_000, ambient_K: 288.15, coolingWater_K: 297.15 });
  expect(problem.limits).toEqual({ 'valve/cools': 25, 'cooling/below-air': 318.15 });
  expect(problem.units.map((x) => x.settings)).toMatchObject([
    // 10 bar above a site pressure of 0.98 bar; 2 t/h of 128.26 g/mol.
    { state: { P: 1_098_000, enthalpy: -150_000 } },
    // 100 Nm3/h as ideal gas at 0 degC, 101325 Pa: n = P V / (R T).
    { flow: { is: 'molar', n_mol_s: expect.closeTo((101_325 * 100) / (8.314462618 * 273.15) / 3600, 12) } },
    { p: { ratio: 0.9 } },
    { p: { drop: 20_000 }, duty: -40_000 },
    { h: { T: 303.15, vapourFraction: 0.6 } },
    { shares: { out2: { is: 'share', share: 0.08, of: { stream: 's1' }, basis: 'mass', chemical: 0 } } },
    { to: 'atmosphere' },
    { T: 353.15 },
    { p: { ratio: 0.5 } },
  ]);
  expect(problem.units[3]).toHaveProperty('materialNoted', true);
  expect(problem.reads).toEqual([{ unit: 'u6', path: 'shares.out2', stream: 's1', of: 'mass', chemical: 0 }]);
  expect(basis?.model).toMatchObject({ alpha: '1978', liquidVolume: 'cubic', poynting: false });
  expect(basis?.chemicals.map((c) => c.id)).toEqual([
    'methane',
    'thinner',
    'n-decane',
    'nitrogen',
    'oxygen',
    'argon',
    'carbon-dioxide',
    'water',
  ]);
  expect(basis?.model.pairs.filter((p) => p.kij !== 0)).toMatchObject([
    { i: 0, j: 1, kij: 0.04, origin: 'given' },
  ]);
  expect(assumptions.map((a) => a.path)).toEqual([
    'chemicals.4',
    'chemicals.5',
    'chemicals.6',
    'chemicals.7',
    'p.drop',
  ]);
});
