import type { DrawnState, LabelRow, LinkTexts, SceneInput } from '../../src/drawing/types';
import type { StreamId, UnitId } from '../../src/engine/ids';
import type { Weight } from '../../src/engine/outcome';
import type { Json, Sketch, SketchStream, SketchUnit } from '../../src/sketch/types';

type UnitLine = readonly [
  kind: string,
  tag: string,
  x: number,
  y: number,
  more?: { turn?: 0 | 90 | 180 | 270; mirror?: true; name?: string; settings?: { [key: string]: Json } },
];
/** 'TAG.port' at either end; an empty text leaves the end hanging. */
type StreamLine = readonly [
  number: string,
  from: string,
  to: string,
  via?: readonly (readonly [number, number])[],
];

/** A sketch made by hand: ids are tags and numbers. */
export function sheetOf(units: readonly UnitLine[], streams: readonly StreamLine[]): Sketch {
  const end = (text: string): readonly [UnitId, string] | undefined => {
    const dot = text.lastIndexOf('.');
    return dot < 0 ? undefined : [text.slice(0, dot) as UnitId, text.slice(dot + 1)];
  };
  return {
    format: 'splitwright.sketch',
    version: 1,
    id: 'made by hand',
    title: {},
    site: {},
    chemicals: [],
    model: { kind: 'peng-robinson', bankPairs: true, pairs: [] },
    units: units.map(([kind, tag, x, y, more]): SketchUnit => {
      const { settings = {}, ...rest } = more ?? {};
      return { id: tag as UnitId, tag, kind, at: [x, y], settings, ...rest };
    }),
    streams: streams.map(([number, from, to, via]): SketchStream => {
      const [f, t] = [end(from), end(to)];
      return {
        id: number as StreamId,
        number,
        ...(f ? { from: f } : {}),
        ...(t ? { to: t } : {}),
        ...(via ? { via } : {}),
      };
    }),
    display: { set: 'metric', labels: ['molarFlow', 'temperature', 'pressure'] },
    notes: [],
  };
}

const ROWS: readonly LabelRow[] = [
  { number: '120.0', unit: 'kmol/h' },
  { number: '56.65', unit: '°C' },
  { number: '3.000', unit: 'bar(a)' },
];

const DUTIES: LinkTexts = {
  heat: 'Q 1307 kW',
  shaft: 'W 52.10 kW',
  condenser: 'Q 1307 kW',
  reboiler: 'Q 1661 kW',
};

/** What a solved sketch shows: three rows a stream, duties, a few limits. */
export function inputOf(
  sketch: Sketch,
  more: {
    readonly rows?: readonly LabelRow[];
    readonly states?: Readonly<Record<string, DrawnState>>;
    readonly limits?: Readonly<Record<string, Weight>>;
    readonly textScale?: number;
  } = {},
): SceneInput {
  const { rows = ROWS, states = {}, limits = {}, textScale } = more;
  return {
    states: new Map(sketch.units.map((u) => [u.id, states[u.tag] ?? 'solved'])),
    limits: new Map(Object.entries(limits).map(([tag, weight]) => [tag as UnitId, weight])),
    labels: new Map(sketch.streams.map((s) => [s.id, rows])),
    duties: new Map(sketch.units.map((u) => [u.id, DUTIES])),
    remarks: new Map(
      sketch.units.filter((u) => u.kind === 'column').map((u) => [u.id, ['26 stages', 'reflux 2.400']]),
    ),
    ...(textScale ? { textScale } : {}),
  };
}

/** The sketch with units elsewhere, by their tags. */
export const placedAt = (
  sketch: Sketch,
  places: readonly (readonly [tag: string, at: readonly [number, number]])[],
): Sketch => ({
  ...sketch,
  units: sketch.units.map((unit) => {
    const place = places.find(([tag]) => tag === unit.tag);
    return place ? { ...unit, at: place[1] } : unit;
  }),
});

/** A feed let down into a drum. */
export const LET_DOWN = sheetOf(
  [
    ['feed', 'FEED-1', 80, 200, { name: 'Feed' }],
    ['valve', 'PV-101', 216, 200],
    ['drum', 'V-101', 352, 200],
    ['product', 'PROD-1', 536, 80, { name: 'Vapour' }],
    ['product', 'PROD-2', 536, 320, { name: 'Stabilised liquid to storage' }],
  ],
  [
    ['1', 'FEED-1.out', 'PV-101.in'],
    ['2', 'PV-101.out', 'V-101.in1'],
    ['3', 'V-101.vapour', 'PROD-1.in'],
    ['4', 'V-101.liquid', 'PROD-2.in'],
  ],
);

