import { describe, expect, test } from 'vitest';
import { aligned, distributed } from '../../src/canvas/align';
import { bendArrow, bendable, bendByKeys, endBend } from '../../src/canvas/bending';
import { bendsAfter, bent, followed, moveWithBends, withBends } from '../../src/canvas/bends';
import { copySelected, cutSelected, duplicateSelected, pasteText } from '../../src/canvas/clipboard';
import { drawnTo, guidePath, guidesOf } from '../../src/canvas/guides';
import { putHandle, type SheetHandle } from '../../src/canvas/handle';
import { keepScene } from '../../src/canvas/keepScene';
import { createSheetStore } from '../../src/canvas/sheetStore';
import type { Point } from '../../src/drawing/types';
import { addNote, bendStream } from '../../src/sketch/edits';
import { emptySketch } from '../../src/sketch/fresh';
import { letDown, storesOf, streamId, unitId } from './fixture';

function sheetOn(sketch = letDown()) {
  const stores = storesOf(sketch);
  const store = createSheetStore();
  keepScene(stores, store, () => 1);
  const handle: SheetHandle = {
    store,
    fit: () => undefined,
    zoomBy: () => undefined,
    zoomTo: () => undefined,
    zoom: () => 1,
    reveal: () => undefined,
    centre: () => undefined,
    middle: () => [400, 300],
    toSheet: (x, y) => [x, y],
    focus: () => undefined,
  };
  putHandle(stores, handle);
  const now = () => stores.sketch.getState().sketch;
  const labels = () => stores.sketch.getState().past.map((entry) => entry.label);
  return { stores, store, now, labels };
}

const shape = (unit: string, at: Point, w = 32, h = 32) => ({
  unit: unitId(unit),
  at,
  box: { x: at[0] - w / 2, y: at[1] - h / 2, w, h },
});

describe('the clipboard', () => {
  test('what is copied is pasted beside itself, selected, in one step with a name', () => {
    const { stores, now, labels } = sheetOn();
    stores.session.select([unitId('u2'), unitId('u3')]);
    const text = copySelected(stores)!;
    pasteText(stores, text);
    expect(labels()).toEqual(['paste 2 units']);
    const { units } = stores.session.getState();
    expect(units).toHaveLength(2);
    const copies = now().units.filter((unit) => units.includes(unit.id));
    expect(copies.map((unit) => unit.tag)).toEqual(['PV-102', 'V-102']);
    const taken = now().units.filter((unit) => !units.includes(unit.id));
    for (const copy of copies) expect(taken.map((unit) => unit.at)).not.toContainEqual(copy.at);
    expect(now().streams.some((s) => s.from?.[0] === copies[0]!.id && s.to?.[0] === copies[1]!.id)).toBe(
      true,
    );
    stores.sketch.undo();
    expect(now()).toEqual(letDown());
  });

  test('what is cut goes in one step and comes back where it was', () => {
    const { stores, now, labels } = sheetOn();
    stores.session.select([unitId('u5')]);
    const text = cutSelected(stores)!;
    expect(now().units.some((unit) => unit.id === 'u5')).toBe(false);
    pasteText(stores, text);
    expect(now().units.at(-1)).toMatchObject({ kind: 'heater', at: [600, 520] });
    expect(labels()).toEqual(['cut E-101', 'paste E-101']);
  });

  test('a duplicate is one step; nothing selected is nothing copied', () => {
    const { stores, labels } = sheetOn();
    expect(copySelected(stores)).toBeUndefined();
    stores.session.select([unitId('u3')]);
    duplicateSelected(stores);
    expect(labels()).toEqual(['duplicate V-101']);
  });

  test('pasted into another sketch it stands in the middle of the view', () => {
    const from = sheetOn();
    from.stores.session.select([unitId('u2')]);
    const text = copySelected(from.stores)!;
    const into = sheetOn(emptySketch('other'));
    pasteText(into.stores, text);
    expect(into.now().units.map((unit) => unit.at)).toEqual([[400, 304]]);
  });

  test('words of another kind say what can be pasted, and change nothing', () => {
    const { stores, now } = sheetOn();
    const before = now();
    pasteText(stores, 'hello');
    expect(now()).toBe(before);
    expect(stores.session.getState().notice?.title).toMatch(/no part of a sketch/);
  });
});

