import { existsSync, readdirSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, test } from 'vitest';
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
  test('every unit stands on the grid, within the sheet, clear of the others', () => {
    for (const a of sketch.units) {
      expect(a.at.map((x) => x % 8)).toEqual([0, 0]);
      expect(a.at[0] >= 64 && a.at[0] <= 1040 && a.at[1] >= 64 && a.at[1] <= 600).toBe(true);
      for (const b of sketch.units)
        if (a !== b)
          expect(Math.abs(a.at[0] - b.at[0]) >= 72 || Math.abs(a.at[1] - b.at[1]) >= 104).toBe(true);
    }
  });
  test('streams run from left to right, or up and down', () => {
    const at = new Map(sketch.units.map((x) => [x.id, x.at]));
    for (const { from, to } of sketch.streams) {
      expect(from && to).toBeDefined();
      if (from && to)
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
