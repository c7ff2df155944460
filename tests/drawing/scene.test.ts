import { describe, expect, test } from 'vitest';
import { frameOf, pageOf, zoneOf } from '../../src/drawing/frame';
import { omittedSentence } from '../../src/drawing/labelText';
import { limitMark, stateMark } from '../../src/drawing/marks';
import { cutText, measureText } from '../../src/drawing/metrics';
import { drawApart } from '../../src/drawing/nudge';
import { buildScene } from '../../src/drawing/scene';
import { sceneToSvg } from '../../src/drawing/svg';
import { DARK, LIGHT, PRINT } from '../../src/drawing/tokens';
import type { DrawnState, Point } from '../../src/drawing/types';
import type { StreamId, UnitId } from '../../src/engine/ids';
import type { SketchUnit } from '../../src/sketch/types';
import { LAWS } from './laws';
import { randomSheet, seeded } from './random';
import { inputOf, LET_DOWN, placedAt, RECYCLE, SHEETS, sheetOf } from './sheets';

const rowsWith = (number: string) => [
  { number, unit: 'kmol/h' },
  { number, unit: '°C' },
  { number, unit: 'bar(a)' },
];

describe('labels', () => {
  test.each(Object.entries(SHEETS))('keep their places whatever the digits are: %s', (_name, sketch) => {
    const boxes = (number: string) =>
      buildScene(sketch, inputOf(sketch, { rows: rowsWith(number) })).labels.map((l) => [l.box, l.folded]);
    expect(boxes('0')).toEqual(boxes('0.1234'));
    expect(boxes('–')).toEqual(boxes('−9.99'));
  });

  test('have the room of an unusually wide number', () => {
    const [narrow, wide] = ['120.0', '0.00012345'].map(
      (number) => buildScene(LET_DOWN, inputOf(LET_DOWN, { rows: rowsWith(number) })).labels[0]!,
    );
    expect(wide!.box.w).toBeGreaterThan(narrow!.box.w);
    expect(wide!.numberRight - measureText('0.00012345', 11.5)).toBeGreaterThanOrEqual(wide!.box.x);
  });

  test('keep their places when states, limits and duties change', () => {
    const plain = inputOf(RECYCLE);
    const before = buildScene(RECYCLE, { ...plain, duties: new Map() });
    const marked = inputOf(RECYCLE, {
      states: { 'V-101': 'no-solution', 'E-101': 'needs-value' },
      limits: { 'V-101': 'beyond-limit', 'PV-101': 'note' },
    });
    const after = buildScene(RECYCLE, marked);
    expect(after.labels).toEqual(before.labels);
    expect(after.lines).toEqual(before.lines);
    expect(after.box).toEqual(before.box);
  });

  test('show numbers of an out-of-date unit as stale', () => {
    const { labels } = buildScene(LET_DOWN, inputOf(LET_DOWN, { states: { 'PV-101': 'out-of-date' } }));
    expect(labels.map((label) => label.stale)).toEqual([false, true, false, false]);
  });

  test('keep clear of ribbons in follow', () => {
    const plain = inputOf(LET_DOWN);
    const ribbons = new Map(LET_DOWN.streams.map((s) => [s.id, 28]));
    const { labels, lines } = buildScene(LET_DOWN, { ...plain, ribbons });
    for (const label of labels.filter((l) => !l.folded)) {
      const line = lines.find((l) => l.stream === label.stream)!;
      const [[, y]] = [line.diamond!];
      const gap = Math.min(Math.abs(label.box.y - y), Math.abs(label.box.y + label.box.h - y));
      expect(gap).toBeGreaterThanOrEqual(14 + 6);
    }
  });
});

test('what has no room is said in words', () => {
  const label = { what: 'label', stream: 's1' as StreamId } as const;
  const duty = { what: 'duty', unit: 'u1' as UnitId, link: 'heat' } as const;
  expect(omittedSentence([])).toBe('');
  expect(omittedSentence([label])).toBe('1 label has no room here');
  expect(omittedSentence([label, label, duty])).toBe('2 labels and 1 duty have no room here');
});

