import { word } from '../findings';
import { sameJson } from '../json';
import { nextNoteId } from '../naming';
import type { Display, Json, ModelChoice, Note, Quantity, Sketch, TitleBlock } from '../types';
import { type Edit, refuse, withText } from './edited';

const changed = <K extends keyof Sketch>(sketch: Sketch, key: K, value: Sketch[K]): Sketch =>
  sketch[key] === value || sameJson(sketch[key] as unknown as Json, value as unknown as Json)
    ? sketch
    : { ...sketch, [key]: value };

/** A line of the title block; blank takes it away. */
export const setTitle = (sketch: Sketch, key: keyof TitleBlock, text: string): Edit => ({
  ok: true,
  sketch: changed(sketch, 'title', withText(sketch.title, key, text)),
  label: `title block: ${key}`,
});

/** A value of the site, as typed; blank returns to the assumption. */
export const setSite = (sketch: Sketch, key: keyof Sketch['site'], text: string): Edit => ({
  ok: true,
  sketch: changed(
    sketch,
    'site',
    withText(sketch.site as { readonly [K in keyof Sketch['site']]?: string }, key, text),
  ),
  label: `site: ${key}`,
});

/** Choices that may be undefined: that takes them away. */
type Choices<T> = { readonly [K in keyof T]?: T[K] | undefined };

function merged<T extends object>(record: T, choices: Choices<T>): T {
  const entries = new Map<string, unknown>(Object.entries(record));
  for (const [key, value] of Object.entries(choices))
    if (value === undefined) entries.delete(key);
    else entries.set(key, value);
  return Object.fromEntries(entries) as T;
}

/** Choices of the thermodynamic model; undefined returns one to its assumption. */
export const setModel = (sketch: Sketch, choices: Choices<ModelChoice>): Edit => ({
  ok: true,
  sketch: changed(
    sketch,
    'model',
    merged(sketch.model, { ...choices, kind: choices.kind ?? sketch.model.kind }),
  ),
  label: 'thermodynamic model',
});

/** What is shown, and in which measures. */
export const setDisplay = (sketch: Sketch, choices: Choices<Display>): Edit => ({
  ok: true,
  sketch: changed(
    sketch,
    'display',
    merged(sketch.display, {
      ...choices,
      set: choices.set ?? sketch.display.set,
      labels: choices.labels ?? sketch.display.labels,
    }),
  ),
  label: choices.set !== undefined ? `measures: ${choices.set}` : 'what the sheet shows',
});

/** A threshold of a limit by its code; undefined returns it to the usual one. */
export function setLimit(sketch: Sketch, code: string, value: Quantity | undefined): Edit {
  const limits = merged<Readonly<Record<string, Quantity>>>(sketch.limits ?? {}, { [code]: value });
  if (sameJson(limits as Json, (sketch.limits ?? {}) as Json))
    return { ok: true, sketch, label: `limit ${code}` };
  const { limits: _, ...rest } = sketch;
  const next = Object.keys(limits).length === 0 ? rest : { ...rest, limits };
  return { ok: true, sketch: next, label: `limit ${code}` };
}

type NotePlace = Pick<Note, 'at' | 'on' | 'kind' | 'size'>;
const noteWord = (note: Pick<Note, 'kind'> | undefined): string =>
  note?.kind === 'area' ? 'an area' : 'a note';

/** A note or an area, with the next free id; blank text is refused (edit/empty-text). */
export function addNote(sketch: Sketch, text: string, where: NotePlace = {}): Edit {
  if (text.trim() === '') return refuse('edit/empty-text');
  const note: Note = { id: nextNoteId(sketch.notes), text, ...where };
  return {
    ok: true,
    sketch: { ...sketch, notes: [...sketch.notes, note] },
    label: `add ${noteWord(note)}`,
    noteIds: [note.id],
  };
}

/** A note's text, place or size. */
export function changeNote(
  sketch: Sketch,
  id: string,
  change: { readonly text?: string } & Omit<NotePlace, 'on' | 'kind'>,
): Edit {
  const note = sketch.notes.find((n) => n.id === id);
  if (!note) return refuse('edit/unknown-note', word('note', id));
  if (change.text !== undefined && change.text.trim() === '') return refuse('edit/empty-text');
  const notes = sketch.notes.map((n) => (n.id === id ? { ...n, ...change } : n));
  return { ok: true, sketch: changed(sketch, 'notes', notes), label: `change ${noteWord(note)}` };
}

/** Moves notes and areas to other places. */
export function moveNotes(sketch: Sketch, places: ReadonlyMap<string, readonly [number, number]>): Edit {
  const notes = sketch.notes.map((n) => {
    const at = places.get(n.id);
    return at ? { ...n, at } : n;
  });
  const [first] = sketch.notes.filter((n) => places.has(n.id));
  const label = places.size === 1 ? `move ${noteWord(first)}` : `move ${places.size} notes`;
  return { ok: true, sketch: changed(sketch, 'notes', notes), label };
}

/** The sketch without a note; without effect where there is none of that id. */
export const deleteNote = (sketch: Sketch, id: string): Edit => ({
  ok: true,
  sketch: changed(
    sketch,
    'notes',
    sketch.notes.filter((n) => n.id !== id),
  ),
  label: `delete ${noteWord(sketch.notes.find((n) => n.id === id))}`,
});
