import { expect, test } from 'vitest';
import { keepScene } from '../../src/canvas/keepScene';
import { createSheetStore, hold } from '../../src/canvas/sheetStore';
import { portOnSheet } from '../../src/drawing/transform';
import type { Point } from '../../src/drawing/types';
import { letDown, solveAll, storesOf, streamId, unitId } from './fixture';

function held(moves: readonly (readonly [string, Point])[]) {
  const stores = storesOf(letDown());
  const sheet = createSheetStore();
  keepScene(stores, sheet, () => 1);
  solveAll(stores);
  const before = sheet.getState();
  const moved = new Map(moves.map(([id, at]) => [unitId(id), at] as const));
  hold(sheet, { moved, bends: null });
  return { stores, sheet, before, now: sheet.getState() };
}

test('under the hand only the lines and labels of what it moves become others; the scene waits', () => {
  const { before, now } = held([['u4', [720, 200]]]);
  expect(now.scene).toBe(before.scene);
  expect(now.units).toBe(before.units);
  for (const stream of now.lines.keys()) {
    const isTouched = stream === 's3';
    expect(now.lines.get(stream) === before.lines.get(stream), stream).toBe(!isTouched);
    expect(now.labels.get(stream) === before.labels.get(stream), stream).toBe(!isTouched);
  }
});

test('at every step of the hand a line meets the ports of the unit where it stands', () => {
  for (const at of [
    [680, 168],
    [560, 400],
    [250, 120],
    [432, 600],
  ] as const) {
    const { now, stores } = held([['u4', at]]);
    const stream = stores.sketch.getState().sketch.streams.find((s) => s.id === 's3')!;
    const points = now.lines.get(streamId('s3'))!.points;
    const ends = [stream.from!, stream.to!].map(([unit, port]) => {
      const shape = now.units.get(unit)!;
      const pose = unit === 'u4' ? { at, turn: shape.turn, mirror: shape.mirror } : shape;
      return portOnSheet(pose, shape.symbol.ports(port)!).at;
    });
    expect([points[0], points.at(-1)]).toEqual(ends);
    for (const [k, [x, y]] of points.slice(1).entries())
      expect(x === points[k]![0] || y === points[k]![1], 'right angles').toBe(true);
  }
});

test('lines between units that move alike move as they are, and come back with Esc', () => {
  const { before, now, sheet } = held([
    ['u2', [256, 400]],
    ['u3', [432, 400]],
  ]);
  const by = (points: readonly Point[]): Point[] => points.map(([x, y]) => [x, y + 80]);
  expect(now.lines.get(streamId('s2'))!.points).toEqual(by(before.lines.get(streamId('s2'))!.points));
  const [label, was] = [now.labels.get(streamId('s2'))!, before.labels.get(streamId('s2'))!];
  expect([label.box.x - was.box.x, label.box.y - was.box.y]).toEqual([0, 80]);
  sheet.setState({ moved: null });
  expect([...sheet.getState().lines]).toEqual([...before.lines]);
  expect([...sheet.getState().labels]).toEqual([...before.labels]);
});
