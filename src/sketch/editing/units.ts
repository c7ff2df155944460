import type { StreamId, UnitId } from '../../engine/ids';
import type { KindCatalogue, PortSpec } from '../../engine/units/types';
import { word } from '../findings';
import { hangingStreams, nextStreamId, nextStreamNumber, nextTag, nextUnitId } from '../naming';
import { KNOWN_KINDS, kindOf, nextPortName, type Registry } from '../registry';
import type { Json, Sketch, SketchStream, SketchUnit } from '../types';
import { dropStreams } from './connect';
import { type Edit, refuse, streamOf, unitOf, without, withUnit } from './edited';

type Place = readonly [number, number];

const GRID = 8;
/** The nearest place on the sheet's grid. */
const onGrid = ([x, y]: Place): Place => [Math.round(x / GRID) * GRID, Math.round(y / GRID) * GRID];

function freshUnit(sketch: Sketch, kind: KindCatalogue, at: Place): SketchUnit {
  return {
    id: nextUnitId(sketch),
    tag: nextTag(sketch.units, kind),
    kind: kind.kind,
    at: onGrid(at),
    settings: { ...(kind.fresh as { readonly [key: string]: Json } | undefined) },
  };
}

/** A new unit with its tag, its fresh settings, and a stream at each outlet that always has one. */
export function addUnit(sketch: Sketch, kindName: string, at: Place, registry: Registry = KNOWN_KINDS): Edit {
  const kind = kindOf(registry, kindName);
  if (!kind) return refuse('edit/unknown-kind', word('kind', kindName));
  const unit = freshUnit(sketch, kind, at);
  const streams = [...sketch.streams, ...hangingStreams([unit], sketch.streams, registry)];
  const next = { ...sketch, units: [...sketch.units, unit], streams };
  return { ok: true, sketch: next, label: `add ${unit.tag}`, unit: unit.id };
}

/**
 * Puts a new unit into a stream: the stream ends at its first inlet and keeps its number; a new one goes on from its first
 * outlet to where the stream went.
 */
export function insertUnitOnStream(
  sketch: Sketch,
  id: StreamId,
  kindName: string,
  at: Place,
  registry: Registry = KNOWN_KINDS,
): Edit {
  const stream = streamOf(sketch, id);
  if (!stream) return refuse('edit/unknown-stream', word('stream', id));
  const kind = kindOf(registry, kindName);
  if (!kind) return refuse('edit/unknown-kind', word('kind', kindName));
  const first = (dir: PortSpec['dir']): string | undefined => {
    const spec = kind.ports.find((p) => p.dir === dir);
    return spec && nextPortName(spec, []);
  };
  const [inlet, outlet] = [first('in'), first('out')];
  if (inlet === undefined) return refuse('edit/no-inlet', word('kind', kindName));
  if (outlet === undefined) return refuse('edit/no-outlet', word('kind', kindName));
  if (!stream.from || !stream.to) return refuse('edit/nothing-to-part', word('stream', stream.number));
  const unit = freshUnit(sketch, kind, at);
  const onward: SketchStream = {
    id: nextStreamId(sketch.streams),
    number: nextStreamNumber(sketch.streams),
    from: [unit.id, outlet],
    to: stream.to,
  };
  const before: SketchStream = { ...without(stream, 'via'), to: [unit.id, inlet] };
  const streams = [...sketch.streams.map((s) => (s === stream ? before : s)), onward];
  return {
    ok: true,
    sketch: {
      ...sketch,
      units: [...sketch.units, unit],
      streams: [...streams, ...hangingStreams([unit], streams, registry)],
    },
    label: `put ${unit.tag} into stream ${stream.number}`,
    unit: unit.id,
  };
}

const namesOf = (sketch: Sketch, ids: Iterable<UnitId>): string => {
  const tags = [...ids].flatMap((id) => unitOf(sketch, id)?.tag ?? []);
  return tags.length === 1 ? (tags[0] ?? '') : `${tags.length} units`;
};

/**
 * Moves units to places on the grid, by hand: when any of them gets another place, all are marked as placed so. Bends of
 * streams between moved units move with them when all move alike.
 */
