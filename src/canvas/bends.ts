import { GRID } from '../drawing/tokens';
import type { Point } from '../drawing/types';
import type { StreamId, UnitId } from '../engine/ids';
import type { Sketch, SketchStream } from '../sketch/types';
import { bendStream, type Edit, moveUnits } from '../store/commands';
import { together } from './edit';
import type { SheetState } from './sheetStore';

/** A line leaves its ports straight for this much [px]; a bend nearer than that would have to turn back. */
const STUB = 24;

type Bends = readonly Point[];

const isLevel = (a: Point, b: Point): boolean => a[1] === b[1];
const toward = (a: Point, b: Point, by: number): Point => [
  a[0] + Math.sign(b[0] - a[0]) * by,
  a[1] + Math.sign(b[1] - a[1]) * by,
];
const lengthOf = (a: Point, b: Point): number => Math.abs(b[0] - a[0]) + Math.abs(b[1] - a[1]);

/** Whether a piece can be moved: those at a port only when there is room for a bend on the way. */
export function canBend(points: readonly Point[], piece: number): boolean {
  const [a, b] = [points[piece], points[piece + 1]];
  if (!a || !b) return false;
  const ends = Number(piece === 0) + Number(piece === points.length - 2);
  return ends === 0 || lengthOf(a, b) >= ends * STUB + GRID;
}

/** The axis along which a piece can be moved: across its own direction. */
export const bendAxis = (points: readonly Point[], piece: number): 0 | 1 =>
  isLevel(points[piece]!, points[piece + 1]!) ? 1 : 0;

/**
 * Bends of a line after one of its straight pieces was moved across its direction. A piece at a port keeps a stub there, so
 * that a step comes in; a piece next to a piece at a port goes no nearer to the port than the stub.
 *
 * @param points the line as it is drawn, port to port
 * @param by how far [px]; it is held back where a port is in the way
 */
export function bent(points: readonly Point[], piece: number, by: number): Bends {
  const last = points.length - 2;
  const axis = bendAxis(points, piece);
  const shift = ([x, y]: Point, d: number): Point => (axis === 0 ? [x + d, y] : [x, y + d]);
  let d = by;
  // A neighbour that ends at a port gets no shorter than its stub.
  if (piece === 1) d = heldBack(points[0]!, points[1]!, axis, d);
  if (piece === last - 1) d = heldBack(points[last + 1]!, points[last]!, axis, d);
  const out = [...points];
  const head: Point[] = [];
  const tail: Point[] = [];
  if (piece === 0) head.push(toward(points[0]!, points[1]!, STUB));
  if (piece === last) tail.push(toward(points[last + 1]!, points[last]!, STUB));
  const [a, b] = [head[0] ?? out[piece]!, tail[0] ?? out[piece + 1]!];
  return simple([
    ...out.slice(0, piece === 0 ? 1 : piece),
    ...head,
    shift(a, d),
    shift(b, d),
    ...tail,
    ...out.slice(piece === last ? piece + 1 : piece + 2),
  ]).slice(1, -1);
}

/** No nearer to a port than its stub: the piece from the port to the corner keeps its direction and at least that length. */
function heldBack(port: Point, corner: Point, axis: 0 | 1, by: number): number {
  const long = corner[axis] - port[axis];
  const least = Math.min(STUB, Math.abs(long));
  return long >= 0 ? Math.max(by, least - long) : Math.min(by, -least - long);
}

/** Without points that add nothing. */
function simple(points: readonly Point[]): readonly Point[] {
  const out: Point[] = [];
  for (const p of points) {
    const [before, now] = [out.at(-2), out.at(-1)];
    if (now && now[0] === p[0] && now[1] === p[1]) continue;
    if (
      before &&
      now &&
      ((before[0] === now[0] && now[0] === p[0]) || (before[1] === now[1] && now[1] === p[1]))
    )
      out.pop();
    out.push(p);
  }
  return out;
}

/**
 * Bends that follow when one end of a line moves: the piece at the end moves along, the rest stays. Undefined when the end
 * passed its bend, so that no bend is left that makes sense.
 */
