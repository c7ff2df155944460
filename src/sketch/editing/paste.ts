import type { StreamId, UnitId } from '../../engine/ids';
import type { Finding } from '../../engine/outcome';
import { chemicalId } from '../compiling/air';
import { finding, word } from '../findings';
import { isObject, type JsonObject, own, sameJson } from '../json';
import { hangingStreams, nextNoteId, nextStreamId, nextStreamNumber, nextTag, nextUnitId } from '../naming';
import { KNOWN_KINDS, kindOf, type Registry } from '../registry';
import type { Json, Note, Sketch, SketchStream, SketchUnit } from '../types';
import { type Edit, without } from './edited';
import { copyPart, type Fragment } from './fragment';

type Place = readonly [number, number];
const shiftedBy =
  ([dx, dy]: Place) =>
  ([x, y]: Place): Place => [x + dx, y + dy];

const count = (n: number, word: string): string => `${n} ${word}${n === 1 ? '' : 's'}`;

/** "3 units", "3 units and 1 note", the tag of a single one. */
function whatOf(units: readonly SketchUnit[], notes: number): string {
  const parts = [
    ...(units.length === 1 ? [units[0]!.tag] : units.length > 1 ? [count(units.length, 'unit')] : []),
    ...(notes > 0 ? [count(notes, 'note')] : []),
  ];
  return parts.join(' and ');
}

/**
 * Puts a fragment on the sheet, moved by `shift`: new ids, the next free tags and numbers. What a setting says of a stream
 * that came along means the copied stream; of a stream that did not, it means that stream only in the sketch where it was
 * copied, as long as the stream is there. Elsewhere such a value is left out, so that the unit asks for it, and a note says so.
 * Chemicals that the settings name are added to the list.
 */
export function pasteFragment(
  sketch: Sketch,
  fragment: Fragment,
  shift: Place,
  registry: Registry = KNOWN_KINDS,
  verb = 'paste',
): Edit {
  const moved = shiftedBy(shift);
  const notes: Finding[] = [];
  // A unit and a stream may have the same id.
  const unitIds = new Map<UnitId, UnitId>();
  const streamIds = new Map<StreamId, StreamId>();
  const units: SketchUnit[] = [];
  for (const unit of fragment.units) {
    const all = { units: [...sketch.units, ...units] };
    const kind = kindOf(registry, unit.kind);
    const id = nextUnitId(all);
    const tag = kind ? nextTag(all.units, kind) : freeTag(all.units, unit.tag);
    unitIds.set(unit.id, id);
    units.push({ ...without(unit, 'byHand'), id, tag, at: moved(unit.at) });
  }
  const end = (ends: SketchStream['from']): SketchStream['from'] => {
    const unit = ends && unitIds.get(ends[0]);
    return ends && unit && [unit, ends[1]];
  };
  const streams: SketchStream[] = [];
  for (const { from, to, via, id: copied, number: _, ...rest } of fragment.streams) {
    const all = [...sketch.streams, ...streams];
    const [a, b] = [end(from), end(to)];
    const id = nextStreamId(all);
    streamIds.set(copied, id);
    streams.push({
      id,
      number: nextStreamNumber(all),
      ...rest,
      ...(a ? { from: a } : {}),
      ...(b ? { to: b } : {}),
      ...(via && a && b ? { via: via.map(moved) } : {}),
    });
  }
  const stays = new Set<string>(fragment.of === sketch.id ? sketch.streams.map((s) => s.id) : []);
  const settled = units.map((unit): SketchUnit => {
    const lost: string[] = [];
    const settings = referring(
      unit.settings,
      '',
      lost,
      (stream) => streamIds.get(stream) ?? (stays.has(stream) ? stream : undefined),
    );
    for (const path of lost)
      notes.push(finding('sketch/reference-lost', 'note', { unit: unit.id, path }, word('tag', unit.tag)));
    return settings === unit.settings ? unit : { ...unit, settings };
  });
  streams.push(...hangingStreams(settled, [...sketch.streams, ...streams], registry));
  const jotted: Note[] = [];
  for (const note of fragment.notes) {
    const id = nextNoteId([...sketch.notes, ...jotted]);
    const { on, at, ...rest } = note;
    const onto = unitIds.get(on as UnitId) ?? streamIds.get(on as StreamId);
    jotted.push({ ...rest, id, ...(onto ? { on: onto } : {}), ...(at ? { at: moved(at) } : {}) });
  }
  return {
    ok: true,
    sketch: {
      ...sketch,
      chemicals: [...sketch.chemicals, ...missingChemicals(sketch, fragment, notes)],
      units: [...sketch.units, ...settled],
      streams: [...sketch.streams, ...streams],
      notes: [...sketch.notes, ...jotted],
    },
    label: `${verb} ${whatOf(verb === 'paste' ? settled : fragment.units, jotted.length)}`,
    units: settled.map((unit) => unit.id),
    noteIds: jotted.filter((note) => note.at !== undefined).map((note) => note.id),
    notes,
  };
}

