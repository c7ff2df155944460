import { describe, expect, test } from 'vitest';
import { MIGRATIONS, type Migration, oldest, VERSION } from '../../src/sketch/file/migrate';
import { type Opened, openSketch } from '../../src/sketch/read';
import { writeSketch } from '../../src/sketch/write';
import { codes, exampleText, type Loose, letDown, loose, opened } from './help';

const problems = (result: Opened): string[] =>
  result.ok ? [] : result.problems.map((p) => `${p.code} at ${p.path}`);
const slot = (result: Opened, name: string): unknown => {
  const found = result.ok ? undefined : result.problems[0].evidence.find((e) => e.name === name);
  return found?.text ?? found?.value;
};
const spoilt = (spoil: (raw: Loose & { units: Loose[]; streams: Loose[] }) => void): Opened => {
  const raw = loose();
  spoil(raw);
  return openSketch(raw);
};

describe('text that is no JSON is refused with the place of the fault', () => {
  test.each([
    ['{\n  "format": "splitwright.sketch",\n  "version" 1\n}', 3, 13, '1'],
    ['{"a": [1, 2,]}', 1, 13, ']}'],
    ['{"a": 1,}', 1, 9, '}'],
    ['{"a": 01}', 1, 8, '1}'],
    ['{"a": "b', 1, 7, '"b'],
    ['{"a": "\\x"}', 1, 7, '"\\x"}'],
    ['{"a": 1} {', 1, 10, '{'],
    ['{"a": 1', 1, 8, ''],
    ['{a: 1}', 1, 2, 'a: 1}'],
    ['nothing', 1, 1, 'nothing'],
  ])('%s', (text, line, column, found) => {
    const result = openSketch(text);
    expect(problems(result)).toEqual(['file/not-json at ']);
    expect([slot(result, 'line'), slot(result, 'column'), slot(result, 'found')]).toEqual([
      line,
      column,
      found,
    ]);
    expect(() => JSON.parse(text)).toThrow();
  });

  test('a key that stands twice, of which JSON.parse would drop one, is told', () => {
    const result = openSketch('{"format": "splitwright.sketch",\n "format": "other"}');
    expect(problems(result)).toEqual(['file/repeated-key at ']);
    expect([slot(result, 'line'), slot(result, 'column')]).toEqual([2, 2]);
  });

  test('nothing but blanks is an empty file, and a byte order mark is no fault', () => {
    expect(problems(openSketch(' \n'))).toEqual(['file/empty at ']);
    expect(openSketch(`\ufeff${exampleText('let-down')}`).ok).toBe(true);
  });

  test('endless nesting ends with a reason, in text and in data', () => {
    expect(problems(openSketch('['.repeat(200_000)))).toEqual(['file/too-deep at ']);
    const circle: Loose = {};
    circle.self = circle;
    expect(problems(openSketch(circle))[0]).toMatch(/^file\/too-deep at self/);
    let wide: unknown = 0;
    for (let k = 0; k < 60; k += 1) wide = [wide, wide];
    expect(problems(openSketch(wide))).toEqual(['file/too-large at ']);
  });

  test('a number beyond all bounds is refused at its place', () => {
    const text = exampleText('let-down').replace('"vapourFraction": 0', '"vapourFraction": 1e999');
    expect(problems(openSketch(text))).toEqual([
      'file/out-of-range at units.0.settings.state.vapourFraction',
    ]);
  });
});

describe('files that are no sketch of this version', () => {
  test.each([
    ['a foreign file', { nodes: [] }, 'file/not-a-sketch at format'],
    ['a results file', { format: 'splitwright.results', version: 1 }, 'file/not-a-sketch at format'],
    ['a list', [], 'file/not-a-sketch at '],
    ['nothing', undefined, 'file/not-a-sketch at '],
    ['a newer one', { format: 'splitwright.sketch', version: 2 }, 'file/newer-version at version'],
    ['one without a version', { format: 'splitwright.sketch' }, 'file/missing at version'],
    ['half a version', { format: 'splitwright.sketch', version: 0.5 }, 'file/wrong-type at version'],
    ['a version in words', { format: 'splitwright.sketch', version: '1' }, 'file/wrong-type at version'],
  ])('%s is refused', (_, raw, reason) => {
    expect(problems(openSketch(raw))).toEqual([reason]);
  });

  test('every required part that is missing is named at once', () => {
    expect(problems(openSketch({ format: 'splitwright.sketch', version: 1 }))).toEqual([
      'file/missing at chemicals',
      'file/missing at model',
      'file/missing at units',
      'file/missing at streams',
    ]);
  });
});

