import { boxOfPiece, grown, hull, overlaps } from './boxes';
import { HARD, type Lane } from './grid';
import { findWay, type Heading } from './search';
import { AWAY, HEADING } from './transform';
import type { Box, Point, PortPlace, Side } from './types';

/** A line leaves and enters its ports straight for as much as there is room, the first of these that is free [px]. */
const STUBS = [24, 16, 12, 8] as const;
/** A hanging stream shows as a straight piece with an arrowhead [px]. */
const HANGING = [40, 32, 24, 16] as const;
/** How far around its ends a line looks for a way at first [px]. */
const REGION = 160;
const EVERYWHERE: Box = { x: -1e6, y: -1e6, w: 2e6, h: 2e6 };

export interface RouteEnd {
  readonly port: PortPlace;
  /** The unit's own symbol among the obstacles (the same object). */
  readonly own?: Box;
}

const along = ([x, y]: Point, side: Side, by: number): Point => [
  x + AWAY[side][0] * by,
  y + AWAY[side][1] * by,
];

const inside = ([x, y]: Point, b: Box): boolean => x > b.x && x < b.x + b.w && y > b.y && y < b.y + b.h;

/** Whether a point lies where no line may pass: inside a symbol or too close to it. */
const isShut = (p: Point, obstacles: readonly Box[]): boolean =>
  obstacles.some((o) => inside(p, grown(o, HARD)));

const crossesAny = (a: Point, b: Point, obstacles: readonly Box[], by: number, except?: Box): boolean => {
  const piece = boxOfPiece(a, b, by);
  return obstacles.some((o) => o !== except && overlaps(o, piece));
};

/** Drops points that add nothing: repeated ones and those in the middle of a straight piece or a spike. */
export function simplified(points: readonly Point[]): Point[] {
  const out: Point[] = [];
  for (const p of points) {
    const last = out.at(-1);
    if (last && last[0] === p[0] && last[1] === p[1]) continue;
    const before = out.at(-2);
    if (
      last &&
      before &&
      ((before[0] === last[0] && last[0] === p[0]) || (before[1] === last[1] && last[1] === p[1]))
    ) {
      out.pop();
      if (before[0] === p[0] && before[1] === p[1]) continue;
    }
    out.push(p);
  }
  return out;
}

/** How deep a port lies inside its own symbol's box (a notch, a circle's side) [px]. */
function depthOf({ port: { at, side }, own }: RouteEnd): number {
  if (!own) return 0;
  const [ux, uy] = AWAY[side];
  const edge =
    ux > 0 ? own.x + own.w - at[0] : ux < 0 ? at[0] - own.x : uy > 0 ? own.y + own.h - at[1] : at[1] - own.y;
  return Math.max(0, edge);
}

/** Length of the straight piece at a port: shorter where another symbol is close or the other port faces it nearby. */
function stubOf(end: RouteEnd, most: number, obstacles: readonly Box[], longest: number = STUBS[0]): number {
  const depth = depthOf(end);
  for (const stub of STUBS) {
    const length = stub + depth;
    if (stub > longest || length > most) continue;
    if (!crossesAny(end.port.at, along(end.port.at, end.port.side, length), obstacles, 6, end.own))
      return length;
  }
  return Math.min(most, STUBS.at(-1)! + depth);
}

/** Free way between two ports that face each other across less than two stubs, half of it [px]. */
function halfGap(a: PortPlace, b: PortPlace): number {
  const [ux, uy] = AWAY[a.side];
  if (AWAY[b.side][0] !== -ux || AWAY[b.side][1] !== -uy) return Infinity;
  const ahead = (b.at[0] - a.at[0]) * ux + (b.at[1] - a.at[1]) * uy;
  return ahead > 0 ? ahead / 2 : Infinity;
}

/** How far a bend moved by hand lies straight before a port: the line leaves the port no further than that [px]. */
function ahead({ at, side }: PortPlace, bend: Point): number {
  const [ux, uy] = AWAY[side];
  const aside = ux !== 0 ? bend[1] - at[1] : bend[0] - at[0];
  const far = (bend[0] - at[0]) * ux + (bend[1] - at[1]) * uy;
  return aside === 0 && far > 0 ? far : Infinity;
}

interface Way {
  /** Looks for a way around its ends alone, not all over the sheet. */
  readonly near?: true;
  /** Whether ports that face one another share what lies between them; else each has its full stub. */
  readonly narrow?: boolean;
  readonly detour?: Detour;
}

