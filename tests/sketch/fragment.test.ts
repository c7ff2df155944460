import { describe, expect, test } from 'vitest';
import {
  addNote,
  addUnit,
  connect,
  copyPart,
  deleteAndJoin,
  duplicateUnits,
  type Fragment,
  fragmentText,
  pasteFragment,
  readFragment,
  reconnect,
  setSetting,
} from '../../src/sketch/edits';
import { emptySketch } from '../../src/sketch/fresh';
import { openSketch } from '../../src/sketch/read';
import type { Json, Sketch } from '../../src/sketch/types';
import { writeSketch } from '../../src/sketch/write';
import { compiled, done, exampleText, gapsOf, letDown, opened, refusedWith, s, u } from './help';

const ends = (sketch: Sketch): string[] =>
  sketch.streams.map((x) => `${x.number}: ${x.from?.join('.') ?? '-'} > ${x.to?.join('.') ?? '-'}`);
const all = (sketch: Sketch) => new Set(sketch.units.map((unit) => unit.id));
const part = (sketch: Sketch, ...ids: string[]): Fragment => copyPart(sketch, new Set(ids.map(u)))!;
const throughText = (fragment: Fragment): Fragment => readFragment(fragmentText(fragment))!;
/** A sketch that opens again from its own text says that no end, id, tag or number is wrong. */
const isSound = (sketch: Sketch): boolean => openSketch(writeSketch(sketch)).ok;

const column = (): Sketch => opened(exampleText('aromatic-condensate'));

describe('copying and pasting', () => {
  test('keeps the streams between copied units, with the next ids, tags and numbers', () => {
    const sketch = letDown();
    const [first] = sketch.units;
    const made = done(pasteFragment(sketch, part(sketch, ...all(sketch)), [80, 400]));
    expect(made.label).toBe('paste 5 units');
    expect(made.units).toHaveLength(5);
    expect(isSound(made.sketch)).toBe(true);
    expect(made.sketch.streams).toHaveLength(2 * sketch.streams.length);
    const copy = made.sketch.units[5]!;
    expect(copy.at).toEqual([first!.at[0] + 80, first!.at[1] + 400]);
    expect(copy.settings).toEqual(first!.settings);
    expect(copy.tag).not.toBe(first!.tag);
    // Everything that runs between the copies runs as it did between the originals.
    const at = (list: Sketch['streams'], from: number) =>
      list.map((x) =>
        [x.from, x.to].map(
          (end) => end && [made.sketch.units.findIndex((k) => k.id === end[0]) - from, end[1]],
        ),
      );
    const n = sketch.streams.length;
    expect(at(made.sketch.streams.slice(n), 5)).toEqual(at(made.sketch.streams.slice(0, n), 0));
  });

  test('keeps every end where a unit and a stream of a file have the same id', () => {
    const sketch = letDown();
    const [first] = sketch.streams;
    const unit = sketch.units.at(-1)!;
    const asStream = (id: string): string => (id === first!.id ? unit.id : id);
    // Ids are the file's own affair: they are unique among units and among streams, not over both.
    const twins = opened({ ...sketch, streams: sketch.streams.map((x) => ({ ...x, id: asStream(x.id) })) });
    const made = done(pasteFragment(twins, part(twins, ...all(twins)), [0, 400]));
    expect(isSound(made.sketch)).toBe(true);
    expect(made.sketch.streams.filter((x) => x.to)).toHaveLength(
      2 * sketch.streams.filter((x) => x.to).length,
    );
  });

  test('a stream that led outside comes along with a loose end, one that came from outside does not', () => {
    const sketch = letDown();
    const drum = sketch.units.find((unit) => unit.kind === 'drum')!;
    const made = done(pasteFragment(sketch, part(sketch, drum.id), [0, 200]));
    const [copy] = made.units!;
    const mine = made.sketch.streams.filter((x) => x.from?.[0] === copy || x.to?.[0] === copy);
    expect(mine.map((x) => [x.from?.[1], x.to])).toEqual([
      ['vapour', undefined],
      ['liquid', undefined],
    ]);
    expect(made.label).toBe('paste V-101');
    expect(made.sketch.units.at(-1)!.tag).toBe('V-101');
  });

  test('a setting that names a stream follows the copied stream, or stays with the one outside in the same sketch', () => {
    const sketch = column();
    const naming = sketch.units.find((unit) => JSON.stringify(unit.settings).includes('"stream"'))!;
    const named = /"stream":"([^"]+)"/.exec(JSON.stringify(naming.settings))![1]!;
    const whole = done(pasteFragment(sketch, part(sketch, ...all(sketch)), [0, 900]));
    const copy = whole.sketch.units[sketch.units.length + sketch.units.indexOf(naming)]!;
    const renamed = /"stream":"([^"]+)"/.exec(JSON.stringify(copy.settings))![1]!;
    const k = sketch.streams.findIndex((x) => x.id === named);
    expect(renamed).toBe(whole.sketch.streams[sketch.streams.length + k]!.id);
    expect(whole.notes).toEqual([]);

    const alone = done(pasteFragment(sketch, part(sketch, naming.id), [0, 900]));
    expect(alone.sketch.units.at(-1)!.settings).toEqual(naming.settings);
  });

  test('in another sketch a share of a stream that did not come along is left out, said, and asked for', async () => {
    const sketch = column();
    const naming = sketch.units.find((unit) => JSON.stringify(unit.settings).includes('"stream"'))!;
    const text = fragmentText(part(sketch, naming.id));
    const made = done(pasteFragment(emptySketch('other'), readFragment(text)!, [0, 0]));
    const [copy] = made.sketch.units;
    expect(JSON.stringify(copy!.settings)).not.toContain('"stream"');
    expect(made.notes!.map((n) => n.code)).toEqual(['sketch/reference-lost']);
    expect(made.notes![0]!.at.unit).toBe(copy!.id);
    const gaps = gapsOf(await compiled(made.sketch));
    expect(gaps.filter((gap) => gap.startsWith('sketch/needs-value at fixedBy'))).toHaveLength(1);
  });

  test('the chemicals that settings name come along, and only those', () => {
    const sketch = letDown();
    const feed = sketch.units.find((unit) => unit.kind === 'feed')!;
    const valve = sketch.units.find((unit) => unit.kind === 'valve')!;
    const into = emptySketch('other');
    const fed = done(pasteFragment(into, throughText(part(sketch, feed.id)), [0, 0])).sketch;
    expect(fed.chemicals).toEqual(sketch.chemicals);
    expect(done(pasteFragment(into, throughText(part(sketch, valve.id)), [0, 0])).sketch.chemicals).toEqual(
      [],
    );
  });

  test('a chemical of one’s own that is another one here is kept as it is here, and that is said', () => {
    const own = (MW: number): Sketch['chemicals'] =>
      [{ id: 'oil', own: { name: 'Oil', MW, Cp: [] } }] as unknown as Sketch['chemicals'];
    const base = done(addUnit({ ...emptySketch('one'), chemicals: own(200) }, 'feed', [0, 0])).sketch;
    const settings: Json = { basis: 'mole', parts: { oil: '100 %' } };
    const from = done(setSetting(base, u('u1'), 'composition', settings)).sketch;
    const made = done(
      pasteFragment({ ...emptySketch('two'), chemicals: own(210) }, part(from, 'u1'), [0, 0]),
    );
    expect(made.sketch.chemicals).toEqual(own(210));
    expect(made.notes!.map((n) => n.code)).toEqual(['sketch/chemical-differs']);
  });

  test('notes on copied units, and notes of the sheet that were chosen, come along', () => {
    let sketch = done(addNote(letDown(), 'check the level', { on: 'u1' })).sketch;
    sketch = done(addNote(sketch, 'Battery limit', { kind: 'area', at: [8, 16], size: [320, 200] })).sketch;
    const id = sketch.notes[1]!.id;
    const made = done(duplicateUnits(sketch, new Set([u('u1')]), [16, 8], new Set([id])));
    expect(made.label).toBe(`duplicate ${sketch.units[0]!.tag} and 2 notes`);
    const [, , on, area] = made.sketch.notes;
    expect(on!.on).toBe(made.units![0]);
    expect(area).toMatchObject({ kind: 'area', at: [24, 24], size: [320, 200] });
    expect(new Set(made.sketch.notes.map((n) => n.id)).size).toBe(4);
    expect(isSound(made.sketch)).toBe(true);
  });

  test('nothing chosen is nothing copied', () => {
    expect(copyPart(letDown(), new Set())).toBeUndefined();
  });

  test.each([
    ['words', 'hello'],
    ['another format', '{"format":"splitwright.sketch","version":1}'],
    [
      'another version',
      '{"format":"splitwright.fragment","version":7,"chemicals":[],"units":[],"streams":[]}',
    ],
    ['no list of units', '{"format":"splitwright.fragment","version":1,"chemicals":[],"streams":[]}'],
    [
      'an end at no unit',
      '{"format":"splitwright.fragment","version":1,"chemicals":[],"units":[],"streams":[{"id":"s1","number":"1","from":["u9","out"]}]}',
    ],
  ])('the clipboard with %s is no part of a sketch', (_, text) => {
    expect(readFragment(text)).toBeUndefined();
  });
});

