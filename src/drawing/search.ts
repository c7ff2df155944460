import { grown } from './boxes';
import type { Box, Point } from './types';

/** Clear of a symbol by this much, always [px]; less than a grid step, so that lines pass between close symbols. */
const HARD = 6;
/** Closer than this costs extra, so that lines keep away where there is room [px]. */
const SOFT = 12;
/** Where lines run past a symbol: a roomy and a narrow channel on each side [px]. */
const CHANNELS = [16, 8] as const;
/** A bend costs as much as this way round [px]. */
const BEND = 40;
const SOFT_COST = 1.6;
/** Among equal lines the one that bends late wins: its first straight piece is the longest. */
const LATE = 1e-3;

/** Directions of travel in order right, down, left, up. */
export type Heading = 0 | 1 | 2 | 3;

/** A straight piece of another line: crossing it is free, running along it is not. */
export interface Lane {
  readonly across: boolean;
  /** Place across its direction, and its extent. */
  readonly at: number;
  readonly lo: number;
  readonly hi: number;
  /** The way may run beside it: its edges are offered as channels. */
  readonly channel?: boolean;
}

/** Lines keep this far from lanes [px]; running along one costs as much as this many times the way. */
export const APART = 10;
const LANE_COST = 12;
const BESIDE_LANE = 12;

export interface Leg {
  readonly from: Point;
  readonly heading: Heading;
  readonly to: Point;
  /** Direction in which the line goes on behind `to`; undefined: any. */
  readonly arrive?: Heading;
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

function coordinates(
  own: readonly number[],
  from: number,
  to: number,
  edges: readonly number[],
): Float64Array {
  const all = new Set(own);
  for (const e of edges) if (e >= from && e <= to) all.add(e);
  return Float64Array.from(all).sort();
}

/** Bits of an edge: 1 closed, 2 near a symbol, 4 along another line. Edges run from a crossing to the next one right (across) or below (down). */
class Grid {
  readonly nx: number;
  readonly ny: number;
  readonly across: Uint8Array;
  readonly down: Uint8Array;

