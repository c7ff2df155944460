import { grown } from './boxes';
import type { Box, Point } from './types';

/** Clear of a symbol by this much, always [px]; less than a grid step, so that lines pass between close symbols. */
export const HARD = 6;
/** Closer than this costs extra, so that lines keep away where there is room [px]. */
const SOFT = 12;
/** Where lines run past a symbol: a roomy and a narrow channel on each side [px]. */
const CHANNELS = [16, 8] as const;
/** Lines keep this far from pieces of others [px]. */
export const APART = 10;
/** Where a line may run beside a piece of another [px]. */
const BESIDE_LANE = 12;

/** What an edge of the grid has in its bits. */
export const CLOSED = 1;
export const NEAR_SYMBOL = 2;
export const ALONG_LANE = 4;
export const OVER_LANE = 8;

/** A straight piece of another line: crossing it costs a little, running along it a lot. */
export interface Lane {
  readonly across: boolean;
  /** Place across its direction, and its extent. */
  readonly at: number;
  readonly lo: number;
  readonly hi: number;
  /** The way may run beside it: its edges are offered as channels. */
  readonly channel?: boolean;
}

/** Indices of the sorted values strictly between a and b: from, to (exclusive). */
function span(values: Float64Array, a: number, b: number): [number, number] {
  let lo = 0;
  let end = values.length;
  while (lo < end) {
    const middle = (lo + end) >> 1;
    if (values[middle]! <= a) lo = middle + 1;
    else end = middle;
  }
  let hi = lo;
  while (hi < values.length && values[hi]! < b) hi++;
  return [lo, hi];
}

/** Grown as needed and kept. */
let sorting = new Float64Array(256);

/** The sorted different values of `own`, and of `edges` as far as they lie between the two. */
function coordinates(
  own: readonly number[],
  from: number,
  to: number,
  edges: readonly number[],
): Float64Array {
  if (sorting.length < own.length + edges.length) sorting = new Float64Array(2 * (own.length + edges.length));
  let n = 0;
  for (const e of own) sorting[n++] = e;
  for (const e of edges) if (e >= from && e <= to) sorting[n++] = e;
  sorting.subarray(0, n).sort();
  let different = 0;
  for (let k = 0; k < n; k++) {
    if (different === 0 || sorting[k] !== sorting[different - 1]) sorting[different++] = sorting[k]!;
  }
  return sorting.slice(0, different);
}

/**
 * Crossings of all coordinates at which a line might bend, and what is in the way between them.
 * An edge runs from a crossing to the next one right of it (across) or below it (down).
 */
export class Grid {
  readonly nx: number;
  readonly ny: number;
  readonly across: Uint8Array;
  readonly down: Uint8Array;

  readonly xs: Float64Array;
  readonly ys: Float64Array;

  /**
   * @param ends   points whose coordinates must be there
   * @param within only this part of the sheet is spanned
   */
  constructor(ends: readonly Point[], within: Box, obstacles: readonly Box[], lanes: readonly Lane[]) {
    const edgesX: number[] = [];
    const edgesY: number[] = [];
    for (const b of obstacles) {
      for (const c of CHANNELS) {
        edgesX.push(b.x - c, b.x + b.w + c);
        edgesY.push(b.y - c, b.y + b.h + c);
      }
    }
    for (const { across, at, lo, hi, channel } of lanes) {
      if (!channel) continue;
      const [along, aside] = across ? [edgesX, edgesY] : [edgesY, edgesX];
      aside.push(at - BESIDE_LANE, at + BESIDE_LANE);
      along.push(lo - BESIDE_LANE, hi + BESIDE_LANE);
    }
    this.xs = coordinates(
      ends.map(([x]) => x),
      within.x,
      within.x + within.w,
      edgesX,
    );
    this.ys = coordinates(
      ends.map(([, y]) => y),
      within.y,
      within.y + within.h,
      edgesY,
    );
    this.nx = this.xs.length;
    this.ny = this.ys.length;
    this.across = new Uint8Array(this.nx * this.ny);
    this.down = new Uint8Array(this.nx * this.ny);
    for (const box of obstacles) {
      this.mark(grown(box, SOFT), NEAR_SYMBOL);
      this.mark(grown(box, HARD), CLOSED);
    }
    for (const lane of lanes) this.markLane(lane);
  }

  private markLane({ across, at, lo, hi }: Lane): void {
    const { xs, ys, nx } = this;
    const [along, aside] = across ? [xs, ys] : [ys, xs];
    const [a1, a2] = span(along, lo - 4, hi + 4);
    const [b1, b2] = span(aside, at - APART, at + APART);
    for (let b = b1; b < b2; b++) {
      for (let a = Math.max(0, a1 - 1); a < a2; a++) {
        if (across) this.across[b * nx + a]! |= ALONG_LANE;
        else this.down[a * nx + b]! |= ALONG_LANE;
      }
    }
    // The edge across which the piece lies: from the last coordinate before it to the next one.
    const [, over] = span(aside, -Infinity, at);
    if (over === 0 || over >= aside.length) return;
    const [c1, c2] = span(along, lo, hi);
    for (let c = c1; c < c2; c++) {
      if (across) this.down[(over - 1) * nx + c]! |= OVER_LANE;
      else this.across[c * nx + over - 1]! |= OVER_LANE;
    }
  }

  private mark(b: Box, bit: number): void {
    const { xs, ys, nx } = this;
    const [x1, x2] = span(xs, b.x, b.x + b.w);
    const [y1, y2] = span(ys, b.y, b.y + b.h);
    // the edge that leads into the box overlaps it as well, hence one more before the first coordinate inside
    for (let iy = y1; iy < y2; iy++) {
      for (let ix = Math.max(0, x1 - 1); ix < x2; ix++) this.across[iy * nx + ix]! |= bit;
    }
    for (let ix = x1; ix < x2; ix++) {
      for (let iy = Math.max(0, y1 - 1); iy < y2; iy++) this.down[iy * nx + ix]! |= bit;
    }
  }
}
