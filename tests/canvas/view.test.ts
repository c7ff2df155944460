import { expect, test } from 'vitest';
import { fitting } from '../../src/canvas/extent';
import { zonesAlong } from '../../src/canvas/Frame';
import { keepScene, quietAgain } from '../../src/canvas/keepScene';
import { middleOf, nearestOn } from '../../src/canvas/lines';
import { nodesOf } from '../../src/canvas/nodes';
import { quietAt, steadyScale } from '../../src/canvas/quiet';
import { createSheetStore } from '../../src/canvas/sheetStore';
import { shelfGroups } from '../../src/canvas/shelfItems';
import { chooseByArrow, type Places, stepFrom } from '../../src/canvas/walk';
import { letDown, solveAll, storesOf, streamId, unitId } from './fixture';

function solvedScene() {
  const stores = storesOf(letDown());
  const sheet = createSheetStore();
  keepScene(stores, sheet, () => 1);
  solveAll(stores);
  return sheet.getState();
}

test('text shrinks with the sheet to 80 % and no further down to a zoom of 50 %; up to 150 % it does not swell', () => {
  for (const zoom of [1, 1.5]) expect(steadyScale(zoom) * zoom).toBeCloseTo(1, 12);
  for (const zoom of [0.8, 0.9]) expect(steadyScale(zoom)).toBe(1);
  for (const zoom of [0.5, 0.6, 0.8]) expect(steadyScale(zoom) * zoom).toBeCloseTo(0.8, 12);
  expect(steadyScale(0.25)).toBe(1.6);
  expect(steadyScale(3)).toBeCloseTo(1 / 1.5, 12);
});

test('from 30 % up nothing that has room steps back, below only symbols, tags and lines stay', () => {
  const { scene } = solvedScene();
  expect(quietAt(scene, 0.3)).toMatchObject({ duties: false, labels: new Set() });
  const far = quietAt(scene, 0.29);
  expect(far.labels.size).toBe(scene.labels.length);
  expect(far.diamonds.size).toBe(scene.lines.length);
});

test('texts are placed anew for the scale at which they keep their size on the screen', () => {
  const stores = storesOf(letDown());
  const sheet = createSheetStore();
  keepScene(stores, sheet, () => 1);
  solveAll(stores);
  expect(sheet.getState().scene.textScale).toBe(1);
  quietAgain(sheet, 0.6);
  // 0.8 / 0.6 = 1.33, rounded up to the next eighth
  expect(sheet.getState().scene.textScale).toBe(1.375);
  const { scene } = sheet.getState();
  quietAgain(sheet, 0.59);
  expect(sheet.getState().scene).toBe(scene);
  quietAgain(sheet, 2);
  expect(sheet.getState().scene.textScale).toBe(0.75);
});

test('zones belong to the page and stand at the edges of the view', () => {
  const name = (k: number) => `${k + 1}`;
  const whole = zonesAlong(4, name, 0, 400, 400);
  expect(whole.map((z) => [z.text, z.middle, z.edge])).toEqual([
    ['1', 50, 100],
    ['2', 150, 200],
    ['3', 250, 300],
    ['4', 350, null],
  ]);
  // Moved half a zone to the right: the first zone reaches to the edge of the view, the last one is cut.
  const moved = zonesAlong(4, name, 50, 400, 400);
  expect(moved[0]).toMatchObject({ text: '1', middle: 75, edge: 150 });
  expect(moved.at(-1)).toMatchObject({ text: '4', middle: 375 });
  // Zoomed in on zone 2 alone.
  expect(zonesAlong(4, name, -1000, 2800, 400).map((z) => z.text)).toEqual(['2']);
});

test('the whole scene fits the view, flags and labels at their size included', () => {
  const { scene } = solvedScene();
  const { zoom } = fitting(scene, 400, 400, 0.25);
  expect(zoom).toBeLessThanOrEqual(Math.max(0.3, 400 / scene.box.w) + 1e-9);
  expect(zoom).toBeGreaterThanOrEqual(0.3);
  expect(fitting(scene, 4000, 4000, 0.25).zoom).toBe(1);
});

