import { type BoxIndex, boxAround } from './boxes';
import { DIAMOND } from './diamonds';
import { CLEAR, type LabelWish } from './labelPlaces';
import { nearestOfBox } from './near';
import type { Box, Point } from './types';

/** From the diamond to a label on a leader line [px]. */
const FAR = [20, 36, 56, 80] as const;
/** Leader line and what it passes stay this far apart [px]. */
const PASSING = 2.5;
const STEP = 3;

export interface LedPlace {
  readonly box: Box;
  /** From the edge of the diamond to the edge of the label. */
  readonly leader: readonly [Point, Point];
}

/** Boxes around the diamond, further and further away, each with the leader line that joins it to its diamond. */
export function* ledPlaces({ points, anchor, size, scale }: LabelWish): Generator<LedPlace> {
  if (!anchor.diamond) return;
  const { w, h, middle } = size;
  const [x, y] = anchor.at;
  const across = points[anchor.piece]![1] === points[anchor.piece + 1]![1];
  for (const far of FAR) {
    const off = (DIAMOND + far) * scale;
    const half = (DIAMOND + CLEAR) * scale;
    const below: Point[] = [];
    const above: Point[] = [];
    for (const left of [
      x - middle,
      x - w * 0.15,
      x - w * 0.85,
      x + half,
      x - half - w,
      x + off,
      x - off - w,
    ]) {
      below.push([left, y + off]);
      above.push([left, y - off - h]);
    }
    const right: Point[] = [];
    const left: Point[] = [];
    for (const top of [y - h / 2, y - h * 0.1, y - h * 0.9, y + half, y - half - h, y + off, y - off - h]) {
      right.push([x + off, top]);
      left.push([x - off - w, top]);
    }
    const corners = across
      ? [...below, ...above, ...right.slice(3), ...left.slice(3)]
      : [...right, ...left, ...below.slice(3), ...above.slice(3)];
    for (const [bx, by] of corners) {
      const box: Box = { x: Math.round(bx), y: Math.round(by), w, h };
      const leader = leaderTo(anchor.at, box, scale);
      if (leader) yield { box, leader };
    }
  }
}

/** The shortest straight line from a diamond to a label, from edge to edge. */
function leaderTo(at: Point, box: Box, scale: number): readonly [Point, Point] | undefined {
  const end = nearestOfBox(box, at);
  const [dx, dy] = [end[0] - at[0], end[1] - at[1]];
  const reach = Math.abs(dx) + Math.abs(dy);
  const edge = DIAMOND * scale;
  if (reach <= edge + 4 * scale) return undefined;
  const share = edge / reach;
  const length = Math.hypot(dx, dy);
  const gap = (2 * scale) / length;
  return [
    [at[0] + dx * share, at[1] + dy * share],
    [end[0] - dx * gap, end[1] - dy * gap],
  ];
}

/** Small boxes along a leader line: what it must not meet. */
export function leaderBoxes([a, b]: readonly [Point, Point], half = PASSING): readonly Box[] {
  const length = Math.hypot(b[0] - a[0], b[1] - a[1]);
  const count = Math.max(1, Math.ceil(length / STEP));
  return Array.from({ length: count + 1 }, (_, k) =>
    boxAround([a[0] + ((b[0] - a[0]) * k) / count, a[1] + ((b[1] - a[1]) * k) / count], half),
  );
}

/**
 * Whether a leader line meets nothing, its own line included; only its own diamond, where it begins, is left out.
 *
 * @param stream index of its stream
 */
export const isLeaderFree = (
  leader: readonly [Point, Point],
  diamond: Point,
  taken: BoxIndex,
  stream: number,
  scale: number,
): boolean =>
  leaderBoxes(leader).every((box) => {
    const middle: Point = [box.x + box.w / 2, box.y + box.h / 2];
    const away = Math.abs(middle[0] - diamond[0]) + Math.abs(middle[1] - diamond[1]);
    return away < DIAMOND * scale + 3 || !taken.hits(box, 0, `diamond ${stream}`);
  });
