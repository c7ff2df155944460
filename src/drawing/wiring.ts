import type { StreamId, UnitId } from '../engine/ids';
import type { Sketch, SketchStream } from '../sketch/types';
import { boxOfPiece, grown, hull, overlaps } from './boxes';
import { drawApart } from './nudge';
import { hangingLine, type Route, type RouteEnd, routeLine } from './route';
import { portOf, type StandingUnit } from './standing';
import type { Box, Point } from './types';

/** A stream's line before it is drawn. */
export interface Wire {
  readonly stream: SketchStream;
  readonly points: readonly Point[];
  readonly hanging: boolean;
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
}

const keyOfBox = (b: Box): string => `${b.x} ${b.y} ${b.w} ${b.h}`;
const keyOfEnd = (e: RouteEnd | undefined): string =>
  e ? `${e.port.at} ${e.port.side} ${e.own ? keyOfBox(e.own) : ''}` : '-';

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
  sketch: Sketch,
  units: readonly StandingUnit[],
  before: RouteCache | undefined,
): { readonly wires: readonly Wire[]; readonly cache: RouteCache } {
  const byId = new Map<UnitId, StandingUnit>(units.map((u) => [u.unit.id, u]));
  const obstacles = units.flatMap((u) => (u.linkBox ? [u.box, u.linkBox] : [u.box]));
  const obstacleMap = new Map(obstacles.map((box) => [keyOfBox(box), box]));
  const changed = before ? changedBoxes(before.obstacles, obstacleMap) : [];
  const routes = new Map<StreamId, Kept>();
  const wires: Wire[] = [];

  const endOf = (end: readonly [UnitId, string] | undefined): RouteEnd | undefined => {
    const standing = end && byId.get(end[0]);
    const port = standing && portOf(standing, end[1]);
    return port && { port, own: standing.box };
  };

  for (const stream of sketch.streams) {
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
    wires.push({ stream, points: route.points, hanging: !to, reach });
  }
  const fixed = wires.map((wire) => (wire.stream.via?.length ?? 0) > 0);
  const apart = drawApart(
    wires.map((wire) => wire.points),
    obstacles,
    fixed,
  );
  return {
    wires: wires.map((wire, k) => (apart[k] === wire.points ? wire : { ...wire, points: apart[k]! })),
    cache: { obstacles: obstacleMap, routes },
  };
}

/** Thin boxes over the pieces of a line. */
export const pieceBoxes = (points: readonly Point[], half: number): readonly Box[] =>
  points.slice(1).map((p, k) => boxOfPiece(points[k]!, p, half));

/** Points where a line meets the others at right angles. */
export function crossingsOf(
  points: readonly Point[],
  others: readonly (readonly Point[])[],
): readonly Point[] {
  const out: Point[] = [];
  const around = hull(pieceBoxes(points, 1))!;
  for (const other of others) {
    for (let j = 0; j + 1 < other.length; j++) {
      const b = boxOfPiece(other[j]!, other[j + 1]!, 0.5);
      if (!overlaps(b, around)) continue;
      const down = other[j]![0] === other[j + 1]![0];
      for (let k = 0; k + 1 < points.length; k++) {
        if ((points[k]![0] === points[k + 1]![0]) === down) continue;
        if (!overlaps(b, boxOfPiece(points[k]!, points[k + 1]!, 0.5))) continue;
        out.push(down ? [other[j]![0], points[k]![1]] : [points[k]![0], other[j]![1]]);
      }
    }
  }
  return out;
}
