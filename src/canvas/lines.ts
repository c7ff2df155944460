import type { Point } from '../drawing/types';

/** Straight pieces of a line: start, end, length. */
function pieces(points: readonly Point[]): { a: Point; b: Point; length: number }[] {
  return points.slice(1).map((b, k) => {
    const a = points[k]!;
    return { a, b, length: Math.abs(b[0] - a[0]) + Math.abs(b[1] - a[1]) };
  });
}

/** Middle of the longest straight piece. */
export function middleOf(points: readonly Point[]): Point {
  let best = pieces(points)[0];
  if (!best) return points[0] ?? [0, 0];
  for (const piece of pieces(points)) if (piece.length > best.length) best = piece;
  return [(best.a[0] + best.b[0]) / 2, (best.a[1] + best.b[1]) / 2];
}

/** Point of a line nearest to another point, and how far away it is [px]. */
export function nearestOn(points: readonly Point[], [x, y]: Point): { at: Point; distance: number } {
  let at: Point = points[0] ?? [x, y];
  let distance = Infinity;
  for (const { a, b } of pieces(points)) {
    const here: Point = [
      Math.min(Math.max(x, Math.min(a[0], b[0])), Math.max(a[0], b[0])),
      Math.min(Math.max(y, Math.min(a[1], b[1])), Math.max(a[1], b[1])),
    ];
    const away = Math.hypot(here[0] - x, here[1] - y);
    if (away < distance) {
      at = here;
      distance = away;
    }
  }
  return { at, distance };
}
