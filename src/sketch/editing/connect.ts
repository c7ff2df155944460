import type { Port, StreamId, UnitId } from '../../engine/ids';
import type { PortSpec } from '../../engine/units/types';
import { word } from '../findings';
import { nextStreamId, nextStreamNumber, streamAt, usedPorts } from '../naming';
import { isOneOf, isThere, KNOWN_KINDS, kindOf, nextPortName, portSpec, type Registry } from '../registry';
import type { Sketch, SketchStream } from '../types';
import {
  type Edit,
  type Edited,
  type Refused,
  refuse,
  streamOf,
  unitOf,
  without,
  withStream,
} from './edited';

/** A unit's port: its full name, or the stem of a numbered one ('in'), which means the next free. */
export type End = readonly [UnitId, Port];

interface Found {
  readonly ok: true;
  readonly unit: UnitId;
  readonly tag: string;
  readonly port: Port;
  readonly spec: PortSpec;
}

/** The port that is meant, with its description. */
function find(sketch: Sketch, [id, name]: End, registry: Registry): Found | Refused {
  const unit = unitOf(sketch, id);
  if (!unit) return refuse('edit/unknown-unit', word('unit', id));
  const kind = kindOf(registry, unit.kind);
  if (!kind) return refuse('edit/unknown-kind', word('kind', unit.kind), word('tag', unit.tag));
  const stem = kind.ports.find((p) => p.numbered !== undefined && p.name === name);
  const spec = stem ?? portSpec(kind, name);
  if (!spec) return refuse('edit/no-such-port', word('tag', unit.tag), word('port', name));
  const port = stem ? nextPortName(stem, usedPorts(sketch, id)) : name;
  return { ok: true, unit: id, tag: unit.tag, port, spec };
}

interface Joint {
  readonly ok: true;
  readonly from: Found;
  readonly to: Found;
  /** The stream without a target that already leaves the outlet. */
  readonly hanging: SketchStream | undefined;
  /** The stream without a source that already enters the inlet. */
  readonly waiting: SketchStream | undefined;
}

/** Both ends in their direction, whichever was pulled first. */
function joint(sketch: Sketch, a: End, b: End, registry: Registry): Joint | Refused {
  const [one, two] = [find(sketch, a, registry), find(sketch, b, registry)];
  if (!one.ok) return one;
  if (!two.ok) return two;
  if (one.spec.dir === two.spec.dir)
    return refuse(
      one.spec.dir === 'in' ? 'edit/two-inlets' : 'edit/two-outlets',
      word('from', one.tag),
      word('to', two.tag),
    );
  const [from, to] = one.spec.dir === 'out' ? [one, two] : [two, one];
  if (from.unit === to.unit) return refuse('edit/same-unit', word('tag', from.tag));
  const hanging = streamAt(sketch, from.unit, from.port);
  const waiting = streamAt(sketch, to.unit, to.port);
  if (hanging?.to) return taken(from, hanging);
  if (waiting?.from) return taken(to, waiting);
  for (const end of [from, to]) {
    const used = usedPorts(sketch, end.unit).filter((p) => isOneOf(end.spec, p));
    const most = end.spec.numbered?.max ?? 1;
    if (!used.includes(end.port) && used.length >= most)
      return refuse('edit/ports-used-up', word('tag', end.tag), word('port', end.spec.name));
  }
  return { ok: true, from, to, hanging, waiting };
}

const taken = ({ tag, port }: Found, stream: SketchStream): Refused =>
  refuse('edit/port-taken', word('tag', tag), word('port', port), word('stream', stream.number));

/** Why these two ports cannot be connected; undefined when they can. Either end may come first. */
export function whyNotConnect(
  sketch: Sketch,
  from: End,
  to: End,
  registry: Registry = KNOWN_KINDS,
): Refused | undefined {
  const found = joint(sketch, from, to, registry);
  return found.ok ? undefined : found;
}

