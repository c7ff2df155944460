import type { Box, Point } from './types';

/** Boxes that only touch do not overlap. */
export const overlaps = (a: Box, b: Box): boolean =>
  a.x < b.x + b.w && b.x < a.x + a.w && a.y < b.y + b.h && b.y < a.y + a.h;

export const grown = (b: Box, by: number): Box => ({
  x: b.x - by,
  y: b.y - by,
  w: b.w + 2 * by,
  h: b.h + 2 * by,
});

export const boxAround = ([x, y]: Point, half: number): Box => ({
  x: x - half,
  y: y - half,
  w: 2 * half,
  h: 2 * half,
});

/** The thin box of a straight piece, `half` to each side. */
export const boxOfPiece = ([x1, y1]: Point, [x2, y2]: Point, half: number): Box => ({
  x: Math.min(x1, x2) - half,
  y: Math.min(y1, y2) - half,
  w: Math.abs(x2 - x1) + 2 * half,
  h: Math.abs(y2 - y1) + 2 * half,
});

/** Smallest box over all; undefined of none. */
export const hull = (boxes: Iterable<Box>): Box | undefined => {
  let x1 = Infinity;
  let y1 = Infinity;
  let x2 = -Infinity;
  let y2 = -Infinity;
  for (const b of boxes) {
    x1 = Math.min(x1, b.x);
    y1 = Math.min(y1, b.y);
    x2 = Math.max(x2, b.x + b.w);
    y2 = Math.max(y2, b.y + b.h);
  }
  return x1 <= x2 ? { x: x1, y: y1, w: x2 - x1, h: y2 - y1 } : undefined;
};

export const sameBox = (a: Box, b: Box): boolean => a.x === b.x && a.y === b.y && a.w === b.w && a.h === b.h;

const CELL = 96;

/** Boxes by place, so that asking what a small box hits does not walk over the whole sheet. */
export class BoxIndex {
  private readonly cells = new Map<number, { readonly box: Box; readonly owner: unknown }[]>();

  private *keys(b: Box): Generator<number> {
    const x2 = Math.floor((b.x + b.w) / CELL);
    const y2 = Math.floor((b.y + b.h) / CELL);
    for (let cx = Math.floor(b.x / CELL); cx <= x2; cx++) {
      for (let cy = Math.floor(b.y / CELL); cy <= y2; cy++) yield cx * 65536 + cy;
    }
  }

  /** @param owner who put it there; `hits` can leave out one owner's boxes */
  add(box: Box, owner?: unknown): void {
    for (const key of this.keys(box)) {
      const cell = this.cells.get(key);
      if (cell) cell.push({ box, owner });
      else this.cells.set(key, [{ box, owner }]);
    }
  }

  /** Whether anything of another owner overlaps the box. */
  hits(box: Box, except?: unknown): boolean {
    for (const key of this.keys(box)) {
      const cell = this.cells.get(key);
      if (!cell) continue;
      for (const entry of cell) {
        if ((except === undefined || entry.owner !== except) && overlaps(entry.box, box)) return true;
      }
    }
    return false;
  }
}
