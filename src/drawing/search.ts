import { ALONG_LANE, CLOSED, Grid, type Lane, NEAR_SYMBOL, OVER_LANE } from './grid';
import type { Box, Point } from './types';

/** A bend costs as much as this way round [px]. */
export const BEND = 40;
/** Times the way: near a symbol, and along another line. */
const SOFT_COST = 1.6;
const LANE_COST = 12;
/** A crossing costs as much as this way round [px]. */
export const CROSSING = 60;
/** Among equal lines the one that bends late wins: its first straight piece is the longest. */
const LATE = 1e-3;

/** Directions of travel in order right, down, left, up. */
export type Heading = 0 | 1 | 2 | 3;

export interface Leg {
  readonly from: Point;
  readonly heading: Heading;
  readonly to: Point;
  /** Direction in which the line goes on behind `to`; undefined: any. */
  readonly arrive?: Heading;
  /** A way that costs more than this is not worth having [px]. */
  readonly most?: number;
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
  const grid = new Grid([leg.from, leg.to], within, obstacles, lanes);
  const { xs, ys, nx, ny, across, down } = grid;
  const node = ([x, y]: Point): number => ys.indexOf(y) * nx + xs.indexOf(x);
  const goal = node(leg.to);
  const { most = Infinity } = leg;
  // taken out of the loop: exports of another file are not free to read there
  const [closed, nearSymbol, alongLane, overLane] = [CLOSED, NEAR_SYMBOL, ALONG_LANE, OVER_LANE];
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
    if (g > most) return undefined;
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
      if (edge & closed) continue;
      const x = xs[next % nx]!;
      const y = ys[Math.floor(next / nx)]!;
      const length = Math.abs(x - xs[ix]!) + Math.abs(y - ys[iy]!);
      let to = g + length * (edge & alongLane ? LANE_COST : edge & nearSymbol ? SOFT_COST : 1);
      if (edge & overLane) to += CROSSING;
      if (d !== heading) to += BEND + LATE * (Math.abs(gx - xs[ix]!) + Math.abs(gy - ys[iy]!));
      const s = next * 4 + d;
      if (to >= cost[s]!) continue;
      const least =
        to + Math.abs(gx - x) + Math.abs(gy - y) + BEND * bendsLeft(gx - x, gy - y, d, leg.arrive);
      if (least > most) continue;
      cost[s] = to;
      parent[s] = state;
      push(least, s);
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
