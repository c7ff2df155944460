import { describe, expect, test } from 'vitest';
import { bridgesOf, drawPath } from '../../src/drawing/path';
import { buildScene } from '../../src/drawing/scene';
import { portOfShape } from '../../src/drawing/transform';
import type { Point, Scene } from '../../src/drawing/types';
import { linesUnderHand } from '../../src/drawing/underHand';
import type { UnitId } from '../../src/engine/ids';
import type { Sketch } from '../../src/sketch/types';
import {
  diamondsStandFree,
  labelsCoverNothing,
  leadersMeetNothing,
  linesMeetPorts,
  noLineCrossesASymbol,
  onlyRightAngles,
  symbolsStandApart,
} from './laws';
import { randomSheet, seeded } from './random';
import { inputOf, RECYCLE, sheetOf } from './sheets';

/** The sheet at 100 % with the units left there. */
function letGo(sketch: Sketch, moved: ReadonlyMap<UnitId, Point>): Scene {
  const units = sketch.units.map((unit) => ({ ...unit, at: moved.get(unit.id) ?? unit.at }));
  const there = { ...sketch, units };
  return buildScene(there, inputOf(there));
}

const shiftedScene = (scene: Scene, moved: ReadonlyMap<UnitId, Point>, sketch: Sketch): Scene => {
  const there = new Map(letGo(sketch, moved).units.map((u) => [u.unit, u]));
  return {
    ...scene,
    units: scene.units.map((shape) => {
      const at = moved.get(shape.unit);
      if (!at) return shape;
      const by: Point = [at[0] - shape.at[0], at[1] - shape.at[1]];
      const to = ([x, y]: Point): Point => [x + by[0], y + by[1]];
      const text = <T extends { readonly at: Point }>(one: T): T => ({ ...one, at: to(one.at) });
      return {
        ...shape,
        at,
        box: there.get(shape.unit)!.box,
        hold: to(shape.hold),
        ...(shape.tagText ? { tagText: text(shape.tagText) } : {}),
        ...(shape.limit ? { limit: text(shape.limit) } : {}),
        texts: shape.texts.map(text),
        remarks: shape.remarks.map(text),
        links: shape.links.map((link) => (link.text ? { ...link, text: text(link.text) } : link)),
      };
    }),
  };
};

/** The sheet as it is seen while a hand holds units elsewhere: they with all that is written beside them, and what follows. */
function seen(scene: Scene, sketch: Sketch, moved: ReadonlyMap<UnitId, Point>): Scene {
  const over = linesUnderHand(scene, sketch.streams, moved, new Set());
  const shifted = shiftedScene(scene, moved, sketch);
  return {
    ...shifted,
    lines: scene.lines.map((line) => over.lines.get(line.stream) ?? line),
    labels: scene.labels.map((label) => over.labels.get(label.stream) ?? label),
  };
}

/** Each line's path with all its bridges, made anew. */
function pathsOf(scene: Scene, sketch: Sketch): readonly string[] {
  const units = new Map(scene.units.map((u) => [u.unit, u]));
  const bridges = bridgesOf(scene.lines.map((line) => line.points));
  return scene.lines.map(({ stream, points }, k) => {
    const { from, to } = sketch.streams.find((s) => s.id === stream)!;
    const reach = [from, to].map((end) => (end && portOfShape(units.get(end[0])!, end[1])?.reach) ?? 0);
    return drawPath(points, bridges.get(k), [reach[0]!, reach[1]!]).d;
  });
}

const LAWS = {
  linesMeetPorts,
  onlyRightAngles,
  labelsCoverNothing,
  diamondsStandFree,
  leadersMeetNothing,
};

describe.each([1, 1.375])('while a hand holds units, at text scale %d', (textScale) => {
  test.each(Array.from({ length: 20 }, (_, k) => 3 * k + 1))(
    'nothing that is drawn overlaps, and bridges are where lines cross: seed %i',
    (seed) => {
      const sketch = randomSheet(seed);
      const scene = buildScene(sketch, inputOf(sketch, { textScale }));
      const next = seeded(seed);
      let steps = 0;
      for (let k = 0; k < 12; k++) {
        const held = sketch.units.filter(() => next() < 1.5 / sketch.units.length);
        const by: Point = [8 * Math.round(next() * 30 - 15), 8 * Math.round(next() * 30 - 15)];
        const moved = new Map(held.map((u): [UnitId, Point] => [u.id, [u.at[0] + by[0], u.at[1] + by[1]]]));
        const now = seen(scene, sketch, moved);
        // On top of another unit no line can be right.
        if (symbolsStandApart(now, sketch).length > 0) continue;
        steps += 1;
        for (const [name, law] of Object.entries(LAWS))
          expect(law(now, sketch), `${name}, step ${k}`).toEqual([]);
        // Where symbols leave no way at all there is none when the hand has let go either. Flags grow only then.
        const wayless = new Set(noLineCrossesASymbol(letGo(sketch, moved), sketch));
        const over = noLineCrossesASymbol({ ...now, textScale: 1 }, sketch).filter(
          (one) => !wayless.has(one),
        );
        expect(over, `step ${k}`).toEqual([]);
        expect(now.lines.map((line) => line.d)).toEqual(pathsOf(now, sketch));
      }
      expect(steps).toBeGreaterThan(3);
    },
  );
});

test('a unit that is held where it stands changes nothing', () => {
  const scene = buildScene(RECYCLE, inputOf(RECYCLE));
  const all = new Map(RECYCLE.units.map((unit) => [unit.id, unit.at] as const));
  const { lines, labels } = linesUnderHand(scene, RECYCLE.streams, all, new Set());
  expect([...lines]).toEqual([]);
  expect([...labels]).toEqual(scene.labels.map((label) => [label.stream, label]));
});

test('a line that the hand puts a unit upon is led round it, and comes back', () => {
  const sketch = sheetOf(
    [
      ['feed', 'FEED-1', 0, 0],
      ['product', 'PROD-1', 600, 0],
      ['drum', 'V-101', 300, 300],
    ],
    [['1', 'FEED-1.out', 'PROD-1.in']],
  );
  const scene = buildScene(sketch, inputOf(sketch));
  const over = new Map([['V-101' as UnitId, [300, 0] as const]]);
  const now = seen(scene, sketch, over);
  expect(now.lines[0]!.points.length).toBeGreaterThan(2);
  expect(noLineCrossesASymbol(now, sketch)).toEqual([]);
  const away = new Map([['V-101' as UnitId, [300, 200] as const]]);
  expect(seen(scene, sketch, away).lines[0]).toBe(scene.lines[0]);
});
