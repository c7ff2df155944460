import { type BoxIndex, grown, overlaps } from './boxes';
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
function* beyond([px, py]: Point, [x, y]: Point, { w, h, middle }: LabelSize): Generator<Box> {
  const off = CLEAR + 4;
  if (py === y) yield { x: x > px ? x + off : x - off - w, y: Math.round(y - h / 2), w, h };
  else yield { x: Math.round(x - middle), y: y > py ? y + off : y - off - h, w, h };
}

/** Boxes to try for a label, in order: at its diamond, then along its piece, then along the other pieces. */
function* candidates({ points, anchor, size, half, freeEnd }: LabelWish): Generator<Box> {
  const beside = half + CLEAR;
  const first = anchor.diamond ? Math.max(beside, DIAMOND + CLEAR) : beside;
  const order = [anchor.piece, ...piecesByLength(points).filter((k) => k !== anchor.piece)];
  for (const piece of order) {
    const a = points[piece]!;
    const b = points[piece + 1]!;
    const across = a[1] === b[1];
    const axis = across ? 0 : 1;
    const own = piece === anchor.piece;
    const middle = own ? anchor.at[axis] : (a[axis] + b[axis]) / 2;
    const on = (by: number): Point => (across ? [middle + by, a[1]] : [a[0], middle + by]);
    yield* sides(across, on(0), own ? first : beside, size);
    if (own && freeEnd) {
      const last = points.length - 1;
      if (freeEnd === 'last') yield* beyond(points[last - 1]!, points[last]!, size);
      else yield* beyond(points[1]!, points[0]!, size);
    }
    const reach = (across ? size.w - size.middle : size.h / 2) + CLEAR + DIAMOND;
    const [from, to] = [Math.min(a[axis], b[axis]) - middle, Math.max(a[axis], b[axis]) - middle];
    for (const by of shifts(from, to)) {
      yield* sides(across, on(by), own && anchor.diamond && Math.abs(by) < reach ? first : beside, size);
    }
  }
}

/** Further out from the diamond when nothing close is free [px]. */
const FURTHER = [16, 32] as const;

/** Boxes further out at the diamond, each with the strip between the two that must be free as well. */
function* furtherOut({ points, anchor, size, half }: LabelWish): Generator<readonly [Box, Box]> {
  if (!anchor.diamond) return;
  const across = points[anchor.piece]![1] === points[anchor.piece + 1]![1];
  const [x, y] = anchor.at;
  const first = Math.max(half, DIAMOND) + CLEAR;
  for (const far of FURTHER) {
    for (const by of [0, STEP, -STEP]) {
      const at: Point = across ? [x + by, y] : [x, y + by];
      for (const box of sides(across, at, first + far, size)) {
        const strip: Box = across
          ? { x: x - 2, y: box.y > y ? y + DIAMOND + 1 : box.y + box.h, w: 4, h: far + CLEAR - 1 }
          : { x: box.x > x ? x + DIAMOND + 1 : box.x + box.w, y: y - 2, w: far + CLEAR - 1, h: 4 };
        yield [box, strip];
      }
    }
  }
}

export interface LabelWish {
  readonly points: readonly Point[];
  readonly anchor: Anchor;
  readonly size: LabelSize;
  /** Half the width of the line or its ribbon [px]. */
  readonly half: number;
  /** The end of a hanging line that nothing is joined to. */
  readonly freeEnd?: 'first' | 'last';
}

/** A label's candidates that clear what is taken, looked for only as far as somebody asks. */
class FreePlaces {
  private readonly boxes: Box[] = [];
  private readonly rest: Generator<Box>;
  private readonly taken: BoxIndex;

  constructor(wish: LabelWish, taken: BoxIndex) {
    this.rest = candidates(wish);
    this.taken = taken;
  }

  /** How many were found so far. */
  get found(): number {
    return this.boxes.length;
  }

  at(k: number): Box | undefined {
    while (this.boxes.length <= k) {
      const next = this.rest.next();
      if (next.done) return undefined;
      if (!this.taken.hits(next.value, CLEAR)) this.boxes.push(next.value);
    }
    return this.boxes[k];
  }
}

/** How many free places are counted before a label counts as easy to place. */
const EASY = 6;

/**
 * Places labels one after another, those with the fewest free places first, each at the first of its candidates that
 * clears everything by 6 px. A label that finds none may send one other label to its next free place.
 *
 * @param taken symbols, lines, diamonds, tags and marks
 * @returns a box each, undefined where no place is free
 */
export function placeLabels(wishes: readonly LabelWish[], taken: BoxIndex): readonly (Box | undefined)[] {
  const free = wishes.map((wish) => new FreePlaces(wish, taken));
  const order = wishes.map((_, k) => k);
  const ease = free.map((places) => (places.at(EASY - 1) ? EASY : places.found));
  order.sort((a, b) => ease[a]! - ease[b]! || a - b);
  const placed: (Box | undefined)[] = wishes.map(() => undefined);
  const inTheWay = (box: Box, except: number): readonly number[] => {
    const room = grown(box, CLEAR);
    return order.filter((j) => j !== except && placed[j] !== undefined && overlaps(room, placed[j]));
  };
  const fits = (box: Box, except: number): boolean => inTheWay(box, except).length === 0;
  const firstFit = (k: number): Box | undefined => {
    for (let n = 0; ; n++) {
      const box = free[k]!.at(n);
      if (!box || fits(box, k)) return box;
    }
  };

  /** Takes a place that one other label can leave for another one. */
  const swap = (k: number): boolean => {
    for (let n = 0; ; n++) {
      const box = free[k]!.at(n);
      if (!box) return false;
      const [j, ...more] = inTheWay(box, k);
      if (j === undefined || more.length > 0) continue;
      placed[k] = box;
      const next = firstFit(j);
      if (next) {
        placed[j] = next;
        return true;
      }
      placed[k] = undefined;
    }
  };
  for (const k of order) {
    placed[k] = firstFit(k);
    if (placed[k] || swap(k)) continue;
    for (const [box, strip] of furtherOut(wishes[k]!)) {
      if (taken.hits(box, CLEAR) || taken.hits(strip) || !fits(box, k) || !fits(strip, k)) continue;
      placed[k] = box;
      break;
    }
  }
  return placed;
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
export function foldedBox(wish: LabelWish): Box {
  for (const box of candidates(wish)) return box;
  return { x: wish.anchor.at[0], y: wish.anchor.at[1], w: wish.size.w, h: wish.size.h };
}
