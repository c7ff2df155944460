import { GRID } from '../drawing/tokens';
import type { Point } from '../drawing/types';
import type { StreamId } from '../engine/ids';
import { bendStream } from '../store/commands';
import type { Stores } from '../store/react';
import { bendAxis, bent, canBend } from './bends';
import { tryEdit } from './edit';
import { sheetOf } from './handle';
import { stepOf } from './moving';
import { follow } from './pointer';
import { AT_REST, type Bending, type SheetStore } from './sheetStore';
import type { Arrow } from './walk';

/** Nearer to the piece's own place than this, or to a neighbour's line, it snaps there [px]. */
const snapped = (by: number): number => Math.round(by / GRID) * GRID;

function show(sheet: SheetStore, bending: Bending): void {
  const bends =
    bending.by === 0 ? null : new Map([[bending.stream, bent(bending.points, bending.piece, bending.by)]]);
  sheet.setState({ bending, bends });
}

/** The line keeps its bends as they are now: one edit. */
export function endBend(stores: Stores, sheet: SheetStore): void {
  const { bending, bends } = sheet.getState();
  const via = bending && bends?.get(bending.stream);
  if (bending && via) tryEdit(stores, (sketch) => bendStream(sketch, bending.stream, via));
  sheet.setState(AT_REST);
}

/** Takes a straight piece of a line by the pointer; it moves across its own direction, on the grid. */
export function bendByPointer(
  stores: Stores,
  sheet: SheetStore,
  stream: StreamId,
  piece: number,
  event: React.PointerEvent,
): void {
  const points = sheet.getState().lines.get(stream)?.points;
  const start = sheetOf(stores)?.toSheet(event.clientX, event.clientY);
  if (event.button !== 0 || !points || !start || !stores.sketch.getState().writable) return;
  event.preventDefault();
  event.stopPropagation();
  const axis = bendAxis(points, piece);
  show(sheet, { stream, piece, points, by: 0, byKeys: false });
  follow(
    ({ clientX, clientY }) => {
      const at = sheetOf(stores)?.toSheet(clientX, clientY);
      if (at) show(sheet, { stream, piece, points, by: snapped(at[axis] - start[axis]), byKeys: false });
    },
    (kept) => {
      if (kept) endBend(stores, sheet);
      else sheet.setState(AT_REST);
    },
  );
}

/** Pieces of a line that can be moved. */
export const bendable = (points: readonly Point[]): readonly number[] =>
  points.slice(1).flatMap((_, k) => (canBend(points, k) ? [k] : []));

/** Starts moving the pieces of the selected stream's line by keys; pressed again, the next piece. */
export function bendByKeys(stores: Stores): void {
  const sheet = sheetOf(stores)?.store;
  if (!sheet) return;
  const { bending } = sheet.getState();
  if (bending?.byKeys) {
    nextPiece(stores, sheet, 1);
    return;
  }
  const stream = stores.session.getState().streams.at(-1);
  const points = stream && sheet.getState().lines.get(stream)?.points;
  if (!stream || !points) return;
  const pieces = bendable(points);
  // The piece to begin with: in the middle of the line, where most bends are wanted.
  const piece = pieces[Math.floor((pieces.length - 1) / 2)];
  if (piece === undefined) {
    stores.session.setState({ spoken: 'This line is too short for a bend.' });
    return;
  }
  show(sheet, { stream, piece, points, by: 0, byKeys: true });
  stores.session.setState({
    spoken:
      'Bending. Arrows across the piece move it, arrows along it choose another piece; Enter leaves it there, Esc puts it back.',
  });
}

function nextPiece(stores: Stores, sheet: SheetStore, step: number): void {
  const { bending, lines } = sheet.getState();
  if (!bending) return;
  const { stream } = bending;
  endBend(stores, sheet);
  const points = sheet.getState().lines.get(stream)?.points ?? lines.get(stream)?.points;
  if (!points) return;
  const pieces = bendable(points);
  const now = pieces.findIndex((piece) => piece >= bending.piece);
  const at = pieces[(Math.max(0, now) + step + pieces.length) % pieces.length];
  if (at === undefined) return;
  show(sheet, { stream, piece: at, points, by: 0, byKeys: true });
  stores.session.setState({ spoken: `Piece ${pieces.indexOf(at) + 1} of ${pieces.length}` });
}

/** An arrow while a line is bent by keys: across the piece it moves it, along the piece it chooses the one before or after. */
export function bendArrow(stores: Stores, sheet: SheetStore, direction: Arrow, steps: number): void {
  const { bending } = sheet.getState();
  if (!bending) return;
  const { points, piece } = bending;
  const axis = bendAxis(points, piece);
  const by = stepOf(direction, steps)[axis];
  if (by !== 0) {
    show(sheet, { ...bending, by: bending.by + by });
    return;
  }
  const [a, b] = [points[piece]!, points[piece + 1]!];
  const along = (1 - axis) as 0 | 1;
  const forward = Math.sign(b[along] - a[along]) === Math.sign(stepOf(direction, 1)[along]);
  nextPiece(stores, sheet, forward ? 1 : -1);
}

/** Takes all bends off the selected lines, which find their own ways again: one edit. */
export function straighten(stores: Stores): void {
  const { streams } = stores.session.getState();
  tryEdit(stores, (sketch) => {
    const chosen = sketch.streams.filter((s) => s.via && streams.includes(s.id));
    const next = chosen.reduce((now, { id }) => {
      const edit = bendStream(now, id, undefined);
      return edit.ok ? edit.sketch : now;
    }, sketch);
    const what = chosen.length === 1 ? `stream ${chosen[0]!.number}` : `${chosen.length} streams`;
    return { ok: true, sketch: next, label: `straighten ${what}` };
  });
}