describe('lining up', () => {
  const three = [shape('a', [100, 100]), shape('b', [220, 164], 64, 16), shape('c', [400, 80])];

  test('edges go to the outermost, lines of origins to the middle of all', () => {
    const xs = (how: Parameters<typeof aligned>[1]) => [...aligned(three, how).values()];
    expect(xs('left')).toEqual([
      [100, 100],
      [116, 164],
      [100, 80],
    ]);
    expect(xs('right').map((p) => p[0])).toEqual([400, 384, 400]);
    expect(xs('top').map((p) => p[1])).toEqual([80, 72, 80]);
    expect(xs('bottom').map((p) => p[1])).toEqual([156, 164, 156]);
    expect(xs('centre').map((p) => p[0])).toEqual([250, 250, 250]);
    expect(xs('middle').map((p) => p[1])).toEqual([122, 122, 122]);
  });

  test('three or more get equal gaps between their symbols, the outermost stay', () => {
    const at = distributed(three, 'across');
    const edges = three.map(({ unit, box, at: [x] }) => {
      const by = at.get(unit)![0] - x;
      return [box.x + by, box.x + box.w + by] as const;
    });
    expect(edges[0]![0]).toBe(84);
    expect(edges[2]![1]).toBe(416);
    expect(edges[1]![0] - edges[0]![1]).toBe(edges[2]![0] - edges[1]![1]);
    expect(distributed(three.slice(0, 2), 'across').size).toBe(0);
  });
});

describe('guides', () => {
  test('a unit is drawn to where its stream comes straight, rather than to another’s middle', () => {
    const { store, now } = sheetOn();
    const guides = guidesOf(store.getState().scene.units, now().streams, new Set([unitId('u2')]));
    // The valve is 5 px too low for the feed's port.
    expect(drawnTo(guides, [40, 5], 9, 8)).toEqual([40, 0]);
    expect(guidePath(guides, [40, 0])).toContain('H');
    // Out of reach: the grid.
    expect(drawnTo(guides, [40, 21], 9, 8)).toEqual([40, 24]);
    expect(guidePath(guides, [40, 24])).toBe('');
  });

  test('a port off the grid still gets a straight line', () => {
    const sketch = letDown();
    const units = sketch.units.map((unit) => (unit.id === 'u1' ? { ...unit, at: [96, 323] as const } : unit));
    const { store } = sheetOn({ ...sketch, units });
    const guides = guidesOf(store.getState().scene.units, sketch.streams, new Set([unitId('u1')]));
    expect(drawnTo(guides, [16, 1], 9, 8)).toEqual([16, -3]);
  });
});

