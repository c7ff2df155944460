import { describe, expect, test } from 'vitest';
import { describeStream, portWords } from '../../src/sketch/describe';
import {
  addNote,
  addUnit,
  bendStream,
  changeNote,
  clearSetting,
  connect,
  deleteNote,
  deleteStream,
  deleteUnits,
  disconnect,
  duplicateUnits,
  insertUnitOnStream,
  mirrorUnit,
  moveUnits,
  normaliseParts,
  setByPath,
  setChemicals,
  setDisplay,
  setLimit,
  setModel,
  setNumber,
  setSetting,
  setSite,
  setStreamName,
  setTag,
  setTitle,
  setUnitName,
  turnUnit,
  whyNotConnect,
} from '../../src/sketch/edits';
import { emptySketch } from '../../src/sketch/fresh';
import type { Sketch } from '../../src/sketch/types';
import {
  compiled,
  done,
  feedSketch,
  gapsOf,
  letDown,
  opened,
  refusedWith,
  s,
  twoFlashes,
  u,
  WITH_MILL,
} from './help';

const tags = (sketch: Sketch): string[] => sketch.units.map((x) => x.tag);
const ends = (sketch: Sketch): string[] =>
  sketch.streams.map((x) => `${x.number}: ${x.from?.join('.') ?? '-'} > ${x.to?.join('.') ?? '-'}`);
const build = (...kinds: readonly string[]): Sketch =>
  kinds.reduce((now, kind, k) => done(addUnit(now, kind, [k * 100, 0])).sketch, emptySketch('x'));

describe('adding a unit', () => {
  test('numbers tags by letters from 101, and identifiers from 1', () => {
    expect(
      tags(build('drum', 'drum', 'heater', 'cooler', 'feed', 'product', 'feed', 'join', 'divide')),
    ).toEqual(['V-101', 'V-102', 'E-101', 'E-102', 'FEED-1', 'PROD-1', 'FEED-2', 'J-1', 'D-1']);
  });

  test('goes on after the highest tag in use', () => {
    const sketch = done(setTag(build('drum'), u('u1'), 'V-301')).sketch;
    expect(tags(done(addUnit(sketch, 'drum', [0, 0])).sketch)).toEqual(['V-301', 'V-302']);
  });

  test('gives each fixed outlet a stream without a target, and none to numbered ones', () => {
    expect(ends(build('drum', 'divide'))).toEqual(['1: u1.vapour > -', '2: u1.liquid > -']);
  });

  test('stands on the grid, starts with the fresh settings, and says what it is called', () => {
    const edit = done(addUnit(emptySketch('x'), 'mill', [13, 21], WITH_MILL));
    expect(edit.sketch.units[0]).toMatchObject({ at: [16, 24], settings: { stages: 10 }, tag: 'M-101' });
    expect(edit.label).toBe('add M-101');
    expect(edit.unit).toBe('u1');
  });

  test('refuses a kind that is not there, "constructor" included', () => {
    expect(refusedWith(addUnit(emptySketch('x'), 'constructor', [0, 0]))).toBe('edit/unknown-kind');
  });
});

