import type { Box, Point } from './types';

/** Distance of a point from a box; 0 inside [px]. */
export const distanceTo = (b: Box, [x, y]: Point): number =>
  Math.hypot(Math.max(b.x - x, 0, x - b.x - b.w), Math.max(b.y - y, 0, y - b.y - b.h));

/** Distance between two boxes; 0 when they overlap [px]. */
export const apart = (a: Box, b: Box): number =>
  Math.hypot(Math.max(a.x - b.x - b.w, 0, b.x - a.x - a.w), Math.max(a.y - b.y - b.h, 0, b.y - a.y - a.h));

/** Distance of a box from a line of straight pieces along the axes [px]. */
export function distanceToLine(b: Box, points: readonly Point[]): number {
  let least = Infinity;
  for (let k = 0; k + 1 < points.length; k++) {
    const [x1, y1] = points[k]!;
    const [x2, y2] = points[k + 1]!;
    const piece = { x: Math.min(x1, x2), y: Math.min(y1, y2), w: Math.abs(x2 - x1), h: Math.abs(y2 - y1) };
    least = Math.min(least, apart(b, piece));
  }
  return least;
}

/** Point of a line nearest to another point. */
export function nearestOnLine(points: readonly Point[], [x, y]: Point): Point {
  let best: Point = points[0]!;
  let least = Infinity;
  for (let k = 0; k + 1 < points.length; k++) {
    const [x1, y1] = points[k]!;
    const [x2, y2] = points[k + 1]!;
    const here: Point = [
      Math.min(Math.max(x, Math.min(x1, x2)), Math.max(x1, x2)),
      Math.min(Math.max(y, Math.min(y1, y2)), Math.max(y1, y2)),
    ];
    const away = Math.hypot(here[0] - x, here[1] - y);
    if (away < least) {
      least = away;
      best = here;
    }
  }
  return best;
}

/** A box grown about a fixed point: what keeps its size on the screen takes this room when the sheet is small. */
export const scaledAbout = (box: Box, [x, y]: Point, k: number): Box =>
  k === 1 ? box : { x: x + (box.x - x) * k, y: y + (box.y - y) * k, w: box.w * k, h: box.h * k };

/** The point of a box nearest to another point. */
export const nearestOfBox = (box: Box, [x, y]: Point): Point => [
  Math.min(Math.max(x, box.x), box.x + box.w),
  Math.min(Math.max(y, box.y), box.y + box.h),
];
