import { expect, test } from 'vitest';
import { drop, dropAt, freePlace } from '../../src/canvas/drop';
import { keepScene } from '../../src/canvas/keepScene';
import { isFree, portsOf } from '../../src/canvas/ports';
import { beginPull, endPull, movePull, takeOffer } from '../../src/canvas/pull';
import { createSheetStore, type Target } from '../../src/canvas/sheetStore';
import { letDown, storesOf, streamId, unitId } from './fixture';

function sheetOn(sketch = letDown()) {
  const stores = storesOf(sketch);
  const sheet = createSheetStore();
  keepScene(stores, sheet, () => 1);
  const now = () => stores.sketch.getState().sketch;
  const port = (unit: string, name: string): Target => {
    const record = now().units.find((u) => u.id === unit)!;
    return portsOf(now(), record, sheet.getState().units.get(unitId(unit))).find((p) => p.port === name)!;
  };
  const pull = (from: Target, to: readonly [number, number]) => {
    beginPull(stores, sheet, from, false);
    movePull(sheet, to, 1);
    endPull(stores, sheet, 1);
  };
  const labels = () => stores.sketch.getState().past.map((entry) => entry.label);
  return { stores, sheet, now, port, pull, labels };
}

test('a stream can be pulled from loose outlets and empty inlets only', () => {
  const { now, sheet } = sheetOn();
  const free = (id: string) =>
    portsOf(now(), now().units.find((u) => u.id === id)!, sheet.getState().units.get(unitId(id)))
      .filter(isFree)
      .map((p) => p.port);
  expect(free('u2')).toEqual([]);
  // The drum takes further inlets; its liquid leads nowhere yet.
  expect(free('u3')).toEqual(['in2', 'liquid']);
  expect(free('u5')).toEqual(['in', 'out']);
});

test('a loose stream pulled to a fitting port keeps its number, in one step', () => {
  const { pull, port, now, labels } = sheetOn();
  pull(port('u3', 'liquid'), port('u5', 'in').place.at);
  expect(now().streams.find((s) => s.number === '4')).toMatchObject({
    from: ['u3', 'liquid'],
    to: ['u5', 'in'],
  });
  expect(now().streams).toHaveLength(5);
  expect(labels()).toEqual(['connect V-101 and E-101']);
});

test('a click on a port selects its unit, and makes and offers nothing', () => {
  const { pull, port, stores, now, sheet } = sheetOn();
  const before = now();
  const [x, y] = port('u5', 'out').place.at;
  pull(port('u5', 'out'), [x + 3, y - 2]);
  expect(stores.session.getState()).toMatchObject({ units: ['u5'], drawer: { is: 'unit', id: 'u5' } });
  expect(now()).toBe(before);
  expect(sheet.getState().offer).toBeNull();
});

test('a port that does not fit gives its reason and nothing changes', () => {
  const { pull, port, stores, now, sheet } = sheetOn();
  const before = now();
  pull(port('u3', 'liquid'), port('u5', 'out').place.at);
  expect(now()).toBe(before);
  expect(stores.session.getState().notice?.title).toMatch(/outlets.*cannot receive/);
  pull(port('u3', 'liquid'), port('u2', 'in').place.at);
  expect(now()).toBe(before);
  expect(stores.session.getState().notice?.title).toMatch(/Stream 1 .*PV-101/);
  expect(sheet.getState().pulling).toBeNull();
});

test('let go on empty sheet, a stream offers units, and the chosen one is added and connected in one step', () => {
  const { pull, port, sheet, stores, now, labels } = sheetOn();
  pull(port('u3', 'liquid'), [432, 600]);
  const { offer } = sheet.getState();
  expect(offer).toMatchObject({ from: { unit: 'u3', port: 'liquid' }, at: [432, 600] });
  takeOffer(stores, sheet, offer!, 'product');
  const made = now().units.at(-1)!;
  expect(made.kind).toBe('product');
  // Its inlet, 24 px left of its middle, stands where the stream was let go.
  expect(made.at).toEqual([456, 600]);
  expect(now().streams.find((s) => s.number === '4')?.to).toEqual([made.id, 'in']);
  expect(labels()).toEqual(['add PROD-2']);
  expect(stores.session.getState().units).toEqual([made.id]);
});

test('a short pull is a click and changes nothing', () => {
  const { pull, port, sheet, now } = sheetOn();
  const before = now();
  const [x, y] = port('u3', 'liquid').place.at;
  pull(port('u3', 'liquid'), [x + 3, y + 4]);
  expect(sheet.getState().offer).toBeNull();
  expect(now()).toBe(before);
});

