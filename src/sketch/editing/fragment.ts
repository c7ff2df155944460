import type { UnitId } from '../../engine/ids';
import { chemicalId } from '../compiling/air';
import { readJson } from '../file/text';
import { FORMAT } from '../fresh';
import { isObject, own } from '../json';
import { openSketch } from '../read';
import { KNOWN_KINDS, kindOf, type Registry } from '../registry';
import type { Note, Sketch, SketchChemical, SketchStream, SketchUnit } from '../types';
import { without } from './edited';
import { namesAny, topOf } from './named';

/** What a fragment's text says it is. */
export const FRAGMENT_FORMAT = 'splitwright.fragment';

/** A part of a sketch on its way through the clipboard: units, what runs between them, what their settings name. */
export interface Fragment {
  readonly format: typeof FRAGMENT_FORMAT;
  readonly version: 1;
  /** Id of the sketch it was copied from: references to its streams still mean something there. */
  readonly of: string;
  /** The chemicals that the settings name. */
  readonly chemicals: readonly SketchChemical[];
  readonly units: readonly SketchUnit[];
  /** Both ends inside; one that leads outside comes along with a loose end. */
  readonly streams: readonly SketchStream[];
  readonly notes: readonly Note[];
}

/** Units with the streams between them and the notes on them, and notes of the sheet; undefined when nothing is chosen. */
export function copyPart(
  sketch: Sketch,
  units: ReadonlySet<UnitId>,
  notes: ReadonlySet<string> = new Set(),
  registry: Registry = KNOWN_KINDS,
): Fragment | undefined {
  const chosen = sketch.units.filter((unit) => units.has(unit.id));
  const jotted = sketch.notes.filter(
    (note) => notes.has(note.id) || (note.on !== undefined && units.has(note.on as UnitId)),
  );
  if (chosen.length + jotted.length === 0) return undefined;
  const streams = sketch.streams.flatMap((stream): SketchStream[] => {
    if (!stream.from || !units.has(stream.from[0])) return [];
    return [stream.to && units.has(stream.to[0]) ? stream : without(stream, 'to', 'via')];
  });
  return {
    format: FRAGMENT_FORMAT,
    version: 1,
    of: sketch.id,
    chemicals: sketch.chemicals.filter((chemical) => {
      const id = new Set([chemicalId(chemical)]);
      return chosen.some((unit) => namesAny(id, unit.settings, topOf(kindOf(registry, unit.kind))));
    }),
    units: chosen,
    streams,
    notes: jotted,
  };
}

/** The fragment as text for the clipboard; readFragment reads it. */
export const fragmentText = (fragment: Fragment): string => JSON.stringify(fragment, null, 1);

/**
 * A fragment from text that may come from anywhere; undefined when it is none, or one that does not hold together. It is
 * judged like a file: the same checks of shapes, ends and names.
 */
export function readFragment(text: string, registry: Registry = KNOWN_KINDS): Fragment | undefined {
  const read = readJson(text);
  if (!read.ok || !isObject(read.value) || own(read.value, 'format') !== FRAGMENT_FORMAT) return undefined;
  const { chemicals, units, streams, notes, of, version } = read.value;
  if (version !== 1) return undefined;
  const opened = openSketch(
    { format: FORMAT, version, model: { kind: 'peng-robinson' }, chemicals, units, streams, notes },
    { registry, newId: () => '' },
  );
  if (!opened.ok) return undefined;
  const { sketch } = opened;
  return {
    format: FRAGMENT_FORMAT,
    version: 1,
    of: typeof of === 'string' ? of : '',
    chemicals: sketch.chemicals,
    units: sketch.units,
    streams: sketch.streams,
    notes: sketch.notes,
  };
}
