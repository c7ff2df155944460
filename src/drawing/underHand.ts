import type { StreamId, UnitId } from '../engine/ids';
import type { SketchStream } from '../sketch/types';
import { boxOfPiece } from './boxes';
import { piecesByLength } from './diamonds';
import { drawPath } from './path';
import { hangingLine, type RouteEnd, routeLine } from './route';
import { type Pose, portOnSheet, toSheet } from './transform';
import type { Box, LabelShape, LineShape, Point, Scene, UnitShape } from './types';

/** Where a unit under the hand stands: its shape, moved. */
interface Standing {
  readonly pose: Pose;
  readonly box: Box;
  readonly by: Point;
  readonly shape: UnitShape;
}

const shifted = (box: Box, [dx, dy]: Point): Box => ({ ...box, x: box.x + dx, y: box.y + dy });
const add = ([x, y]: Point, [dx, dy]: Point): Point => [x + dx, y + dy];

function linkBoxes(shape: UnitShape, pose: Pose): readonly Box[] {
  return (shape.symbol.links ?? []).map(({ from, to }) =>
    boxOfPiece(toSheet(pose, from), toSheet(pose, to), 4),
  );
}

/** A label that goes with its diamond. */
function movedLabel(label: LabelShape, by: Point): LabelShape {
  return {
    ...label,
    box: shifted(label.box, by),
    hold: add(label.hold, by),
    ...(label.leader ? { leader: [add(label.leader[0], by), add(label.leader[1], by)] } : {}),
    numberRight: label.numberRight + by[0],
    unitLeft: label.unitLeft + by[0],
    baseline: label.baseline + by[1],
  };
}

function middleOf(points: readonly Point[]): Point {
  const piece = piecesByLength(points)[0] ?? 0;
  const [a, b] = [points[piece]!, points[piece + 1]!];
  return [(a[0] + b[0]) / 2, (a[1] + b[1]) / 2];
}

export interface UnderHand {
  readonly lines: ReadonlyMap<StreamId, LineShape>;
  readonly labels: ReadonlyMap<StreamId, LabelShape>;
}

/**
 * What follows a hand that moves units or bends lines: the lines with an end at such a unit find their ways anew, clear of
 * all symbols, and their diamonds and labels go with them. All else stays as it is in the scene until the hand lets go; so
 * a step costs no more on a sheet of hundreds of units than on a small one.
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
  const standing = new Map<UnitId, Standing>();
  const obstacles: Box[] = [];
  for (const shape of scene.units) {
    const at = moved.get(shape.unit) ?? shape.at;
    const by: Point = [at[0] - shape.at[0], at[1] - shape.at[1]];
    const still = by[0] === 0 && by[1] === 0;
    const box = still ? shape.box : shifted(shape.box, by);
    const pose = still ? shape : { at, turn: shape.turn, mirror: shape.mirror };
    standing.set(shape.unit, { pose, box, by, shape });
    obstacles.push(box, ...linkBoxes(shape, pose));
  }
  const endOf = (end: SketchStream['from']): (RouteEnd & { readonly by: Point }) | undefined => {
    const unit = end && standing.get(end[0]);
    const place = unit?.shape.symbol.ports(end![1]);
    return unit && place && { port: portOnSheet(unit.pose, place), own: unit.box, by: unit.by };
  };
  const before = new Map(scene.lines.map((line) => [line.stream, line]));
  const labelsBefore = new Map(scene.labels.map((label) => [label.stream, label]));
  const lines = new Map<StreamId, LineShape>();
  const labels = new Map<StreamId, LabelShape>();
  for (const stream of streams) {
    const isTouched =
      bent.has(stream.id) || [stream.from, stream.to].some((end) => end !== undefined && moved.has(end[0]));
    const was = before.get(stream.id);
    if (!isTouched || !was) continue;
    const [from, to] = [endOf(stream.from), endOf(stream.to)];
    const alike = !bent.has(stream.id) && sameShift(from?.by, to?.by);
    const points = alike
      ? was.points.map((p) => add(p, alike))
      : from && to
        ? routeLine(from, to, stream.via ?? [], obstacles).points
        : from
          ? hangingLine(from, true, obstacles).points
          : to
            ? hangingLine(to, false, obstacles).points
            : was.points;
    const reach = [from?.port.reach ?? 0, to?.port.reach ?? 0] as const;
    const middle = alike && was.diamond ? add(was.diamond, alike) : middleOf(points);
    lines.set(stream.id, {
      ...was,
      points,
      ...drawPath(points, undefined, reach),
      ...(was.diamond ? { diamond: middle } : {}),
    });
    const label = labelsBefore.get(stream.id);
    const held = was.diamond ?? middleOf(was.points);
    if (label) labels.set(stream.id, movedLabel(label, [middle[0] - held[0], middle[1] - held[1]]));
  }
  return { lines, labels };
}

/** The shift of both ends when they move alike; a loose end moves as the other one does. */
function sameShift(a: Point | undefined, b: Point | undefined): Point | undefined {
  const [one, two] = [a ?? b, b ?? a];
  return one && two && one[0] === two[0] && one[1] === two[1] ? one : undefined;
}