describe('connecting', () => {
  const base = build('feed', 'valve', 'join', 'drum', 'feed', 'divide');
  const [feed, valve, join, drum, feed2, divide] = ['u1', 'u2', 'u3', 'u4', 'u5', 'u6'].map(u) as [
    ReturnType<typeof u>,
    ...ReturnType<typeof u>[],
  ] as ReturnType<typeof u>[];
  const why = (a: [number, string], b: [number, string], sketch = base): string | undefined => {
    const ids = [feed, valve, join, drum, feed2, divide];
    return refusedWith(whyNotConnect(sketch, [ids[a[0]]!, a[1]], [ids[b[0]]!, b[1]]));
  };

  test('an outlet with an inlet keeps the number of the stream that hung there', () => {
    const edit = done(connect(base, [feed!, 'out'], [valve!, 'in']));
    expect(edit.sketch.streams.find((x) => x.id === edit.stream)).toEqual({
      id: 's1',
      number: '1',
      from: ['u1', 'out'],
      to: ['u2', 'in'],
    });
    expect(edit.sketch.streams).toHaveLength(base.streams.length);
    expect(edit.sketch.units).toBe(base.units);
  });

  test('works from either end', () => {
    expect(done(connect(base, [valve!, 'in'], [feed!, 'out'])).sketch).toEqual(
      done(connect(base, [feed!, 'out'], [valve!, 'in'])).sketch,
    );
  });

  test('a numbered port takes the next name and no other is renamed', () => {
    let sketch = done(connect(base, [feed!, 'out'], [join!, 'in'])).sketch;
    sketch = done(connect(sketch, [valve!, 'out'], [join!, 'in'])).sketch;
    sketch = done(connect(sketch, [feed2!, 'out'], [join!, 'in'])).sketch;
    const at = (x: Sketch): unknown[] =>
      x.streams.flatMap(({ number, to }) => (to && to[0] === join ? [`${number}>${to[1]}`] : []));
    expect(at(sketch)).toEqual(['1>in1', '2>in2', '6>in3']);
    sketch = done(disconnect(sketch, s('s2'))).sketch;
    expect(at(sketch)).toEqual(['1>in1', '6>in3']);
    sketch = done(connect(sketch, [valve!, 'out'], [join!, 'in'])).sketch;
    expect(at(sketch)).toEqual(['1>in1', '2>in4', '6>in3']);
  });

  test('a divide gets its outlets on connecting', () => {
    const edit = done(connect(base, [divide!, 'out'], [valve!, 'in']));
    expect(edit.sketch.streams.at(-1)).toMatchObject({ number: '7', from: ['u6', 'out1'], to: ['u2', 'in'] });
  });

  test('says why not', () => {
    expect(why([0, 'out'], [1, 'in'])).toBeUndefined();
    expect(why([0, 'out'], [4, 'out'])).toBe('edit/two-outlets');
    expect(why([1, 'in'], [2, 'in'])).toBe('edit/two-inlets');
    expect(why([1, 'out'], [1, 'in'])).toBe('edit/same-unit');
    expect(why([0, 'in'], [1, 'in'])).toBe('edit/no-such-port');
    expect(why([0, '__proto__'], [1, 'in'])).toBe('edit/no-such-port');
    const joined = done(connect(base, [feed!, 'out'], [valve!, 'in'])).sketch;
    expect(why([4, 'out'], [1, 'in'], joined)).toBe('edit/port-taken');
    expect(why([0, 'out'], [2, 'in'], joined)).toBe('edit/port-taken');
    expect(refusedWith(whyNotConnect(base, [u('u99'), 'out'], [valve!, 'in']))).toBe('edit/unknown-unit');
  });

  test('stops at the most streams that a numbered port may have', () => {
    let sketch = done(addUnit(emptySketch('x'), 'mill', [0, 0], WITH_MILL)).sketch;
    for (let k = 0; k < 4; k += 1) sketch = done(addUnit(sketch, 'feed', [0, 0], WITH_MILL)).sketch;
    const link = (k: number): ReturnType<typeof connect> =>
      connect(sketch, [u(`u${k}`), 'out'], [u('u1'), 'feed'], WITH_MILL);
    for (const k of [2, 3, 4]) sketch = done(link(k)).sketch;
    expect(refusedWith(link(5))).toBe('edit/ports-used-up');
  });
});

describe('taking streams away', () => {
  test('disconnecting leaves the stream hanging at its outlet with its number', () => {
    const sketch = done(disconnect(letDown(), s('s2'))).sketch;
    expect(ends(sketch)[1]).toBe('2: u2.out > -');
  });

  test('deleting a stream of a fixed outlet leaves it hanging; hanging it cannot be deleted', () => {
    const sketch = done(deleteStream(letDown(), s('s3'))).sketch;
    expect(ends(sketch)[2]).toBe('3: u3.vapour > -');
    expect(refusedWith(deleteStream(sketch, s('s3')))).toBe('edit/outlet-needs-stream');
  });

  test('deleting a stream of a numbered outlet removes it and what the settings say about that outlet', () => {
    const sketch = done(deleteStream(twoFlashes(), s('s12'))).sketch;
    expect(sketch.streams.some((x) => x.id === 's12')).toBe(false);
    expect(sketch.units.find((x) => x.tag === 'D-1')?.settings).toEqual({ shares: {} });
  });

  test('deleting a unit takes its streams along; outlets of others stay, inlets of others lose theirs', () => {
    const before = letDown();
    const edit = done(deleteUnits(before, new Set([u('u2')])));
    expect(tags(edit.sketch)).not.toContain('PV-1');
    expect(ends(edit.sketch)).toEqual(['1: u1.out > -', '3: u3.vapour > u4.in', '4: u3.liquid > u5.in']);
    expect(edit.sketch.units[0]).toBe(before.units[0]);
    expect(edit.label).toBe('delete PV-1');
    expect(done(deleteUnits(before, new Set([u('u2'), u('u3')]))).label).toBe('delete 2 units');
  });

  test('a stream or unit that is not there is refused by name', () => {
    const gone = [
      disconnect(letDown(), s('s99')),
      deleteStream(letDown(), s('s99')),
      setNumber(letDown(), s('s99'), '1'),
    ];
    expect(gone.map(refusedWith)).toEqual(gone.map(() => 'edit/unknown-stream'));
    expect(refusedWith(turnUnit(letDown(), u('u99')))).toBe('edit/unknown-unit');
  });

  test('notes on a deleted unit go with it, others stay', () => {
    let sketch = done(addNote(letDown(), 'check', { on: 'u2' })).sketch;
    sketch = done(addNote(sketch, 'free', { at: [8, 8] })).sketch;
    expect(done(deleteUnits(sketch, new Set([u('u2')]))).sketch.notes.map((n) => n.text)).toEqual(['free']);
  });
});

