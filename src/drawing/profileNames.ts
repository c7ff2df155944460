import { overlaps } from './boxes';
import { cutText, measureText } from './metrics';
import type { DrawnLine } from './profiles';
import type { Box, TextShape } from './types';

/** A text that wants a place beside a line of the plot, or on a level of its own. */
export type NameRequest =
  | { readonly text: string; readonly line: DrawnLine }
  | { readonly text: string; readonly level: number };

const SIZE = 11;
const [ABOVE, BELOW] = [8.5, 2.8];
const OFF = 5;
const CLEAR = 6;
const TRIES = 24;

/** One step of a drawn line, from the higher place to the lower, for asking what a text would cover. */
interface Piece {
  readonly owner: DrawnLine;
  readonly x1: number;
  readonly y1: number;
  readonly x2: number;
  readonly y2: number;
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
 *
 * @param dotted  heights of dotted lines through the plot, better not written over
 */
export function placeNames(
  wanted: readonly NameRequest[],
  box: Box,
  lines: readonly DrawnLine[],
  dotted: readonly number[] = [],
): readonly TextShape[] {
  const pieces = lines.flatMap((owner) =>
    owner.points.slice(1).map(({ point: [x2, y2] }, k): Piece => {
      const [x1, y1] = owner.points[k]!.point;
      return { owner, x1, y1, x2, y2 };
    }),
  );
  const placed: Box[] = [];
  return wanted.flatMap((request): TextShape[] => {
    const text = cutText(request.text, box.w - 4, SIZE);
    const w = measureText(text, SIZE);
    const own = 'line' in request ? request.line : undefined;
    const candidates = own ? besideLine(own, box) : 'level' in request ? onLevel(request.level, box) : [];
    let best: Candidate | undefined;
    let least = Infinity;
    for (const c of candidates) {
      const here = boxOf(c, w);
      if (c.bias >= least || !inside(here, box)) continue;
      const score = c.bias + cost(here, own, pieces, placed, dotted);
      if (score >= least) continue;
      least = score;
      best = c;
    }
    if (!best) return [];
    placed.push(boxOf(best, w));
    return [{ at: [best.x, best.y], text, size: SIZE, weight: 400, anchor: best.anchor, ink: 'ink2' }];
  });
}

/** How badly a text would stand there: over other texts, over lines, so near another line that it seems its name, on a dotted one. */
function cost(
  here: Box,
  own: DrawnLine | undefined,
  pieces: readonly Piece[],
  placed: readonly Box[],
  dotted: readonly number[],
): number {
  let covered = 0;
  let mistaken = 0;
  for (const piece of pieces) {
    // Lines run downwards: most pieces are far above or below.
    if (piece.y2 < here.y - CLEAR || piece.y1 > here.y + here.h + CLEAR) continue;
    if (crosses(piece, here, 0)) covered += 20;
    else if (piece.owner !== own && crosses(piece, here, CLEAR)) mistaken = 6;
  }
  const crowded = placed.some((other) => overlaps(other, here)) ? 1000 : 0;
  const struck = dotted.some((y) => y > here.y && y < here.y + here.h) ? 4 : 0;
  return covered + mistaken + crowded + struck;
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

/** Whether a straight piece comes within `by` px of a box: their extents meet, and the box is not all on one side of it. */
function crosses({ x1, y1, x2, y2 }: Piece, { x, y, w, h }: Box, by: number): boolean {
  const left = x - by;
  const right = x + w + by;
  const top = y - by;
  const bottom = y + h + by;
  if ((x1 < left && x2 < left) || (x1 > right && x2 > right)) return false;
  if (y2 < top || y1 > bottom) return false;
  const side = (px: number, py: number): number => (x2 - x1) * (py - y1) - (y2 - y1) * (px - x1);
  const a = side(left, top);
  const b = side(right, top);
  const c = side(left, bottom);
  const d = side(right, bottom);
  return !((a > 0 && b > 0 && c > 0 && d > 0) || (a < 0 && b < 0 && c < 0 && d < 0));
}