test('points on a line: its middle, the nearest one', () => {
  const line = [
    [0, 0],
    [100, 0],
    [100, 300],
  ] as const;
  expect(middleOf(line)).toEqual([100, 150]);
  expect(nearestOn(line, [40, 30])).toEqual({ at: [40, 0], distance: 30 });
});

test('a node is made anew only when its unit moves or is selected', () => {
  const { scene } = solvedScene();
  const first = nodesOf(scene.units, new Set(), []);
  expect(nodesOf(scene.units, new Set(), first)).toBe(first);
  const second = nodesOf(scene.units, new Set([unitId('u2')]), first);
  expect(second.filter((node, k) => node !== first[k]).map((node) => node.id)).toEqual(['u2']);
  expect(first.every((node) => Object.keys(node.data).length === 0)).toBe(true);
  // A target is never smaller than 24 px.
  expect(first.every((node) => (node.width ?? 0) >= 24 && (node.height ?? 0) >= 24)).toBe(true);
});

const sketch = letDown();
const places: Places = {
  unit: (id) => sketch.units.find((u) => u.id === id)?.at,
  stream: (id) =>
    ({ s1: [170, 320], s2: [340, 320], s3: [560, 160], s4: [432, 400], s5: [640, 520] })[id as string] as
      | readonly [number, number]
      | undefined,
};

test('arrows walk along the streams: right with the flow, left against it', () => {
  const path: string[] = [];
  let at: Parameters<typeof stepFrom>[2] | undefined = { unit: unitId('u1') };
  while (at) {
    path.push('unit' in at ? at.unit : at.stream);
    at = stepFrom(sketch, places, at, 'right');
  }
  expect(path).toEqual(['u1', 's1', 'u2', 's2', 'u3', 's3', 'u4']);
  expect(stepFrom(sketch, places, { unit: unitId('u4') }, 'left')).toEqual({ stream: 's3' });
});

test('where no stream goes on, an arrow goes to the nearest unit on that side', () => {
  // The liquid's loose end is left of the heater, which nothing leads to.
  expect(stepFrom(sketch, places, { stream: streamId('s4') }, 'right')).toEqual({ unit: 'u5' });
  expect(stepFrom(sketch, places, { unit: unitId('u5') }, 'left')).toEqual({ unit: 'u3' });
  expect(stepFrom(sketch, places, { unit: unitId('u1') }, 'left')).toBeUndefined();
});

test('up and down choose a branch where streams leave the same unit', () => {
  expect(stepFrom(sketch, places, { stream: streamId('s3') }, 'down')).toEqual({ stream: 's4' });
  expect(stepFrom(sketch, places, { stream: streamId('s4') }, 'up')).toEqual({ stream: 's3' });
  expect(stepFrom(sketch, places, { stream: streamId('s3') }, 'up')).toBeUndefined();
  expect(stepFrom(sketch, places, { unit: unitId('u3') }, 'up')).toEqual({ unit: 'u4' });
});

test('an arrow chooses the nearest port in its direction', () => {
  const ports = [
    { at: [100, 0] as const, name: 'right' },
    { at: [0, 100] as const, name: 'below' },
    { at: [200, 10] as const, name: 'further right' },
  ];
  expect(chooseByArrow(ports, undefined, [0, 0], 'right')?.name).toBe('right');
  expect(chooseByArrow(ports, ports[0], [0, 0], 'right')?.name).toBe('further right');
  expect(chooseByArrow(ports, ports[2], [0, 0], 'right')).toBeUndefined();
  expect(chooseByArrow(ports, undefined, [0, 0], 'left')?.name).toBe('right');
});

test('the shelf lists kinds by group and filters by word or tag letters', () => {
  const all = shelfGroups('');
  expect(all[0]).toMatchObject({ word: 'Boundary', items: [{ word: 'Feed' }, { word: 'Product' }] });
  expect(shelfGroups('flash').flatMap((g) => g.items.map((i) => i.word))).toEqual(['Flash drum']);
  expect(shelfGroups('PV').flatMap((g) => g.items.map((i) => i.word))).toEqual(['Valve']);
  expect(shelfGroups('no such thing')).toEqual([]);
});