/** Two drums in a row, a recycle of liquid, a purge; heat in and out. */
export const RECYCLE = sheetOf(
  [
    ['feed', 'FEED-1', 80, 304, { name: 'Make-up gas' }],
    ['join', 'J-1', 208, 304],
    ['heater', 'E-101', 304, 304],
    ['valve', 'PV-101', 416, 304],
    ['drum', 'V-101', 544, 304, { settings: { h: { duty: '20 kW' } } }],
    ['cooler', 'E-102', 688, 160],
    ['drum', 'V-102', 824, 208],
    ['divide', 'D-1', 544, 496],
    ['product', 'PROD-1', 1016, 112, { name: 'Off-gas' }],
    ['product', 'PROD-2', 1016, 320, { name: 'Condensate' }],
    ['product', 'PROD-3', 1016, 496, { name: 'Purge' }],
  ],
  [
    ['1', 'FEED-1.out', 'J-1.in1'],
    ['2', 'J-1.out', 'E-101.in'],
    ['3', 'E-101.out', 'PV-101.in'],
    ['4', 'PV-101.out', 'V-101.in1'],
    ['5', 'V-101.vapour', 'E-102.in'],
    ['6', 'E-102.out', 'V-102.in1'],
    ['7', 'V-102.vapour', 'PROD-1.in'],
    ['8', 'V-102.liquid', 'PROD-2.in'],
    ['9', 'V-101.liquid', 'D-1.in'],
    ['10', 'D-1.out1', 'PROD-3.in'],
    ['11', 'D-1.out2', 'J-1.in2'],
  ],
);

/** Lines that cross, mirrored and turned units, hanging ends, bends moved by hand, and a kind without a symbol. */
export const CROSSED = sheetOf(
  [
    ['feed', 'FEED-1', 80, 96, { name: 'Wet condensate from the field' }],
    ['feed', 'FEED-2', 80, 320, { name: 'Dry' }],
    ['feed', 'FEED-3', 400, 0, { name: 'From above', turn: 90 }],
    ['drum', 'V-101', 288, 320],
    ['drum', 'V-102', 288, 96],
    ['heater', 'E-101', 528, 240, { turn: 90 }],
    ['cooler', 'E-102', 656, 96, { mirror: true }],
    ['separator', 'X-101', 656, 352],
    ['product', 'PROD-1', 848, 96, { name: 'Off-gas', mirror: true, turn: 180 }],
    ['product', 'PROD-2', 848, 320, { name: 'Water' }],
    ['join', 'J-1', 528, 432],
  ],
  [
    ['1', 'FEED-1.out', 'V-101.in1'],
    ['2', 'FEED-2.out', 'V-102.in1'],
    ['3', 'V-101.vapour', 'E-101.in'],
    ['4', 'E-101.out', 'J-1.in3'],
    ['5', 'V-101.liquid', 'J-1.in1'],
    ['6', 'J-1.out', 'X-101.in'],
    ['7', 'X-101.light', 'PROD-2.in'],
    ['8', 'X-101.heavy', ''],
    ['9', 'V-102.vapour', 'E-102.out', [[496, -48]]],
    ['10', 'E-102.in', 'PROD-1.in'],
    ['11', 'V-102.liquid', ''],
    ['12', 'FEED-3.out', ''],
  ],
);

/** A recycle with what somebody wrote on it: a text where a label would stand, a text over a line, an area around two units. */
export const NOTED: Sketch = {
  ...RECYCLE,
  notes: [
    { id: 'n1', text: 'Flare connection by others, see sheet 2', at: [456, 328], size: [96, 64] },
    { id: 'n2', text: 'Existing', at: [600, 290] },
    { id: 'n3', text: 'Battery limit', at: [480, 96], kind: 'area', size: [440, 260] },
    { id: 'n4', text: 'Not on the drawing' },
  ],
};

export const SHEETS: Readonly<Record<string, Sketch>> = {
  'a feed let down into a drum': LET_DOWN,
  'a recycle with a purge': RECYCLE,
  'crossed, turned and hanging lines': CROSSED,
  'a recycle with notes and an area': NOTED,
};
