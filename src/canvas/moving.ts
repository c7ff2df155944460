import { GRID } from '../drawing/tokens';
import type { Point } from '../drawing/types';
import type { UnitId } from '../engine/ids';
import type { Sketch } from '../sketch/types';
import { bendStream, changeNote, type Edit, moveNotes, moveUnits } from '../store/commands';
import type { Stores } from '../store/react';
import { bendsAfter } from './bends';
import { together, tryEdit } from './edit';
import { guidePath, guidesOf } from './guides';
import { sheetOf } from './handle';
import { AT_REST, type HeldNote, type SheetState, type SheetStore } from './sheetStore';
import type { Arrow } from './walk';

/** An area or a note gets no smaller than this [px]. */
export const LEAST_SIZE: Point = [48, 24];

const STEP: Readonly<Record<Arrow, Point>> = { left: [-1, 0], right: [1, 0], up: [0, -1], down: [0, 1] };
export const stepOf = (arrow: Arrow, steps: number): Point => [
  STEP[arrow][0] * GRID * steps,
  STEP[arrow][1] * GRID * steps,
];

// Lines as they were when a move by keys began: bends follow from there, not from step to step.
const before = new WeakMap<SheetStore, SheetState['lines']>();

/** Starts moving the selected units and notes by keys; pressed again, or with Enter, they stay where they are. */
export function moveByKeys(stores: Stores): void {
  const sheet = sheetOf(stores)?.store;
  if (!sheet) return;
  if (sheet.getState().movingByKeys) {
    endMove(stores, sheet);
    return;
  }
  const { sketch } = stores.sketch.getState();
  const { units, notes } = stores.session.getState();
  const moved = new Map<UnitId, Point>(
    sketch.units.filter((unit) => units.includes(unit.id)).map((unit) => [unit.id, unit.at]),
  );
  const heldNotes = new Map<string, HeldNote>(
    sketch.notes.flatMap(({ id, at, size }): [string, HeldNote][] =>
      at && notes.includes(id) ? [[id, size ? { at, size } : { at }]] : [],
    ),
  );
  if (moved.size + heldNotes.size === 0) return;
  before.set(sheet, sheet.getState().lines);
  sheet.setState({ moved, heldNotes: heldNotes.size > 0 ? heldNotes : null, movingByKeys: true });
  const resizes = heldNotes.size > 0 && moved.size === 0 ? ' Alt and arrows change the size.' : '';
  stores.session.setState({
    spoken: `Moving. Arrows move by one step of the grid, Enter leaves it there, Esc puts it back.${resizes}`,
  });
}

/** One or several steps of the grid, while units and notes are moved by keys. */
export function nudge(stores: Stores, sheet: SheetStore, direction: Arrow, steps: number): void {
  const { moved, heldNotes } = sheet.getState();
  const [dx, dy] = stepOf(direction, steps);
  const { sketch } = stores.sketch.getState();
  const by = ([x, y]: Point): Point => [x + dx, y + dy];
  const next = moved && new Map([...moved].map(([id, at]): [UnitId, Point] => [id, by(at)]));
  sheet.setState({
    moved: next,
    bends: next && bendsAfter(sketch, before.get(sheet) ?? sheet.getState().lines, next),
    heldNotes: heldNotes && new Map([...heldNotes].map(([id, note]) => [id, { ...note, at: by(note.at) }])),
  });
  // Where it stands now, what is it in line with?
  const [first] = next ?? [];
  const start = first && sketch.units.find((unit) => unit.id === first[0])?.at;
  if (!next || !first || !start) return;
  const guides = guidesOf(sheet.getState().scene.units, sketch.streams, new Set(next.keys()));
  sheet.setState({ guide: guidePath(guides, [first[1][0] - start[0], first[1][1] - start[1]]) });
}

/** Notes and areas that are moved by keys become wider, narrower, higher or lower. */
export function resizeByKeys(sheet: SheetStore, direction: Arrow): void {
  const { heldNotes, movingByKeys } = sheet.getState();
  if (!movingByKeys || !heldNotes) return;
  const [dx, dy] = stepOf(direction, 1);
  sheet.setState({
    heldNotes: new Map(
      [...heldNotes].map(([id, note]) => {
        const [w, h] = note.size ?? [160, 48];
        return [id, { ...note, size: [Math.max(LEAST_SIZE[0], w + dx), Math.max(LEAST_SIZE[1], h + dy)] }];
      }),
    ),
  });
}

/** Units and notes stay where a drag or keys brought them: one edit. */
export function endMove(stores: Stores, sheet: SheetStore): void {
  const { moved, bends, heldNotes } = sheet.getState();
  if (moved || heldNotes) tryEdit(stores, (sketch) => placed(sketch, moved, bends, heldNotes));
  sheet.setState(AT_REST);
}

function placed(
  sketch: Sketch,
  moved: SheetState['moved'],
  bends: SheetState['bends'],
  heldNotes: SheetState['heldNotes'],
): Edit {
  const notes = new Map([...(heldNotes ?? [])].map(([id, { at }]) => [id, at]));
  const resized = [...(heldNotes ?? [])].flatMap(([id, { size }]) => {
    const was = sketch.notes.find((note) => note.id === id)?.size;
    return size && (was?.[0] !== size[0] || was[1] !== size[1]) ? [[id, size] as const] : [];
  });
  const edits = [
    ...(moved && moved.size > 0 ? [(now: Sketch) => moveUnits(now, moved)] : []),
    ...[...(bends ?? [])].map(
      ([id, via]) =>
        (now: Sketch) =>
          bendStream(now, id, via),
    ),
    ...(notes.size > 0 ? [(now: Sketch) => moveNotes(now, notes)] : []),
    ...resized.map(
      ([id, size]) =>
        (now: Sketch) =>
          changeNote(now, id, { size }),
    ),
  ];
  const [first, ...rest] = edits;
  return first ? together(sketch, first(sketch), ...rest) : { ok: true, sketch, label: 'move' };
}
