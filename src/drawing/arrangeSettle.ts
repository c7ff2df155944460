import type { UnitId } from '../engine/ids';
import type { Sketch } from '../sketch/types';
import { roomOf } from './arrangeGraph';
import { grown, overlaps } from './boxes';
import type { StandingUnit } from './standing';
import { GRID } from './tokens';
import type { Box, Point } from './types';

/** An arranged sheet begins here [px]. */
const ORIGIN = 96;
/** Lines pass between the rooms of two units [px]. */
const PASSAGE = 16;
/** How far from where it should stand a unit looks for a free place [px]. */
const FARTHEST = 4000;

const snapped = (value: number): number => Math.round(value / GRID) * GRID;

const middle = (values: readonly number[]): number =>
  [...values].sort((a, b) => a - b)[values.length >> 1] ?? 0;

/**
 * Brings a layout onto the grid, around the units that stay where they are: it is moved as a whole so that the kept units
 * come as close as they can to where they stand, then every other unit goes to the nearest free place.
 *
 * @param wanted where the layout puts the units' origins
 * @returns places of the units that are not kept
 */
export function settle(
  sketch: Sketch,
  standing: readonly StandingUnit[],
  wanted: ReadonlyMap<UnitId, Point>,
  kept: ReadonlySet<UnitId>,
): ReadonlyMap<UnitId, Point> {
  const off = shiftOf(sketch, wanted, kept);
  const taken: Box[] = standing.filter((u) => kept.has(u.unit.id)).map(roomOf);
  const places = new Map<UnitId, Point>();
  for (const u of inFlowOrder(standing, wanted)) {
    if (kept.has(u.unit.id)) continue;
    const [x, y] = wanted.get(u.unit.id)!;
    const room = roomOf(u);
    const [ax, ay] = u.pose.at;
    const roomAt = ([px, py]: Point): Box => ({ ...room, x: room.x - ax + px, y: room.y - ay + py });
    const isFree = (at: Point): boolean => {
      const box = grown(roomAt(at), kept.size > 0 ? PASSAGE : 0);
      return !taken.some((other) => overlaps(box, other));
    };
    const at = nearestFree([snapped(x + off[0]), snapped(y + off[1])], isFree);
    taken.push(roomAt(at));
    places.set(u.unit.id, at);
  }
  return places;
}

/** How far the whole layout is moved [px]. */
function shiftOf(sketch: Sketch, wanted: ReadonlyMap<UnitId, Point>, kept: ReadonlySet<UnitId>): Point {
  const staying = sketch.units.filter((unit) => kept.has(unit.id));
  if (staying.length === 0) {
    const all = [...wanted.values()];
    return [ORIGIN - Math.min(...all.map(([x]) => x)), ORIGIN - Math.min(...all.map(([, y]) => y))];
  }
  const away = (axis: 0 | 1): number => middle(staying.map((u) => u.at[axis] - wanted.get(u.id)![axis]));
  return [away(0), away(1)];
}

const inFlowOrder = (
  standing: readonly StandingUnit[],
  wanted: ReadonlyMap<UnitId, Point>,
): readonly StandingUnit[] =>
  [...standing].sort((a, b) => {
    const [p, q] = [wanted.get(a.unit.id)!, wanted.get(b.unit.id)!];
    return p[0] - q[0] || p[1] - q[1];
  });

/** The free place nearest to a point of the grid: rings around it, each from its nearest point on. */
function nearestFree([x, y]: Point, isFree: (at: Point) => boolean): Point {
  if (isFree([x, y])) return [x, y];
  for (let ring = GRID; ring <= FARTHEST; ring += GRID) {
    for (let by = 0; by <= ring; by += GRID) {
      for (const at of ringAt(x, y, ring, by)) if (isFree(at)) return at;
    }
  }
  return [x, y + FARTHEST];
}

function* ringAt(x: number, y: number, ring: number, by: number): Generator<Point> {
  for (const sign of by === 0 ? [1] : [1, -1]) {
    yield [x + sign * by, y + ring];
    yield [x + sign * by, y - ring];
    yield [x + ring, y + sign * by];
    yield [x - ring, y + sign * by];
  }
}
