import { type BoxIndex, boxAround, boxOfPiece } from './boxes';
import type { Point } from './types';

/** Half the width of a diamond [px]. */
export const DIAMOND = 12;
/** A straight piece shorter than this carries none [px]. */
const SHORTEST = 40;
/** From the middle of a diamond to a bend, and to the base of an arrowhead [px]. */
const FROM_BEND = 16;
const HEAD = 9;
/** From the middle of a diamond to a crossing [px]. */
const FROM_CROSSING = 20;
const STEP = 8;

/** Where on a line its diamond stands: the piece it stands on, and its middle. */
export interface DiamondPlace {
  readonly at: Point;
  /** Index of the piece's first point. */
  readonly piece: number;
}

/** Pieces of a line by length, the longest first. */
export function piecesByLength(points: readonly Point[]): readonly number[] {
  const length = (k: number): number =>
    Math.abs(points[k + 1]![0] - points[k]![0]) + Math.abs(points[k + 1]![1] - points[k]![1]);
  return Array.from({ length: points.length - 1 }, (_, k) => k).sort(
    (a, b) => length(b) - length(a) || a - b,
  );
}

/** Middles to try on a piece from its own middle outward: distances from its first point. */
function places(length: number, last: boolean, scale: number): number[] {
  const from = FROM_BEND - DIAMOND + DIAMOND * scale;
  const to = length - from - (last ? HEAD : 0);
  const middle = (from + to) / 2;
  const out = [middle];
  for (let by = STEP; middle + by <= to; by += STEP) out.push(middle + by, middle - by);
  return out;
}

/** Whether a diamond at a point of its line is clear of symbols, other lines, crossings and other diamonds. */
const diamondMayStand = (
  at: Point,
  line: number,
  taken: BoxIndex,
  crossings: readonly Point[],
  scale: number,
): boolean => {
  const apart = FROM_CROSSING + DIAMOND * (scale - 1);
  if (crossings.some(([x, y]) => Math.abs(x - at[0]) + Math.abs(y - at[1]) < apart)) return false;
  return !taken.hits(boxAround(at, DIAMOND * scale), 2, line);
};

/**
 * Places for a line's diamond: the longest straight piece first, its middle first, clear of symbols, other lines,
 * crossings and other diamonds. None when every piece is too short or taken.
 *
 * @param taken     symbols and lines (each with its own line as the owner) and the diamonds placed so far
 * @param crossings distances along no axis: the points where this line meets others
 * @param scale     how much larger than at 100 % diamonds are [-]
 */
export function* diamondPlaces(
  points: readonly Point[],
  line: number,
  taken: BoxIndex,
  crossings: readonly Point[],
  scale: number,
): Generator<DiamondPlace> {
  for (const piece of piecesByLength(points)) {
    const [x1, y1] = points[piece]!;
    const [x2, y2] = points[piece + 1]!;
    const length = Math.abs(x2 - x1) + Math.abs(y2 - y1);
    if (length < SHORTEST + 2 * DIAMOND * (scale - 1)) return;
    const [ux, uy] = [Math.sign(x2 - x1), Math.sign(y2 - y1)];
    for (const along of places(length, piece + 2 === points.length, scale)) {
      const at: Point = [Math.round(x1 + ux * along), Math.round(y1 + uy * along)];
      if (!diamondMayStand(at, line, taken, crossings, scale)) continue;
      if (ownPieceNear(points, piece, at, DIAMOND * scale)) continue;
      yield { at, piece };
    }
  }
}

function ownPieceNear(points: readonly Point[], except: number, at: Point, half: number): boolean {
  for (let k = 0; k + 1 < points.length; k++) {
    if (k === except) continue;
    const box = boxOfPiece(points[k]!, points[k + 1]!, half + 2);
    if (at[0] > box.x && at[0] < box.x + box.w && at[1] > box.y && at[1] < box.y + box.h) return true;
  }
  return false;
}

export const diamondPath = ([x, y]: Point, half: number = DIAMOND): string =>
  `M${x} ${y - half}L${x + half} ${y} ${x} ${y + half} ${x - half} ${y}Z`;