/** A copy beside the original, streams between the copied units kept. */
export function duplicateUnits(
  sketch: Sketch,
  units: ReadonlySet<UnitId>,
  shift: Place,
  noteIds: ReadonlySet<string> = new Set(),
  registry: Registry = KNOWN_KINDS,
): Edit {
  const part = copyPart(sketch, units, noteIds, registry);
  if (!part) return { ok: true, sketch, label: 'duplicate' };
  return pasteFragment(sketch, part, shift, registry, 'duplicate');
}

/** The tag of a kind that is not known, with the first number that makes it free. */
function freeTag(units: readonly SketchUnit[], tag: string): string {
  const taken = new Set(units.map((unit) => unit.tag));
  if (!taken.has(tag)) return tag;
  for (let k = 2; ; k += 1) if (!taken.has(`${tag}-${k}`)) return `${tag}-${k}`;
}

function missingChemicals(sketch: Sketch, fragment: Fragment, notes: Finding[]): Sketch['chemicals'] {
  const here = new Map(sketch.chemicals.map((chemical) => [chemicalId(chemical), chemical]));
  return fragment.chemicals.filter((chemical) => {
    const id = chemicalId(chemical);
    const known = here.get(id);
    if (known === undefined) return true;
    if (!sameJson(known as unknown as Json, chemical as unknown as Json))
      notes.push(finding('sketch/chemical-differs', 'caution', { path: 'chemicals' }, word('chemical', id)));
    return false;
  });
}

/**
 * Settings with every stream they name put through `to`. A value that names a stream for which there is none is left out;
 * its place goes to `lost`.
 */
function referring(
  settings: JsonObject,
  path: string,
  lost: string[],
  to: (stream: StreamId) => string | undefined,
): JsonObject {
  let same = true;
  const entries = Object.entries(settings).flatMap(([key, value]): [string, Json][] => {
    const here = path === '' ? key : `${path}.${key}`;
    const next = referringValue(value, here, lost, to);
    if (next !== value) same = false;
    return next === undefined ? [] : [[key, next]];
  });
  return same ? settings : Object.fromEntries(entries);
}

function referringValue(
  value: Json,
  path: string,
  lost: string[],
  to: (stream: StreamId) => string | undefined,
): Json | undefined {
  if (Array.isArray(value)) {
    const items = value as readonly Json[];
    const next = items.map((item, k) => referringValue(item, `${path}.${k}`, lost, to));
    if (next.every((item, k) => item === items[k])) return value;
    return next.filter((item): item is Json => item !== undefined);
  }
  if (!isObject(value)) return value;
  const of = own(value, 'of');
  const stream = isObject(of) ? own(of, 'stream') : undefined;
  if (typeof stream !== 'string') return referring(value, path, lost, to);
  const next = to(stream as StreamId);
  if (next === undefined) {
    lost.push(path);
    return undefined;
  }
  return next === stream ? value : { ...value, of: { ...(of as JsonObject), stream: next } };
}