describe('a scene built upon an earlier one', () => {
  test('is the same object when nothing changed', () => {
    const scene = buildScene(RECYCLE, inputOf(RECYCLE));
    expect(buildScene(RECYCLE, inputOf(RECYCLE), scene)).toBe(scene);
  });

  test.each(Object.entries(SHEETS))(
    'has other digits in the same places, and hands everything else on: %s',
    (_name, sketch) => {
      const before = buildScene(sketch, inputOf(sketch));
      const input = inputOf(sketch);
      const labels = new Map([...input.labels, [sketch.streams[1]!.id, rowsWith('7.5')]]);
      const duties = new Map(
        [...input.duties].map(([id, texts]) => [id, { ...texts, heat: 'Q 9 kW', shaft: 'W 9 kW' }]),
      );
      const fresh = { ...input, labels, duties };
      const after = buildScene(sketch, fresh, before);
      expect(after).toEqual(buildScene(sketch, fresh));
      expect(after.lines).toBe(before.lines);
      const changed = after.labels.filter((label, k) => label !== before.labels[k]);
      expect(changed.map((label) => label.stream)).toEqual([sketch.streams[1]!.id]);
      const redrawn = after.units.filter((unit, k) => unit !== before.units[k]);
      expect(redrawn.every((unit) => unit.links.length > 0)).toBe(true);
    },
  );

  test.each([2, 9, 14, 27])(
    'equals one built from scratch whatever changes in sketch and results: seed %i',
    (seed) => {
      let sketch = randomSheet(seed);
      let input = inputOf(sketch);
      const next = seeded(100 + seed);
      const pick = <T>(list: readonly T[]): T => list[Math.floor(next() * list.length)]!;
      const states: readonly DrawnState[] = ['solved', 'waiting', 'no-solution', 'out-of-date'];
      const rows = [rowsWith('1.5'), rowsWith('99'), rowsWith('3').slice(1), []];
      const swap = (change: Partial<SketchUnit>): void => {
        const at = Math.floor(next() * sketch.units.length);
        sketch = { ...sketch, units: sketch.units.map((u, k) => (k === at ? { ...u, ...change } : u)) };
      };
      const steps: readonly (() => void)[] = [
        () => {
          input = { ...input, labels: new Map([...input.labels, [pick(sketch.streams).id, pick(rows)]]) };
        },
        () => {
          input = { ...input, states: new Map([...input.states, [pick(sketch.units).id, pick(states)]]) };
        },
        () => {
          input = {
            ...input,
            limits: new Map([[pick(sketch.units).id, pick(['note', 'caution'] as const)]]),
          };
        },
        () => {
          const text = pick(['Q 1 kW', 'W 12 MW', 'Q 5.55 BTU/h']);
          input = {
            ...input,
            duties: new Map([...input.duties, [pick(sketch.units).id, { heat: text, shaft: text }]]),
          };
        },
        () =>
          swap({
            settings: { p: { P: `${1 + Math.floor(9 * next())} bar` }, duty: pick(['3 kW', '-3 kW']) },
          }),
        () => swap({ name: pick(['Gas', 'A rather longer name']) }),
        () => swap({ turn: pick([0, 90, 180, 270] as const) }),
        () => {
          const at = Math.floor(next() * sketch.streams.length);
          sketch = { ...sketch, streams: sketch.streams.filter((_, k) => k !== at) };
        },
      ];
      let scene = buildScene(sketch, input);
      for (let step = 0; step < 40; step++) {
        pick(steps)();
        scene = buildScene(sketch, input, scene);
        expect(scene).toEqual(buildScene(sketch, input));
      }
    },
  );

  test('keeps the lines that have nothing to do with a moved unit', () => {
    const before = buildScene(RECYCLE, inputOf(RECYCLE));
    const after = buildScene(placedAt(RECYCLE, [['PROD-1', [1016, 96]]]), inputOf(RECYCLE), before);
    const changed = after.lines.filter((line, k) => line !== before.lines[k]).map((line) => line.number);
    expect(changed).toEqual(['7']);
  });

  test.each([3, 11, 23, 35])(
    'equals one built from scratch after every step of a random walk: seed %i',
    (seed) => {
      let sketch = randomSheet(seed);
      const input = inputOf(sketch);
      const next = seeded(seed);
      let scene = buildScene(sketch, input);
      for (let step = 0; step < 12; step++) {
        const { tag, at } = sketch.units[Math.floor(next() * sketch.units.length)]!;
        const by = (): number => 8 * Math.floor(next() * 5 - 2);
        sketch = placedAt(sketch, [[tag, [at[0] + by(), at[1] + by()]]]);
        scene = buildScene(sketch, input, scene);
        expect(scene).toEqual(buildScene(sketch, input));
      }
    },
  );
});

test('a unit pushed against another until their ports touch leaves the line without length', () => {
  const sketch = sheetOf(
    [
      ['feed', 'FEED-1', 0, 0],
      ['valve', 'PV-1', 200, 0],
      ['product', 'PROD-1', 400, 0],
    ],
    [
      ['1', 'FEED-1.out', 'PV-1.in'],
      ['2', 'PV-1.out', 'PROD-1.in'],
    ],
  );
  const scene = buildScene(sketch, inputOf(sketch));
  const [[x], [far]] = [scene.lines[0]!.points[0]!, scene.lines[0]!.points.at(-1)!];
  const touching = buildScene(placedAt(sketch, [['PV-1', [200 - (far - x), 0]]]), inputOf(sketch), scene);
  expect(touching.lines[0]!.points).toEqual([
    [x, 0],
    [x, 0],
  ]);
  expect(JSON.stringify(touching)).not.toContain('null');
});

