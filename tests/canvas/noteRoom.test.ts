import { expect, test } from 'vitest';
import { putHandle, type SheetHandle } from '../../src/canvas/handle';
import { keepScene } from '../../src/canvas/keepScene';
import { endWriting, putNote } from '../../src/canvas/noteEdits';
import { noteRoom } from '../../src/canvas/noteRoom';
import { createSheetStore } from '../../src/canvas/sheetStore';
import { boxOfPiece, overlaps } from '../../src/drawing/boxes';
import type { Box, Point, Scene } from '../../src/drawing/types';
import { letDown, solveAll, storesOf } from './fixture';

/** The sheet of the let-down, solved, so that labels stand on it; its view has its middle at a given point. */
function sheetOn(middle: Point) {
  const stores = storesOf(letDown());
  const store = createSheetStore();
  keepScene(stores, store, () => 1);
  solveAll(stores);
  const shown: Point[] = [];
  putHandle(stores, {
    store,
    middle: () => middle,
    reveal: (at: Point) => void shown.push(at),
  } as unknown as SheetHandle);
  return { stores, store, shown };
}

const standing = ({ units, lines, labels }: Scene): readonly Box[] => [
  ...units.map((unit) => unit.box),
  ...lines.flatMap(({ points }) => points.slice(1).map((p, k) => boxOfPiece(points[k]!, p, 1))),
  ...labels.map((label) => label.box),
];

test('a new note stands on no symbol, line or label, with room for its words, and is brought into view', () => {
  // The middle of the view is the middle of the drum.
  const { stores, store, shown } = sheetOn([432, 320]);
  const before = standing(store.getState().scene);
  expect(store.getState().scene.labels.length).toBeGreaterThan(0);
  expect(before.some((box) => overlaps(box, { x: 432, y: 320, w: 30, h: 16 }))).toBe(true);
  putNote(stores, 'text');
  const [note] = stores.sketch.getState().sketch.notes;
  const [x, y] = note!.at!;
  for (const box of before) expect(overlaps(box, { x, y, w: 240, h: 48 })).toBe(false);
  expect([x % 8, y % 8].map(Math.abs)).toEqual([0, 0]);
  expect(shown).toEqual([[x, y]]);
  // A second one keeps off the first.
  endWriting(stores, store, note!.id, 'Level to be checked');
  putNote(stores, 'text');
  const second = stores.sketch.getState().sketch.notes[1]!.at!;
  const [first] = store.getState().scene.notes;
  expect(overlaps(first!.box, { x: second[0], y: second[1], w: 240, h: 48 })).toBe(false);
});

test('on empty sheet a note stands in the middle of the view', () => {
  const { store } = sheetOn([0, 0]);
  // Half of the room, on the grid: 240 by 48 about (4000, 4000).
  expect(noteRoom(store.getState().scene, [4000, 4000])).toEqual([3880, 3976]);
});
