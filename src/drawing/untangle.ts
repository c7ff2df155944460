import { boxOfPiece, grown, hull, overlaps, pieceBoxes } from './boxes';
import { crossingsOf } from './crossings';
import { APART, type Lane } from './grid';
import { type Piece, pieceAt, TANGLE, tangles, trouble } from './nudge';
import { detourLine, detourReach, keyOfEnd, type RouteEnd } from './route';
import { BEND, CROSSING } from './search';
import type { Box, Point } from './types';

/** Straight pieces at the ports of a line that is led once more, to choose from [px]. */
const DETOUR_STUBS: readonly (readonly [number, number])[] = [
  [24, 24],
  [12, 24],
  [24, 12],
  [12, 12],
];

/** How much longer than the line that runs along another one a detour may be, bends counted [px]. */
const LONGER = 480;

/** Answers to a line led once more, by all that has a say in them; `false`: nothing better. */
export type Detours = ReadonlyMap<string, readonly Point[] | false>;

/**
 * Leads lines that still run along another one once more, this time keeping off the pieces of all others.
 * A line that finds nothing better stays; it is tried again only when a line it runs along has changed.
 *
 * @param known answers of an earlier scene
 */
export function untangled(
  lines: readonly (readonly Point[])[],
  ends: readonly (readonly [RouteEnd | undefined, RouteEnd | undefined])[],
  obstacles: readonly Box[],
  fixed: readonly boolean[],
  known: Detours = new Map(),
): { readonly lines: readonly (readonly Point[])[]; readonly detours: Detours } {
  const detours = new Map<string, readonly Point[] | false>();
  const out = [...lines];
  let changed = new Set(out.keys());
  for (let round = 0; round < 3; round++) {
    const tangled = tangles(out);
    const now = new Set<number>();
    for (const [line, near] of [...tangled].sort(([a], [b]) => b - a)) {
      const [from, to] = ends[line]!;
      if (fixed[line] || !from || !to) continue;
      if (![...near].some((other) => changed.has(other) || now.has(other))) continue;
      const task = taskOf(out, line, near, [from, to], obstacles);
      if (task.least < TANGLE) continue;
      const better = detours.get(task.key) ?? known.get(task.key) ?? (ledOff(task) || false);
      detours.set(task.key, better);
      if (!better) continue;
      out[line] = better;
      now.add(line);
    }
    if (now.size === 0) break;
    changed = now;
  }
  ledAround(out, ends, obstacles, fixed, known, detours);
  return { lines: out, detours };
}

/** Lines that cross others look for a way with fewer crossings, as far as it is worth its length and bends. */
function ledAround(
  out: (readonly Point[])[],
  ends: readonly (readonly [RouteEnd | undefined, RouteEnd | undefined])[],
  obstacles: readonly Box[],
  fixed: readonly boolean[],
  known: Detours,
  detours: Map<string, readonly Point[] | false>,
): void {
  const crossings = crossingCounts(out);
  const order = [...crossings.keys()].sort((a, b) => crossings.get(b)! - crossings.get(a)! || b - a);
  for (const line of order) {
    const [from, to] = ends[line]!;
    if (fixed[line] || !from || !to) continue;
    const task = taskOf(out, line, new Set(), [from, to], obstacles);
    if (task.least === 0 || task.least >= TANGLE) continue;
    const key = `around ${task.key}`;
    const better = detours.get(key) ?? known.get(key) ?? (cheaper(task) || false);
    detours.set(key, better);
    if (better) out[line] = better;
  }
}

function crossingCounts(lines: readonly (readonly Point[])[]): ReadonlyMap<number, number> {
  const counts = new Map<number, number>();
  crossingsOf(lines).forEach((points, line) => {
    if (points.length > 0) counts.set(line, points.length);
  });
  return counts;
}

