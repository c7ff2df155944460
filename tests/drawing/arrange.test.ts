import ELK from 'elkjs/lib/elk.bundled.js';
import { describe, expect, test } from 'vitest';
import { type Arrangement, arrange, arranged, placedByHand } from '../../src/drawing/arrange';
import { buildScene } from '../../src/drawing/scene';
import type { UnitId } from '../../src/engine/ids';
import type { Sketch } from '../../src/sketch/types';
import { LAWS, openLabels, symbolsStandApart } from './laws';
import { randomPlant } from './plants';
import { CROSSED, inputOf, LET_DOWN, RECYCLE, sheetOf } from './sheets';

const engine = new ELK();
const anew = async (sketch: Sketch): Promise<Sketch> => arranged(sketch, await arrange(sketch, engine));
const placeOf = (sketch: Sketch, tag: string) => sketch.units.find((u) => u.tag === tag)!.at;

/** The other seeds up to 200 and beyond: npm run robust -- --what drawings. */
const SEEDS = Array.from({ length: 40 }, (_, k) => 1 + 5 * k);

describe('a plant of all kinds, arranged', () => {
  test.each(SEEDS)('keeps every law of the drawing: seed %i', async (seed) => {
    const sheet = await anew(randomPlant(seed));
    for (const textScale of [1, 1.375]) {
      const scene = buildScene(sheet, inputOf(sheet, { textScale }));
      const broken = Object.values({ ...LAWS, symbolsStandApart }).flatMap((law) => law(scene, sheet));
      expect(broken, `text scale ${textScale}`).toEqual([]);
      if (textScale === 1)
        expect(openLabels(scene).length).toBeGreaterThanOrEqual(Math.floor(0.9 * scene.labels.length));
    }
  });

  test('runs from left to right: most lines lead to a unit further right', async () => {
    const sheet = await anew(randomPlant(6));
    const x = new Map(sheet.units.map((u) => [u.id, u.at[0]]));
    const ahead = sheet.streams.filter(({ from, to }) => x.get(from![0])! < x.get(to![0])!);
    expect(ahead.length / sheet.streams.length).toBeGreaterThan(0.85);
  });
});

test('a train without recycle stands in the order of its flow, on the grid', async () => {
  const sheet = await anew(LET_DOWN);
  const [feed, valve, drum, gas] = ['FEED-1', 'PV-101', 'V-101', 'PROD-1'].map(
    (tag) => placeOf(sheet, tag)[0],
  );
  expect([feed, valve, drum, gas]).toEqual([feed, valve, drum, gas].sort((a, b) => a! - b!));
  expect(sheet.units.flatMap((u) => u.at).filter((v) => v % 8 !== 0)).toEqual([]);
});

test('lines between units that face each other are straight after arranging', async () => {
  const sheet = await anew(LET_DOWN);
  const { lines } = buildScene(sheet, inputOf(sheet));
  expect(lines.slice(0, 2).map((line) => line.points.length)).toEqual([2, 2]);
});

test('a recycle is cut where it goes back: the feed stays at the left edge', async () => {
  const sheet = await anew(RECYCLE);
  expect(placeOf(sheet, 'FEED-1')[0]).toBe(Math.min(...sheet.units.map((u) => u.at[0])));
});

test('the same sketch gives the same places', async () => {
  const [a, b] = [await arrange(randomPlant(3), engine), await arrange(randomPlant(3), engine)];
  expect([...a.at]).toEqual([...b.at]);
});

test('turned units, hanging streams and kinds that nobody knows are arranged too, bends by hand are dropped', async () => {
  const arrangement = await arrange(CROSSED, engine);
  expect(arrangement.at.size).toBe(CROSSED.units.length);
  expect(arrangement.unbent).toEqual(['9']);
  const sheet = arranged(CROSSED, arrangement);
  expect(sheet.units.map(({ turn, mirror }) => [turn, mirror])).toEqual(
    CROSSED.units.map(({ turn, mirror }) => [turn, mirror]),
  );
  const scene = buildScene(sheet, inputOf(sheet));
  expect(Object.values(LAWS).flatMap((law) => law(scene, sheet))).toEqual([]);
});

describe('what was placed by hand', () => {
  const half = (sheet: Sketch): UnitId[] => sheet.units.filter((_, k) => k % 2 === 0).map((u) => u.id);

  test.each([2, 7, 11, 20, 33])('stays where it is, and nothing lies on anything: seed %i', async (seed) => {
    const before = await anew(randomPlant(seed));
    const keep = half(before);
    const scattered: Sketch = {
      ...before,
      units: before.units.map((u) => (keep.includes(u.id) ? u : { ...u, at: [0, 0] })),
    };
    const arrangement: Arrangement = await arrange(scattered, engine, { keep });
    expect(keep.filter((id) => arrangement.at.has(id))).toEqual([]);
    const sheet = arranged(scattered, arrangement);
    const scene = buildScene(sheet, inputOf(sheet));
    const broken = Object.values({ ...LAWS, symbolsStandApart }).flatMap((law) => law(scene, sheet));
    expect(broken).toEqual([]);
  });

  test('is marked so only as long as it is kept', async () => {
    const [first, second, ...others] = LET_DOWN.units;
    const marked: Sketch = {
      ...LET_DOWN,
      units: [{ ...first!, byHand: true }, { ...second!, byHand: true }, ...others],
    };
    expect(placedByHand(marked)).toEqual([first!.id, second!.id]);
    const keep = [first!.id];
    expect(placedByHand(arranged(marked, await arrange(marked, engine, { keep })))).toEqual(keep);
    expect(placedByHand(arranged(marked, await arrange(marked, engine)))).toEqual([]);
  });

  test('keeps its bends where both ends stay', async () => {
    const all = CROSSED.units.map((u) => u.id);
    expect(await arrange(CROSSED, engine, { keep: all })).toEqual({ at: new Map(), unbent: [] });
    const ends = ['V-102', 'E-102'] as UnitId[];
    expect((await arrange(CROSSED, engine, { keep: ends })).unbent).toEqual([]);
  });
});

test('an empty sketch asks for no layout', async () => {
  const never = { layout: () => Promise.reject(new Error('asked')) };
  expect(await arrange(sheetOf([], []), never)).toEqual({ at: new Map(), unbent: [] });
});
