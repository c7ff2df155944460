import type { StreamId, UnitId } from '../engine/ids';
import { CATALOGUE } from '../engine/units/catalogue';
import type { Sketch, SketchStream } from '../sketch/types';
import { sameBox } from './boxes';
import { type LabelSize, labelSize, roomFor } from './labelSize';
import { type StandingNote, standingNotes } from './notes';
import { sameValue } from './same';
import { remarkRoom, roomOf } from './sideTexts';
import { portOf, type StandingUnit, standingUnits } from './standing';
import { flagName } from './symbols/flag';
import type { LabelRow, Point, SceneInput } from './types';

/** All that has a say in where things stand. */
export interface Ground {
  readonly standing: readonly StandingUnit[];
  readonly streams: readonly SketchStream[];
  /** Sizes of the labels at 100 %: from units and count of rows; from digits only where a number is unusually wide. */
  readonly sizes: ReadonlyMap<StreamId, LabelSize>;
  /** Room of each unit's duties, by link [px]. */
  readonly rooms: readonly (readonly number[])[];
  /** Count and width of the lines under each unit's tag [px]. */
  readonly remarks: readonly (readonly [rows: number, width: number])[];
  /** Streams of feeds and products, whose labels come first. */
  readonly outer: ReadonlySet<StreamId>;
  readonly notes: readonly StandingNote[];
  readonly textScale: number;
  readonly ribbons: ReadonlyMap<StreamId, number> | undefined;
}

/** What a ground was made of, beside the ground: the same again needs no second look. */
export interface Made {
  readonly sketch: Sketch;
  readonly input: SceneInput;
  readonly ground: Ground;
}

const sizeByUnits = new Map<string, LabelSize>();

/** The same units and rooms give the same object, so that sizes are compared by identity. */
export function sizeOf(rows: readonly LabelRow[]): LabelSize {
  let key = '';
  for (const row of rows) key += `${row.unit}\n${roomFor(row.number)}\n`;
  let size = sizeByUnits.get(key);
  if (!size) {
    size = labelSize(rows);
    sizeByUnits.set(key, size);
  }
  return size;
}

export function groundOf(sketch: Sketch, input: SceneInput, before: Made | undefined): Ground {
  const kinds = input.kinds ?? CATALOGUE;
  const stands =
    before !== undefined &&
    sketch.units === before.sketch.units &&
    sketch.streams === before.sketch.streams &&
    kinds === (before.input.kinds ?? CATALOGUE);
  const standing = stands ? before.ground.standing : standingUnits(sketch, kinds);
  const sizes = new Map<StreamId, LabelSize>();
  for (const { id } of sketch.streams) {
    const rows = input.labels.get(id);
    if (rows && rows.length > 0) sizes.set(id, sizeOf(rows));
  }
  const rooms = standing.map(({ unit, symbol }) =>
    (symbol.links ?? []).map(({ name }) => roomOf(input.duties.get(unit.id)?.[name])),
  );
  const remarks = standing.map(({ unit }) => {
    const rows = input.remarks?.get(unit.id) ?? [];
    return [rows.length, remarkRoom(rows)] as const;
  });
  const { textScale = 1, ribbons } = input;
  return {
    standing,
    streams: sketch.streams,
    sizes,
    rooms,
    remarks,
    outer: outerStreams(sketch),
    notes: standingNotes(sketch.notes),
    textScale,
    ribbons,
  };
}

/** Streams that come from a feed, lead to a product, or have a loose end. */
export function outerStreams(sketch: Sketch): ReadonlySet<StreamId> {
  const edge = new Set<UnitId>();
  for (const { id, kind } of sketch.units) if (kind === 'feed' || kind === 'product') edge.add(id);
  const outer = new Set<StreamId>();
  for (const { id, from, to } of sketch.streams) {
    if (!from || !to || edge.has(from[0]) || edge.has(to[0])) outer.add(id);
  }
  return outer;
}

/** Whether everything stands where it stood, whatever else changed in the sketch. */
export function sameGround(a: Ground, b: Ground): boolean {
  if (a.standing.length !== b.standing.length) return false;
  if (a.textScale !== b.textScale) return false;
  if (a.notes.length !== b.notes.length || a.notes.some((note, k) => note !== b.notes[k])) return false;
  if (!sameValue(a.rooms, b.rooms) || !sameValue(a.remarks, b.remarks)) return false;
  if (!sameMap(a.sizes, b.sizes) || !sameMap(a.ribbons, b.ribbons)) return false;
  if (a.standing === b.standing && a.streams === b.streams) return true;
  /** Units that became another record or symbol, though they stand where they stood. */
  const redrawn = new Map<UnitId, readonly [StandingUnit, StandingUnit]>();
  for (const [k, now] of a.standing.entries()) {
    const was = b.standing[k]!;
    if (now === was) continue;
    if (!standsAlike(now, was)) return false;
    if (now.symbol !== was.symbol) redrawn.set(now.unit.id, [now, was]);
  }
  if (a.streams.length !== b.streams.length) return false;
  const portStands = (end: SketchStream['from']): boolean => {
    const pair = end && redrawn.get(end[0]);
    return !pair || sameValue(portOf(pair[0], end[1]), portOf(pair[1], end[1]));
  };
  return a.streams.every((now, k) => {
    const was = b.streams[k]!;
    if (now !== was && !runsAlike(now, was)) return false;
    return redrawn.size === 0 || (portStands(now.from) && portStands(now.to));
  });
}

function standsAlike(a: StandingUnit, b: StandingUnit): boolean {
  if (a.unit !== b.unit) {
    if (a.unit.id !== b.unit.id || a.unit.tag !== b.unit.tag || a.unit.kind !== b.unit.kind) return false;
    if (flagName(a.unit) !== flagName(b.unit)) return false;
  }
  const { pose: p, symbol: s } = a;
  const { pose: q, symbol: t } = b;
  if (!samePoint(p.at, q.at) || p.turn !== q.turn || p.mirror !== q.mirror || !sameBox(a.box, b.box))
    return false;
  return (
    s === t ||
    (s.tagless === t.tagless &&
      s.nameInside === t.nameInside &&
      sameValue(s.nameAt, t.nameAt) &&
      sameValue(a.links, b.links))
  );
}

const runsAlike = (a: SketchStream, b: SketchStream): boolean =>
  a.id === b.id &&
  a.number === b.number &&
  sameValue(a.from, b.from) &&
  sameValue(a.to, b.to) &&
  sameValue(a.via, b.via);

const samePoint = (a: Point, b: Point): boolean => a[0] === b[0] && a[1] === b[1];

const sameMap = <K, T>(a: ReadonlyMap<K, T> | undefined, b: ReadonlyMap<K, T> | undefined): boolean => {
  if (a === b) return true;
  if ((a?.size ?? 0) !== (b?.size ?? 0)) return false;
  for (const [key, value] of a ?? []) if (!sameValue(b?.get(key), value)) return false;
  return true;
};
