import type { UnitId } from '../engine/ids';
import type { Sketch } from '../sketch/types';
import { roomOf } from './arrangeGraph';
import { grown, overlaps } from './boxes';
import type { StandingUnit } from './standing';
import { GRID } from './tokens';
import type { Box, Point } from './types';

/** An arranged sheet begins here [px]. */
const ORIGIN = 96;
/** How far from where it should stand a unit looks for a free place [px]. */
const FARTHEST = 4000;
/** Rounds in which the shifts of units between kept ones even out. */
const ROUNDS = 100;

const snapped = (value: number): number => Math.round(value / GRID) * GRID;

const middle = (values: readonly number[]): number =>
  [...values].sort((a, b) => a - b)[values.length >> 1] ?? 0;

/** What a layout is brought onto the sheet around. */
export interface Staying {
  readonly kept: ReadonlySet<UnitId>;
  /** What else was placed by hand and has room of its own: texts, lines bent by hand. */
  readonly taken: readonly Box[];
  /** How far units keep from all that, and from one another, beyond their rooms [px]. */
  readonly passage: number;
}

/**
 * Brings a layout onto the grid, around what stays where it is: every unit is shifted as its neighbours along the streams
 * are, the kept ones being shifted from their places in the layout to where they stand; then it goes to the nearest free
 * place.
 *
 * @param wanted where the layout puts the units' origins
 * @returns places of the units that are not kept
 */
export function settle(
  sketch: Sketch,
  standing: readonly StandingUnit[],
  wanted: ReadonlyMap<UnitId, Point>,
  { kept, taken: others, passage }: Staying,
): ReadonlyMap<UnitId, Point> {
  const shifts = shiftsOf(sketch, wanted, kept);
  const taken: Box[] = [...standing.filter((u) => kept.has(u.unit.id)).map(roomOf), ...others];
  const places = new Map<UnitId, Point>();
  for (const u of inFlowOrder(standing, wanted)) {
    if (kept.has(u.unit.id)) continue;
    const [x, y] = wanted.get(u.unit.id)!;
    const [dx, dy] = shifts.get(u.unit.id)!;
    const room = roomOf(u);
    const [ax, ay] = u.pose.at;
    const roomAt = ([px, py]: Point): Box => ({ ...room, x: room.x - ax + px, y: room.y - ay + py });
    const isFree = (at: Point): boolean => {
      const box = grown(roomAt(at), passage);
      return !taken.some((other) => overlaps(box, other));
    };
    const at = nearestFree([snapped(x + dx), snapped(y + dy)], isFree);
    taken.push(roomAt(at));
    places.set(u.unit.id, at);
  }
  return places;
}

/**
 * How far each unit is moved from its place in the layout [px]: all alike to the origin while none is kept. Else kept units
 * are moved to where they stand, and each of the others by the mean of what its neighbours are moved by; what is joined to
 * no kept unit goes with the middle one of them.
 *
 * Source: barycentric placement around fixed points after Tutte, Proc. London Math. Soc. s3-13(1), 1963, p. 743.
 */
function shiftsOf(
  sketch: Sketch,
  wanted: ReadonlyMap<UnitId, Point>,
  kept: ReadonlySet<UnitId>,
): ReadonlyMap<UnitId, Point> {
  const staying = sketch.units.filter((unit) => kept.has(unit.id));
  const away = ({ id, at }: Sketch['units'][number], axis: 0 | 1): number => at[axis] - wanted.get(id)![axis];
  const least = (axis: 0 | 1): number => Math.min(...[...wanted.values()].map((at) => at[axis]));
  const whole: Point =
    staying.length === 0
      ? [ORIGIN - least(0), ORIGIN - least(1)]
      : [middle(staying.map((u) => away(u, 0))), middle(staying.map((u) => away(u, 1)))];
  const shifts = new Map<UnitId, Point>(
    sketch.units.map((u) => [u.id, kept.has(u.id) ? [away(u, 0), away(u, 1)] : whole]),
  );
  if (staying.length === 0) return shifts;
  const near = neighboursOf(sketch);
  for (let round = 0; round < ROUNDS; round++) {
    for (const { id } of sketch.units) {
      const around = near.get(id)!;
      if (kept.has(id) || around.length === 0) continue;
      let [dx, dy] = [0, 0];
      for (const other of around) {
        const [x, y] = shifts.get(other)!;
        dx += x / around.length;
        dy += y / around.length;
      }
      shifts.set(id, [dx, dy]);
    }
  }
  return shifts;
}

function neighboursOf({ units, streams }: Sketch): ReadonlyMap<UnitId, readonly UnitId[]> {
  const near = new Map<UnitId, UnitId[]>(units.map(({ id }) => [id, []]));
  for (const { from, to } of streams) {
    if (!from || !to || from[0] === to[0]) continue;
    near.get(from[0])?.push(to[0]);
    near.get(to[0])?.push(from[0]);
  }
  return near;
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
