import { describe, expect, test } from 'vitest';
import { buildScene } from '../../src/drawing/scene';
import { portOf, standingUnits } from '../../src/drawing/standing';
import { iconOf, symbolToSvg } from '../../src/drawing/symbols/icon';
import { plainSymbol, SYMBOLS, symbolOf } from '../../src/drawing/symbols/registry';
import { linkShapes } from '../../src/drawing/symbols/shapes';
import {
  boxOnSheet,
  type Pose,
  portOfShape,
  portOnSheet,
  sideOnSheet,
  toSheet,
} from '../../src/drawing/transform';
import type { Box, Point } from '../../src/drawing/types';
import { CATALOGUE } from '../../src/engine/units/catalogue';
import type { KindCatalogue } from '../../src/engine/units/types';
import type { Json } from '../../src/sketch/types';
import { inputOf, sheetOf } from './sheets';

const portNames = (kind: KindCatalogue, numbers = 3): readonly string[] =>
  kind.ports.flatMap((p) =>
    p.numbered
      ? Array.from({ length: Math.min(numbers, p.numbered.max) }, (_, k) => `${p.name}${k + 1}`)
      : [p.name],
  );

const onOrIn = ([x, y]: Point, b: Box, slack: number): boolean =>
  x >= b.x - slack && x <= b.x + b.w + slack && y >= b.y - slack && y <= b.y + b.h + slack;

const POSES: readonly Pose[] = ([0, 90, 180, 270] as const).flatMap((turn) =>
  [false, true].map((mirror): Pose => ({ at: [800, 240], turn, mirror })),
);

/** A kind known by its catalogue alone. */
const MADE_UP: KindCatalogue = {
  kind: 'made-up',
  group: 'vessels',
  tag: { letters: 'X', drawn: true },
  ports: [
    { name: 'in', dir: 'in', numbered: { min: 1, max: 12 } },
    { name: 'top', dir: 'out' },
    { name: 'foot', dir: 'out' },
  ],
  settings: {},
  results: {},
  findings: [],
};

describe.each(Object.values(CATALOGUE).map((kind) => [kind.kind, kind] as const))(
  'the symbol of %s',
  (name, kind) => {
    const symbol = plainSymbol(name);

    test('has a place on the grid for every port, no two in one place', () => {
      const places = portNames(kind).map((port) => symbol.ports(port));
      for (const place of places) {
        expect(place).toBeDefined();
        expect(place!.at.map((v) => Math.abs(v % 8))).toEqual([0, 0]);
      }
      expect(new Set(places.map((place) => place!.at.join())).size).toBe(places.length);
    });

    test('keeps its ports on the symbol however it is turned and mirrored', () => {
      for (const pose of POSES) {
        const box = boxOnSheet(pose, symbol.box);
        for (const port of portNames(kind)) {
          const { at, side } = portOnSheet(pose, symbol.ports(port)!);
          // a dot's ports lie 4 px off its edge
          expect(onOrIn(at, box, symbol.sides ? 4 : 0)).toBe(true);
          const toEdge = {
            left: at[0] - box.x,
            right: box.x + box.w - at[0],
            top: at[1] - box.y,
            bottom: box.y + box.h - at[1],
          };
          // A column's draws leave its shell, beside which the exchangers of its ends stand.
          if (name === 'column' && port.startsWith('side')) continue;
          expect(Math.min(...Object.values(toEdge))).toBe(toEdge[side]);
        }
      }
    });

    test('draws no NaN and stays inside its box', () => {
      for (const path of symbol.paths) expect(path.d).not.toMatch(/NaN|undefined/);
      expect(symbolToSvg(name)).toContain('<path');
      expect(iconOf(name).box.w).toBeGreaterThan(0);
    });
  },
);

test('every kind of the catalogue has a symbol of its own', () => {
  expect(Object.keys(CATALOGUE).filter((kind) => !(kind in SYMBOLS))).toEqual([]);
});

test('turning goes clockwise, mirroring comes before it', () => {
  const pose: Pose = { at: [0, 0], turn: 90, mirror: true };
  expect(toSheet({ ...pose, mirror: false }, [24, 8])).toEqual([-8, 24]);
  expect(toSheet(pose, [24, 8])).toEqual([-8, -24]);
  expect(sideOnSheet({ ...pose, mirror: false }, 'right')).toBe('bottom');
  expect(sideOnSheet(pose, 'right')).toBe('top');
  expect(sideOnSheet(pose, 'top')).toBe('right');
});

test('further inlets of a drum follow below the first in steps of 8 px', () => {
  const { ports } = plainSymbol('drum');
  expect(['in1', 'in2', 'in3'].map((name) => ports(name)!.at)).toEqual([
    [-24, 0],
    [-24, 8],
    [-24, 16],
  ]);
  const all = portNames(CATALOGUE.drum!, 11).map((name) => ports(name)!.at.join());
  expect(new Set(all).size).toBe(all.length);
});