test('ports that face one another across less than a line needs are joined round the symbols', () => {
  const far = sheetOf(
    [
      ['cooler', 'E-1', 0, 0],
      ['cooler', 'E-2', 40, 624],
    ],
    [['1', 'E-1.out', 'E-2.in']],
  );
  const scene = buildScene(far, inputOf(far));
  expect(Object.values(LAWS).flatMap((law) => law(scene, far))).toEqual([]);
});

test('a piece is not drawn apart when that would lead the line out of its port through a symbol', () => {
  const line: readonly Point[] = [
    [0, 24],
    [0, 40],
    [200, 40],
    [200, 160],
  ];
  const along: readonly Point[] = [
    [-40, 40],
    [240, 40],
  ];
  const symbol = { x: -20, y: 50, w: 40, h: 28 };
  expect(drawApart([line, along], [], [false, true])[0]).not.toEqual(line);
  expect(drawApart([line, along], [symbol], [false, true])[0]).toEqual(line);
});

test('bends moved by hand are honoured, those inside a symbol are left out', () => {
  const via = (at: readonly [number, number]) =>
    sheetOf(
      [
        ['feed', 'FEED-1', 0, 0],
        ['product', 'PROD-1', 400, 0],
        ['drum', 'V-1', 200, 200],
      ],
      [['1', 'FEED-1.out', 'PROD-1.in', [at]]],
    );
  const points = (at: readonly [number, number]) => buildScene(via(at), inputOf(via(at))).lines[0]!.points;
  expect(points([200, -80]).map(([, y]) => y)).toContain(-80);
  expect(points([200, 200])).toEqual([
    [32, 0],
    [376, 0],
  ]);
});

describe('bends moved by hand', () => {
  const given = [
    [64, 0],
    [64, -56],
    [320, -56],
    [320, 80],
    [344, 80],
    [344, 0],
  ] as const;
  const sketch = sheetOf(
    [
      ['feed', 'FEED-1', 0, 0],
      ['product', 'PROD-1', 400, 0],
      ['drum', 'V-1', 200, 40],
    ],
    [['1', 'FEED-1.out', 'PROD-1.in', given]],
  );
  const pointsOf = (of: typeof sketch) => buildScene(of, inputOf(of)).lines[0]!.points;
  const moved = (tag: string, at: readonly [number, number]) => ({
    ...sketch,
    units: sketch.units.map((u) => (u.tag === tag ? { ...u, at } : u)),
  });

  test('make the line exactly as given where it has right angles and touches no symbol', () => {
    expect(pointsOf(sketch)).toEqual([[32, 0], ...given, [376, 0]]);
  });

  test('lead the line on where a unit has moved and they no longer meet its port', () => {
    const points = pointsOf(moved('PROD-1', [400, 24]));
    for (const [x, y] of given.slice(1, 5)) {
      const isOn = points.slice(1).some(([x2, y2], k) => {
        const [x1, y1] = points[k]!;
        return (x - x1) * (x - x2) <= 0 && (y - y1) * (y - y2) <= 0 && (x1 === x2 ? x === x1 : y === y1);
      });
      expect(isOn, `${x} ${y}`).toBe(true);
    }
    expect(points.at(-1)).toEqual([376, 24]);
  });

  test('give way to a symbol that came to stand on them', () => {
    const sheet = moved('V-1', [200, -56]);
    expect(LAWS['no line crosses a symbol']!(buildScene(sheet, inputOf(sheet)), sheet)).toEqual([]);
  });
});

test('a hanging stream is a straight piece of 40 px with an arrowhead', () => {
  const sketch = sheetOf([['feed', 'FEED-1', 0, 0]], [['1', 'FEED-1.out', '']]);
  const [line] = buildScene(sketch, inputOf(sketch)).lines;
  expect(line).toMatchObject({
    points: [
      [32, 0],
      [72, 0],
    ],
    hanging: true,
    arrow: { at: [72, 0], side: 'right' },
  });
});

test('a horizontal line jumps over a vertical one with a half circle of 5 px', () => {
  const sketch = sheetOf(
    [
      ['feed', 'FEED-1', 0, 0],
      ['product', 'PROD-1', 400, 0],
      ['drum', 'V-1', 200, -200],
      ['drum', 'V-2', 200, 200],
      ['product', 'PROD-2', 400, 400],
    ],
    [
      ['1', 'FEED-1.out', 'PROD-1.in'],
      ['2', 'V-1.liquid', ''],
      ['3', 'V-2.vapour', 'PROD-2.in'],
    ],
  );
  const down = {
    ...sketch,
    streams: [sketch.streams[0]!, { ...sketch.streams[1]!, to: ['V-2' as UnitId, 'in1'] as const }],
  };
  const [across] = buildScene(down, inputOf(down)).lines;
  expect(across!.d.match(/A5 5 0 0 1/g)).toHaveLength(1);
});

