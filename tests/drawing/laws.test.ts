import { describe, expect, test } from 'vitest';
import { boxAround, boxOfPiece, grown, overlaps } from '../../src/drawing/boxes';
import { diamondPath } from '../../src/drawing/diamonds';
import { measureText } from '../../src/drawing/metrics';
import { buildScene } from '../../src/drawing/scene';
import { portOnSheet, toSheet } from '../../src/drawing/transform';
import type { Box, LineShape, Point, Scene, TextShape, UnitShape } from '../../src/drawing/types';
import type { Weight } from '../../src/engine/outcome';
import type { Sketch } from '../../src/sketch/types';
import { randomSheet } from './random';
import { inputOf, SHEETS } from './sheets';

/** Laws every sheet obeys: hand-made ones, and 60 made from seeds. */
const CASES: readonly (readonly [string, Sketch])[] = [
  ...Object.entries(SHEETS),
  ...Array.from({ length: 60 }, (_, k): [string, Sketch] => [
    `the sheet of seed ${k + 1}`,
    randomSheet(k + 1),
  ]),
];

const pieces = (points: readonly Point[]): readonly (readonly [Point, Point])[] =>
  points.slice(1).map((p, k): [Point, Point] => [points[k]!, p]);

const endAt = (unit: UnitShape, port: string): Point => portOnSheet(unit, unit.symbol.ports(port)!).at;

/** The drawn symbol and its heat link: nothing else may lie on them. */
function obstaclesOf(scene: Scene): readonly (readonly [UnitShape, Box])[] {
  return scene.units.flatMap((unit): (readonly [UnitShape, Box])[] => {
    const { link } = unit.symbol;
    const own = [unit, unit.box] as const;
    if (!link) return [own];
    return [own, [unit, boxOfPiece(toSheet(unit, link.from), toSheet(unit, link.to), 3)]];
  });
}

function boxOfText({ at: [x, y], text, size, weight, anchor }: TextShape): Box {
  const w = measureText(text, size, weight);
  const left = anchor === 'start' ? x : anchor === 'end' ? x - w : x - w / 2;
  return { x: left, y: y - size * 0.75, w, h: size * 0.95 };
}

/** Tag with the room of its state, limit mark, duty and a name that stands outside. */
function textsOf(unit: UnitShape): readonly Box[] {
  const { tagText, limit, duty, symbol, texts } = unit;
  return [
    ...(tagText ? [{ ...boxOfText(tagText), h: 18 }] : []),
    ...(limit ? [boxAround(limit.at, 8)] : []),
    ...(duty?.text ? [boxOfText(duty.text)] : []),
    ...(symbol.nameInside ? [] : texts.map(boxOfText)),
  ];
}

