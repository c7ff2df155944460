import { portOnSheet } from '../drawing/transform';
import type { Point, UnitShape } from '../drawing/types';
import type { Port, UnitId } from '../engine/ids';
import type { SketchStream } from '../sketch/types';

/** The hand is drawn to a line within this distance [screen px]. */
export const MAGNET = 9;
/** With more units in the hand only the first ones look for lines. */
const MOST = 12;

/** A moving unit lines up with something that stands: shift by which it does, along one axis, and where both are at first. */
export interface Guide {
  readonly axis: 0 | 1;
  readonly shift: number;
  readonly from: Point;
  readonly to: Point;
  /** Ports of one stream: its line comes straight. Such a guide wins. */
  readonly line: boolean;
}

/**
 * Everything the units in the hand could line up with: the ports at the other ends of their streams, and the origins of all
 * others.
 */
export function guidesOf(
  shapes: readonly UnitShape[],
  streams: readonly SketchStream[],
  moving: ReadonlySet<UnitId>,
): readonly Guide[] {
  const guides: Guide[] = [];
  const byId = new Map(shapes.map((shape) => [shape.unit, shape]));
  const portOf = ([unit, port]: readonly [UnitId, Port]) => {
    const shape = byId.get(unit);
    const place = shape?.symbol.ports(port);
    return shape && place && portOnSheet(shape, place);
  };
  for (const { from, to } of streams) {
    if (!from || !to || moving.has(from[0]) === moving.has(to[0])) continue;
    const [mine, other] = moving.has(from[0]) ? [portOf(from), portOf(to)] : [portOf(to), portOf(from)];
    if (!mine || !other) continue;
    const level = (side: string): boolean => side === 'left' || side === 'right';
    if (level(mine.side) !== level(other.side)) continue;
    const axis = level(mine.side) ? 1 : 0;
    guides.push({ axis, shift: other.at[axis] - mine.at[axis], from: mine.at, to: other.at, line: true });
  }
  const mine = shapes.filter((shape) => moving.has(shape.unit)).slice(0, MOST);
  for (const { at } of mine)
    for (const other of shapes) {
      if (moving.has(other.unit)) continue;
      for (const axis of [0, 1] as const)
        guides.push({ axis, shift: other.at[axis] - at[axis], from: at, to: other.at, line: false });
    }
  return guides;
}

/** A shift drawn to the nearest guide within reach, ports first, else to the grid; each axis by itself. */
export function drawnTo(guides: readonly Guide[], by: Point, reach: number, grid: number): Point {
  const along = (axis: 0 | 1): number => {
    let best: Guide | undefined;
    for (const guide of guides) {
      if (guide.axis !== axis) continue;
      const away = Math.abs(guide.shift - by[axis]);
      if (away > reach || (best?.line && !guide.line)) continue;
      if (!best || (guide.line && !best.line) || away < Math.abs(best.shift - by[axis])) best = guide;
    }
    return best ? best.shift : Math.round(by[axis] / grid) * grid;
  };
  return [along(0), along(1)];
}

/** Lines along which something lines up after a shift, as one path; the longest on each line. */
export function guidePath(guides: readonly Guide[], by: Point): string {
  const spans = new Map<string, { readonly axis: 0 | 1; readonly at: number; lo: number; hi: number }>();
  for (const { axis, shift, from, to } of guides) {
    if (shift !== by[axis]) continue;
    const other = (1 - axis) as 0 | 1;
    const key = `${axis} ${to[axis]}`;
    const span = spans.get(key) ?? { axis, at: to[axis], lo: to[other], hi: to[other] };
    span.lo = Math.min(span.lo, to[other], from[other] + by[other]);
    span.hi = Math.max(span.hi, to[other], from[other] + by[other]);
    spans.set(key, span);
  }
  return [...spans.values()]
    .map(({ axis, at, lo, hi }) => (axis === 1 ? `M${lo} ${at}H${hi}` : `M${at} ${lo}V${hi}`))
    .join('');
}