describe('faults inside a sketch are refused with place and reason', () => {
  const cases: [string, (raw: Loose & { units: Loose[]; streams: Loose[] }) => void, string][] = [
    ['two units with one tag', (r) => (r.units[2]!.tag = 'PV-1'), 'file/repeated-tag at units.2.tag'],
    ['two units with one id', (r) => (r.units[2]!.id = 'u1'), 'file/repeated-id at units.2.id'],
    ['a unit without a tag', (r) => delete r.units[0]!.tag, 'file/missing at units.0.tag'],
    ['a blank tag', (r) => (r.units[0]!.tag = ' '), 'file/empty-text at units.0.tag'],
    ['settings that are a list', (r) => (r.units[1]!.settings = []), 'file/wrong-type at units.1.settings'],
    ['a place of text', (r) => (r.units[1]!.at = ['1', '2']), 'file/wrong-type at units.1.at'],
    ['a place at the moon', (r) => (r.units[1]!.at = [1e9, 0]), 'file/out-of-range at units.1.at'],
    ['an odd turn', (r) => (r.units[1]!.turn = 45), 'file/not-one-of at units.1.turn'],
    [
      'two streams with one number',
      (r) => (r.streams[1]!.number = '1'),
      'file/repeated-number at streams.1.number',
    ],
    ['a number that is no text', (r) => (r.streams[1]!.number = 2), 'file/wrong-type at streams.1.number'],
    [
      'a stream to a unit that is not there',
      (r) => (r.streams[0]!.to = ['u9', 'in']),
      'file/unknown-unit at streams.0.to',
    ],
    [
      'a stream to a port that is not there',
      (r) => (r.streams[0]!.to = ['u2', 'inn']),
      'file/unknown-port at streams.0.to',
    ],
    [
      'a stream to the bare stem of a numbered port',
      (r) => (r.streams[1]!.to = ['u3', 'in']),
      'file/unknown-port at streams.1.to',
    ],
    [
      'a stream that ends at an outlet',
      (r) => (r.streams[0]!.to = ['u2', 'out']),
      'file/wrong-direction at streams.0.to',
    ],
    ['two streams on one port', (r) => (r.streams[1]!.to = ['u2', 'in']), 'file/port-taken at streams.1.to'],
    ['an end that is no pair', (r) => (r.streams[0]!.from = 'u1'), 'file/wrong-type at streams.0.from'],
    [
      'a chemical twice',
      (r) => (r.chemicals = ['methane', 'methane']),
      'file/repeated-chemical at chemicals.1',
    ],
    ['a chemical that is a number', (r) => (r.chemicals = [7]), 'file/wrong-type at chemicals.0'],
    ['a model that is text', (r) => (r.model = 'raoult'), 'file/wrong-type at model'],
    ['measures nobody knows', (r) => (r.display = { set: 'cgs' }), 'file/not-one-of at display.set'],
    ['a note without text', (r) => (r.notes = [{}]), 'file/missing at notes.0.text'],
    ['a title of numbers', (r) => (r.title = { title: 3 }), 'file/wrong-type at title.title'],
    [
      'a site pressure that is a list',
      (r) => (r.site = { pressure: [] }),
      'file/wrong-type at site.pressure',
    ],
  ];
  test.each(cases)('%s', (_, spoil, reason) => {
    expect(problems(spoilt(spoil))).toEqual([reason]);
  });

  test('a hopeless file lists the first fifty faults and how many more there are', () => {
    const result = spoilt((r) => {
      r.chemicals = Array.from({ length: 80 }, () => 1);
    });
    expect(problems(result)).toHaveLength(51);
    expect(result.ok ? undefined : result.problems.at(-1)).toMatchObject({
      code: 'file/more-problems',
      evidence: [{ value: 30 }],
    });
  });
});

describe('an own chemical is checked row by row', () => {
  const own = { name: 'Oil', MW: 200, Cp: [{ form: 'poly5', c: [200] }] };
  const withOwn = (change: Loose): Opened =>
    openSketch({
      format: 'splitwright.sketch',
      version: 1,
      chemicals: [{ id: 'oil', own: { ...own, ...change } }],
      model: { kind: 'raoult' },
      units: [],
      streams: [],
    });
  test('a sound one opens', () => expect(withOwn({}).ok).toBe(true));
  test.each([
    ['no molar mass', { MW: undefined }, 'file/missing at chemicals.0.own.MW'],
    ['a molar mass of nothing', { MW: 0 }, 'file/out-of-range at chemicals.0.own.MW'],
    ['a form nobody knows', { Cp: [{ form: 'x', c: [] }] }, 'file/not-one-of at chemicals.0.own.Cp.0.form'],
    [
      'a vapour pressure as heat capacity',
      { Cp: [{ form: 'dippr101', c: [1, 2] }] },
      'file/form-does-not-fit at chemicals.0.own.Cp.0.form',
    ],
    [
      'too few coefficients',
      { Psat: [{ form: 'wagner25', c: [1, 2, 3] }] },
      'file/too-few-coefficients at chemicals.0.own.Psat.0.c',
    ],
    [
      'an Antoine row that does not say its units',
      { Psat: [{ form: 'antoine', c: [1, 2, 3], log: '10', P: 'bar' }] },
      'file/missing at chemicals.0.own.Psat.0.T',
    ],
    [
      'a range upside down',
      { Cp: [{ form: 'poly5', c: [1], Tmin: 500, Tmax: 300 }] },
      'file/out-of-range at chemicals.0.own.Cp.0.Tmax',
    ],
  ])('%s', (_, change, reason) => {
    expect(problems(withOwn(change))).toEqual([reason]);
  });
});