/** What else a line is to heed when it is led once more, because it ran along another one. */
export interface Detour {
  readonly lanes: readonly Lane[];
  /** Most that the straight pieces at its ports may take [px]. */
  readonly stubs: readonly [number, number];
  /** Most that the way may cost in length and bends [px]. */
  readonly most: number;
}

export interface Route {
  readonly points: Point[];
  /** What lies outside this part of the sheet has no influence on the line. */
  readonly region: Box;
}

/**
 * Orthogonal line from port to port, by way of the bends that were moved by hand.
 * It keeps clear of every obstacle as long as there is any way; bends inside a symbol are left out.
 */
export function routeLine(
  from: RouteEnd,
  to: RouteEnd,
  via: readonly Point[],
  obstacles: readonly Box[],
): Route {
  const led = ledOnce(from, to, via, obstacles);
  if (led) return led;
  // Ports that face one another across a gap too narrow for a line between the symbols: round them, with full stubs.
  const round = ledOnce(from, to, via, obstacles, { narrow: false });
  return round ? { ...round, region: EVERYWHERE } : lastResort(from, to);
}

/** The line while an end is under the hand: a way around its ends, else over whatever is there. */
export const routeNear = (
  from: RouteEnd,
  to: RouteEnd,
  via: readonly Point[],
  obstacles: readonly Box[],
): readonly Point[] => (ledOnce(from, to, via, obstacles, { near: true }) ?? lastResort(from, to)).points;

/** All that has a say in how an end lies, as one text. */
export const keyOfEnd = (e: RouteEnd | undefined): string =>
  e ? `${e.port.at} ${e.port.side} ${e.own ? `${e.own.x} ${e.own.y} ${e.own.w} ${e.own.h}` : ''}` : '-';

/** The part of the sheet that a detour between two ends cannot leave. */
export function detourReach(from: RouteEnd, to: RouteEnd): Box {
  const farthest = REGION + STUBS[0] + Math.max(depthOf(from), depthOf(to));
  return grown(boxOfPiece(from.port.at, to.port.at, 0), farthest);
}

/** The line once more, heeding others; undefined when there is no way. */
export const detourLine = (
  from: RouteEnd,
  to: RouteEnd,
  obstacles: readonly Box[],
  detour: Detour,
): Route | undefined => ledOnce(from, to, [], obstacles, { detour });

function ledOnce(
  from: RouteEnd,
  to: RouteEnd,
  via: readonly Point[],
  obstacles: readonly Box[],
  { narrow = true, near: nearOnly, detour }: Way = {},
): Route | undefined {
  const a = from.port;
  const b = to.port;
  // Ports that touch: nothing lies between them, and nothing else has a say in it.
  if (a.at[0] === b.at[0] && a.at[1] === b.at[1])
    return { points: [a.at, b.at], region: boxOfPiece(a.at, b.at, 1) };
  const own = [from.own, to.own];
  const straight = simplified([a.at, b.at]);
  if (
    via.length === 0 &&
    !detour &&
    halfGap(a, b) < Infinity &&
    (a.at[0] === b.at[0] || a.at[1] === b.at[1]) &&
    !obstacles.some((o) => !own.includes(o) && overlaps(o, boxOfPiece(a.at, b.at, 6)))
  ) {
    return { points: straight, region: boxOfPiece(a.at, b.at, 6) };
  }
  const exact = via.length > 0 && !detour ? asGiven(from, to, via, obstacles) : undefined;
  if (exact) return exact;
  const [first, last] = [via[0], via.at(-1)];
  const between = narrow ? halfGap(a, b) : Infinity;
  const [before, behind] = first && last ? [ahead(a, first), ahead(b, last)] : [between, between];
  const start = along(a.at, a.side, stubOf(from, before, obstacles, detour?.stubs[0]));
  const end = along(b.at, b.side, stubOf(to, behind, obstacles, detour?.stubs[1]));
  // No way leads out of a symbol: known before the whole sheet is searched for one.
  if (!isSame(start, end) && (isShut(start, obstacles) || isShut(end, obstacles))) return undefined;
  const stops = [start, ...via.filter((v) => !isShut(v, obstacles)), end];
  const arrive = ((HEADING[b.side] + 2) & 3) as Heading;

  const around = hull([...stops, a.at, b.at].map((p) => boxOfPiece(p, p, REGION)))!;
  const near = obstacles.filter((o) => overlaps(grown(o, 16), around));
  const looks: readonly (readonly [readonly Box[], Box])[] = [
    [near, around],
    ...(detour || nearOnly ? [] : [[obstacles, EVERYWHERE] as const]),
  ];
  for (const [boxes, region] of looks) {
    const points = throughStops(stops, HEADING[a.side], arrive, boxes, region, detour);
    if (points) return { points: simplified([a.at, ...points, b.at]), region };
  }
  return undefined;
}

