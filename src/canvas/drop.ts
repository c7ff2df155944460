import { boxOfPiece, overlaps } from '../drawing/boxes';
import { plainSymbol } from '../drawing/symbols/registry';
import { GRID } from '../drawing/tokens';
import { AWAY, type Pose, portOnSheet } from '../drawing/transform';
import type { Box, LineShape, Point, PortPlace, SymbolData } from '../drawing/types';
import type { UnitId } from '../engine/ids';
import { CATALOGUE } from '../engine/units/catalogue';
import type { Sketch } from '../sketch/types';
import {
  addUnit,
  connect,
  type Edit,
  insertUnitOnStream,
  mirrorUnit,
  nextPortName,
  turnUnit,
} from '../store/commands';
import type { Stores } from '../store/react';
import { together, tryEdit } from './edit';
import { sheetOf } from './handle';
import { nearestOn } from './lines';
import type { Dropping, SheetState, SheetStore } from './sheetStore';

/** A unit opens a line within this distance [screen px]. */
const CATCH = 14;
/** It takes up a loose stream within this distance [screen px]. */
const LOOSE_CATCH = 24;
const ROOM: Point = [96, 56];
/** Line that stays between a unit put into a stream and the next bend [px]. */
const STUB = 24;

const onGrid = ([x, y]: Point): Point => [Math.round(x / GRID) * GRID, Math.round(y / GRID) * GRID];

type Facing = Pick<Dropping, 'turn'> & { readonly mirror: boolean };

/** How a unit with an inlet at its left and an outlet at its right turns to face the flow; others stay upright. */
function facing(kind: string, [a, b]: readonly [Point, Point]): Facing {
  const symbol = plainSymbol(kind);
  const through =
    (symbol.ports('in') ?? symbol.ports('in1'))?.side === 'left' &&
    (symbol.ports('out') ?? symbol.ports('out1'))?.side === 'right';
  if (!through) return { turn: 0, mirror: false };
  if (a[1] === b[1]) return { turn: 0, mirror: b[0] < a[0] };
  return { turn: b[1] > a[1] ? 90 : 270, mirror: false };
}

function faced(sketch: Sketch, edit: Edit, { turn, mirror }: Facing): Edit {
  const unit = edit.ok ? edit.unit : undefined;
  if (!unit) return edit;
  const turns = Array.from({ length: turn / 90 }, () => (now: Sketch) => turnUnit(now, unit));
  return together(sketch, edit, ...turns, ...(mirror ? [(now: Sketch) => mirrorUnit(now, unit)] : []));
}

interface Under {
  readonly line: LineShape;
  /** The straight piece, and the place on it where the unit would stand. */
  readonly piece: readonly [Point, Point];
  readonly at: Point;
}

/** The line under a point that this kind would open, if any, and where on it: clear of bends where there is room. */
function lineAt(sheet: SheetStore, kind: string, at: Point, zoom: number): Under | undefined {
  let best: Under | undefined;
  let nearest = CATCH / zoom;
  for (const line of sheet.getState().scene.lines) {
    for (let k = 0; k + 1 < line.points.length; k += 1) {
      const piece = [line.points[k]!, line.points[k + 1]!] as const;
      const { at: here, distance } = nearestOn(piece, at);
      if (distance >= nearest) continue;
      nearest = distance;
      best = { line, piece, at: clearOfEnds(kind, piece, here) };
    }
  }
  return best;
}

function clearOfEnds(kind: string, [a, b]: readonly [Point, Point], at: Point): Point {
  const { w } = plainSymbol(kind).box;
  const axis = a[1] === b[1] ? 0 : 1;
  const [lo, hi] = [Math.min(a[axis], b[axis]), Math.max(a[axis], b[axis])];
  const room = w / 2 + STUB;
  const along = hi - lo < 2 * room ? (lo + hi) / 2 : Math.min(Math.max(at[axis], lo + room), hi - room);
  return axis === 0 ? [along, at[1]] : [at[0], along];
}

/** What would happen if the unit were let go here: shown beside the pointer. */
export function dropAt(stores: Stores, sheet: SheetStore, kind: string, at: Point, zoom: number): Dropping {
  const { sketch } = stores.sketch.getState();
  const under = lineAt(sheet, kind, at, zoom);
  if (under) {
    const edit = insertUnitOnStream(sketch, under.line.stream, kind, under.at);
    if (edit.ok) {
      const tag = edit.sketch.units.find((unit) => unit.id === edit.unit)?.tag ?? '';
      const known = new Set(sketch.streams.map((stream) => stream.id));
      const made = edit.sketch.streams.filter((stream) => !known.has(stream.id));
      const onward = made.find((stream) => stream.to)?.number ?? '';
      return {
        kind,
        at: onGrid(under.at),
        ...facing(kind, under.piece),
        on: under.line.stream,
        tip: [
          `Drop: puts ${tag} into stream ${under.line.number}`,
          `its line becomes streams ${under.line.number} and ${onward}`,
        ],
      };
    }
  }
  return (
    atLooseEnd(stores, sheet, kind, at, zoom) ?? {
      kind,
      at: onGrid(at),
      turn: 0,
      mirror: false,
      on: null,
      tip: [],
    }
  );
}

