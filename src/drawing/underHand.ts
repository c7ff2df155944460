import type { StreamId, UnitId } from '../engine/ids';
import type { SketchStream } from '../sketch/types';
import { overlaps, pieceBoxes } from './boxes';
import { HALF_LINE, HandGround } from './handGround';
import {
  comeUpon,
  type HandLine,
  type Marked,
  type Marks,
  marksMovedAlong,
  marksUnderHand,
} from './handMarks';
import { drawApart } from './nudge';
import { bridgesOf, drawPath } from './path';
import { hangingLine, type RouteEnd, routeNear } from './route';
import { linkBoxesOf, solidBoxesOf, textBoxesOf } from './shapeBoxes';
import { type Pose, portOnSheet } from './transform';
import type { Box, LabelShape, LineShape, Point, Scene, UnitShape } from './types';

/** As many lines that the hand puts a unit upon are led round it in one step. */
const LED_ROUND = 8;
/** With more lines than this under the hand they are drawn apart, and their marks look for other places, when it lets go. */
const FEW = 24;

/** Where a unit stands: its shape, moved. */
interface Standing {
  readonly pose: Pose;
  /** Its symbol, and its links. */
  readonly boxes: readonly [Box, ...Box[]];
  readonly by: Point;
  readonly shape: UnitShape;
}

export interface UnderHand {
  readonly lines: ReadonlyMap<StreamId, LineShape>;
  readonly labels: ReadonlyMap<StreamId, LabelShape>;
}

const STILL: Point = [0, 0];
const shifted = (box: Box, [dx, dy]: Point): Box => ({ ...box, x: box.x + dx, y: box.y + dy });
const add = ([x, y]: Point, [dx, dy]: Point): Point => [x + dx, y + dy];

/** A scene as it stands without the hand, made ready for it. */
interface Ready {
  readonly standing: ReadonlyMap<UnitId, Standing>;
  readonly lines: readonly Marked[];
  readonly ground: HandGround;
}

const ready = new WeakMap<Scene, Ready>();

function madeReady(scene: Scene): Ready {
  let made = ready.get(scene);
  if (!made) {
    const labels = new Map(scene.labels.map((label) => [label.stream, label]));
    made = {
      standing: new Map(
        scene.units.map((shape) => [
          shape.unit,
          { pose: shape, boxes: [shape.box, ...linkBoxesOf(shape, shape)], by: STILL, shape },
        ]),
      ),
      lines: scene.lines.map((line) => ({ line, label: labels.get(line.stream) })),
      ground: new HandGround(scene),
    };
    ready.set(scene, made);
  }
  return made;
}

/**
 * What follows a hand that moves units or bends lines. Lines with an end at such a unit find their ways anew, clear of all
 * symbols and drawn apart from other lines; lines that the unit is put upon are led round it; bridges are where lines cross.
 * Diamonds and labels of all these go with them where they cover nothing, else they are left off until the hand lets go.
 * All else stays as it is in the scene, so that a step costs little more on a sheet of hundreds of units than on a small one.
 *
 * @param scene as it stands without the hand
 * @param streams the sketch's, with bends as the hand has them
 * @param moved places of units under the hand
 * @param bent  streams whose bends are under the hand
 */