test('a short line has no diamond', () => {
  const sketch = sheetOf(
    [
      ['valve', 'PV-1', 0, 0],
      ['valve', 'PV-2', 64, 0],
    ],
    [['1', 'PV-1.out', 'PV-2.in']],
  );
  expect(buildScene(sketch, inputOf(sketch)).lines[0]!.diamond).toBeUndefined();
});

test('an empty sketch is an empty scene', () => {
  const empty = sheetOf([], []);
  expect(buildScene(empty, inputOf(empty))).toEqual({
    box: { x: 0, y: 0, w: 0, h: 0 },
    textScale: 1,
    units: [],
    lines: [],
    labels: [],
    notes: [],
    omitted: [],
  });
});

describe('text widths', () => {
  // Source Sans 3, advance widths as the shipped files state them: figure 497 (regular) and 513 (semibold) of 1000
  test('are the advance widths of the font', () => {
    expect(measureText('0', 1000)).toBe(497);
    expect(measureText('0000', 1000, 600)).toBe(4 * 513);
    expect(measureText('8', 10)).toBe(measureText('1', 10));
  });

  test('a text that is cut fits and ends in an ellipsis', () => {
    const cut = cutText('Stabilised condensate to storage', 80, 11.5);
    expect(cut.endsWith('…')).toBe(true);
    expect(measureText(cut, 11.5)).toBeLessThanOrEqual(80);
    expect(cutText('Air', 80, 11.5)).toBe('Air');
  });
});

describe('SVG', () => {
  const scene = buildScene(RECYCLE, inputOf(RECYCLE, { limits: { 'V-101': 'beyond-limit' } }));

  test('keeps to attributes that the PDF writer reads', () => {
    const svg = sceneToSvg(scene, PRINT, { frame: frameOf(pageOf(scene.box)) });
    expect(svg).not.toMatch(/class=|style=|tspan|NaN|undefined/);
    expect(new Set(svg.match(/<([a-z]+)/g))).toEqual(new Set(['<svg', '<path', '<g', '<text']));
    expect(svg).toContain('font-family="SourceSans3"');
  });

  test('escapes names', () => {
    const sketch = sheetOf([['feed', 'FEED-1', 0, 0, { name: 'A & <B>' }]], []);
    expect(sceneToSvg(buildScene(sketch, inputOf(sketch)), PRINT)).toContain('A &amp; &lt;B&gt;');
  });

  test('takes its colours from one palette', () => {
    for (const palette of [LIGHT, DARK, PRINT]) {
      const colours = new Set(sceneToSvg(scene, palette).match(/#[0-9A-F]{6}/gi));
      expect([...colours].filter((c) => !Object.values(palette).includes(c))).toEqual([]);
    }
  });

  test('a small picture shows lines and symbols only', () => {
    expect(sceneToSvg(scene, LIGHT, { bare: true })).not.toContain('<text');
  });
});

describe('the border', () => {
  const page = pageOf({ x: 0, y: 0, w: 900, h: 300 });

  test('holds the drawing with a margin, in the shape of the paper', () => {
    expect(page.w / page.h).toBeCloseTo(Math.SQRT2, 2);
    const { inner } = frameOf(page);
    expect(inner.x).toBeLessThanOrEqual(-40);
    expect(inner.x + inner.w).toBeGreaterThanOrEqual(940);
  });

  test('names zones 1 to 8 across and A to F down at both edges', () => {
    const names = frameOf(page).texts.map((t) => t.text);
    expect(names.filter((n) => n === 'C')).toHaveLength(2);
    expect(names).toHaveLength(2 * (8 + 6));
    expect(zoneOf([page.x, page.y], page)).toBe('A1');
    expect(zoneOf([page.x + page.w / 2 + 1, page.y + page.h / 2 + 1], page)).toBe('D5');
    expect(zoneOf([page.x + page.w + 99, page.y + page.h + 99], page)).toBe('F8');
  });
});

test('states and limits are told apart by shape, not by colour', () => {
  const states = ['solved', 'needs-value', 'waiting', 'no-solution', 'out-of-date'] as const;
  const shapes = states.map((state) =>
    stateMark(state, 0, 40, 0)
      .map((p) => `${p.d} ${p.dash}`)
      .join(),
  );
  expect(new Set(shapes).size).toBe(states.length);
  const limits = (['note', 'caution', 'beyond-limit'] as const).map((w) =>
    limitMark(w)
      .map((p) => p.d)
      .join(),
  );
  expect(new Set(limits).size).toBe(3);
});
