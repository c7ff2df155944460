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

/** Thin boxes over the pieces of a line. */
export const pieceBoxes = (points: readonly Point[], half: number): readonly Box[] =>
  points.slice(1).map((p, k) => boxOfPiece(points[k]!, p, half));

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
/** Cells in a row of the index; sheets are far smaller than that. */
const ROW = 65536;

/** What was put into an index; whoever has it can take it out again. */
export interface Entry {
  readonly box: Box;
  readonly owner: unknown;
}

/** Boxes by place, so that asking what a small box hits does not walk over the whole sheet. */
export class BoxIndex {
  private readonly cells = new Map<number, Entry[]>();

  /** @param owner who put it there; `hits` can leave out one owner's boxes */
  add(box: Box, owner?: unknown): Entry {
    const entry: Entry = { box, owner };
    const x2 = Math.floor((box.x + box.w) / CELL);
    const y2 = Math.floor((box.y + box.h) / CELL);
    for (let cx = Math.floor(box.x / CELL); cx <= x2; cx++) {
      for (let cy = Math.floor(box.y / CELL); cy <= y2; cy++) {
        const cell = this.cells.get(cx * ROW + cy);
        if (cell) cell.push(entry);
        else this.cells.set(cx * ROW + cy, [entry]);
      }
    }
    return entry;
  }

  remove(entry: Entry): void {
    const { box } = entry;
    const x2 = Math.floor((box.x + box.w) / CELL);
    const y2 = Math.floor((box.y + box.h) / CELL);
    for (let cx = Math.floor(box.x / CELL); cx <= x2; cx++) {
      for (let cy = Math.floor(box.y / CELL); cy <= y2; cy++) {
        const cell = this.cells.get(cx * ROW + cy);
        const at = cell?.indexOf(entry) ?? -1;
        if (at >= 0) cell!.splice(at, 1);
      }
    }
  }

  /** Whether anything of another owner overlaps the box when it is grown by `clear` px on all sides. */
  hits(box: Box, clear = 0, except?: unknown): boolean {
    const x1 = box.x - clear;
    const y1 = box.y - clear;
    const x2 = box.x + box.w + clear;
    const y2 = box.y + box.h + clear;
    const cx2 = Math.floor(x2 / CELL);
    const cy2 = Math.floor(y2 / CELL);
    for (let cx = Math.floor(x1 / CELL); cx <= cx2; cx++) {
      for (let cy = Math.floor(y1 / CELL); cy <= cy2; cy++) {
        const cell = this.cells.get(cx * ROW + cy);
        if (!cell) continue;
        for (const { box: b, owner } of cell) {
          const over = b.x < x2 && x1 < b.x + b.w && b.y < y2 && y1 < b.y + b.h;
          if (over && (except === undefined || owner !== except)) return true;
        }
      }
    }
    return false;
  }
}
