import { boxOfPiece, grown, hull, overlaps, pieceBoxes } from './boxes';
import type { Lane } from './grid';
import { piecesOf, TANGLE, tangles, trouble } from './nudge';
import { detourLine, type RouteEnd } from './route';
import type { Box, Point } from './types';

/** Straight pieces at the ports of a line that is led once more, to choose from [px]. */
const DETOUR_STUBS: readonly (readonly [number, number])[] = [
  [24, 24],
  [12, 24],
  [24, 12],
  [12, 12],
];

/**
 * Leads lines that still run along another one once more, this time keeping off the pieces of all others. A line that finds nothing better stays.
 */
export function untangled(
  lines: readonly (readonly Point[])[],
  ends: readonly (readonly [RouteEnd | undefined, RouteEnd | undefined])[],
  obstacles: readonly Box[],
  fixed: readonly boolean[],
): readonly (readonly Point[])[] {
  const out = [...lines];
  for (let round = 0; round < 3; round++) {
    const tangled = tangles(out);
    if (tangled.size === 0) break;
    for (const [line, near] of [...tangled].sort(([a], [b]) => b - a)) {
      const [from, to] = ends[line]!;
      if (fixed[line] || !from || !to) continue;
      const others = piecesOf(out).filter((p) => p.line !== line);
      let least = trouble(out[line]!, line, others);
      if (least < TANGLE) continue;
      const around = grown(hull(pieceBoxes(out[line]!, 60))!, 60);
      const lanes = others
        .filter((p) => overlaps(around, laneBox(p)))
        .map((p) => ({ ...p, channel: near.has(p.line) }));
      for (const stubs of DETOUR_STUBS) {
        const points = detourLine(from, to, obstacles, { lanes, stubs })?.points;
        if (!points) continue;
        const left = trouble(points, line, others);
        if (left < least) {
          least = left;
          out[line] = points;
        }
        if (least < TANGLE) break;
      }
    }
  }
  return out;
}

const laneBox = ({ across, at, lo, hi }: Lane): Box =>
  across ? boxOfPiece([lo, at], [hi, at], 1) : boxOfPiece([at, lo], [at, hi], 1);
