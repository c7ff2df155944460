import ELK from 'elkjs/lib/elk.bundled.js';
import { describe, expect, test } from 'vitest';
import { type Arrangement, arrange, arranged, placedByHand } from '../../src/drawing/arrange';
import { boxOfPiece, overlaps } from '../../src/drawing/boxes';
import { buildScene } from '../../src/drawing/scene';
import type { Point } from '../../src/drawing/types';
import type { StreamId, UnitId } from '../../src/engine/ids';
import { moveUnits } from '../../src/sketch/edits';
import type { Sketch } from '../../src/sketch/types';
import { handPlaced, turnedAbout } from './handPlaced';
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

test('what stands as arranged is the same sketch once more', async () => {
  const once = await anew(LET_DOWN);
  expect(await anew(once)).toBe(once);
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
  /** The other seeds: npm run robust -- --what drawings. */
  test.each([2, 7, 11, 20, 33, 44])(
    'stays where it is, turned and mirrored or not, and all laws hold around it: seed %i',
    async (seed) => {
      const before = handPlaced(await anew(turnedAbout(randomPlant(seed), seed)), seed);
      const keep = placedByHand(before);
      expect(keep.length).toBeGreaterThan(0);
      const arrangement: Arrangement = await arrange(before, engine, { keep });
      expect(keep.filter((id) => arrangement.at.has(id))).toEqual([]);
      const sheet = arranged(before, arrangement);
      expect(placedByHand(sheet)).toEqual(keep);
      for (const textScale of [1, 1.375]) {
        const scene = buildScene(sheet, inputOf(sheet, { textScale }));
        const broken = Object.values({ ...LAWS, symbolsStandApart }).flatMap((law) => law(scene, sheet));
        expect(broken, `text scale ${textScale}`).toEqual([]);
      }
    },
  );

  test('takes its neighbours along: what stands between units moved and unmoved moves by the mean', async () => {
    const sheet = await anew(LET_DOWN);
    const by = (tag: string, [dx, dy]: Point): Point => {
      const [x, y] = placeOf(sheet, tag);
      return [x + dx, y + dy];
    };
    const places: Readonly<Record<string, Point>> = {
      'FEED-1': by('FEED-1', [0, 0]),
      'PV-101': by('PV-101', [0, 0]),
      'PROD-1': by('PROD-1', [600, 240]),
      'PROD-2': by('PROD-2', [600, 240]),
    };
    const edit = moveUnits(sheet, new Map(Object.entries(places).map(([tag, at]) => [tag as UnitId, at])));
    if (!edit.ok) throw new Error(edit.code);
    const keep = placedByHand(edit.sketch);
    expect(keep).toEqual(Object.keys(places));
    const after = arranged(edit.sketch, await arrange(edit.sketch, engine, { keep }));
    // One neighbour stands still, two moved.
    expect(placeOf(after, 'V-101')).toEqual(by('V-101', [(2 / 3) * 600, (2 / 3) * 240]));
  });

  test('leaves notes and lines bent by hand their room', async () => {
    const sheet = await anew(RECYCLE);
    const at = new Map(sheet.units.map((u) => [u.tag, u.at]));
    const [[x1, y1], [x2]] = [at.get('V-101')!, at.get('V-102')!];
    const bends = (y: number): Point[] => [
      [x1 + 80, y1],
      [x1 + 80, y],
      [x2 - 80, y],
    ];
    // Where units stand that are to be placed anew: a note on the valve, a line through the cooler.
    const [nx, ny] = at.get('PV-101')!;
    const marked: Sketch = {
      ...sheet,
      units: sheet.units.map((u) =>
        ['V-101', 'V-102', 'FEED-1'].includes(u.tag) ? { ...u, byHand: true } : u,
      ),
      streams: [
        ...sheet.streams.filter((s) => !['5', '6'].includes(s.number)),
        {
          id: '5' as StreamId,
          number: '5',
          from: ['V-101' as UnitId, 'vapour'],
          to: ['V-102' as UnitId, 'in1'],
          via: bends(at.get('E-102')![1]),
        },
      ],
      notes: [{ id: 'n1', text: 'By others', at: [nx - 40, ny - 8] }],
    };
    const plan = await arrange(marked, engine, { keep: placedByHand(marked) });
    expect(plan.unbent).toEqual([]);
    const after = arranged(marked, plan);
    const scene = buildScene(after, inputOf(after));
    const via = marked.streams.at(-1)!.via!;
    const boxes = [scene.notes[0]!.box, ...via.slice(1).map((p, k) => boxOfPiece(via[k]!, p, 4))];
    for (const unit of scene.units)
      if (plan.at.has(unit.unit))
        for (const box of boxes)
          expect(overlaps(unit.box, box), `${unit.tag} on what was placed`).toBe(false);
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