export function followed(points: readonly Point[], a: Point, b: Point): Bends | undefined {
  const bends = points.slice(1, -1);
  if (bends.length === 0) return [];
  const out = bends.map(([x, y]): [number, number] => [x, y]);
  const ends = [
    { at: points[0]!, shift: a, bend: out[0]! },
    { at: points.at(-1)!, shift: b, bend: out.at(-1)! },
  ];
  const level = [isLevel(points[0]!, bends[0]!), isLevel(points.at(-1)!, bends.at(-1)!)];
  ends.forEach(({ shift, bend }, k) => {
    const axis = level[k] ? 1 : 0;
    bend[axis] += shift[axis];
  });
  const holds = ends.every(({ at, shift, bend }, k) => {
    const axis = level[k] ? 0 : 1;
    const first = k === 0 ? bends[0]! : bends.at(-1)!;
    const [was, is] = [first[axis] - at[axis], bend[axis] - (at[axis] + shift[axis])];
    return Math.sign(was) === Math.sign(is) && Math.abs(is) >= Math.min(GRID, Math.abs(was));
  });
  return holds ? out : undefined;
}

const NOWHERE: Point = [0, 0];
/** Whether the line is drawn just as its bends say. */
const isDrawnSo = (stream: SketchStream, points: readonly Point[]): boolean => {
  const bends = points.slice(1, -1);
  return (
    stream.via?.length === bends.length &&
    bends.every(([x, y], k) => stream.via?.[k]?.[0] === x && stream.via[k][1] === y)
  );
};

/**
 * New bends of the lines whose ends do not move alike, while units move to other places.
 *
 * @param lines the lines as they were drawn before the move
 */
export function bendsAfter(
  sketch: Sketch,
  lines: SheetState['lines'],
  places: ReadonlyMap<UnitId, Point>,
): ReadonlyMap<StreamId, Bends> | null {
  const changed = new Map<StreamId, Bends>();
  for (const stream of sketch.streams) {
    const points = stream.via ? lines.get(stream.id)?.points : undefined;
    if (!points || !isDrawnSo(stream, points)) continue;
    const [a, b] = [stream.from, stream.to].map((end): Point => {
      const unit = end && places.has(end[0]) ? sketch.units.find((u) => u.id === end[0]) : undefined;
      const at = unit && places.get(unit.id);
      return unit && at ? [at[0] - unit.at[0], at[1] - unit.at[1]] : NOWHERE;
    }) as [Point, Point];
    if (a[0] === b[0] && a[1] === b[1]) {
      if (a[0] !== 0 || a[1] !== 0)
        changed.set(
          stream.id,
          stream.via!.map(([x, y]): Point => [x + a[0], y + a[1]]),
        );
      continue;
    }
    changed.set(stream.id, followed(points, a, b) ?? []);
  }
  return changed.size === 0 ? null : changed;
}

/** The sketch with other bends; the same sketch when there are none. */
export function withBends(sketch: Sketch, bends: ReadonlyMap<StreamId, Bends> | null): Sketch {
  if (!bends || bends.size === 0) return sketch;
  const streams = sketch.streams.map((stream) => {
    const via = bends.get(stream.id);
    if (!via) return stream;
    const { via: _, ...rest } = stream;
    return via.length === 0 ? rest : { ...rest, via };
  });
  return { ...sketch, streams };
}

/** Moves units, and the bends of their lines with them, as one edit. */
export function moveWithBends(
  sketch: Sketch,
  lines: SheetState['lines'],
  places: ReadonlyMap<UnitId, Point>,
  label?: string,
): Edit {
  const bends = bendsAfter(sketch, lines, places) ?? new Map<StreamId, Bends>();
  const edit = together(
    sketch,
    moveUnits(sketch, places),
    ...[...bends].map(
      ([id, via]) =>
        (now: Sketch) =>
          bendStream(now, id, via),
    ),
  );
  return edit.ok && label ? { ...edit, label } : edit;
}