  constructor(
    readonly xs: Float64Array,
    readonly ys: Float64Array,
    obstacles: readonly Box[],
    lanes: readonly Lane[],
  ) {
    this.nx = xs.length;
    this.ny = ys.length;
    this.across = new Uint8Array(this.nx * this.ny);
    this.down = new Uint8Array(this.nx * this.ny);
    for (const box of obstacles) {
      this.mark(grown(box, SOFT), 2);
      this.mark(grown(box, HARD), 1);
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
        if (across) this.across[b * nx + a]! |= 4;
        else this.down[a * nx + b]! |= 4;
      }
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

/** Grown as needed and kept: a search allocates next to nothing. */
let cost = new Float64Array(0);
let parent = new Int32Array(0);
let heapKey = new Float64Array(0);
let heapState = new Int32Array(0);
let heapSize = 0;

function ensure(states: number): void {
  if (cost.length < states) {
    cost = new Float64Array(states);
    parent = new Int32Array(states);
  }
  cost.fill(Infinity, 0, states);
  heapSize = 0;
}

function push(key: number, state: number): void {
  if (heapSize === heapKey.length) {
    const keys = new Float64Array(Math.max(1024, 2 * heapSize));
    keys.set(heapKey);
    heapKey = keys;
    const states = new Int32Array(keys.length);
    states.set(heapState);
    heapState = states;
  }
  let k = heapSize++;
  while (k > 0) {
    const up = (k - 1) >> 1;
    if (heapKey[up]! <= key) break;
    heapKey[k] = heapKey[up]!;
    heapState[k] = heapState[up]!;
    k = up;
  }
  heapKey[k] = key;
  heapState[k] = state;
}

function pop(): number {
  const top = heapState[0]!;
  const key = heapKey[--heapSize]!;
  const state = heapState[heapSize]!;
  let k = 0;
  for (;;) {
    let child = 2 * k + 1;
    if (child >= heapSize) break;
    if (child + 1 < heapSize && heapKey[child + 1]! < heapKey[child]!) child++;
    if (heapKey[child]! >= key) break;
    heapKey[k] = heapKey[child]!;
    heapState[k] = heapState[child]!;
    k = child;
  }
  heapKey[k] = key;
  heapState[k] = state;
  return top;
}

/** Fewest bends that lead from a point with a heading to another point and heading, in open space. */
export function bendsLeft(dx: number, dy: number, heading: number, arrive: number | undefined): number {
  const hx = heading === 0 ? 1 : heading === 2 ? -1 : 0;
  const hy = heading === 1 ? 1 : heading === 3 ? -1 : 0;
  const ahead = dx * hx + dy * hy;
  const aside = hx !== 0 ? dy : dx;
  if (arrive === undefined) return aside === 0 ? (ahead >= 0 ? 0 : 2) : ahead >= 0 ? 1 : 2;
  if (arrive === heading) return aside === 0 && ahead >= 0 ? 0 : 2;
  if (((arrive + 2) & 3) === heading) return 2;
  return 1;
}

/**
 * Cheapest orthogonal way (length + bends) that stays clear of the obstacles, on the grid their edges span (A*).
 * Source: Hart, Nilsson & Raphael, IEEE Trans. Syst. Sci. Cybern. 4(2), 1968, p. 100.
 *
 * @param within only this part of the sheet is looked at
 * @param lanes  pieces of other lines not to run along
 * @returns corners from `from` to `to`, or undefined when there is no way
 */
export function findWay(
  leg: Leg,
  obstacles: readonly Box[],
  within: Box,
  lanes: readonly Lane[] = [],
): Point[] | undefined {
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
  const xs = coordinates([leg.from[0], leg.to[0]], within.x, within.x + within.w, edgesX);
  const ys = coordinates([leg.from[1], leg.to[1]], within.y, within.y + within.h, edgesY);
  const grid = new Grid(xs, ys, obstacles, lanes);
  const { nx, ny, across, down } = grid;
  const node = ([x, y]: Point): number => ys.indexOf(y) * nx + xs.indexOf(x);
  const goal = node(leg.to);
  const [gx, gy] = leg.to;
  ensure(nx * ny * 4);
  const first = node(leg.from) * 4 + leg.heading;
  cost[first] = 0;
  parent[first] = -1;
  push(0, first);
  while (heapSize > 0) {
    const state = pop();
    const at = state >> 2;
    const heading = state & 3;
    const g = cost[state]!;
    if (at === goal) {
      if (leg.arrive === undefined || heading === leg.arrive) return corners(state, xs, ys, nx);
      if (((heading + 2) & 3) !== leg.arrive) {
        const turned = at * 4 + leg.arrive;
        if (g + BEND < cost[turned]!) {
          cost[turned] = g + BEND;
          parent[turned] = state;
          push(g + BEND, turned);
        }
      }
      continue;
    }
    const ix = at % nx;
    const iy = (at - ix) / nx;
    for (let d = 0; d < 4; d++) {
      if (((d + 2) & 3) === heading) continue;
      const next = d === 0 ? at + 1 : d === 1 ? at + nx : d === 2 ? at - 1 : at - nx;
      if (d === 0 ? ix + 1 >= nx : d === 1 ? iy + 1 >= ny : d === 2 ? ix === 0 : iy === 0) continue;
      const edge = d === 0 ? across[at]! : d === 1 ? down[at]! : d === 2 ? across[next]! : down[next]!;
      if (edge & 1) continue;
      const x = xs[next % nx]!;
      const y = ys[Math.floor(next / nx)]!;
      const length = Math.abs(x - xs[ix]!) + Math.abs(y - ys[iy]!);
      let to = g + length * (edge & 4 ? LANE_COST : edge & 2 ? SOFT_COST : 1);
      if (d !== heading) to += BEND + LATE * (Math.abs(gx - xs[ix]!) + Math.abs(gy - ys[iy]!));
      const s = next * 4 + d;
      if (to < cost[s]!) {
        cost[s] = to;
        parent[s] = state;
        push(to + Math.abs(gx - x) + Math.abs(gy - y) + BEND * bendsLeft(gx - x, gy - y, d, leg.arrive), s);
      }
    }
  }
  return undefined;
}

function corners(last: number, xs: Float64Array, ys: Float64Array, nx: number): Point[] {
  const points: Point[] = [];
  for (let s = last; s >= 0; s = parent[s]!) {
    const at = s >> 2;
    points.push([xs[at % nx]!, ys[Math.floor(at / nx)]!]);
  }
  return points.reverse();
}