export function linesUnderHand(
  scene: Scene,
  streams: readonly SketchStream[],
  moved: ReadonlyMap<UnitId, Point>,
  bent: ReadonlySet<StreamId>,
): UnderHand {
  const { standing: still, lines: before, ground } = madeReady(scene);
  const standing = new Map(still);
  for (const [id, at] of moved) {
    const unit = still.get(id);
    if (unit) standing.set(id, movedTo(unit, at));
  }
  const { lines, changed, reachOf } = waysOf(before, streams, standing, moved, bent);
  const held = [...moved.keys()].flatMap((id) => standing.get(id) ?? []);
  const { upon, marks } =
    changed.size > FEW
      ? { upon: new Set<number>(), marks: marksMovedAlong(before, lines, changed) }
      : placed(ground, before, lines, changed, held);
  const pointsOf = lines.map((line) => line.points);
  const redrawn = new Set([...changed, ...bridgedAnew(before, pointsOf, changed)]);
  const bridges = bridgesOf(pointsOf, redrawn);
  const out = new Map<StreamId, LineShape>();
  for (const k of new Set([...redrawn, ...upon])) {
    const { line } = before[k]!;
    const path = redrawn.has(k) ? drawPath(pointsOf[k]!, bridges.get(k), reachOf(k)) : line;
    const { diamond: was, ...rest } = line;
    const diamond = marks.diamonds.has(k) ? marks.diamonds.get(k) : was;
    if (path.d === line.d && samePoint(diamond, was)) continue;
    out.set(line.stream, {
      ...rest,
      points: pointsOf[k]!,
      d: path.d,
      ...(path.head === undefined ? {} : { head: path.head }),
      ...(path.arrow ? { arrow: path.arrow } : {}),
      ...(diamond ? { diamond } : {}),
    });
  }
  return {
    lines: out,
    labels: new Map([...marks.labels].map(([k, label]) => [before[k]!.line.stream, label])),
  };
}

/** Marks in their places among what the hand brings and what it takes away. */
function placed(
  ground: HandGround,
  before: readonly Marked[],
  lines: readonly HandLine[],
  changed: ReadonlySet<number>,
  held: readonly Standing[],
): { readonly upon: ReadonlySet<number>; readonly marks: Marks } {
  const { scale } = ground;
  const brought: Box[] = [];
  for (const { shape, by } of held) {
    const boxes = [...solidBoxesOf(shape, scale, by), ...textBoxesOf(shape, scale, by)];
    ground.takeOut('unit', shape.unit);
    ground.putUnit(shape.unit, boxes);
    brought.push(...boxes);
  }
  for (const k of changed) {
    const { points } = lines[k]!;
    ground.takeOut('line', k);
    ground.putLine(k, points);
    brought.push(...pieceBoxes(points, HALF_LINE));
  }
  const upon = comeUpon(before, changed, brought, scale);
  const marks = marksUnderHand(ground, before, lines, changed, upon);
  ground.putBack();
  return { upon, marks };
}

const samePoint = (a: Point | undefined, b: Point | undefined): boolean =>
  a?.[0] === b?.[0] && a?.[1] === b?.[1];

function movedTo({ shape, boxes }: Standing, at: Point): Standing {
  const by: Point = [at[0] - shape.at[0], at[1] - shape.at[1]];
  const [box, ...links] = boxes;
  return {
    pose: { at, turn: shape.turn, mirror: shape.mirror },
    boxes: [shifted(box, by), ...links.map((link) => shifted(link, by))],
    by,
    shape,
  };
}

interface Ways {
  /** All lines as they run now. */
  readonly lines: readonly HandLine[];
  /** Those that run elsewhere than without the hand. */
  readonly changed: ReadonlySet<number>;
  readonly reachOf: (line: number) => readonly [number, number];
}