test('a drum with a duty has a coil and a heat link, an adiabatic one has neither', () => {
  const drum = (settings: { [key: string]: Json }) =>
    symbolOf(sheetOf([['drum', 'V-1', 0, 0, { settings }]], []).units[0]!);
  expect(drum({}).links).toBeUndefined();
  expect(drum({ h: { duty: '20 kW' } }).links?.[0]?.flow).toBe('in');
  expect(drum({ h: { duty: '-20 kW' } }).links?.[0]?.flow).toBe('out');
  expect(drum({ h: { T: '20 degC' } }).links?.[0]?.flow).toBe('none');
  expect(drum({ h: { T: '20 degC' } }).paths.length).toBe(drum({}).paths.length + 1);
});

test('machines have a shaft link with a double bar, and a fan its blades', () => {
  const drawn = (kind: string, settings: { [key: string]: Json } = {}) =>
    symbolOf(sheetOf([[kind, 'K-1', 0, 0, { settings }]], []).units[0]!);
  expect(drawn('pump').links?.[0]).toMatchObject({ carries: 'shaft', flow: 'in' });
  expect(drawn('expander').links?.[0]?.flow).toBe('out');
  const { line, marks } = linkShapes(drawn('compressor').links![0]!);
  expect(line.dash).toBe('7 2 1.5 2');
  expect(marks[0]!.d.match(/M/g)).toHaveLength(2);
  expect(linkShapes(drawn('heater').links![0]!).line.dash).toBe('5 2.5');
  expect(drawn('compressor', { service: 'fan' }).paths.length).toBe(drawn('compressor').paths.length + 1);
});

test.each(['feed', 'product'])(
  'a long name makes the flag of a %s longer and leaves its port in place',
  (kind) => {
    const port = kind === 'feed' ? 'out' : 'in';
    const named = (name: string) => symbolOf(sheetOf([[kind, 'X-1', 0, 0, { name }]], []).units[0]!);
    const short = named('Air');
    const long = named('Stabilised condensate to storage');
    const endless = named('Stabilised condensate to storage '.repeat(9));
    expect(long.box.w).toBeGreaterThan(short.box.w);
    expect((long.box.w - short.box.w) % 8).toBe(0);
    expect(endless.box.w).toBeLessThan(240);
    for (const symbol of [long, endless]) expect(symbol.ports(port)).toEqual(short.ports(port));
  },
);

test('a kind known by its catalogue alone is drawn as a box with its ports spread over both sides', () => {
  const kinds = { ...CATALOGUE, 'made-up': MADE_UP };
  const sketch = sheetOf(
    [
      ['feed', 'FEED-1', 0, 0],
      ['made-up', 'X-1', 200, 0],
    ],
    [
      ['1', 'FEED-1.out', 'X-1.in1'],
      ['2', 'X-1.top', ''],
      ['3', 'X-1.foot', ''],
    ],
  );
  const scene = buildScene(sketch, { ...inputOf(sketch), kinds });
  const unit = scene.units[1]!;
  expect([unit.box.w, unit.box.h]).toEqual([64, 56]);
  expect(scene.lines.map((line) => line.points[0])).toEqual([
    [32, 0],
    [232, -8],
    [232, 8],
  ]);
  expect(portOfShape(unit, 'in2')?.at).toEqual([168, 8]);
  expect(portOfShape(unit, 'nowhere')).toBeUndefined();
});

test('a kind nobody knows any more has the ports its streams use', () => {
  const sketch = sheetOf(
    [
      ['feed', 'FEED-1', 0, 0],
      ['of-tomorrow', 'X-1', 200, 0],
    ],
    [
      ['1', 'FEED-1.out', 'X-1.strange'],
      ['2', 'X-1.stranger', ''],
    ],
  );
  const [, unit] = buildScene(sketch, inputOf(sketch)).units;
  expect(portOfShape(unit!, 'strange')).toMatchObject({ at: [168, 0], side: 'left' });
  expect(portOfShape(unit!, 'stranger')).toMatchObject({ at: [232, 0], side: 'right' });
});

describe('a dot that no one has turned', () => {
  const below = (more: object) =>
    sheetOf(
      [
        ['drum', 'V-1', 0, 0],
        ['divide', 'D-1', 0, 160, more],
        ['product', 'PROD-1', 200, 160],
        ['product', 'PROD-2', -200, 160, { mirror: true }],
      ],
      [
        ['1', 'V-1.liquid', 'D-1.in'],
        ['2', 'D-1.out1', 'PROD-1.in'],
        ['3', 'D-1.out2', 'PROD-2.in'],
      ],
    );

  test('lets its lines take the sides that suit them', () => {
    const [line1, line2, line3] = buildScene(below({}), inputOf(below({}))).lines;
    for (const line of [line1, line2, line3]) expect(line!.points).toHaveLength(2);
  });

  test('keeps its usual sides once it is turned by hand', () => {
    const dot = standingUnits(below({ turn: 180 }))[1]!;
    expect(dot.symbol).toBe(SYMBOLS.divide!.draw({ tag: '', kind: 'divide', settings: {} }));
  });

  test('leaves a free port only the sides that are left', () => {
    const scene = buildScene(below({}), inputOf(below({})));
    expect(portOfShape(scene.units[1]!, 'out3')?.side).toBe('bottom');
    const dot = scene.units[1]!;
    const standing = standingUnits(below({}))[1]!;
    for (const name of ['in', 'out1', 'out2', 'out3']) {
      expect(portOf(standing, name)).toEqual(portOfShape(dot, name));
    }
    expect(portOfShape(dot, 'in')?.side).toBe('top');
  });
});