/** At the arrowhead of a stream that leads nowhere yet: the unit takes it up. */
function atLooseEnd(
  stores: Stores,
  sheet: SheetStore,
  kind: string,
  at: Point,
  zoom: number,
): Dropping | undefined {
  const port = firstInlet(kind);
  const inlet = port === undefined ? undefined : plainSymbol(kind).ports(port);
  if (port === undefined || !inlet) return undefined;
  const { sketch } = stores.sketch.getState();
  for (const line of sheet.getState().scene.lines) {
    const from = sketch.streams.find((stream) => stream.id === line.stream)?.from;
    if (!line.hanging || !from) continue;
    const [a, b] = [line.points.at(-2)!, line.points.at(-1)!];
    if (nearestOn([a, b], at).distance > LOOSE_CATCH / zoom) continue;
    const { turn, mirror } = facing(kind, [a, b]);
    return {
      kind,
      at: onGrid(takingUp(plainSymbol(kind), inlet, { at: [0, 0], turn, mirror }, a, b)),
      turn,
      mirror,
      on: null,
      onto: { from: { unit: from[0], port: from[1], dir: 'out' }, port },
      tip: [`Drop: stream ${line.number} leads to it`],
    };
  }
  return undefined;
}

/** With its inlet at the arrowhead where the line runs into it; else further on, so that the line finds its way round. */
function takingUp(symbol: SymbolData, inlet: PortPlace, pose: Pose, a: Point, b: Point): Point {
  const flow: Point = [Math.sign(b[0] - a[0]), Math.sign(b[1] - a[1])];
  const port = portOnSheet(pose, inlet);
  const [ux, uy] = AWAY[port.side];
  if (ux === -flow[0] && uy === -flow[1]) return [b[0] - port.at[0], b[1] - port.at[1]];
  const on = STUB + Math.max(symbol.box.w, symbol.box.h) / 2;
  return [b[0] + flow[0] * on, b[1] + flow[1] * on];
}

function firstInlet(kind: string): string | undefined {
  const spec = CATALOGUE[kind]?.ports.find((port) => port.dir === 'in');
  return spec && nextPortName(spec, []);
}

/** Lets the unit go: into the line below it, else on empty sheet; it is selected. */
export function drop(stores: Stores, dropping: Dropping): UnitId | undefined {
  const made = tryEdit(stores, (sketch) => {
    if (dropping.on === null) {
      const added = addUnit(sketch, dropping.kind, dropping.at);
      const unit = added.ok ? added.unit : undefined;
      const { onto } = dropping;
      if (!unit || !onto) return added;
      const joined = together(sketch, added, (now) =>
        connect(now, [onto.from.unit, onto.from.port], [unit, onto.port]),
      );
      return faced(sketch, joined, dropping);
    }
    const edit = insertUnitOnStream(sketch, dropping.on, dropping.kind, dropping.at);
    return faced(sketch, edit, dropping);
  });
  if (made?.unit) stores.session.select([made.unit]);
  return made?.unit;
}

/** Steps to try from a wished place, the nearest first; to the left only when nothing else is near. */
const STEPS: readonly Point[] = Array.from(
  { length: 17 * 25 },
  (_, k): Point => [(k % 17) - 5, Math.floor(k / 17) - 8],
).sort((a, b) => far(a) - far(b));
function far([x, y]: Point): number {
  return Math.hypot(x < 0 ? -2 * x * ROOM[0] : x * ROOM[0], y * ROOM[1]) + (y < 0 ? 1 : 0);
}

/** The nearest free place to a point, rather to its right and below. */
export function freePlace(boxes: readonly Box[], symbol: Box, from: Point): Point {
  for (const [column, row] of STEPS) {
    const at = onGrid([from[0] + column * ROOM[0], from[1] + row * ROOM[1]]);
    const box = { x: at[0] + symbol.x - 20, y: at[1] + symbol.y - 24, w: symbol.w + 40, h: symbol.h + 48 };
    if (!boxes.some((other) => overlaps(other, box))) return at;
  }
  return onGrid(from);
}

/** What a new unit must not stand on: symbols and lines. */
export const takenBoxes = ({ scene }: Pick<SheetState, 'scene'>): readonly Box[] => [
  ...scene.units.map((unit) => unit.box),
  ...scene.lines.flatMap(({ points }) => points.slice(1).map((p, k) => boxOfPiece(points[k]!, p, 1))),
];

/** The unit that a new one stands beside: the selected one, or the one that the selected stream leads to, or comes from. */
function unitChosen({ session, sketch }: Stores): UnitId | undefined {
  const { units, streams } = session.getState();
  const stream = sketch.getState().sketch.streams.find(({ id }) => id === streams.at(-1));
  return units.at(-1) ?? stream?.to?.[0] ?? stream?.from?.[0];
}

/** Puts a unit on the sheet without a pointer: right of what is selected, else at the middle of the view. */
export function place(stores: Stores, kind: string): UnitId | undefined {
  const sheet = sheetOf(stores);
  const state = sheet?.store.getState();
  const symbol = plainSymbol(kind).box;
  const chosen = unitChosen(stores);
  const beside = chosen && state?.units.get(chosen);
  const start: Point = beside
    ? [beside.box.x + beside.box.w + ROOM[0] - symbol.x, beside.at[1]]
    : (sheet?.middle() ?? [0, 0]);
  const taken = state ? takenBoxes(state) : [];
  const at = freePlace(taken, symbol, start);
  const made = tryEdit(stores, (sketch) => addUnit(sketch, kind, at));
  if (!made?.unit) return undefined;
  stores.session.select([made.unit]);
  // Once its drawer has taken its room from the sheet.
  setTimeout(() => sheet?.reveal(at), 0);
  return made.unit;
}