function waysOf(
  before: readonly Marked[],
  streams: readonly SketchStream[],
  standing: ReadonlyMap<UnitId, Standing>,
  moved: ReadonlyMap<UnitId, Point>,
  bent: ReadonlySet<StreamId>,
): Ways {
  const byId = new Map(streams.map((stream) => [stream.id, stream]));
  const obstacles = [...standing.values()].flatMap(({ boxes }) => boxes);
  const upon = [...moved.keys()].flatMap((id) => standing.get(id)?.boxes ?? []);
  const around = [...standing].flatMap(([id, { boxes }]) => (moved.has(id) ? [] : boxes));
  const endOf = (end: SketchStream['from']): (RouteEnd & { readonly by: Point }) | undefined => {
    const unit = end && standing.get(end[0]);
    const place = unit?.shape.symbol.ports(end![1]);
    return unit && place && { port: portOnSheet(unit.pose, place), own: unit.boxes[0], by: unit.by };
  };
  const changed = new Set<number>();
  const fixed = before.map(() => true);
  let led = 0;
  const lines = before.map(({ line }, k): HandLine => {
    const stream = byId.get(line.stream);
    if (!stream) return { points: line.points };
    const { from, to, via = [] } = stream;
    const free = !to ? ({ freeEnd: 'last' } as const) : !from ? ({ freeEnd: 'first' } as const) : {};
    const isTouched = bent.has(stream.id) || [from, to].some((end) => end !== undefined && moved.has(end[0]));
    if (!isTouched && !(led < LED_ROUND && isUnder(line.points, upon)))
      return { points: line.points, ...free };
    if (!isTouched) led += 1;
    changed.add(k);
    const [a, b] = [endOf(from), endOf(to)];
    const alike = isTouched && !bent.has(stream.id) ? sameShift(a?.by, b?.by) : undefined;
    if (alike) {
      const points = line.points.map((p) => add(p, alike));
      if (!(a && b) || !isUnder(points, around)) return { points, alike, ...free };
    }
    fixed[k] = via.length > 0;
    if (a && b) return { points: routeNear(a, b, via, obstacles) };
    if (a) return { points: hangingLine(a, true, obstacles).points, ...free };
    return { points: b ? hangingLine(b, false, obstacles).points : line.points, ...free };
  });
  const reachOf = (k: number): readonly [number, number] => {
    const stream = byId.get(before[k]!.line.stream);
    return [endOf(stream?.from)?.port.reach ?? 0, endOf(stream?.to)?.port.reach ?? 0];
  };
  if (changed.size > FEW) return { lines, changed, reachOf };
  const apart = drawApart(
    lines.map((line) => line.points),
    obstacles,
    fixed,
  );
  return { lines: lines.map((line, k) => ({ ...line, points: apart[k]! })), changed, reachOf };
}

const isUnder = (points: readonly Point[], boxes: readonly Box[]): boolean =>
  points.slice(1).some((q, k) => {
    const p = points[k]!;
    const piece = {
      x: Math.min(p[0], q[0]) - 1,
      y: Math.min(p[1], q[1]) - 1,
      w: Math.abs(q[0] - p[0]) + 2,
      h: Math.abs(q[1] - p[1]) + 2,
    };
    return boxes.some((box) => overlaps(box, piece));
  });

/** The shift of both ends when they move alike; a loose end moves as the other one does. */
function sameShift(a: Point | undefined, b: Point | undefined): Point | undefined {
  const [one, two] = [a ?? b, b ?? a];
  return one && two && one[0] === two[0] && one[1] === two[1] ? one : undefined;
}

/** Lines left where they were whose level pieces an upright piece crosses now, or did before. */
function bridgedAnew(
  before: readonly Marked[],
  now: readonly (readonly Point[])[],
  changed: ReadonlySet<number>,
): readonly number[] {
  const uprights = [...changed].flatMap((k) =>
    [before[k]!.line.points, now[k]!].flatMap((points) =>
      points.slice(1).flatMap(([x, y], n) => {
        const [x0, y0] = points[n]!;
        return x === x0 && y !== y0 ? [{ x, lo: Math.min(y, y0), hi: Math.max(y, y0) }] : [];
      }),
    ),
  );
  return before.flatMap(({ line: { points } }, k) => {
    if (changed.has(k)) return [];
    const isCrossed = points.slice(1).some(([x, y], n) => {
      const [x0, y0] = points[n]!;
      if (y !== y0) return false;
      const [lo, hi] = [Math.min(x, x0), Math.max(x, x0)];
      return uprights.some((u) => u.x > lo && u.x < hi && u.lo < y && u.hi > y);
    });
    return isCrossed ? [k] : [];
  });
}
