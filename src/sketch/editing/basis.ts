import type { DesignBasis, DocumentChoices, Hold, Revision } from '../documentTypes';
import { sameJson } from '../json';
import type { Json, Sketch } from '../types';
import { type Edit, without } from './edited';

type Part = 'revisions' | 'designBasis' | 'holds' | 'documents';

/** The sketch with one part replaced; an empty one is taken away, an equal one changes nothing. */
function put<K extends Part>(sketch: Sketch, key: K, value: NonNullable<Sketch[K]>, label: string): Edit {
  const isEmpty = Object.keys(value).length === 0;
  const before = sketch[key] as Json | undefined;
  if (isEmpty ? before === undefined : before !== undefined && sameJson(before, value as unknown as Json))
    return { ok: true, sketch, label };
  const next = isEmpty ? (without(sketch, key) as Sketch) : { ...sketch, [key]: value };
  return { ok: true, sketch: next, label };
}

/** A record without what is undefined, blank or an empty list. */
function trimmed<T extends object>(record: Change<T>): T {
  const kept = Object.entries(record).filter(
    ([, v]) => v !== undefined && v !== '' && !(Array.isArray(v) && v.length === 0),
  );
  return Object.fromEntries(kept) as T;
}

/** Parts to change; undefined or empty takes one away. */
type Change<T> = { readonly [K in keyof T]?: T[K] | undefined };

/** The revision table, newest first. */
export const setRevisions = (sketch: Sketch, revisions: readonly Revision[]): Edit =>
  put(sketch, 'revisions', revisions.map(trimmed), 'revision table');

/** Parts of the design basis; an empty part is taken away. */
export const setDesignBasis = (sketch: Sketch, change: Change<DesignBasis>): Edit =>
  put(
    sketch,
    'designBasis',
    trimmed({
      ...sketch.designBasis,
      ...change,
      ...(change.cases ? { cases: change.cases.map(trimmed) } : {}),
      ...(change.requirements ? { requirements: change.requirements.map(trimmed) } : {}),
      ...(change.utilities ? { utilities: change.utilities.map(trimmed) } : {}),
    }),
    `design basis: ${Object.keys(change).join(', ')}`,
  );

/** The list of HOLDs; an empty one is taken away. */
export const setHolds = (sketch: Sketch, holds: readonly Hold[]): Edit =>
  put(sketch, 'holds', holds.map(trimmed), 'holds');

/** What the documents show. */
export const setDocuments = (sketch: Sketch, change: Change<DocumentChoices>): Edit =>
  put(sketch, 'documents', trimmed({ ...sketch.documents, ...change }), 'what the documents show');