describe('inserting into a stream', () => {
  test('the stream ends at the new unit and a new one goes on to where it went', () => {
    const edit = done(insertUnitOnStream(letDown(), s('s2'), 'heater', [470, 320]));
    expect(ends(edit.sketch)[1]).toBe('2: u2.out > u6.in');
    expect(ends(edit.sketch).at(-1)).toBe('5: u6.out > u3.in1');
    expect(edit.label).toBe('put E-101 into stream 2');
  });
  test('a drum put into a stream sends its vapour on and lets its liquid hang', () => {
    const { sketch } = done(insertUnitOnStream(letDown(), s('s2'), 'drum', [470, 320]));
    expect(ends(sketch).slice(-2)).toEqual(['5: u6.vapour > u3.in1', '6: u6.liquid > -']);
  });
  test('feeds, products and hanging streams cannot serve', () => {
    expect(refusedWith(insertUnitOnStream(letDown(), s('s2'), 'feed', [0, 0]))).toBe('edit/no-inlet');
    expect(refusedWith(insertUnitOnStream(letDown(), s('s2'), 'product', [0, 0]))).toBe('edit/no-outlet');
    const hanging = done(disconnect(letDown(), s('s2'))).sketch;
    expect(refusedWith(insertUnitOnStream(hanging, s('s2'), 'valve', [0, 0]))).toBe('edit/nothing-to-part');
  });
});

describe('moving, turning, mirroring', () => {
  test('places fall on the grid and everything else is shared', () => {
    const before = letDown();
    const { sketch, label } = done(moveUnits(before, new Map([[u('u2'), [361, 330]]])));
    expect(sketch.units[1]?.at).toEqual([360, 328]);
    expect([sketch.units[0], sketch.units[2], sketch.model, sketch.streams[0]]).toEqual([
      before.units[0],
      before.units[2],
      before.model,
      before.streams[0],
    ]);
    expect(sketch.units[0]).toBe(before.units[0]);
    expect(sketch.streams[0]).toBe(before.streams[0]);
    expect(label).toBe('move PV-1');
  });
  test('a move to where it stands is no edit', () => {
    const before = letDown();
    expect(done(moveUnits(before, new Map([[u('u2'), [360, 320]]]))).sketch).toBe(before);
  });
  test('what was moved is marked as placed by hand, and what was lined up with it; a turned, new or pasted unit is not', () => {
    const byHand = (sketch: Sketch): string[] => sketch.units.filter((x) => x.byHand).map((x) => x.id);
    const before = letDown();
    expect(byHand(before)).toEqual([]);
    const places = new Map([
      [u('u2'), [360, 400]],
      [u('u3'), before.units[2]!.at],
    ] as const);
    const { sketch } = done(moveUnits(before, places));
    expect(byHand(sketch)).toEqual(['u2', 'u3']);
    expect(byHand(done(turnUnit(before, u('u2'))).sketch)).toEqual([]);
    expect(byHand(done(addUnit(sketch, 'valve', [800, 800])).sketch)).toEqual(['u2', 'u3']);
    const twice = done(duplicateUnits(sketch, new Set([u('u2'), u('u3')]), [400, 400])).sketch;
    expect(twice.units).toHaveLength(sketch.units.length + 2);
    expect(byHand(twice)).toEqual(['u2', 'u3']);
  });
  test('bends move with both their units and stay when only one moves', () => {
    const bent = done(bendStream(letDown(), s('s3'), [[584, 200]])).sketch;
    const both = new Map([
      [u('u3'), [600, 336]],
      [u('u4'), [888, 208]],
    ] as const);
    expect(done(moveUnits(bent, both)).sketch.streams[2]?.via).toEqual([[600, 216]]);
    expect(done(moveUnits(bent, new Map([[u('u3'), [600, 336]]]))).sketch.streams[2]?.via).toEqual([
      [584, 200],
    ]);
  });
  test('four quarter turns and two mirrors lead back', () => {
    const before = letDown();
    let sketch = before;
    for (let k = 0; k < 4; k += 1) sketch = done(turnUnit(sketch, u('u2'))).sketch;
    for (let k = 0; k < 2; k += 1) sketch = done(mirrorUnit(sketch, u('u2'))).sketch;
    expect(sketch).toEqual(before);
    expect(done(turnUnit(before, u('u2'))).sketch.units[1]?.turn).toBe(90);
    expect(done(mirrorUnit(before, u('u2'))).sketch.units[1]?.mirror).toBe(true);
  });
});