/** What a line moved by hand clears a symbol by: it only must not touch it [px]. */
const BY_HAND = 2;

const heads = (p: Point, q: Point): Point => [Math.sign(q[0] - p[0]), Math.sign(q[1] - p[1])];
const isSame = (a: Point, b: Point): boolean => a[0] === b[0] && a[1] === b[1];

/** The bends as they were set by hand, where they and the ports make a line of right angles that touches no symbol. */
function asGiven(
  from: RouteEnd,
  to: RouteEnd,
  via: readonly Point[],
  obstacles: readonly Box[],
): Route | undefined {
  const points: readonly Point[] = [from.port.at, ...via, to.port.at];
  const last = points.length - 2;
  if (!isSame(heads(points[0]!, points[1]!), AWAY[from.port.side])) return undefined;
  if (!isSame(heads(points[last + 1]!, points[last]!), AWAY[to.port.side])) return undefined;
  for (let k = 0; k <= last; k++) {
    const [p, q] = [points[k]!, points[k + 1]!];
    if ((p[0] === q[0]) === (p[1] === q[1])) return undefined;
    if (k > 0 && isSame(heads(points[k - 1]!, p), heads(q, p))) return undefined;
    const own = [k === 0 ? from.own : undefined, k === last ? to.own : undefined];
    const piece = boxOfPiece(p, q, BY_HAND);
    if (obstacles.some((o) => !own.includes(o) && overlaps(o, piece))) return undefined;
  }
  const region = hull(points.map((p) => boxOfPiece(p, p, 2 * BY_HAND)))!;
  return { points: simplified(points), region };
}

function throughStops(
  stops: readonly Point[],
  heading: Heading,
  arrive: Heading,
  obstacles: readonly Box[],
  region: Box,
  detour?: Detour,
): Point[] | undefined {
  const points: Point[] = [stops[0]!];
  let now = heading;
  for (let k = 1; k < stops.length; k++) {
    const last = k === stops.length - 1;
    const leg = {
      from: stops[k - 1]!,
      heading: now,
      to: stops[k]!,
      ...(detour ? { most: detour.most } : {}),
    };
    if (!last && leg.from[0] === leg.to[0] && leg.from[1] === leg.to[1]) continue;
    const way = findWay(last ? { ...leg, arrive } : leg, obstacles, region, detour?.lanes);
    if (!way) return undefined;
    points.push(...way.slice(1));
    const [p, q] = [way.at(-2), way.at(-1)];
    if (p && q && (p[0] !== q[0] || p[1] !== q[1])) {
      now = p[0] !== q[0] ? (q[0] > p[0] ? 0 : 2) : q[1] > p[1] ? 1 : 3;
    }
  }
  return points;
}

/** When symbols leave no way at all: one bend between the straight pieces, over whatever is there. */
function lastResort({ port: a }: RouteEnd, { port: b }: RouteEnd): Route {
  const [start, end] = [along(a.at, a.side, STUBS[1]), along(b.at, b.side, STUBS[1])];
  const bend: Point = AWAY[a.side][0] !== 0 ? [end[0], start[1]] : [start[0], end[1]];
  return { points: simplified([a.at, start, bend, end, b.at]), region: EVERYWHERE };
}

/** A stream with one end: straight away from its port (or towards it), shorter where a symbol is in the way. */
export function hangingLine(end: RouteEnd, outgoing: boolean, obstacles: readonly Box[]): Route {
  const { at, side } = end.port;
  const length =
    HANGING.find((l) => !crossesAny(at, along(at, side, l), obstacles, 6, end.own)) ?? HANGING.at(-1)!;
  const far = along(at, side, length);
  return { points: outgoing ? [at, far] : [far, at], region: boxOfPiece(at, along(at, side, HANGING[0]), 6) };
}
