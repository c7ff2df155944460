import type { Json } from '../../sketch/types';
import type { LinkData, PathShape, PortPlace, SymbolData } from '../types';
import { circle, type DrawnUnit, detail, numberOf, outline, port, type SymbolKind } from './shapes';

const GRID = 8;
/** Half width of the shell, height of its round heads, radius of the ends' exchangers. */
const HALF = 24;
const HEAD = 12;
const ROUND = 16;
/** Half height of a shell without a condenser, and the least with one. */
const SHORT = 64;
/** From here on more stages make no taller shell. */
const MOST_STAGES = 40;
/** Middle of the exchangers and of what hangs on them, right of the shell. */
const BESIDE = 64;
const FAR = 104;

interface Form {
  readonly stages: number;
  readonly distillate: string;
  readonly reboiler: boolean;
  /** Places by port. */
  readonly feeds: Readonly<Record<string, Json>>;
  readonly sides: Readonly<Record<string, Json>>;
}

const isRecord = (value: Json | undefined): value is { readonly [key: string]: Json } =>
  typeof value === 'object' && value !== null && !Array.isArray(value);
const inside = (value: Json | undefined, key: string): Json | undefined =>
  isRecord(value) ? value[key] : undefined;

/** Only what the drawing depends on; an end that is not chosen yet is drawn. */
function formOf({ settings }: DrawnUnit): Form {
  const { stages, top, bottom, feeds, sides } = settings;
  const distillate = inside(top, 'distillate');
  const stagesOf = (map: Json | undefined): Record<string, Json> =>
    isRecord(map)
      ? Object.fromEntries(Object.entries(map).map(([name, of]) => [name, inside(of, 'stage') ?? null]))
      : {};
  return {
    stages: typeof stages === 'number' && stages >= 1 ? Math.floor(stages) : 12,
    distillate: typeof distillate === 'string' ? distillate : 'liquid',
    reboiler: inside(bottom, 'reboiler') !== false,
    feeds: stagesOf(feeds),
    sides: stagesOf(sides),
  };
}

/** Half height of the shell with its heads, on the grid. */
function halfHeight({ stages, distillate }: Form): number {
  if (distillate === 'none') return SHORT;
  const body = 4 * Math.min(stages, MOST_STAGES);
  return Math.max(SHORT, GRID * Math.ceil((body + HEAD) / GRID));
}

const shell = (T: number): PathShape =>
  outline(
    `M${-HALF} ${-T + HEAD}A${HALF} ${HEAD} 0 0 1 ${HALF} ${-T + HEAD}V${T - HEAD}A${HALF} ${HEAD} 0 0 1 ${-HALF} ${T - HEAD}Z`,
  );

/** Half trays from both walls in turn, one a stage as long as they have 8 px each. */
function trays(stages: number, T: number): PathShape {
  const body = 2 * (T - HEAD);
  const count = Math.min(stages, MOST_STAGES, Math.floor(body / GRID));
  const lines = Array.from({ length: count }, (_, k) => {
    const y = -T + HEAD + ((k + 0.5) * body) / count;
    return k % 2 === 0 ? `M${-HALF} ${y}H8` : `M-8 ${y}H${HALF}`;
  });
  return detail(lines.join(''));
}

/** Two packed beds, crossed. */
const BEDS = detail(
  [-40, 8]
    .map(
      (y) =>
        `M${-HALF} ${y}H${HALF}V${y + 32}H${-HALF}ZM${-HALF} ${y}L${HALF} ${y + 32}M${HALF} ${y}L${-HALF} ${y + 32}`,
    )
    .join(''),
);

const zigzag = (x: number, y: number): PathShape =>
  detail(`M${x} ${y - 16}V${y - 6}L${x + 6} ${y - 2} ${x - 6} ${y + 3} ${x} ${y + 7}V${y + 16}`);
const pipe = (d: string): PathShape => outline(d, 'none');
const heatLink = (name: string, y: number, flow: 'in' | 'out'): LinkData => ({
  name,
  from: [BESIDE + ROUND, y],
  to: [FAR, y],
  flow,
});

/** Overhead line, condenser, drum and reflux, right of the top. */
function condenser(T: number, vapour: boolean): readonly PathShape[] {
  const y = -T + GRID;
  return [
    pipe(`M0 ${-T}V${-T - 16}H${BESIDE}V${y - ROUND}M${BESIDE} ${y + ROUND}V${y + 28}`),
    outline(circle(ROUND, BESIDE, y)),
    zigzag(BESIDE, y),
    outline(`M52 ${y + 28}H92A12 12 0 0 1 92 ${y + 52}H52A12 12 0 0 1 52 ${y + 28}Z`),
    detail(`M41 ${y + 42}H103`),
    pipe(`M56 ${y + 52}V${y + 64}H${HALF}`),
    // From the drum's round end to the port.
    ...(vapour ? [pipe(`M101 ${y + 32}H${FAR}`)] : []),
  ];
}

