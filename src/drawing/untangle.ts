import { boxOfPiece, grown, hull, overlaps, pieceBoxes } from './boxes';
import type { Lane } from './grid';
import { piecesOf, TANGLE, tangles, trouble } from './nudge';
import { detourLine, type RouteEnd } from './route';
import { BEND } from './search';
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

/**
 * Leads lines that still run along another one once more, this time keeping off the pieces of all others.
 * A line that finds nothing better stays; it is tried again only when a line it runs along has changed.
 */
export function untangled(
  lines: readonly (readonly Point[])[],
  ends: readonly (readonly [RouteEnd | undefined, RouteEnd | undefined])[],
  obstacles: readonly Box[],
  fixed: readonly boolean[],
): readonly (readonly Point[])[] {
  const out = [...lines];
  let changed = new Set(out.keys());
  for (let round = 0; round < 3; round++) {
    const tangled = tangles(out);
    const now = new Set<number>();
    for (const [line, near] of [...tangled].sort(([a], [b]) => b - a)) {
      const [from, to] = ends[line]!;
      if (fixed[line] || !from || !to) continue;
      if (![...near].some((other) => changed.has(other) || now.has(other))) continue;
      const better = ledOff(out, line, near, [from, to], obstacles);
      if (!better) continue;
      out[line] = better;
      now.add(line);
    }
    if (now.size === 0) break;
    changed = now;
  }
  return out;
}

const costOf = (points: readonly Point[]): number =>
  points
    .slice(1)
    .reduce((sum, [x, y], k) => sum + Math.abs(x - points[k]![0]) + Math.abs(y - points[k]![1]) + BEND, 0);

/** A way for one line with less trouble than it has; undefined when none is found. */
function ledOff(
  lines: readonly (readonly Point[])[],
  line: number,
  near: ReadonlySet<number>,
  [from, to]: readonly [RouteEnd, RouteEnd],
  obstacles: readonly Box[],
): readonly Point[] | undefined {
  const points = lines[line]!;
  const others = piecesOf(lines).filter((p) => p.line !== line);
  let least = trouble(points, line, others);
  if (least < TANGLE) return undefined;
  const around = grown(hull(pieceBoxes(points, 60))!, 60);
  const lanes = others
    .filter((p) => overlaps(around, laneBox(p)))
    .map((p) => ({ ...p, channel: near.has(p.line) }));
  const most = costOf(points) + LONGER;
  let best: readonly Point[] | undefined;
  for (const stubs of DETOUR_STUBS) {
    const way = detourLine(from, to, obstacles, { lanes, stubs, most })?.points;
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