describe('bends moved by hand', () => {
  const step: readonly Point[] = [
    [0, 0],
    [96, 0],
    [96, 80],
    [200, 80],
  ];

  test('a piece between two bends moves across its direction', () => {
    expect(bent(step, 1, 24)).toEqual([
      [120, 0],
      [120, 80],
    ]);
  });

  test('it goes no nearer to a port than the line’s straight way out', () => {
    expect(bent(step, 1, -200)).toEqual([
      [24, 0],
      [24, 80],
    ]);
    expect(bent(step, 1, 400)).toEqual([
      [176, 0],
      [176, 80],
    ]);
  });

  test('a piece at a port gets a step', () => {
    expect(bent(step, 0, 16)).toEqual([
      [24, 0],
      [24, 16],
      [96, 16],
      [96, 80],
    ]);
    expect(
      bent(
        [
          [0, 0],
          [200, 0],
        ],
        0,
        -40,
      ),
    ).toEqual([
      [24, 0],
      [24, -40],
      [176, -40],
      [176, 0],
    ]);
  });

  test('a piece at a port that is too short for a step cannot be moved', () => {
    expect(
      bendable([
        [0, 0],
        [24, 0],
        [24, 80],
        [56, 80],
      ]),
    ).toEqual([1, 2]);
  });

  test('bends follow an end that moves, until it passes them', () => {
    expect(followed(step, [16, 24], [0, 0])).toEqual([
      [96, 24],
      [96, 80],
    ]);
    expect(followed(step, [0, 0], [0, -40])).toEqual([
      [96, 0],
      [96, 40],
    ]);
    expect(followed(step, [120, 0], [0, 0])).toBeUndefined();
  });

  test('the line on the sheet runs through the bends, in one step, and straightening undoes it', () => {
    const { stores, store, now, labels } = sheetOn();
    stores.session.select([], [streamId('s3')]);
    const before = store.getState().lines.get(streamId('s3'))!.points;
    expect(before).toHaveLength(3);
    bendByKeys(stores);
    expect(store.getState().bending).toMatchObject({ stream: 's3', byKeys: true });
    const { piece } = store.getState().bending!;
    const across = before[piece]![1] === before[piece + 1]![1] ? 'down' : 'right';
    bendArrow(stores, store, across, 3);
    const shown = store.getState().lines.get(streamId('s3'))!.points;
    expect(shown).not.toEqual(before);
    expect(labels()).toEqual([]);
    endBend(stores, store);
    expect(labels()).toEqual(['bend stream 3']);
    const { via } = now().streams.find((s) => s.id === 's3')!;
    // What was seen under the hand is what stays, and it is drawn through every bend.
    expect(store.getState().lines.get(streamId('s3'))!.points).toEqual(shown);
    expect(shown.slice(1, -1)).toEqual(via);
    stores.sketch.undo();
    expect(store.getState().lines.get(streamId('s3'))!.points).toEqual(before);
  });

  test('a unit that moves takes the piece at its port along; the other bends stay', () => {
    const { store, now } = sheetOn();
    const id = streamId('s3');
    const points = store.getState().lines.get(id)!.points;
    const via = bent(points, 1, -24);
    const base = bendStream(now(), id, via);
    if (!base.ok) throw new Error(base.code);
    const bentSheet = sheetOn(base.sketch);
    const lines = bentSheet.store.getState().lines;
    expect(lines.get(id)!.points.slice(1, -1)).toEqual(via);
    const edit = moveWithBends(base.sketch, lines, new Map([[unitId('u4'), [680, 144] as const]]));
    if (!edit.ok) throw new Error(edit.code);
    const moved = edit.sketch.streams.find((s) => s.id === id)!.via!;
    expect(moved.slice(0, -1)).toEqual(via.slice(0, -1));
    expect(moved.at(-1)).toEqual([via.at(-1)![0], via.at(-1)![1] - 16]);
    const after = sheetOn(edit.sketch).store.getState().lines.get(id)!.points;
    expect(after.slice(1, -1)).toEqual(moved);
  });

  test('lines without bends of their own are none of it', () => {
    const { store, now } = sheetOn();
    expect(bendsAfter(now(), store.getState().lines, new Map([[unitId('u4'), [0, 0] as const]]))).toBeNull();
    const sketch = now();
    expect(withBends(sketch, null)).toBe(sketch);
  });
});

test('a note under the hand is moved with the units in one step', async () => {
  const { endMove, moveByKeys, nudge, resizeByKeys } = await import('../../src/canvas/moving');
  const base = addNote(letDown(), 'Battery limit', { kind: 'area', at: [0, 0], size: [320, 200] });
  if (!base.ok) throw new Error(base.code);
  const { stores, store, now, labels } = sheetOn(base.sketch);
  stores.session.setState({ units: [unitId('u2')], notes: ['n1'] });
  moveByKeys(stores);
  nudge(stores, store, 'right', 2);
  resizeByKeys(store, 'down');
  endMove(stores, store);
  expect(now().notes[0]).toMatchObject({ at: [16, 0], size: [320, 208] });
  expect(now().units[1]!.at).toEqual([272, 320]);
  expect(labels()).toEqual(['move PV-101']);
});