describe('opening fills what may be absent and keeps what it does not know', () => {
  const least = {
    format: 'splitwright.sketch',
    version: 1,
    chemicals: ['methane'],
    model: { kind: 'peng-robinson' },
    units: [
      { id: 'u1', tag: 'FEED-1', kind: 'feed', settings: {} },
      { id: 'u2', tag: 'V-1', kind: 'drum', settings: {} },
    ],
    streams: [{ id: 's4', number: '4', from: ['u1', 'out'], to: ['u2', 'in1'] }],
  };

  test('places, title, site, display, notes and id are there afterwards', () => {
    const sketch = opened(least);
    expect(sketch).toMatchObject({ id: 'new-id', title: {}, site: {}, notes: [] });
    expect(sketch.display.labels.length).toBeGreaterThan(0);
    expect(sketch.units.map((unit) => unit.at)).toEqual([
      [96, 128],
      [256, 128],
    ]);
  });

  test('choices of the model stay open, so that they are listed as assumptions', () => {
    expect(opened(least).model).toEqual({ kind: 'peng-robinson' });
  });

  test('an outlet without a stream gets one with the next free number and no target', () => {
    const result = openSketch(least);
    const streams = result.ok ? result.sketch.streams.slice(1) : [];
    expect(streams).toEqual([
      { id: 's5', number: '5', from: ['u2', 'vapour'] },
      { id: 's6', number: '6', from: ['u2', 'liquid'] },
    ]);
    expect(result.ok && codes(result.notes)).toEqual(['sketch/stream-added', 'sketch/stream-added']);
  });

  test('unknown fields survive opening and writing', () => {
    const raw = { ...least, aims: [{ x: 1 }], units: [{ ...least.units[0], colour: 'red' }], streams: [] };
    const back = JSON.parse(writeSketch(opened(raw))) as typeof raw;
    expect(back.aims).toEqual([{ x: 1 }]);
    expect(back.units[0]).toMatchObject({ colour: 'red' });
  });

  test('an unknown kind of unit, its streams and an unknown model are kept and told', () => {
    const result = openSketch({
      ...least,
      model: { kind: 'wilson', pairs: [{ i: 'a' }] },
      units: [least.units[0], { id: 'u2', tag: 'X-1', kind: 'constructor', settings: { any: [1] } }],
      streams: [{ id: 's1', number: '1', from: ['u1', 'out'], to: ['u2', 'wherever'] }],
    });
    expect(result.ok && codes(result.notes)).toEqual([
      'sketch/kind-not-available',
      'sketch/model-not-available',
    ]);
    expect(result.ok && result.sketch.units[1]).toMatchObject({
      kind: 'constructor',
      settings: { any: [1] },
    });
    expect(result.ok && result.sketch.model.kind).toBe('wilson');
  });

  test('a stream without any end is kept and told', () => {
    const result = openSketch({ ...least, streams: [...least.streams, { id: 's9', number: '9' }] });
    expect(result.ok && codes(result.notes)).toContain('sketch/stream-without-ends');
    expect(result.ok && result.sketch.streams.some((x) => x.id === 's9')).toBe(true);
  });

  test('a label that this version does not know is left out, with a note', () => {
    const result = openSketch({ ...least, display: { set: 'US', labels: ['pressure', 'colour'] } });
    expect(result.ok && result.sketch.display.labels).toEqual(['pressure']);
    expect(result.ok && codes(result.notes)).toContain('sketch/label-not-available');
  });
});

describe('writing', () => {
  test.each(['let-down', 'condensate-flash'])('%s comes back letter by letter', (name) => {
    expect(writeSketch(opened(exampleText(name)))).toBe(exampleText(name));
  });

  test('the order of keys does not depend on the order they came in', () => {
    const raw = loose();
    const turned = Object.fromEntries(
      Object.entries({
        ...raw,
        units: raw.units.map((x) => Object.fromEntries(Object.entries(x).reverse())),
      }).reverse(),
    );
    expect(writeSketch(opened(turned))).toBe(exampleText('let-down'));
  });
});

