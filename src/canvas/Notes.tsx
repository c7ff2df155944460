import { memo, useLayoutEffect, useRef } from 'react';
import { useShallow } from 'zustand/react/shallow';
import { standingNotes } from '../drawing/notes';
import type { Point } from '../drawing/types';
import type { Note } from '../sketch/types';
import { useSession, useSketch, useStores } from '../store/react';
import { adds } from './choose';
import { endKeys } from './keys';
import { endWriting, holdNote } from './noteEdits';
import { drawSteady, drawText } from './Shapes';
import { type HeldNote, useSheet, useSheetStore } from './sheetStore';
import { useField } from './watch';

/** Notes or areas of the sheet: areas lie behind units and lines, notes before them. */
export const Notes = memo(function Notes({ kind }: { readonly kind: NonNullable<Note['kind']> }) {
  const notes = useSketch(
    useShallow((state) =>
      state.sketch.notes.filter((note) => note.at !== undefined && (note.kind ?? 'text') === kind),
    ),
  );
  return (
    <div className="notes" data-kind={kind}>
      {notes.map((note) => (
        <OneNote key={note.id} note={note} />
      ))}
    </div>
  );
});

const OneNote = memo(function OneNote({ note }: { readonly note: Note }) {
  const stores = useStores();
  const sheet = useSheetStore();
  const held = useSheet((state) => state.heldNotes?.get(note.id));
  const selected = useSession((state) => state.notes.includes(note.id));
  const writing = useSheet((state) => state.writing === note.id);
  const writable = useSketch((state) => state.writable);
  const standing = { ...note, ...held } as Note & HeldNote;
  const drawn = useField('scene', ({ notes }) => notes.find(({ id }) => id === note.id));
  const [shape] = held || !drawn ? standingNotes([standing]) : [drawn];
  if (!shape) return null;
  const { box, texts } = shape;
  const hold: Point = held || !drawn ? [box.x, box.y] : drawn.hold;
  const choose = (event: React.PointerEvent | React.MouseEvent): void => {
    endKeys(stores, sheet);
    const { notes } = stores.session.getState();
    if (!adds(event)) {
      stores.session.select([]);
      stores.session.setState({ notes: [note.id] });
    } else
      stores.session.setState({
        notes: notes.includes(note.id) ? notes.filter((id) => id !== note.id) : [...notes, note.id],
      });
  };
  const grab = (what: 'move' | 'size') => (event: React.PointerEvent) => {
    if (event.button === 0) (event.currentTarget as HTMLElement).focus({ preventScroll: true });
    holdNote(stores, sheet, standing, what, event);
  };
  const isArea = shape.kind === 'area';
  return (
    <div
      className="note nodrag nopan"
      data-note={note.id}
      data-kind={shape.kind}
      data-selected={selected || undefined}
      style={{ transform: `translate(${box.x}px, ${box.y}px)`, width: box.w, height: box.h }}
    >
      <svg aria-hidden="true" style={{ left: -box.x, top: -box.y }}>
        {drawSteady(
          hold,
          drawn?.upTo ?? 1,
          texts.map((text) => drawText(text)),
        )}
      </svg>
      {/* An area is taken by its name and its border; what stands in it stays free for the hand. */}
      <button
        type="button"
        className="note-body"
        aria-label={`${isArea ? 'Area' : 'Note'}: ${note.text}`}
        aria-pressed={selected}
        data-focus-note={note.id}
        onPointerDown={grab('move')}
        onClick={choose}
        onFocus={() => {
          if (!stores.session.getState().notes.includes(note.id) && sheet.getState().writing === null) {
            stores.session.select([]);
            stores.session.setState({ notes: [note.id] });
          }
        }}
        onDoubleClick={() => writable && sheet.setState({ writing: note.id })}
      />
      {selected && writable ? (
        <div className="note-corner" title="Pull to another size" onPointerDown={grab('size')} />
      ) : null}
      {writing ? <Writing note={note} /> : null}
    </div>
  );
});

/** The text while it is typed: Ctrl+Enter or leaving the field keeps it, Esc leaves it as it was. */
function Writing({ note }: { readonly note: Note }) {
  const stores = useStores();
  const sheet = useSheetStore();
  const field = useRef<HTMLTextAreaElement>(null);
  useLayoutEffect(() => {
    field.current?.focus({ preventScroll: true });
    field.current?.select();
  }, []);
  const end = (text: string | null): void => {
    endWriting(stores, sheet, note.id, text);
    document.querySelector<HTMLElement>(`[data-focus-note="${note.id}"]`)?.focus({ preventScroll: true });
  };
  return (
    <textarea
      ref={field}
      className="note-text nowheel"
      aria-label={note.kind === 'area' ? 'Name of the area' : 'Text of the note'}
      defaultValue={note.text}
      rows={note.kind === 'area' ? 1 : 3}
      onBlur={(event) => endWriting(stores, sheet, note.id, event.currentTarget.value)}
      onKeyDown={(event) => {
        if (event.key === 'Escape') end(null);
        else if (event.key === 'Enter' && (note.kind === 'area' || event.ctrlKey || event.metaKey))
          end(event.currentTarget.value);
        else return;
        event.preventDefault();
        event.stopPropagation();
      }}
    />
  );
}