test('a unit dropped on a line opens it, and the tip says so before', () => {
  const { stores, sheet, now, labels } = sheetOn();
  const over = dropAt(stores, sheet, 'heater', [340, 326], 1);
  expect(over).toMatchObject({
    on: 's2',
    turn: 0,
    mirror: false,
    tip: ['Drop: puts E-102 into stream 2', 'its line becomes streams 2 and 6'],
  });
  expect(over.at[1]).toBe(320);
  const id = drop(stores, over)!;
  expect(now().streams.find((s) => s.number === '2')).toMatchObject({ from: ['u2', 'out'], to: [id, 'in'] });
  expect(now().streams.find((s) => s.number === '6')).toMatchObject({ from: [id, 'out'], to: ['u3', 'in1'] });
  expect(labels()).toEqual(['put E-102 into stream 2']);
});

test('a unit dropped on an upright line turns to face the flow', () => {
  const { stores, sheet, now } = sheetOn();
  const line = sheet.getState().lines.get(streamId('s3'))!;
  // Vapour leaves the drum upwards: the first piece of its line runs up.
  const [a, b] = [line.points[0]!, line.points[1]!];
  expect(a[0]).toBe(b[0]);
  expect(b[1]).toBeLessThan(a[1]);
  const over = dropAt(stores, sheet, 'valve', [a[0] + 5, (a[1] + b[1]) / 2], 1);
  expect(over).toMatchObject({ on: 's3', turn: 270, mirror: false });
  const id = drop(stores, over)!;
  expect(now().units.find((u) => u.id === id)).toMatchObject({ kind: 'valve', turn: 270 });
});

test('a unit dropped at a loose end takes the stream up', () => {
  const { stores, sheet, now, labels } = sheetOn();
  const tip = sheet.getState().lines.get(streamId('s5'))!.points.at(-1)!;
  const over = dropAt(stores, sheet, 'cooler', [tip[0] + 6, tip[1] - 4], 1);
  expect(over.tip).toEqual(['Drop: stream 5 leads to it']);
  const id = drop(stores, over)!;
  expect(now().streams.find((s) => s.number === '5')?.to).toEqual([id, 'in']);
  expect(labels()).toHaveLength(1);
});

test('a feed dropped on a line does not open it: it has no inlet', () => {
  const { stores, sheet } = sheetOn();
  expect(dropAt(stores, sheet, 'feed', [340, 320], 1)).toMatchObject({ on: null, tip: [] });
});

test('a read-only sketch says so and stays as it is', () => {
  const { stores, sheet, now } = sheetOn();
  stores.sketch.setWritable(false);
  const before = now();
  expect(drop(stores, dropAt(stores, sheet, 'valve', [800, 400], 1))).toBeUndefined();
  expect(now()).toBe(before);
  expect(stores.session.getState().notice?.title).toMatch(/open in another tab/);
});

test('a free place covers nothing and is near the wished one', () => {
  const symbol = { x: -24, y: -56, w: 48, h: 112 };
  const taken = [{ x: 76, y: 44, w: 48, h: 112 }];
  const at = freePlace(taken, symbol, [100, 100]);
  expect(at).not.toEqual([104, 104]);
  const box = { x: at[0] - 24, y: at[1] - 56, w: 48, h: 112 };
  const [other] = taken;
  const apart =
    box.x >= other!.x + other!.w ||
    box.x + box.w <= other!.x ||
    box.y >= other!.y + other!.h ||
    box.y + box.h <= other!.y;
  expect(apart).toBe(true);
  expect(Math.hypot(at[0] - 100, at[1] - 100)).toBeLessThan(200);
  expect(freePlace([], symbol, [100, 100])).toEqual([104, 104]);
});

test('the end of a stream is pulled to another inlet and keeps its number, or is let go and hangs', async () => {
  const { stores, sheet, now, port, labels } = sheetOn();
  beginPull(stores, sheet, port('u3', 'vapour'), false, streamId('s3'));
  // Its own place is free for it again.
  const fitting = sheet.getState().pulling!.targets.filter((target) => !target.reason);
  expect(fitting.map((target) => `${target.unit}.${target.port}`)).toEqual(['u4.in', 'u5.in']);
  movePull(sheet, port('u5', 'in').place.at, 1);
  endPull(stores, sheet, 1);
  expect(now().streams.find((s) => s.id === 's3')!.to).toEqual(['u5', 'in']);
  beginPull(stores, sheet, port('u3', 'vapour'), false, streamId('s3'));
  movePull(sheet, [20, 20], 1);
  endPull(stores, sheet, 1);
  expect(now().streams.find((s) => s.id === 's3')!.to).toBeUndefined();
  expect(labels()).toEqual(['lead stream 3 to E-101', 'disconnect stream 3']);
});