describe('migrations', () => {
  // Two versions before the first one, made up for these tests.
  const steps: readonly Migration[] = [
    {
      from: -1,
      what: 'the units’ list has another name',
      change: ({ things, ...old }) => ({ ...old, units: things! }),
    },
    {
      from: 0,
      what: 'temperatures carry their unit',
      change: (old) => ({
        ...old,
        site: { ...(old.site as object), ambient: `${(old.site as { ambient: number }).ambient} K` },
      }),
    },
  ];
  const older = (version: number): Loose => {
    const { units, site, ...rest } = loose();
    return {
      ...rest,
      version,
      ...(version < 0 ? { things: units } : { units }),
      site: { ...(site as object), ambient: 290 },
      kept: ['as', 'it', 'is'],
    };
  };
  const notesOf = (result: Opened): unknown[] =>
    result.ok ? result.notes.map((note) => [note.code, note.evidence[0]?.text]) : [];

  test('run in order from the version of the file, say what was changed and keep what they do not know', () => {
    const whole = openSketch(older(-1), { migrations: steps });
    expect(notesOf(whole)).toEqual(steps.map(({ what }) => ['sketch/migrated', what]));
    const half = openSketch(older(0), { migrations: steps });
    expect(notesOf(half)).toEqual([['sketch/migrated', steps[1]!.what]]);
    for (const result of [whole, half]) {
      expect(result.ok && result.sketch).toMatchObject({
        version: VERSION,
        site: { ambient: '290 K' },
        kept: ['as', 'it', 'is'],
      });
      expect(result.ok && result.sketch.units.map((x) => x.tag)).toEqual(letDown().units.map((x) => x.tag));
      // Saved and opened again it is a document of this version.
      const again = result.ok ? openSketch(writeSketch(result.sketch)) : undefined;
      expect(again?.ok && again.notes).toEqual([]);
    }
  });

  test('leave a document of this version alone', () => {
    const result = openSketch(loose(), { migrations: steps });
    expect(result.ok && result.notes).toEqual([]);
  });

  test('a version older than the chain is refused', () => {
    expect(problems(openSketch(older(-2), { migrations: steps }))).toEqual(['file/wrong-type at version']);
    expect(problems(openSketch(older(0)))).toEqual(['file/wrong-type at version']);
  });

  test('a step that meets what it cannot read refuses the file and says which step', () => {
    const { site, ...without } = older(0);
    const broken = openSketch({ ...without, site: null }, { migrations: steps });
    expect(problems(broken)).toEqual(['file/not-migrated at ']);
    expect(slot(broken, 'what')).toBe(steps[1]!.what);
    expect(site).toBeDefined();
  });

  test('what comes out of a step is checked like any other file', () => {
    const result = openSketch({ ...older(-1), things: 'none' }, { migrations: steps });
    expect(problems(result)).toEqual(['file/wrong-type at units']);
  });

  test('a gap in the list is our own mistake', () => {
    const gap = [steps[0]!, { ...steps[1]!, from: 1 }];
    expect(() => openSketch(older(-1), { migrations: gap })).toThrow(/gap/);
  });

  test('the chain that ships begins at the first version that was ever saved', () => {
    expect(oldest(MIGRATIONS)).toBe(1);
    expect(MIGRATIONS.map((step) => step.from)).toEqual(MIGRATIONS.map((_, k) => k + 1));
  });
});

describe('bytes', () => {
  const bytes = (text: string): Uint8Array => new TextEncoder().encode(text);
  const named = exampleText('let-down').replace('"Let-down"', '"Entspannung für 15 °C, 蒸留"');

  test('of a file give the same sketch as its text, with and without a mark, and in UTF-16', () => {
    const wanted = writeSketch(opened(named));
    expect(wanted).toContain('蒸留');
    const wide = new Uint8Array(new Uint16Array([...`\ufeff${named}`].map((c) => c.charCodeAt(0))).buffer);
    for (const source of [bytes(named), bytes(`\ufeff${named}`), wide])
      expect(writeSketch(opened(source))).toBe(wanted);
  });

  test('that are no text are refused with their place, not read as question marks', () => {
    const whole = bytes(named);
    const at = whole.indexOf(bytes('ü')[0]!);
    const spoilt = whole.slice();
    spoilt[at + 1] = 0x20;
    const result = openSketch(spoilt);
    expect(problems(result)).toEqual(['file/not-text at ']);
    const before = named.slice(0, named.indexOf('ü'));
    expect(slot(result, 'line')).toBe(before.split('\n').length);
    expect((result.ok ? undefined : result.problems[0].evidence[1])?.value).toBe(
      before.length - before.lastIndexOf('\n'),
    );
    expect(problems(openSketch(new Uint8Array([0x50, 0x4b, 0x03, 0x04, 0x8f, 0xff])))).toEqual([
      'file/not-text at ',
    ]);
    expect(problems(openSketch(new Uint8Array()))).toEqual(['file/empty at ']);
  });
});
