import type { BoxIndex } from './boxes';
import { LIMIT_SIDE, STATE_ROOM } from './marks';
import { measureText } from './metrics';
import { TEXT } from './tokens';
import type { Box, Point } from './types';

/** Text above the baseline of a tag [px]. */
const ASCENT = 10;
const HEIGHT = ASCENT + STATE_ROOM;
/** Between symbol and tag, tag and limit mark [px]. */
const GAP = 6;
const MARK_GAP = 5;
/** Clear of lines, symbols and other tags by this [px]. */
const CLEAR = 3;
/** Further away when all places next to the symbol are taken [px]. */
const FURTHER = [0, 12, 24, 36, 48, 64] as const;

export interface TagPlace {
  /** Text, with the room of any state mark. */
  readonly box: Box;
  readonly left: number;
  readonly baseline: number;
  readonly width: number;
  /** Middle of the limit mark; its room is kept whether or not there is one. */
  readonly limitAt: Point;
  readonly limitBox: Box;
}

/** Left upper corners to try, in order: above, above right, right, left, above left, below, then further out. */
function corners(symbol: Box, width: number): Point[] {
  const middle = symbol.x + symbol.w / 2;
  const right = symbol.x + symbol.w + GAP + 2;
  const left = symbol.x - GAP - 2 - width;
  const bottom = symbol.y + symbol.h;
  const out: Point[] = [];
  for (const far of FURTHER) {
    const above = symbol.y - GAP - HEIGHT + 2 - far;
    const below = bottom + GAP + far;
    out.push(
      [middle - width / 2, above],
      [middle + GAP, above],
      [right + far, symbol.y - 4],
      [left - far, symbol.y - 4],
      [middle - GAP - width, above],
      [middle - width / 2, below],
      [middle + GAP, below],
      [middle - GAP - width, below],
      [right + far, bottom - HEIGHT + 4],
      [left - far, bottom - HEIGHT + 4],
    );
  }
  return out;
}

/**
 * Where a unit's tag stands: next to its symbol, above or to the right where it can, covering nothing, with room for a
 * limit mark at its left, or at its right when the left is taken.
 */
export function placeTag(tag: string, symbol: Box, taken: BoxIndex): TagPlace {
  const width = measureText(tag, TEXT.tag, 600);
  const at = corners(symbol, width);
  for (const corner of at) {
    const place = placeAt(corner, width, 'left');
    if (taken.hits(place.box, CLEAR)) continue;
    for (const side of ['left', 'right'] as const) {
      const withMark = placeAt(corner, width, side);
      if (!taken.hits(withMark.limitBox, CLEAR)) return withMark;
    }
  }
  return placeAt(at[0]!, width, 'left');
}

function placeAt([px, py]: Point, width: number, side: 'left' | 'right'): TagPlace {
  const x = Math.round(px * 2) / 2;
  const y = Math.round(py);
  const baseline = y + ASCENT;
  const half = LIMIT_SIDE / 2;
  const cx = side === 'left' ? x - MARK_GAP - half : x + width + MARK_GAP + half;
  const cy = baseline - 4;
  return {
    box: { x, y, w: width, h: HEIGHT },
    left: x,
    baseline,
    width,
    limitAt: [cx, cy],
    limitBox: { x: cx - half, y: cy - half, w: LIMIT_SIDE, h: LIMIT_SIDE },
  };
}