describe('names', () => {
  test('tags and numbers stay unique', () => {
    expect(refusedWith(setTag(letDown(), u('u2'), 'V-1'))).toBe('edit/tag-taken');
    expect(refusedWith(setTag(letDown(), u('u2'), '  '))).toBe('edit/empty-text');
    expect(refusedWith(setNumber(letDown(), s('s2'), '1'))).toBe('edit/number-taken');
    expect(done(setNumber(letDown(), s('s2'), '2a')).sketch.streams[1]?.number).toBe('2a');
  });
  test('a blank name is no name, and the same name no edit', () => {
    const before = letDown();
    expect(done(setUnitName(before, u('u2'), ' Let-down valve ')).sketch).toBe(before);
    expect('name' in (done(setUnitName(before, u('u2'), ' ')).sketch.units[1] ?? {})).toBe(false);
    expect('name' in (done(setStreamName(before, s('s1'), '')).sketch.streams[0] ?? {})).toBe(false);
  });
  test('a stream without a name is described by where it comes from', () => {
    const sketch = letDown();
    const plain = sketch.streams.map(({ name: _, ...stream }) => stream);
    expect(plain.map((x) => describeStream(sketch, x))).toEqual([
      'Live liquid',
      'PV-1 outlet',
      'V-1 vapour',
      'V-1 liquid',
    ]);
    expect(sketch.streams.map((x) => describeStream(sketch, x))[1]).toBe('Let-down, two phases');
    expect(['vapourDistillate', 'out2', 'in1', 'side1'].map(portWords)).toEqual([
      'vapour distillate',
      'outlet 2',
      'inlet 1',
      'side 1',
    ]);
  });
});