/** Connects an outlet with an inlet; a stream that hangs at the outlet keeps its number. */
export function connect(sketch: Sketch, a: End, b: End, registry: Registry = KNOWN_KINDS): Edit {
  const found = joint(sketch, a, b, registry);
  if (!found.ok) return found;
  const { from, to, hanging, waiting } = found;
  const ends = { from: [from.unit, from.port], to: [to.unit, to.port] } as const;
  const label = `connect ${from.tag} and ${to.tag}`;
  // Two loose streams become one: the outlet's, whose number results already carry.
  const kept = hanging ?? waiting;
  const streams = sketch.streams.filter((s) => s === kept || (s !== hanging && s !== waiting));
  const stream: SketchStream = kept
    ? { ...without(kept, 'via'), ...ends }
    : { id: nextStreamId(sketch.streams), number: nextStreamNumber(sketch.streams), ...ends };
  const next = kept ? streams.map((s) => (s === kept ? stream : s)) : [...streams, stream];
  return { ok: true, sketch: { ...sketch, streams: next }, label, stream: stream.id };
}

/** Takes a stream's target away; it stays at its outlet. */
export function disconnect(sketch: Sketch, id: StreamId): Edit {
  const stream = streamOf(sketch, id);
  if (!stream) return refuse('edit/unknown-stream', word('stream', id));
  const label = `disconnect stream ${stream.number}`;
  if (!stream.to) return { ok: true, sketch, label };
  // A stream without a source would be left with no end at all.
  const next = withStream(sketch, id, (s) => (s.from ? without(s, 'to', 'via') : undefined));
  return { ok: true, sketch: next, label };
}

/** Whether an outlet of this kind must always have a stream. */
function isFixedOutlet(sketch: Sketch, [id, port]: End, registry: Registry): boolean {
  const unit = unitOf(sketch, id);
  const kind = unit && kindOf(registry, unit.kind);
  const spec = kind && portSpec(kind, port);
  if (!unit || !spec || spec.numbered) return false;
  return spec.when ? isThere(spec, unit.settings) : !spec.optional;
}

/**
 * Deletes a stream. At an outlet that always has one it stays, without a target, so that results close; such a stream
 * that has no target already cannot be deleted.
 */
export function deleteStream(sketch: Sketch, id: StreamId, registry: Registry = KNOWN_KINDS): Edit {
  const stream = streamOf(sketch, id);
  if (!stream) return refuse('edit/unknown-stream', word('stream', id));
  const label = `delete stream ${stream.number}`;
  if (stream.from && isFixedOutlet(sketch, stream.from, registry)) {
    if (!stream.to) return refuse('edit/outlet-needs-stream', word('stream', stream.number));
    return { ok: true, sketch: withStream(sketch, id, (s) => without(s, 'to', 'via')), label };
  }
  return { ok: true, sketch: dropStreams(sketch, new Set([id]), registry), label };
}

/** Without these streams, and without what settings say about the numbered outlets they left. */
export function dropStreams(sketch: Sketch, ids: ReadonlySet<StreamId>, registry: Registry): Sketch {
  if (ids.size === 0) return sketch;
  const gone = sketch.streams.filter((s) => ids.has(s.id));
  const units = sketch.units.map((unit) => {
    const ports = gone.flatMap((s) => (s.from?.[0] === unit.id ? [s.from[1]] : []));
    const kind = kindOf(registry, unit.kind);
    const maps = Object.entries(kind?.settings ?? {}).flatMap(([key, spec]) =>
      spec.is === 'map' && spec.keys === 'port' ? [key] : [],
    );
    let settings = unit.settings;
    for (const key of maps) {
      const map = settings[key];
      if (typeof map !== 'object' || map === null || Array.isArray(map)) continue;
      const left = Object.entries(map).filter(([port]) => !ports.includes(port));
      if (left.length < Object.keys(map).length) settings = { ...settings, [key]: Object.fromEntries(left) };
    }
    return settings === unit.settings ? unit : { ...unit, settings };
  });
  return {
    ...sketch,
    units: units.every((u, k) => u === sketch.units[k]) ? sketch.units : units,
    streams: sketch.streams.filter((s) => !ids.has(s.id)),
  };
}

/** Bends of a stream moved by hand; none means that the line finds its own way. */
export function bendStream(sketch: Sketch, id: StreamId, via: SketchStream['via']): Edit {
  const stream = streamOf(sketch, id);
  if (!stream) return refuse('edit/unknown-stream', word('stream', id));
  const next = withStream(sketch, id, (s) => {
    if (JSON.stringify(s.via ?? []) === JSON.stringify(via ?? [])) return s;
    return via && via.length > 0 ? { ...s, via } : without(s, 'via');
  });
  return { ok: true, sketch: next, label: `bend stream ${stream.number}` } satisfies Edited;
}
