import { hull } from '../drawing/boxes';
import { GRID } from '../drawing/tokens';
import type { Point } from '../drawing/types';
import type { Note } from '../sketch/types';
import { addNote, changeNote } from '../store/commands';
import type { Stores } from '../store/react';
import { tryEdit } from './edit';
import { sheetOf } from './handle';
import { endMove, LEAST_SIZE } from './moving';
import { noteRoom } from './noteRoom';
import { follow } from './pointer';
import type { HeldNote, SheetStore } from './sheetStore';

/** Room between an area's border and what it is put around [px]. */
const AROUND = 40;
const AREA: Point = [320, 200];

const onGrid = (value: number): number => Math.round(value / GRID) * GRID;

/** Puts a note where it stands on nothing, or an area around what is selected, and has its text typed. */
export function putNote(stores: Stores, kind: NonNullable<Note['kind']>): void {
  const handle = sheetOf(stores);
  if (!handle) return;
  const chosen = new Set(stores.session.getState().units);
  const around = hull(
    handle.store
      .getState()
      .scene.units.filter((shape) => chosen.has(shape.unit))
      .map((shape) => shape.box),
  );
  const [mx, my] = handle.middle();
  const box =
    kind === 'area' && around
      ? { x: around.x - AROUND, y: around.y - AROUND, w: around.w + 2 * AROUND, h: around.h + 2 * AROUND }
      : { x: mx - AREA[0] / 2, y: my - AREA[1] / 2, w: AREA[0], h: AREA[1] };
  const at: Point =
    kind === 'area' ? [onGrid(box.x), onGrid(box.y)] : noteRoom(handle.store.getState().scene, [mx, my]);
  const size = kind === 'area' ? ([onGrid(box.w), onGrid(box.h)] as const) : undefined;
  const { sketch } = stores.sketch.getState();
  const made = addNote(sketch, kind === 'area' ? 'Battery limit' : 'Note', {
    kind,
    at,
    ...(size ? { size } : {}),
  });
  const id = made.ok ? made.noteIds?.[0] : undefined;
  if (!made.ok || id === undefined) return;
  // Putting it there and typing its text are one step: it ends with the typing.
  stores.sketch.begin(made.label);
  stores.sketch.change(() => made.sketch);
  stores.session.select([]);
  stores.session.setState({ notes: [id], spoken: kind === 'area' ? 'Area added' : 'Note added' });
  handle.store.setState({ writing: id });
  if (kind === 'text') handle.reveal(at);
}

/** What was typed becomes the note's text; a note that says nothing stays as it was. Null: Esc, a new note goes again. */
export function endWriting(stores: Stores, sheet: SheetStore, id: string, text: string | null): void {
  if (sheet.getState().writing !== id) return;
  sheet.setState({ writing: null });
  const { gesture, sketch } = stores.sketch.getState();
  const words = text?.trim() ?? '';
  if (gesture) {
    const notes = sketch.notes.map((note) => (note.id === id && words ? { ...note, text: words } : note));
    if (text === null) stores.sketch.cancel();
    else {
      stores.sketch.change((before) => ({ ...before, notes }));
      stores.sketch.commit();
    }
    return;
  }
  if (words === '') return;
  tryEdit(stores, (now) => changeNote(now, id, { text: words }));
}

/** A note or area under the pointer: it moves, or its lower right corner does; on the grid, one edit. */
export function holdNote(
  stores: Stores,
  sheet: SheetStore,
  note: Note & HeldNote,
  what: 'move' | 'size',
  event: React.PointerEvent,
): void {
  const start = sheetOf(stores)?.toSheet(event.clientX, event.clientY);
  if (event.button !== 0 || !start || !stores.sketch.getState().writable) return;
  event.stopPropagation();
  follow(
    ({ clientX, clientY }) => {
      const at = sheetOf(stores)?.toSheet(clientX, clientY);
      if (!at) return;
      const [dx, dy] = [onGrid(at[0] - start[0]), onGrid(at[1] - start[1])];
      const [w, h] = note.size ?? LEAST_SIZE;
      const held: HeldNote =
        what === 'move'
          ? { ...(note.size ? { size: note.size } : {}), at: [note.at[0] + dx, note.at[1] + dy] }
          : { at: note.at, size: [Math.max(LEAST_SIZE[0], w + dx), Math.max(LEAST_SIZE[1], h + dy)] };
      sheet.setState({ heldNotes: new Map([[note.id, held]]) });
    },
    (kept) => {
      if (kept) endMove(stores, sheet);
      else sheet.setState({ heldNotes: null });
    },
  );
}
