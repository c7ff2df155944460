import type { StreamId, UnitId } from '../engine/ids';
import type { SketchStream } from '../sketch/types';
import { grown, overlaps } from './boxes';
import { drawApart } from './nudge';
import { hangingLine, keyOfEnd, type Route, type RouteEnd, routeLine } from './route';
import { portOf, type StandingUnit, symbolBoxes } from './standing';
import type { Box, Point } from './types';
import { type Detours, untangled } from './untangle';

/** A stream's line before it is drawn. */
export interface Wire {
  readonly stream: SketchStream;
  readonly points: readonly Point[];
  readonly hanging: boolean;
  /** The end that nothing is joined to. */
  readonly freeEnd?: 'first' | 'last';
  /** How far the drawn line runs on beyond its ends [px]. */
  readonly reach: readonly [number, number];
}

interface Kept {
  readonly key: string;
  readonly route: Route;
}

/** Ways found for an earlier scene: a way stays as it is while its ends and all that could bear on it are the same. */
export interface RouteCache {
  readonly obstacles: ReadonlyMap<string, Box>;
  readonly routes: ReadonlyMap<StreamId, Kept>;
  /** Lines as they were drawn apart; they stand while all ways and symbols do. */
  readonly apart: readonly (readonly Point[])[];
  readonly detours: Detours;
}

const keyOfBox = (b: Box): string => `${b.x} ${b.y} ${b.w} ${b.h}`;

/** Boxes that are in one of the two only. */
function changedBoxes(a: ReadonlyMap<string, Box>, b: ReadonlyMap<string, Box>): readonly Box[] {
  const out: Box[] = [];
  for (const [key, box] of a) if (!b.has(key)) out.push(grown(box, 16));
  for (const [key, box] of b) if (!a.has(key)) out.push(grown(box, 16));
  return out;
}

/**
 * Lines of all streams that have an end on the sheet, parallel ones drawn apart.
 *
 * @param before ways of an earlier scene, kept where they still hold; the answer is the same with and without
 */
export function wireSheet(
  streams: readonly SketchStream[],
  units: readonly StandingUnit[],
  before: RouteCache | undefined,
): { readonly wires: readonly Wire[]; readonly cache: RouteCache } {
  const byId = new Map<UnitId, StandingUnit>(units.map((u) => [u.unit.id, u]));
  const obstacles = symbolBoxes(units);
  const obstacleMap = new Map(obstacles.map((box) => [keyOfBox(box), box]));
  const changed = before ? changedBoxes(before.obstacles, obstacleMap) : [];
  const routes = new Map<StreamId, Kept>();
  const wires: Wire[] = [];

  const endOf = (end: readonly [UnitId, string] | undefined): RouteEnd | undefined => {
    const standing = end && byId.get(end[0]);
    const port = standing && portOf(standing, end[1]);
    return port && { port, own: standing.box };
  };

  for (const stream of streams) {
    const from = endOf(stream.from);
    const to = endOf(stream.to);
    const via = stream.via ?? [];
    const key = `${keyOfEnd(from)} > ${keyOfEnd(to)} via ${via.join(' ')}`;
    const old = before?.routes.get(stream.id);
    const holds = old?.key === key && !changed.some((box) => overlaps(box, old.route.region));
    let route: Route;
    if (holds) route = old.route;
    else if (from && to) route = routeLine(from, to, via, obstacles);
    else if (from) route = hangingLine(from, true, obstacles);
    else if (to) route = hangingLine(to, false, obstacles);
    else continue;
    routes.set(stream.id, { key, route });
    const reach = [from?.port.reach ?? 0, to?.port.reach ?? 0] as const;
    const freeEnd = !to ? ({ freeEnd: 'last' } as const) : !from ? ({ freeEnd: 'first' } as const) : {};
    wires.push({ stream, points: route.points, hanging: !to, ...freeEnd, reach });
  }
  const fixed = wires.map((wire) => (wire.stream.via?.length ?? 0) > 0);
  const drawApartAnew = (): Pick<RouteCache, 'apart' | 'detours'> => {
    const shifted = drawApart(
      wires.map((wire) => wire.points),
      obstacles,
      fixed,
    );
    const ends = wires.map(({ stream }) => [endOf(stream.from), endOf(stream.to)] as const);
    const { lines, detours } = untangled(shifted, ends, obstacles, fixed, before?.detours);
    return { apart: lines, detours };
  };
  const unmoved =
    before !== undefined && changed.length === 0 && sameOrder(before.routes, routes) ? before : undefined;
  const { apart, detours } = unmoved ?? drawApartAnew();
  return {
    wires: wires.map((wire, k) => (apart[k] === wire.points ? wire : { ...wire, points: apart[k]! })),
    cache: { obstacles: obstacleMap, routes, apart, detours },
  };
}

/** Whether both hold the same ways in the same order. */
function sameOrder(a: ReadonlyMap<StreamId, Kept>, b: ReadonlyMap<StreamId, Kept>): boolean {
  if (a.size !== b.size) return false;
  const old = [...a];
  return [...b].every(([id, kept], k) => old[k]?.[0] === id && old[k][1].key === kept.key);
}
