import { expect, test } from 'vitest';
import { buildScene } from '../../src/drawing/scene';
import type { Point } from '../../src/drawing/types';
import type { UnitId } from '../../src/engine/ids';
import { LAWS } from './laws';
import { randomSheet, seeded } from './random';
import { inputOf, RECYCLE } from './sheets';

/** A unit is never put onto another one: sheets stand on a coarse grid, and steps are small. */
test.each([3, 11, 23, 35, 47])('a sheet under the hand keeps every law at every step: seed %i', (seed) => {
  const sketch = randomSheet(seed);
  const input = inputOf(sketch, { textScale: seed % 2 ? 1 : 1.25 });
  const next = seeded(seed);
  const moved = new Map<UnitId, Point>();
  let scene = buildScene(sketch, input);
  for (let step = 0; step < 15; step++) {
    const unit = sketch.units[Math.floor(next() * sketch.units.length)]!;
    const [x, y] = unit.at;
    moved.set(unit.id, [x + 8 * Math.floor(next() * 5 - 2), y + 8 * Math.floor(next() * 5 - 2)]);
    const now = { ...input, moved: new Map(moved), underHand: true };
    scene = buildScene(sketch, now, scene);
    const placed = { ...sketch, units: sketch.units.map((u) => ({ ...u, at: moved.get(u.id) ?? u.at })) };
    expect(Object.values(LAWS).flatMap((law) => law(scene, placed))).toEqual([]);
  }
  const { moved: _, ...letGo } = { ...input, moved };
  const placed = { ...sketch, units: sketch.units.map((u) => ({ ...u, at: moved.get(u.id) ?? u.at })) };
  expect(buildScene(placed, letGo, scene)).toEqual(buildScene(placed, letGo));
});

test('what the hand does not touch stays: the same diamonds, tags and labels as before', () => {
  const input = inputOf(RECYCLE);
  const before = buildScene(RECYCLE, input);
  const moved = new Map<UnitId, Point>([['PROD-1' as UnitId, [1016, 96]]]);
  const after = buildScene(RECYCLE, { ...input, moved, underHand: true }, before);
  const labels = after.labels.filter((label, k) => label !== before.labels[k]).map((label) => label.stream);
  expect(labels.filter((stream) => stream !== '7')).toEqual([]);
  const tags = after.units.filter((unit, k) => unit.tagText !== before.units[k]!.tagText).map((u) => u.tag);
  expect(tags).toEqual([]);
});

test('letting go places everything anew, as if nothing had been under the hand', () => {
  const input = inputOf(RECYCLE);
  const moved = new Map<UnitId, Point>([['V-101' as UnitId, [560, 304]]]);
  const held = buildScene(RECYCLE, { ...input, moved, underHand: true }, buildScene(RECYCLE, input));
  expect(buildScene(RECYCLE, { ...input, moved }, held)).toEqual(buildScene(RECYCLE, { ...input, moved }));
});