describe('deleting a unit and joining its line', () => {
  test('the stream before goes on to where the stream after went, under its own number', () => {
    const sketch = letDown();
    const valve = sketch.units.find((unit) => unit.kind === 'valve')!;
    const before = sketch.streams.find((x) => x.to?.[0] === valve.id)!;
    const after = sketch.streams.find((x) => x.from?.[0] === valve.id)!;
    const made = done(deleteAndJoin(sketch, valve.id));
    expect(made.label).toBe(`delete ${valve.tag} and join its line`);
    expect(made.sketch.streams.find((x) => x.number === before.number)).toMatchObject({
      from: before.from,
      to: after.to,
    });
    expect(made.sketch.streams).toHaveLength(sketch.streams.length - 1);
    expect(isSound(made.sketch)).toBe(true);
  });

  test('is refused where the line parts, ends or comes from nowhere', () => {
    const sketch = letDown();
    for (const kind of ['feed', 'drum', 'product']) {
      const unit = sketch.units.find((x) => x.kind === kind)!;
      expect(refusedWith(deleteAndJoin(sketch, unit.id))).toBe('edit/nothing-to-join');
    }
  });
});

describe('leading a stream elsewhere', () => {
  const three = (): Sketch => {
    let sketch = emptySketch('x');
    for (const kind of ['feed', 'valve', 'heater']) sketch = done(addUnit(sketch, kind, [0, 0])).sketch;
    return done(connect(sketch, [u('u1'), 'out'], [u('u2'), 'in'])).sketch;
  };

  test('keeps its number and its source', () => {
    const made = done(reconnect(three(), s('s1'), [u('u3'), 'in']));
    expect(ends(made.sketch)[0]).toBe('1: u1.out > u3.in');
    expect(made.label).toBe('lead stream 1 to E-101');
  });

  test('to where it leads already changes nothing, and to an outlet it is refused', () => {
    const sketch = three();
    expect(done(reconnect(sketch, s('s1'), [u('u2'), 'in'])).sketch).toBe(sketch);
    expect(refusedWith(reconnect(sketch, s('s1'), [u('u3'), 'out']))).toBe('edit/two-outlets');
  });
});
