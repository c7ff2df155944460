import { type BoxIndex, grown } from './boxes';
import { DIAMOND, piecesByLength } from './diamonds';
import { measureText, numberRoom } from './metrics';
import { TEXT } from './tokens';
import type { Box, LabelRow, Point } from './types';

/** A label clears everything by this [px]. */
const CLEAR = 6;
const UNIT_GAP = 4;
const STEP = 16;
/** A typical number: what a label is centred by, though its room is wider. */
const TYPICAL = '00.00';
/** First baseline below the upper edge of the box [px]. */
const ASCENT = 10;

export interface LabelSize {
  readonly w: number;
  readonly h: number;
  /** Room for the number, before the gap and the unit. */
  readonly number: number;
  /** From the left edge to the middle of what is usually seen. */
  readonly middle: number;
}

/** Size of a label: from its units and the count of its rows, never from its digits. */
export function labelSize(rows: readonly LabelRow[]): LabelSize {
  const unit = Math.max(0, ...rows.map((row) => measureText(row.unit, TEXT.labelUnit)));
  const number = numberRoom(TEXT.label);
  const seen = measureText(TYPICAL, TEXT.label);
  const w = number + UNIT_GAP + unit;
  return {
    w,
    h: rows.length * TEXT.labelLine,
    number,
    middle: number - seen + (seen + UNIT_GAP + unit) / 2,
  };
}

/** Where on its line a label belongs: its piece and the point that it names. */
export interface Anchor {
  readonly at: Point;
  readonly piece: number;
  readonly diamond: boolean;
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

/** Boxes to try for a label, in order. */
function candidates(points: readonly Point[], anchor: Anchor, size: LabelSize, half: number): Box[] {
  const out: Box[] = [];
  const sides = (piece: number, [x, y]: Point, off: number): void => {
    const across = points[piece]![1] === points[piece + 1]![1];
    if (across) {
      const left = Math.round(x - size.middle);
      out.push({ x: left, y: Math.ceil(y + off), w: size.w, h: size.h });
      out.push({ x: left, y: Math.floor(y - off - size.h), w: size.w, h: size.h });
    } else {
      const top = Math.round(y - size.h / 2);
      out.push({ x: Math.ceil(x + off), y: top, w: size.w, h: size.h });
      out.push({ x: Math.floor(x - off - size.w), y: top, w: size.w, h: size.h });
    }
  };
  const beside = half + CLEAR;
  const first = anchor.diamond ? Math.max(beside, DIAMOND + CLEAR) : beside;
  sides(anchor.piece, anchor.at, first);
  const order = [anchor.piece, ...piecesByLength(points).filter((k) => k !== anchor.piece)];
  for (const piece of order) {
    const a = points[piece]!;
    const b = points[piece + 1]!;
    const across = a[1] === b[1];
    const axis = across ? 0 : 1;
    const own = piece === anchor.piece;
    const middle = own ? anchor.at[axis] : (a[axis] + b[axis]) / 2;
    const [from, to] = [Math.min(a[axis], b[axis]) - middle, Math.max(a[axis], b[axis]) - middle];
    if (!own) sides(piece, across ? [middle, a[1]] : [a[0], middle], beside);
    for (const by of shifts(from, to)) {
      const at: Point = across ? [middle + by, a[1]] : [a[0], middle + by];
      const reach = across ? size.w / 2 + 24 : size.h / 2;
      sides(piece, at, own && anchor.diamond && Math.abs(by) < reach + DIAMOND ? first : beside);
    }
  }
  return out;
}

export interface LabelWish {
  readonly points: readonly Point[];
  readonly anchor: Anchor;
  readonly size: LabelSize;
  /** Half the width of the line or its ribbon [px]. */
  readonly half: number;
}

/** How many free places are counted before a label counts as easy to place. */
const EASY = 6;

/**
 * Places labels one after another, those with the fewest free places first, each at the first of its candidates that
 * clears everything by 6 px.
 *
 * @param taken symbols, lines, diamonds, tags and marks; the placed labels are added
 * @returns a box each, undefined where no place is free
 */
export function placeLabels(wishes: readonly LabelWish[], taken: BoxIndex): readonly (Box | undefined)[] {
  const tried = wishes.map((wish) => candidates(wish.points, wish.anchor, wish.size, wish.half));
  const free = tried.map((boxes) => boxes.filter((box) => !taken.hits(grown(box, CLEAR))));
  const order = wishes.map((_, k) => k);
  const ease = (k: number): number => Math.min(free[k]!.length, EASY);
  order.sort((a, b) => ease(a) - ease(b) || a - b);
  const out: (Box | undefined)[] = wishes.map(() => undefined);
  for (const k of order) {
    const box = free[k]!.find((b) => !taken.hits(grown(b, CLEAR)));
    if (!box) continue;
    out[k] = box;
    taken.add(box);
  }
  return out;
}

/** Where the rows of a label stand in its box. */
export const rowsIn = (
  box: Box,
  size: LabelSize,
): { readonly numberRight: number; readonly unitLeft: number; readonly baseline: number } => ({
  numberRight: box.x + size.number,
  unitLeft: box.x + size.number + UNIT_GAP,
  baseline: box.y + ASCENT,
});

/** Where a label opens when it had to fold: below its diamond, or right of it. */
export const foldedBox = (wish: LabelWish): Box =>
  candidates(wish.points, wish.anchor, wish.size, wish.half)[0]!;