describe('settings', () => {
  test('one value is replaced and the rest shared', () => {
    const before = letDown();
    const { sketch, label } = done(setSetting(before, u('u1'), 'state.T', '60 degC'));
    expect(sketch.units[0]?.settings).toMatchObject({ state: { T: '60 degC', vapourFraction: 0 } });
    expect(sketch.units[0]?.settings.composition).toBe(before.units[0]?.settings.composition);
    expect(sketch.units[1]).toBe(before.units[1]);
    expect(label).toBe('set FEED-1 state.T');
    expect(done(setSetting(before, u('u1'), 'state.T', '52 degC')).sketch).toBe(before);
  });
  test('groups and lists on the way are made as the kind describes them', () => {
    const drum = done(setSetting(letDown(), u('u3'), 'h.T', '40 degC')).sketch;
    expect(drum.units[2]?.settings).toEqual({ h: { T: '40 degC' } });
    let mill = done(addUnit(emptySketch('x'), 'mill', [0, 0], WITH_MILL)).sketch;
    mill = done(setSetting(mill, u('u1'), 'fixedBy.0.fix', 'ratio', WITH_MILL)).sketch;
    mill = done(setSetting(mill, u('u1'), 'fixedBy.0.value', 2, WITH_MILL)).sketch;
    expect(mill.units[0]?.settings).toEqual({ stages: 10, fixedBy: [{ fix: 'ratio', value: 2 }] });
    expect(refusedWith(setSetting(mill, u('u1'), 'fixedBy.4.fix', 'ratio', WITH_MILL))).toBe('edit/bad-path');
  });
  test('a place that the kind does not have is refused', () => {
    const wrong = ['P', 'p.Q', 'p.P.x', 'toString', 'p.__proto__', ''];
    expect(wrong.map((path) => refusedWith(setSetting(letDown(), u('u2'), path, '1 bar')))).toEqual(
      wrong.map(() => 'edit/no-such-setting'),
    );
  });
  test('clearing the last value of a group clears the group', () => {
    const drum = done(setSetting(letDown(), u('u3'), 'h.T', '40 degC')).sketch;
    expect(done(clearSetting(drum, u('u3'), 'h.T')).sketch.units[2]?.settings).toEqual({});
    expect(done(clearSetting(drum, u('u3'), 'p.P')).sketch).toBe(drum);
  });
  test('TAG.path with a value: JSON where it parses, else text; tags may hold dots', () => {
    const dotted = done(setTag(letDown(), u('u2'), 'PV.1')).sketch;
    const set = (place: string, value: string): unknown =>
      done(setByPath(dotted, place, value)).sketch.units.map((x) => x.settings);
    expect(set('PV.1.p', '{"ratio": 0.5}')).toMatchObject({ 1: { p: { ratio: 0.5 } } });
    expect(set('PV.1.p.P', '6 bar')).toMatchObject({ 1: { p: { P: '6 bar' } } });
    expect(set('FEED-1.state.vapourFraction', '0.5')).toMatchObject({
      0: { state: { vapourFraction: 0.5 } },
    });
    expect(set('FEED-1.composition.parts.n-butane', '12 %')).toMatchObject({
      0: { composition: { parts: { 'n-butane': '12 %' } } },
    });
    expect(refusedWith(setByPath(dotted, 'FEED-1.flow.share', '14 %'))).toBe('edit/bad-path');
    expect(refusedWith(setByPath(dotted, 'PV.2.p.P', '6 bar'))).toBe('edit/unknown-tag');
    expect(refusedWith(setByPath(dotted, 'PV.1.p.Q', '6 bar'))).toBe('edit/no-such-setting');
    expect(refusedWith(setByPath(dotted, 'PV.1', '6 bar'))).toBe('edit/unknown-tag');
  });
  test('list numbers in a path count from 0', () => {
    const mill = done(addUnit(emptySketch('x'), 'mill', [0, 0], WITH_MILL)).sketch;
    const list =
      '[{"fix": "ratio", "value": 2}, {"fix": "flow", "product": "main", "value": {"share": "10 %", "of": "feed", "basis": "mole"}}]';
    const one = done(setByPath(mill, 'M-101.fixedBy', list, WITH_MILL)).sketch;
    const two = done(setByPath(one, 'M-101.fixedBy.1.value.share', '15 %', WITH_MILL)).sketch;
    expect(two.units[0]?.settings.fixedBy).toMatchObject([
      { value: 2 },
      { value: { share: '15 %', of: 'feed' } },
    ]);
  });
});

describe('parts are normalised as they are written', () => {
  test('units and order stay, and the sum is 1 afterwards', async () => {
    const parts = { methane: '30 %', 'n-butane': 0.4, 'n-decane': '310000 ppm' };
    const sketch = feedSketch({ composition: { basis: 'mole', parts } });
    expect(gapsOf(await compiled(sketch))).toEqual(['sketch/parts-sum-near at composition.parts']);
    const next = done(normaliseParts(sketch, u('u1'), 'composition.parts')).sketch;
    expect(next.units[0]?.settings.composition).toEqual({
      basis: 'mole',
      parts: { methane: '29.702970297 %', 'n-butane': 0.39603960396, 'n-decane': '306930.693069 ppm' },
    });
    expect(gapsOf(await compiled(next))).toEqual([]);
  });
  test('nothing to scale is refused', () => {
    const sketch = feedSketch({ composition: { basis: 'mole', parts: { methane: '0 %' } } });
    expect(refusedWith(normaliseParts(sketch, u('u1'), 'composition.parts'))).toBe(
      'edit/nothing-to-normalise',
    );
  });
});