describe.each(CASES)('%s', (_name, sketch) => {
  const limits = Object.fromEntries(sketch.units.map((u): [string, Weight] => [u.tag, 'caution']));
  const scene = buildScene(sketch, inputOf(sketch, { limits }));
  const byId = new Map(scene.units.map((u) => [u.unit, u]));
  const streamOf = (line: LineShape) => sketch.streams.find((s) => s.id === line.stream)!;

  test('draws every unit, and every stream with an end', () => {
    expect(scene.units.map((u) => u.unit)).toEqual(sketch.units.map((u) => u.id));
    expect(scene.lines).toHaveLength(sketch.streams.length);
  });

  test('lines begin and end exactly at their ports and have only right angles', () => {
    for (const line of scene.lines) {
      const { from, to } = streamOf(line);
      if (from) expect(line.points[0]).toEqual(endAt(byId.get(from[0])!, from[1]));
      if (to) expect(line.points.at(-1)).toEqual(endAt(byId.get(to[0])!, to[1]));
      for (const [[x1, y1], [x2, y2]] of pieces(line.points)) {
        expect([x1 === x2, y1 === y2].filter(Boolean)).toHaveLength(1);
      }
    }
  });

  test('lines leave and enter their ports straight outward', () => {
    for (const line of scene.lines) {
      const { from, to } = streamOf(line);
      for (const [end, a, b] of [
        [from, line.points[0]!, line.points[1]!],
        [to, line.points.at(-1)!, line.points.at(-2)!],
      ] as const) {
        if (!end) continue;
        const unit = byId.get(end[0])!;
        const { side } = portOnSheet(unit, unit.symbol.ports(end[1])!);
        const way = b[0] > a[0] ? 'right' : b[0] < a[0] ? 'left' : b[1] > a[1] ? 'bottom' : 'top';
        expect(way).toBe(side);
      }
    }
  });

  test('no line crosses a symbol', () => {
    for (const line of scene.lines) {
      const { from, to } = streamOf(line);
      const all = pieces(line.points);
      all.forEach(([a, b], k) => {
        for (const [unit, box] of obstaclesOf(scene)) {
          const ownEnd =
            (k === 0 && from?.[0] === unit.unit) || (k === all.length - 1 && to?.[0] === unit.unit);
          if (ownEnd) continue;
          expect(overlaps(boxOfPiece(a, b, 0.9), box), `${line.number} over ${unit.tag}`).toBe(false);
        }
      });
    }
  });

  test('no two lines run along one another', () => {
    for (const a of scene.lines) {
      for (const b of scene.lines) {
        if (a.number >= b.number) continue;
        for (const [p, q] of pieces(a.points)) {
          for (const [r, s] of pieces(b.points)) {
            const along = (p[0] === q[0]) === (r[0] === s[0]);
            const close = overlaps(boxOfPiece(p, q, 1.5), boxOfPiece(r, s, 1.5));
            expect(along && close, `${a.number} along ${b.number}`).toBe(false);
          }
        }
      }
    }
  });

  test('no label covers a symbol, line, diamond, tag or another label', () => {
    const open = scene.labels.filter((label) => !label.folded);
    open.forEach((label, k) => {
      const room = grown(label.box, 5.9);
      const about = `label ${label.stream}`;
      for (const unit of scene.units) {
        expect(overlaps(room, unit.box), `${about} on ${unit.tag}`).toBe(false);
        for (const text of textsOf(unit)) {
          expect(overlaps(label.box, text), `${about} on a text of ${unit.tag}`).toBe(false);
        }
      }
      for (const line of scene.lines) {
        for (const [a, b] of pieces(line.points)) {
          expect(overlaps(room, boxOfPiece(a, b, 0.9)), `${about} on line ${line.number}`).toBe(false);
        }
        if (line.diamond) {
          expect(overlaps(room, boxAround(line.diamond, 12)), `${about} on diamond ${line.number}`).toBe(
            false,
          );
        }
      }
      for (const other of open.slice(k + 1)) {
        expect(overlaps(room, other.box), `${about} on label ${other.stream}`).toBe(false);
      }
    });
  });

  test('diamonds stand on their lines, apart from each other, from symbols and from other lines', () => {
    const stones = scene.lines.filter((line) => line.diamond);
    stones.forEach((line, k) => {
      const at = line.diamond!;
      expect(pieces(line.points).some(([a, b]) => overlaps(boxOfPiece(a, b, 1), boxAround(at, 0.5)))).toBe(
        true,
      );
      for (const unit of scene.units) expect(overlaps(boxAround(at, 12), unit.box), line.number).toBe(false);
      for (const other of stones.slice(k + 1)) {
        expect(overlaps(boxAround(at, 12), boxAround(other.diamond!, 12)), line.number).toBe(false);
      }
      for (const other of scene.lines) {
        if (other === line) continue;
        for (const [a, b] of pieces(other.points)) {
          expect(
            overlaps(boxAround(at, 12), boxOfPiece(a, b, 0.9)),
            `${line.number} on ${other.number}`,
          ).toBe(false);
        }
      }
      expect(diamondPath(at)).not.toContain('NaN');
    });
  });
});

test('every label of the hand-made sheets finds a place, and most do on the crowded seeded ones', () => {
  const shown = (sketch: Sketch): readonly boolean[] =>
    buildScene(sketch, inputOf(sketch)).labels.map((label) => !label.folded);
  for (const sketch of Object.values(SHEETS)) expect(shown(sketch)).not.toContain(false);
  const all = CASES.flatMap(([, sketch]) => shown(sketch));
  expect(all.filter(Boolean).length / all.length).toBeGreaterThan(0.84);
});

test.each(Object.entries(SHEETS))('tags, names, marks and duties cover nothing: %s', (_name, sketch) => {
  const limits = Object.fromEntries(sketch.units.map((u): [string, Weight] => [u.tag, 'note']));
  const scene = buildScene(sketch, inputOf(sketch, { limits }));
  const texts = scene.units.flatMap((unit) => textsOf(unit).map((box) => ({ unit, box })));
  texts.forEach(({ unit, box }, k) => {
    for (const [other, obstacle] of obstaclesOf(scene)) {
      expect(overlaps(box, obstacle), `${unit.tag} on ${other.tag}`).toBe(false);
    }
    for (const line of scene.lines) {
      for (const [a, b] of pieces(line.points)) {
        expect(overlaps(box, boxOfPiece(a, b, 0.9)), `${unit.tag} on line ${line.number}`).toBe(false);
      }
      if (line.diamond) expect(overlaps(box, boxAround(line.diamond, 12))).toBe(false);
    }
    for (const other of texts.slice(k + 1)) {
      expect(overlaps(box, other.box), `${unit.tag} on the text of ${other.unit.tag}`).toBe(false);
    }
  });
});