/** The reboiler at the foot, right of it. */
function reboiler(T: number): readonly PathShape[] {
  const y = T - 16;
  return [
    pipe(`M0 ${T}V${T + 16}H${BESIDE}V${y + ROUND}M${BESIDE} ${y - ROUND}V${y - 32}H${HALF}`),
    outline(circle(ROUND, BESIDE, y)),
    zigzag(BESIDE, y),
  ];
}

/** Heights of the ports on one side: each at its stage, on the grid; one that is taken goes on down, then up. */
function heights(form: Form, T: number, stagesOf: Form['feeds']): ReadonlyMap<string, number> {
  const most = GRID * Math.floor((T - HEAD) / GRID);
  const taken = new Set<number>();
  const found = new Map<string, number>();
  for (const name of Object.keys(stagesOf).sort()) {
    const at = stagesOf[name];
    const share =
      at === 'condenser'
        ? 0
        : at === 'reboiler'
          ? 1
          : typeof at === 'number'
            ? (at - 0.5) / form.stages
            : 0.5;
    const wanted = GRID * Math.round((-most + 2 * most * Math.min(Math.max(share, 0), 1)) / GRID);
    let y = wanted;
    while (taken.has(y) && y < most) y += GRID;
    while (taken.has(y) && y > -most) y -= GRID;
    taken.add(y);
    found.set(name, y);
  }
  return found;
}

function build(form: Form): SymbolData {
  const T = halfHeight(form);
  const hasCondenser = form.distillate !== 'none';
  const bare = !hasCondenser && !form.reboiler;
  const feeds = heights(form, T, form.feeds);
  const sides = heights(form, T, form.sides);
  const most = GRID * Math.floor((T - HEAD) / GRID);
  /** A port whose stage is not known yet: around the middle, where nothing else is. */
  const loose = (k: number, known: ReadonlyMap<string, number>): number => {
    const free = Array.from(
      { length: (2 * most) / GRID + 1 },
      (_, i) => GRID * (i % 2 ? (i + 1) / 2 : -i / 2),
    ).filter((y) => ![...known.values()].includes(y));
    return free[(k - 1) % free.length]!;
  };
  const top = -T + GRID;
  const ports = (name: string): PortPlace | undefined => {
    if (name === 'bottoms') return form.reboiler ? port(32, T + 16, 'bottom') : port(0, T, 'bottom');
    if (name === 'vapourDistillate') return hasCondenser ? port(FAR, top + 32, 'right') : port(0, -T, 'top');
    if (name === 'liquidDistillate') return hasCondenser ? port(FAR, top + 40, 'right') : port(0, -T, 'top');
    const feed = numberOf(name, 'feed');
    if (feed !== undefined) return port(-HALF, feeds.get(name) ?? loose(feed, feeds), 'left');
    const side = numberOf(name, 'side');
    return side === undefined ? undefined : port(HALF, sides.get(name) ?? loose(side, sides), 'right');
  };
  const right = hasCondenser || form.reboiler ? FAR : HALF;
  const [above, below] = [hasCondenser ? T + 16 : T, form.reboiler ? T + 16 : T];
  return {
    box: { x: -HALF, y: -above, w: HALF + right, h: above + below },
    paths: [
      ...(hasCondenser ? condenser(T, form.distillate === 'vapour') : []),
      ...(form.reboiler ? reboiler(T) : []),
      shell(T),
      bare ? BEDS : trays(form.stages, T),
    ],
    ports,
    links: [
      ...(hasCondenser ? [heatLink('condenser', -T + GRID, 'out')] : []),
      ...(form.reboiler ? [heatLink('reboiler', T - 16, 'in')] : []),
    ],
  };
}

const drawn = new Map<string, SymbolData>();

/** A shell with its ends: as many trays as stages, condenser and reboiler only where they are. */
export const column: SymbolKind = {
  draw(unit: DrawnUnit) {
    const form = formOf(unit);
    const key = JSON.stringify(form);
    let data = drawn.get(key);
    if (!data) {
      data = build(form);
      drawn.set(key, data);
    }
    return data;
  },
};
