import { existsSync, readdirSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, test } from 'vitest';
import { standingUnits } from '../../src/drawing/standing';
import { openSketch } from '../../src/sketch/read';
import { KNOWN_KINDS, kindOf, portSpec } from '../../src/sketch/registry';
import { compiled, exampleText, letDown, opened, root } from './help';

const index = JSON.parse(readFileSync(join(root, 'public/examples/index.json'), 'utf8')) as {
  file: string;
  title: string;
  shows: string;
}[];
const names = index.map(({ file }) => file.replace('.sketch.json', ''));

test('the index names every example, and no other', () => {
  const files = readdirSync(join(root, 'public/examples')).filter((f) => f !== 'index.json');
  expect(index.map((e) => e.file).sort()).toEqual(files.sort());
  for (const { title, shows } of index) expect([title.length > 0, shows.endsWith('.')]).toEqual([true, true]);
});

describe.each(names)('%s', (name) => {
  const sketch = opened(exampleText(name));
  test('opens and compiles without a word', async () => {
    expect(openSketch(exampleText(name))).toMatchObject({ ok: true, notes: [] });
    const { gaps, notes } = await compiled(sketch);
    expect([gaps, notes]).toEqual([[], []]);
  });
  test('every unit stands on the grid, on a sheet of A3 shape, clear of the others', () => {
    const boxes = standingUnits(sketch).map((unit) => unit.box);
    for (const { at } of sketch.units) expect(at.map((x) => x % 8)).toEqual([0, 0]);
    for (const box of boxes) {
      expect(box.x >= 0 && box.x + box.w <= 1600 && box.y >= 0 && box.y + box.h <= 1000).toBe(true);
      for (const other of boxes) {
        const apart =
          other.x >= box.x + box.w ||
          other.x + other.w <= box.x ||
          other.y >= box.y + box.h ||
          other.y + other.h <= box.y;
        expect(other === box || apart).toBe(true);
      }
    }
  });
  test('streams run from left to right, or up and down; only what returns in a loop runs back', () => {
    const at = new Map(sketch.units.map((x) => [x.id, x.at]));
    const reaches = (start: string, goal: string): boolean => {
      const seen = new Set([start]);
      for (const id of seen)
        for (const s of sketch.streams) if (s.from?.[0] === id && s.to) seen.add(s.to[0]);
      return seen.has(goal);
    };
    for (const { from, to } of sketch.streams) {
      expect(from && to).toBeDefined();
      if (from && to && !reaches(to[0], from[0]))
        expect((at.get(to[0])?.[0] ?? 0) - (at.get(from[0])?.[0] ?? 0)).toBeGreaterThanOrEqual(0);
    }
  });
  test('every port is one of its kind, every feed and product has a name, every stream a description', () => {
    for (const unit of sketch.units) {
      const kind = kindOf(KNOWN_KINDS, unit.kind);
      expect(kind).toBeDefined();
      if (kind?.group === 'boundary') expect(unit.name ?? '').not.toBe('');
      for (const end of sketch.streams.flatMap((x) => [x.from, x.to]))
        if (kind && end?.[0] === unit.id) expect(portSpec(kind, end[1])).toBeDefined();
    }
    for (const stream of sketch.streams) expect(stream.name ?? '').not.toBe('');
  });
});

test('the let-down is the one that is written about: 150 kmol/h at 52 degC and its bubble point, down to 7.0 bar', () => {
  const { units } = letDown();
  expect(units.map((x) => x.tag)).toEqual(['FEED-1', 'PV-1', 'V-1', 'PROD-1', 'PROD-2']);
  expect(units[0]?.settings).toMatchObject({
    state: { T: '52 degC', vapourFraction: 0 },
    flow: '150 kmol/h',
  });
  expect(units[1]?.settings).toEqual({ p: { P: '7.0 bar' } });
  expect(existsSync(join(root, 'public/examples/let-down.sketch.json'))).toBe(true);
});
