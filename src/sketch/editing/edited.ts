import type { StreamId, UnitId } from '../../engine/ids';
import type { Evidence, Finding } from '../../engine/outcome';
import type { Sketch, SketchStream, SketchUnit } from '../types';

/** Why an edit cannot be done; the sentences live in wording/. */
export const EDIT_REFUSALS = [
  'edit/unknown-unit',
  'edit/unknown-stream',
  'edit/unknown-kind',
  'edit/unknown-note',
  'edit/same-unit',
  'edit/two-inlets',
  'edit/two-outlets',
  'edit/no-such-port',
  'edit/port-taken',
  'edit/ports-used-up',
  'edit/no-inlet',
  'edit/no-outlet',
  'edit/nothing-to-part',
  'edit/nothing-to-join',
  'edit/outlet-needs-stream',
  'edit/empty-text',
  'edit/tag-taken',
  'edit/number-taken',
  'edit/no-such-setting',
  'edit/bad-path',
  'edit/unknown-tag',
  'edit/chemical-in-use',
  'edit/chemical-twice',
  'edit/nothing-to-normalise',
  'edit/same-chemical',
  'edit/not-a-number',
  'edit/bad-factor',
  'edit/nothing-to-scale',
] as const;

export type EditCode = (typeof EDIT_REFUSALS)[number];

/** An edit that cannot be done; its sentence stands in wording/, by the code. */
export interface Refused {
  readonly ok: false;
  readonly code: EditCode;
  readonly evidence: readonly Evidence[];
}

/** A new document with the name of the step for undo ("move V-101"). The same document when nothing changed. */
export interface Edited {
  readonly ok: true;
  readonly sketch: Sketch;
  readonly label: string;
  /** What was made, to be selected. */
  readonly unit?: UnitId;
  readonly stream?: StreamId;
  /** Several at once, and notes of the sheet. */
  readonly units?: readonly UnitId[];
  readonly noteIds?: readonly string[];
  readonly notes?: readonly Finding[];
}

export type Edit = Edited | Refused;

/** An edit that cannot be done, with its reason. */
export const refuse = (code: EditCode, ...evidence: readonly Evidence[]): Refused => ({
  ok: false,
  code,
  evidence,
});

/** The unit of an id; undefined where there is none. */
export const unitOf = (sketch: Pick<Sketch, 'units'>, id: UnitId): SketchUnit | undefined =>
  sketch.units.find((u) => u.id === id);

/** The stream of an id; undefined where there is none. */
export const streamOf = (sketch: Pick<Sketch, 'streams'>, id: StreamId): SketchStream | undefined =>
  sketch.streams.find((s) => s.id === id);

/** The sketch with one unit replaced; identical when the unit is. */
export function withUnit(sketch: Sketch, id: UnitId, change: (unit: SketchUnit) => SketchUnit): Sketch {
  let same = true;
  const units = sketch.units.map((unit) => {
    const next = unit.id === id ? change(unit) : unit;
    if (next !== unit) same = false;
    return next;
  });
  return same ? sketch : { ...sketch, units };
}

/** The sketch with one stream replaced, or taken out (undefined); identical when the stream is. */
export function withStream(
  sketch: Sketch,
  id: StreamId,
  change: (stream: SketchStream) => SketchStream | undefined,
): Sketch {
  let same = true;
  const streams = sketch.streams.flatMap((stream) => {
    const next = stream.id === id ? change(stream) : stream;
    if (next !== stream) same = false;
    return next ? [next] : [];
  });
  return same ? sketch : { ...sketch, streams };
}

/** A record without some of its optional fields. */
export function without<T extends object, K extends keyof T>(record: T, ...keys: readonly K[]): Omit<T, K> {
  const copy = { ...record };
  for (const key of keys) delete copy[key];
  return copy;
}

/** The record with an optional text, or without it when the text is blank; identical when nothing changes. */
export function withText<T extends { readonly [P in K]?: string | undefined }, K extends keyof T & string>(
  record: T,
  key: K,
  text: string,
): T {
  const trimmed = text.trim();
  if ((record[key] ?? '') === trimmed) return record;
  const copy: T = { ...record };
  if (trimmed === '') delete copy[key];
  else (copy as Record<K, string>)[key] = trimmed;
  return copy;
}
