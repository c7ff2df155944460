import { readdirSync, readFileSync } from 'node:fs';
import { describe, expect, test } from 'vitest';
import { buildScene } from '../../src/drawing/scene';
import type { Scene } from '../../src/drawing/types';
import type { Weight } from '../../src/engine/outcome';
import { openSketch } from '../../src/sketch/read';
import type { Sketch } from '../../src/sketch/types';
import { LAWS, LAWS_BETWEEN_STEPS, openLabels } from './laws';
import { randomSheet } from './random';
import { inputOf, SHEETS } from './sheets';

const EXAMPLES = readdirSync('public/examples')
  .filter((file) => file.endsWith('.sketch.json'))
  .map((file): [string, Sketch] => {
    const opened = openSketch(readFileSync(`public/examples/${file}`, 'utf8'));
    if (!opened.ok) throw new Error(`${file} does not open`);
    return [`the example ${file}`, opened.sketch];
  });
const BY_HAND = [...Object.entries(SHEETS), ...EXAMPLES];
const SEEDED = Array.from({ length: 60 }, (_, k): [string, Sketch] => [
  `the sheet of seed ${k + 1}`,
  randomSheet(k + 1),
]);

/** Texts as large as the sheet, smaller on one that is zoomed in, and larger on ever smaller sheets. */
const SCALES = [1, 0.75, 1.25, 1.5, 2] as const;

const sceneOf = (sketch: Sketch, textScale: number): Scene => {
  const limits = Object.fromEntries(sketch.units.map((u): [string, Weight] => [u.tag, 'caution']));
  return buildScene(sketch, inputOf(sketch, { limits, textScale }));
};

describe.each([...BY_HAND, ...SEEDED])('%s', (_name, sketch) => {
  const scenes = SCALES.map((k) => sceneOf(sketch, k));

  test('draws every unit, and every stream with an end', () => {
    expect(scenes[0]!.units.map((u) => u.unit)).toEqual(sketch.units.map((u) => u.id));
    expect(scenes[0]!.lines).toHaveLength(sketch.streams.length);
  });

  test.each(Object.entries(LAWS))('%s', (_law, broken) => {
    for (const scene of scenes) expect(broken(scene, sketch), `text scale ${scene.textScale}`).toEqual([]);
  });

  test('keeps its laws between two steps of the text scale', () => {
    for (const scene of scenes) {
      const between = { ...scene, textScale: scene.textScale - 0.12 };
      const broken = Object.values(LAWS_BETWEEN_STEPS).flatMap((law) => law(between, sketch));
      expect(broken, `text scale ${between.textScale}`).toEqual([]);
    }
  });
});

test('every label of the hand-made sheets finds a place, and most do on the crowded seeded ones', () => {
  const share = (list: readonly (readonly [string, Sketch])[], k: number): number => {
    const scenes = list.map(([, sketch]) => sceneOf(sketch, k));
    const all = scenes.reduce((sum, scene) => sum + scene.labels.length, 0);
    return scenes.reduce((sum, scene) => sum + openLabels(scene).length, 0) / all;
  };
  expect(share(BY_HAND, 1)).toBe(1);
  expect(share(BY_HAND, 1.375)).toBeGreaterThan(0.93);
  expect(share(SEEDED, 1)).toBeGreaterThan(0.86);
});