describe('the list of chemicals', () => {
  test('may be put in another order and extended', () => {
    const before = letDown();
    const turned = [...before.chemicals].reverse();
    expect(done(setChemicals(before, turned)).sketch.chemicals).toEqual(turned);
    expect(done(setChemicals(before, [...before.chemicals, 'water'])).label).toBe('add water');
    expect(done(setChemicals(before, [...before.chemicals])).sketch).toBe(before);
    expect(refusedWith(setChemicals(before, ['methane', 'methane']))).toBe('edit/chemical-twice');
  });
  test('a chemical in use is not taken away, unless its entries may go too', () => {
    const before = letDown();
    const rest = before.chemicals.filter((c) => c !== 'propane');
    const refused = setChemicals(before, rest);
    expect(refusedWith(refused)).toBe('edit/chemical-in-use');
    expect(refused.ok ? [] : refused.evidence.map((e) => e.text)).toEqual([
      'FEED-1.composition.parts.propane',
    ]);
    const edit = done(setChemicals(before, rest, { cleanUp: true }));
    expect(edit.notes?.map((n) => n.code)).toEqual(['sketch/parts-removed']);
    expect(edit.sketch.units[0]?.settings.composition).not.toHaveProperty('parts.propane');
    expect(edit.sketch.units[1]).toBe(before.units[1]);
  });
  test('a setting that is called like a chemical is none of its entries', () => {
    const own = { id: 'P', own: { name: 'product', MW: 60, Cp: [{ form: 'monatomic' }] } };
    const before = opened({ ...letDown(), chemicals: [...letDown().chemicals, own] });
    const edit = done(setChemicals(before, letDown().chemicals, { cleanUp: true }));
    expect(edit.notes).toEqual([]);
    expect(edit.sketch.units).toBe(before.units);
  });
  test('a reaction loses the chemical it counts by, when that is taken away', () => {
    const before = opened({
      ...letDown(),
      units: [
        {
          id: 'r',
          tag: 'R-101',
          kind: 'reactor',
          settings: { reactions: [{ stoichiometry: { propane: -1, methane: 3 }, of: 'propane' }] },
        },
      ],
      streams: [],
    });
    const rest = before.chemicals.filter((c) => c !== 'propane');
    const edit = done(setChemicals(before, rest, { cleanUp: true }));
    expect(edit.sketch.units[0]?.settings).toEqual({ reactions: [{ stoichiometry: { methane: 3 } }] });
    expect(edit.notes?.map((n) => n.at.path)).toEqual([
      'reactions.0.stoichiometry.propane',
      'reactions.0.of',
    ]);
  });
  test('a part of zero is no use', () => {
    const sketch = done(setSetting(letDown(), u('u1'), 'composition.parts.propane', '0 %')).sketch;
    expect(
      done(
        setChemicals(
          sketch,
          sketch.chemicals.filter((c) => c !== 'propane'),
        ),
      ).notes,
    ).toEqual([]);
  });
});

describe('the rest of the document', () => {
  test('title, site, model, display and limits change alone, and back again', () => {
    const before = letDown();
    expect(done(setTitle(before, 'author', 'N. N.')).sketch.title.author).toBe('N. N.');
    expect(done(setSite(before, 'pressure', '0.95 bar')).sketch.site).toEqual({ pressure: '0.95 bar' });
    expect(done(setSite(before, 'pressure', '')).sketch).toBe(before);
    expect(done(setModel(before, { alpha: '1978' })).sketch.model).toMatchObject({
      alpha: '1978',
      bankPairs: true,
    });
    expect(done(setModel(before, { alpha: undefined })).sketch.model).not.toHaveProperty('alpha');
    expect(done(setDisplay(before, { set: 'US' })).sketch.display).toMatchObject({ set: 'US' });
    const limited = done(setLimit(before, 'valve/cools', '30 K')).sketch;
    expect(limited.limits).toEqual({ 'valve/cools': '30 K' });
    expect(done(setLimit(limited, 'valve/cools', undefined)).sketch).toEqual(before);
    expect(done(setTitle(before, 'title', 'Let-down')).sketch).toBe(before);
  });
  test('notes come, change and go', () => {
    const one = done(addNote(letDown(), 'first')).sketch;
    const two = done(changeNote(one, 'n1', { text: 'second', at: [16, 16] })).sketch;
    expect(two.notes).toEqual([{ id: 'n1', text: 'second', at: [16, 16] }]);
    expect(done(deleteNote(two, 'n1')).sketch.notes).toEqual([]);
    expect(refusedWith(changeNote(one, 'n7', { text: 'x' }))).toBe('edit/unknown-note');
  });
});
