import type { BoxIndex } from './boxes';
import { LIMIT_SIDE, STATE_ROOM } from './marks';
import { measureText } from './metrics';
import { apart, nearestOfBox, scaledAbout } from './near';
import { SCALE_STEP } from './textScale';
import { TEXT } from './tokens';
import type { Box, Point } from './types';

/** Text above the baseline of a tag [px]. */
const ASCENT = 10;
const HEIGHT = ASCENT + STATE_ROOM;
/** Between symbol and tag, tag and limit mark, state mark and first remark [px]. */
const GAP = 6;
const MARK_GAP = 5;
const REMARK_GAP = 2;
/** Clear of lines, symbols and other tags by this [px]. */
const CLEAR = 3;
/** A tag is nearer to its own symbol than to any other by at least this [px]. */
const NEARER = 3;
/** Further away when all places next to the symbol are taken [px]. */
const FURTHER = [0, 12, 24, 36, 48, 64, 88, 112] as const;

/** Where a tag stands, as it is at 100 %; on a smaller sheet it grows about `hold`. */
export interface TagPlace {
  readonly hold: Point;
  /** The largest text scale at which it has room. */
  readonly upTo: number;
  readonly left: number;
  readonly baseline: number;
  readonly width: number;
  /** Middle of the limit mark; its room is kept whether or not there is one. */
  readonly limitAt: Point;
  /** First baseline of the remarks, where they begin or end. */
  readonly remarks?: { readonly at: Point; readonly anchor: 'start' | 'end' };
  /** Rooms taken on the sheet, at the scale of `upTo`. */
  readonly boxes: readonly Box[];
}

interface Size {
  readonly tag: number;
  /** Width and count of the remarks. */
  readonly remark: number;
  readonly rows: number;
}

type Align = 'start' | 'end';

/** Left upper corners to try, in order: above, above right, right, left, above left, below, then further out. */
function* corners(symbol: Box, { tag, remark, rows }: Size, k: number): Generator<readonly [Point, Align]> {
  const width = Math.max(tag, remark) * k;
  const height = (HEIGHT + (rows > 0 ? REMARK_GAP + rows * TEXT.labelLine : 0)) * k;
  const gap = GAP * k;
  const middle = symbol.x + symbol.w / 2;
  const right = symbol.x + symbol.w + gap + 2;
  const left = symbol.x - gap - 2 - width;
  const bottom = symbol.y + symbol.h;
  const lower = bottom - height + 4;
  for (const step of FURTHER) {
    const far = step * k;
    const above = symbol.y - gap - height + 2 - far;
    const below = bottom + gap + far;
    yield [[middle - width / 2, above], 'start'];
    yield [[middle + gap, above], 'start'];
    yield [[right + far, symbol.y - 4], 'start'];
    yield [[left - far, symbol.y - 4], 'end'];
    yield [[middle - gap - width, above], 'end'];
    yield [[middle - width / 2, below], 'start'];
    yield [[middle + gap, below], 'start'];
    yield [[middle - gap - width, below], 'end'];
    yield [[right + far, lower], 'start'];
    yield [[left - far, lower], 'end'];
  }
}

/** What is written beside a symbol: its tag, and remarks under it with the width they take [px]. */
export interface TagWish {
  readonly tag: string;
  readonly remark: number;
  readonly rows: number;
}

/**
 * Where a unit's tag stands: next to its symbol, above or to the right where it can, covering nothing, nearer to its own
 * symbol than to another, with room for a limit mark. Remarks go first when there is no room, then the tag is drawn smaller.
 *
 * @param symbols the boxes of all symbols, by unit
 * @param own     the owner of its symbol's box
 * @param scale   how much larger than at 100 % texts are [-]
 * @returns undefined when there is no room at all
 */
export function placeTag(
  { tag, remark, rows }: TagWish,
  symbol: Box,
  taken: BoxIndex,
  symbols: BoxIndex,
  own: unknown,
  scale: number,
): TagPlace | undefined {
  const width = measureText(tag, TEXT.tag, 600);
  const plain: Size = { tag: width, remark: 0, rows: 0 };
  const tries: readonly (readonly [Size, number])[] = [
    ...(rows > 0 ? [[{ tag: width, remark, rows }, scale] as const] : []),
    [plain, scale],
    ...(scale > 1
      ? ([
          [plain, (1 + scale) / 2],
          [plain, 1],
        ] as const)
      : []),
  ];
  for (const [size, k] of tries) {
    for (const [corner, align] of corners(symbol, size, k)) {
      for (const side of align === 'start' ? (['left', 'right'] as const) : (['right', 'left'] as const)) {
        const place = placeAt(corner, align, side, size, symbol, k);
        if (place.boxes.some((box) => taken.hits(box, CLEAR * k))) continue;
        // Drawn one step smaller it stands a little nearer to its symbol.
        const low = (k - SCALE_STEP) / k;
        if (place.boxes.some((box) => taken.hits(scaledAbout(box, place.hold, low)))) continue;
        const toOwn = apart(place.boxes[0]!, symbol);
        if (!symbols.hits(place.boxes[0]!, toOwn + NEARER, own)) return place;
      }
    }
  }
  return undefined;
}

function placeAt(
  [px, py]: Point,
  align: Align,
  side: 'left' | 'right',
  { tag, remark, rows }: Size,
  symbol: Box,
  k: number,
): TagPlace {
  const width = Math.max(tag, remark);
  const text: Box = {
    x: align === 'start' ? px : px + (width - tag) * k,
    y: py,
    w: tag * k,
    h: HEIGHT * k,
  };
  const hold = nearestOfBox(symbol, [text.x + text.w / 2, text.y + text.h / 2]);
  const x = hold[0] + (text.x - hold[0]) / k;
  const y = hold[1] + (text.y - hold[1]) / k;
  const half = LIMIT_SIDE / 2;
  const cx = side === 'left' ? x - MARK_GAP - half : x + tag + MARK_GAP + half;
  const baseline = y + ASCENT;
  const cy = baseline - 4;
  const onSheet = (bx: number, by: number, w: number, h: number): Box => ({
    x: hold[0] + (bx - hold[0]) * k,
    y: hold[1] + (by - hold[1]) * k,
    w: w * k,
    h: h * k,
  });
  const under = baseline + STATE_ROOM + REMARK_GAP;
  const edge = align === 'start' ? x : x + tag;
  const boxes = [text, onSheet(cx - half, cy - half, LIMIT_SIDE, LIMIT_SIDE)];
  if (rows > 0) {
    const left = align === 'start' ? edge : edge - remark;
    boxes.push(onSheet(left, under, remark, rows * TEXT.labelLine));
  }
  return {
    hold,
    upTo: k,
    left: x,
    baseline,
    width: tag,
    limitAt: [cx, cy],
    ...(rows > 0 ? { remarks: { at: [edge, under + ASCENT], anchor: align } } : {}),
    boxes,
  };
}
