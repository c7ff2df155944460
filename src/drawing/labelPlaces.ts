import { DIAMOND, piecesByLength } from './diamonds';
import type { LabelSize } from './labelSize';
import type { Box, Point } from './types';

/** A label clears everything by this [px]. */
export const CLEAR = 6;
const STEP = 16;

/** Where on its line a label belongs: its piece and the point that it names. */
export interface Anchor {
  readonly at: Point;
  readonly piece: number;
  readonly diamond: boolean;
}

export interface LabelWish {
  readonly points: readonly Point[];
  readonly anchor: Anchor;
  /** At the text scale of the sheet. */
  readonly size: LabelSize;
  /** Half the width of the line or its ribbon [px]. */
  readonly half: number;
  /** The end of a hanging line that nothing is joined to. */
  readonly freeEnd?: 'first' | 'last';
  /** How much larger than at 100 % texts are [-]. */
  readonly scale: number;
}

/** Both sides of a straight piece at one of its points: below and above it, or right and left of it. */
function* sides(across: boolean, [x, y]: Point, off: number, size: LabelSize): Generator<Box> {
  const { w, h, middle } = size;
  if (across) {
    const left = Math.round(x - middle);
    yield { x: left, y: Math.ceil(y + off), w, h };
    yield { x: left, y: Math.floor(y - off - h), w, h };
  } else {
    const top = Math.round(y - h / 2);
    yield { x: Math.ceil(x + off), y: top, w, h };
    yield { x: Math.floor(x - off - w), y: top, w, h };
  }
}

/** Beyond the free end of a hanging line, in its direction. */
function* beyond([px, py]: Point, [x, y]: Point, { w, h, middle }: LabelSize, off: number): Generator<Box> {
  if (py === y) yield { x: x > px ? x + off : x - off - w, y: Math.round(y - h / 2), w, h };
  else yield { x: Math.round(x - middle), y: y > py ? y + off : y - off - h, w, h };
}

const isAcross = (points: readonly Point[], piece: number): boolean =>
  points[piece]![1] === points[piece + 1]![1];

/** Shares of half a label by which it is shifted along the piece while it still stands at the diamond. */
const SHIFTS = [0.4, -0.4, 0.8, -0.8] as const;

/** Boxes at the diamond: centred on it, beside the line next to it, then shifted along. */
export function* atAnchor({ points, anchor, size, half, freeEnd, scale }: LabelWish): Generator<Box> {
  const beside = half + CLEAR * scale;
  const off = anchor.diamond ? Math.max(half, DIAMOND * scale) + CLEAR * scale : beside;
  const across = isAcross(points, anchor.piece);
  const [x, y] = anchor.at;
  yield* sides(across, anchor.at, off, size);
  if (freeEnd) {
    const last = points.length - 1;
    const far = (CLEAR + 4) * scale;
    if (freeEnd === 'last') yield* beyond(points[last - 1]!, points[last]!, size, far);
    else yield* beyond(points[1]!, points[0]!, size, far);
  }
  const length = across ? size.w / 2 : size.h / 2;
  for (const share of SHIFTS) {
    const by = share * length;
    yield* sides(across, across ? [x + by, y] : [x, y + by], off, size);
  }
  if (!anchor.diamond) return;
  // Right beside the diamond, close to the line.
  const step = (DIAMOND + CLEAR) * scale;
  for (const sign of [1, -1]) {
    const at: Point = across
      ? [x + (sign > 0 ? step + size.middle : -step - size.w + size.middle), y]
      : [x, y + sign * (step + size.h / 2)];
    yield* sides(across, at, beside, size);
  }
}

/** Distances along a piece from an anchor, nearest first, up to both ends. */
function shifts(from: number, to: number): number[] {
  const out: number[] = [];
  for (let by = STEP; by <= Math.max(to, -from); by += STEP) {
    if (by <= to) out.push(by);
    if (-by >= from) out.push(-by);
  }
  return out;
}

/** Boxes along the line, away from the diamond: its own piece first, then the others. */
export function* alongLine({ points, anchor, size, half, scale }: LabelWish): Generator<Box> {
  const beside = half + CLEAR * scale;
  const order = [anchor.piece, ...piecesByLength(points).filter((k) => k !== anchor.piece)];
  for (const piece of order) {
    const a = points[piece]!;
    const b = points[piece + 1]!;
    const across = a[1] === b[1];
    const axis = across ? 0 : 1;
    const middle = piece === anchor.piece ? anchor.at[axis] : (a[axis] + b[axis]) / 2;
    const [from, to] = [Math.min(a[axis], b[axis]) - middle, Math.max(a[axis], b[axis]) - middle];
    for (const by of [0, ...shifts(from, to)]) {
      yield* sides(across, across ? [middle + by, a[1]] : [a[0], middle + by], beside, size);
    }
  }
}

/** Where a label opens when it had to fold: below its diamond, or right of it. */
export function foldedBox(wish: LabelWish): Box {
  for (const box of atAnchor(wish)) return box;
  return { x: wish.anchor.at[0], y: wish.anchor.at[1], w: wish.size.w, h: wish.size.h };
}
