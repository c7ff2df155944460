import { overlaps } from '../drawing/boxes';
import { plainSymbol } from '../drawing/symbols/registry';
import { GRID } from '../drawing/tokens';
import type { Box, LineShape, Point } from '../drawing/types';
import type { UnitId } from '../engine/ids';
import type { Sketch } from '../sketch/types';
import { addUnit, type Edit, insertUnitOnStream, mirrorUnit, turnUnit } from '../store/commands';
import type { Stores } from '../store/react';
import { together, tryEdit } from './edit';
import { sheetOf } from './handle';
import { nearestOn } from './lines';
import type { Dropping, SheetStore } from './sheetStore';

/** A unit opens a line within this distance [screen px]. */
const CATCH = 14;
const ROOM: Point = [96, 56];

const onGrid = ([x, y]: Point): Point => [Math.round(x / GRID) * GRID, Math.round(y / GRID) * GRID];

type Facing = Pick<Dropping, 'turn'> & { readonly mirror: boolean };

/** How a unit with an inlet at its left and an outlet at its right turns to face the flow; others stay upright. */
function facing(kind: string, line: LineShape, at: Point): Facing {
  const symbol = plainSymbol(kind);
  const through =
    (symbol.ports('in') ?? symbol.ports('in1'))?.side === 'left' &&
    (symbol.ports('out') ?? symbol.ports('out1'))?.side === 'right';
  if (!through) return { turn: 0, mirror: false };
  for (let k = 0; k + 1 < line.points.length; k += 1) {
    const [a, b] = [line.points[k]!, line.points[k + 1]!];
    if (nearestOn([a, b], at).distance > 1) continue;
    if (a[1] === b[1]) return { turn: 0, mirror: b[0] < a[0] };
    return { turn: b[1] > a[1] ? 90 : 270, mirror: false };
  }
  return { turn: 0, mirror: false };
}

function faced(sketch: Sketch, edit: Edit, { turn, mirror }: Facing): Edit {
  const unit = edit.ok ? edit.unit : undefined;
  if (!unit) return edit;
  const turns = Array.from({ length: turn / 90 }, () => (now: Sketch) => turnUnit(now, unit));
  return together(sketch, edit, ...turns, ...(mirror ? [(now: Sketch) => mirrorUnit(now, unit)] : []));
}

/** The line under a point that this kind would open, if any. */
function lineAt(sheet: SheetStore, at: Point, zoom: number): { line: LineShape; at: Point } | undefined {
  let best: { line: LineShape; at: Point } | undefined;
  let nearest = CATCH / zoom;
  for (const line of sheet.getState().scene.lines) {
    const { at: here, distance } = nearestOn(line.points, at);
    if (distance >= nearest) continue;
    nearest = distance;
    best = { line, at: here };
  }
  return best;
}

/** What would happen if the unit were let go here: shown beside the pointer. */
export function dropAt(stores: Stores, sheet: SheetStore, kind: string, at: Point, zoom: number): Dropping {
  const { sketch } = stores.sketch.getState();
  const under = lineAt(sheet, at, zoom);
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
        ...facing(kind, under.line, under.at),
        on: under.line.stream,
        tip: [
          `Drop: puts ${tag} into stream ${under.line.number}`,
          `its line becomes streams ${under.line.number} and ${onward}`,
        ],
      };
    }
  }
  return { kind, at: onGrid(at), turn: 0, mirror: false, on: null, tip: [] };
}

/** Lets the unit go: into the line below it, else on empty sheet; it is selected. */
export function drop(stores: Stores, dropping: Dropping): UnitId | undefined {
  const made = tryEdit(stores, (sketch) => {
    if (dropping.on === null) return addUnit(sketch, dropping.kind, dropping.at);
    const edit = insertUnitOnStream(sketch, dropping.on, dropping.kind, dropping.at);
    return faced(sketch, edit, dropping);
  });
  if (made?.unit) stores.session.select([made.unit]);
  return made?.unit;
}

/** The nearest free place at or right of a point, then in the rows below. */
export function freePlace(boxes: readonly Box[], symbol: Box, from: Point): Point {
  for (let row = 0; row < 40; row += 1) {
    for (let column = 0; column < 8; column += 1) {
      const at = onGrid([from[0] + column * ROOM[0], from[1] + row * ROOM[1]]);
      const box = {
        x: at[0] + symbol.x - 20,
        y: at[1] + symbol.y - 24,
        w: symbol.w + 40,
        h: symbol.h + 48,
      };
      if (!boxes.some((other) => overlaps(other, box))) return at;
    }
  }
  return onGrid(from);
}

/** Puts a unit on the sheet without a pointer: right of the selected one, else at the middle of the view. */
export function place(stores: Stores, kind: string): UnitId | undefined {
  const sheet = sheetOf(stores);
  const state = sheet?.store.getState();
  const symbol = plainSymbol(kind).box;
  const chosen = stores.session.getState().units.at(-1);
  const beside = chosen && state?.units.get(chosen);
  const start: Point = beside
    ? [beside.box.x + beside.box.w + ROOM[0] - symbol.x, beside.at[1]]
    : (sheet?.middle() ?? [0, 0]);
  const at = freePlace(state?.scene.units.map((unit) => unit.box) ?? [], symbol, start);
  const made = tryEdit(stores, (sketch) => addUnit(sketch, kind, at));
  if (!made?.unit) return undefined;
  stores.session.select([made.unit]);
  sheet?.reveal(at);
  return made.unit;
}