/** A way that costs less than the line does, its crossings counted. */
function cheaper({
  points,
  line,
  ends,
  obstacles,
  others,
  lanes,
  least,
}: Task): readonly Point[] | undefined {
  let most = costOf(points) + CROSSING * least;
  let best: readonly Point[] | undefined;
  for (const stubs of DETOUR_STUBS.slice(0, 1)) {
    const way = detourLine(...ends, obstacles, { lanes, stubs, most })?.points;
    if (!way) continue;
    const left = trouble(way, line, others);
    const cost = costOf(way) + CROSSING * left;
    if (left >= TANGLE || cost >= most - 1) continue;
    most = cost;
    best = way;
  }
  return best;
}

const costOf = (points: readonly Point[]): number =>
  points
    .slice(1)
    .reduce((sum, [x, y], k) => sum + Math.abs(x - points[k]![0]) + Math.abs(y - points[k]![1]) + BEND, 0);

/** A line that is to be led once more, and all that has a say in where it then goes. */
interface Task {
  readonly key: string;
  readonly points: readonly Point[];
  readonly line: number;
  readonly ends: readonly [RouteEnd, RouteEnd];
  readonly obstacles: readonly Box[];
  /** Pieces of other lines that a way in reach could meet. */
  readonly others: readonly Piece[];
  /** Those it is to keep off. */
  readonly lanes: readonly Lane[];
  readonly least: number;
}

const rooms = new WeakMap<readonly Point[], Box>();

/** The box around all pieces of a line. */
function roomOf(points: readonly Point[]): Box {
  let room = rooms.get(points);
  if (!room) {
    room = hull(pieceBoxes(points, 1))!;
    rooms.set(points, room);
  }
  return room;
}

function taskOf(
  lines: readonly (readonly Point[])[],
  line: number,
  near: ReadonlySet<number>,
  ends: readonly [RouteEnd, RouteEnd],
  obstacles: readonly Box[],
): Task {
  const points = lines[line]!;
  const around = grown(hull(pieceBoxes(points, 60))!, 60);
  const reach = hull([around, grown(detourReach(...ends), 2 * APART)])!;
  const others: Piece[] = [];
  const lanes: Lane[] = [];
  let key = `${points.join(' ')}|${keyOfEnd(ends[0])}|${keyOfEnd(ends[1])}`;
  for (const [other, ofOther] of lines.entries()) {
    if (other === line || !overlaps(reach, roomOf(ofOther))) continue;
    for (let k = 0; k + 1 < ofOther.length; k++) {
      const piece = pieceAt(ofOther, other, k);
      const box = laneBox(piece);
      if (!overlaps(reach, box)) continue;
      others.push(piece);
      const { across, at, lo, hi } = piece;
      key += `|${across ? 'a' : 'd'}${at} ${lo} ${hi}`;
      if (!overlaps(around, box)) continue;
      const channel = near.has(other);
      lanes.push({ ...piece, channel });
      key += channel ? 'c' : 'l';
    }
  }
  const least = trouble(points, line, others);
  const close = obstacles.filter((o) => overlaps(reach, o));
  for (const o of close) key += `|${o.x} ${o.y} ${o.w} ${o.h}`;
  return { key, points, line, ends, obstacles: close, others, lanes, least };
}

/** A way with less trouble than the line has; undefined when none is found. */
function ledOff({ points, line, ends, obstacles, others, lanes, least: has }: Task) {
  const most = costOf(points) + LONGER;
  let least = has;
  let best: readonly Point[] | undefined;
  for (const stubs of DETOUR_STUBS) {
    const way = detourLine(...ends, obstacles, { lanes, stubs, most })?.points;
    if (!way) continue;
    const left = trouble(way, line, others);
    if (left < least) {
      least = left;
      best = way;
    }
    if (least < TANGLE) break;
  }
  return best;
}

const laneBox = ({ across, at, lo, hi }: Lane): Box =>
  across ? boxOfPiece([lo, at], [hi, at], 1) : boxOfPiece([at, lo], [at, hi], 1);
