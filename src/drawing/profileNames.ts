import { grown, overlaps } from './boxes';
import { cutText, measureText } from './metrics';
import type { DrawnLine } from './profiles';
import type { Box, Point, TextShape } from './types';

/** A text that wants a place beside a line of the plot, or on a level of its own. */
export type NameRequest =
  | { readonly text: string; readonly line: DrawnLine }
  | { readonly text: string; readonly level: number };

const SIZE = 11;
const [ABOVE, BELOW] = [8.5, 2.8];
const OFF = 5;
const CLEAR = 6;
const TRIES = 24;

/** One step of a drawn line, for asking what a text would cover. */
interface Piece {
  readonly owner: DrawnLine;
  readonly a: Point;
  readonly b: Point;
}

interface Candidate {
  readonly x: number;
  readonly y: number;
  readonly anchor: 'start' | 'end';
  readonly bias: number;
}

/**
 * Places names where they cover no line and no other name, as near the middle of the plot as that allows; where all is
 * covered, where least is. Inside the plot always.
 */
export function placeNames(
  wanted: readonly NameRequest[],
  box: Box,
  lines: readonly DrawnLine[],
): readonly TextShape[] {
  const pieces = lines.flatMap((owner) =>
    owner.points.slice(1).map((p, k): Piece => ({ owner, a: owner.points[k]!.point, b: p.point })),
  );
  const placed: Box[] = [];
  return wanted.flatMap((request): TextShape[] => {
    const text = cutText(request.text, box.w - 4, SIZE);
    const width = measureText(text, SIZE);
    const own = 'line' in request ? request.line : undefined;
    const scored = (
      own ? besideLine(own, box) : 'level' in request ? onLevel(request.level, box) : []
    ).flatMap((c) => {
      const here = boxOf(c, width);
      if (!inside(here, box)) return [];
      const covered = pieces.filter((piece) => crosses(piece, here)).length;
      const crowded = placed.filter((other) => overlaps(other, here)).length;
      // A name close to another line would be taken for that line's.
      const around = grown(here, CLEAR);
      const mistaken = pieces.some((piece) => piece.owner !== own && crosses(piece, around)) ? 6 : 0;
      return [{ c, here, score: crowded * 1000 + covered * 20 + mistaken + c.bias }];
    });
    const best = scored.reduce<(typeof scored)[number] | undefined>(
      (least, next) => (least === undefined || next.score < least.score ? next : least),
      undefined,
    );
    if (!best) return [];
    placed.push(best.here);
    const { x, y, anchor } = best.c;
    return [{ at: [x, y], text, size: SIZE, weight: 400, anchor, ink: 'ink2' }];
  });
}

function besideLine({ points }: DrawnLine, box: Box): Candidate[] {
  const step = Math.max(1, Math.floor(points.length / TRIES));
  const middle = box.y + box.h / 2;
  return points
    .filter((_, k) => k % step === 0)
    .flatMap(({ point: [x, y] }) => {
      const bias = (8 * Math.abs(y - middle)) / box.h;
      return ([-3, 3.8, 11] as const).flatMap((dy): Candidate[] => [
        { x: x + OFF, y: y + dy, anchor: 'start', bias: bias + (dy === 3.8 ? 0 : 1) },
        { x: x - OFF, y: y + dy, anchor: 'end', bias: bias + (dy === 3.8 ? 0.5 : 1.5) },
      ]);
    });
}

function onLevel(level: number, box: Box): Candidate[] {
  return [level - 3.5, level + 10.5].flatMap((y, k): Candidate[] => [
    { x: box.x + box.w - 2, y, anchor: 'end', bias: k },
    { x: box.x + 3, y, anchor: 'start', bias: k + 0.5 },
  ]);
}

const boxOf = ({ x, y, anchor }: Candidate, w: number): Box => ({
  x: anchor === 'start' ? x : x - w,
  y: y - ABOVE,
  w,
  h: ABOVE + BELOW,
});

const inside = (a: Box, b: Box): boolean =>
  a.x >= b.x + 1 && a.x + a.w <= b.x + b.w && a.y >= b.y && a.y + a.h <= b.y + b.h;

/** Whether a straight piece runs through a box: clipped against its four sides in turn (Liang and Barsky, 1984). */
function crosses({ a: [x1, y1], b: [x2, y2] }: Piece, box: Box): boolean {
  let [from, to] = [0, 1];
  const sides: readonly (readonly [number, number])[] = [
    [x1 - x2, x1 - box.x],
    [x2 - x1, box.x + box.w - x1],
    [y1 - y2, y1 - box.y],
    [y2 - y1, box.y + box.h - y1],
  ];
  for (const [p, q] of sides) {
    if (p === 0) {
      if (q < 0) return false;
      continue;
    }
    const r = q / p;
    if (p < 0) from = Math.max(from, r);
    else to = Math.min(to, r);
    if (from > to) return false;
  }
  return true;
}