export function moveUnits(sketch: Sketch, places: ReadonlyMap<UnitId, Place>): Edit {
  const shifts = new Map<UnitId, Place>();
  let next = sketch;
  for (const [id, place] of places) {
    const at = onGrid(place);
    const unit = unitOf(sketch, id);
    if (!unit) return refuse('edit/unknown-unit', word('unit', id));
    shifts.set(id, [at[0] - unit.at[0], at[1] - unit.at[1]]);
    next = withUnit(next, id, (u) => (u.at[0] === at[0] && u.at[1] === at[1] ? u : { ...u, at }));
  }
  if (next !== sketch)
    next = {
      ...next,
      units: next.units.map((u) => (places.has(u.id) && !u.byHand ? { ...u, byHand: true } : u)),
      streams: next.streams.map((s) => shifted(s, shifts)),
    };
  return { ok: true, sketch: next, label: `move ${namesOf(sketch, places.keys())}` };
}

function shifted(stream: SketchStream, shifts: ReadonlyMap<UnitId, Place>): SketchStream {
  const [a, b] = [stream.from, stream.to].map((end) => end && shifts.get(end[0]));
  if (!stream.via || !a || !b || a[0] !== b[0] || a[1] !== b[1]) return stream;
  if (a[0] === 0 && a[1] === 0) return stream;
  return { ...stream, via: stream.via.map(([x, y]): Place => [x + a[0], y + a[1]]) };
}

/** The lines at a unit find their own ways again: its ports are elsewhere. */
function straightened(sketch: Sketch, before: Sketch, id: UnitId): Sketch {
  if (sketch === before) return sketch;
  const streams = sketch.streams.map((s) =>
    s.via && (s.from?.[0] === id || s.to?.[0] === id) ? without(s, 'via') : s,
  );
  return streams.every((s, k) => s === sketch.streams[k]) ? sketch : { ...sketch, streams };
}

/** A quarter turn, clockwise. Bends moved by hand of the lines at the unit go. */
export function turnUnit(sketch: Sketch, id: UnitId): Edit {
  const unit = unitOf(sketch, id);
  if (!unit) return refuse('edit/unknown-unit', word('unit', id));
  const turn = (((unit.turn ?? 0) + 90) % 360) as 0 | 90 | 180 | 270;
  const next = withUnit(sketch, id, (u) => (turn === 0 ? without(u, 'turn') : { ...u, turn }));
  return { ok: true, sketch: straightened(next, sketch, id), label: `turn ${unit.tag}` };
}

/** Left to right. Bends moved by hand of the lines at the unit go. */
export function mirrorUnit(sketch: Sketch, id: UnitId): Edit {
  const unit = unitOf(sketch, id);
  if (!unit) return refuse('edit/unknown-unit', word('unit', id));
  const next = withUnit(sketch, id, (u) => (u.mirror ? without(u, 'mirror') : { ...u, mirror: true }));
  return { ok: true, sketch: straightened(next, sketch, id), label: `mirror ${unit.tag}` };
}

/**
 * Deletes units with the streams that leave them. Inlets of others lose their stream; outlets of others keep theirs, without
 * a target. Notes that stand on a deleted unit go too.
 */
export function deleteUnits(
  sketch: Sketch,
  ids: ReadonlySet<UnitId>,
  registry: Registry = KNOWN_KINDS,
): Edit {
  const label = `delete ${namesOf(sketch, ids)}`;
  const units = sketch.units.filter((u) => !ids.has(u.id));
  if (units.length === sketch.units.length) return { ok: true, sketch, label };
  const leaving = sketch.streams.filter((s) => (s.from ? ids.has(s.from[0]) : s.to && ids.has(s.to[0])));
  const left = dropStreams({ ...sketch, units }, new Set(leaving.map((s) => s.id)), registry);
  const streams = left.streams.map((s) => (s.to && ids.has(s.to[0]) ? without(s, 'to', 'via') : s));
  const deleted = new Set<string>([...ids, ...leaving.map((s) => s.id)]);
  const notes = left.notes.filter((n) => n.on === undefined || !deleted.has(n.on));
  return { ok: true, sketch: { ...left, streams, notes }, label };
}
