import { BoxIndex, boxOfPiece, grown } from '../drawing/boxes';
import { plainSymbol } from '../drawing/symbols/registry';
import { GRID } from '../drawing/tokens';
import { boxOnSheet, poseOf } from '../drawing/transform';
import type { Point } from '../drawing/types';
import type { UnitId } from '../engine/ids';
import type { Finding } from '../engine/outcome';
import type { Sketch } from '../sketch/types';
import {
  copyPart,
  deleteNote,
  deleteUnits,
  duplicateUnits,
  type Edit,
  type Edited,
  type Fragment,
  fragmentText,
  pasteFragment,
  readFragment,
} from '../store/commands';
import type { Stores } from '../store/react';
import { sayFinding } from '../wording';
import { together, tryEdit } from './edit';
import { sheetOf } from './handle';

/** Copies stand this far below the originals at first [px]. */
const BELOW = 5 * GRID;
/** Room around a copied unit for its tag and labels [px]. */
const CLEAR = 16;

// What was copied last: for a browser that does not hand its clipboard over when a menu asks for it.
let last = '';

const chosenNotes = ({ session }: Stores): ReadonlySet<string> => new Set(session.getState().notes);
const chosenUnits = ({ session }: Stores): ReadonlySet<UnitId> => new Set(session.getState().units);

/** Text for the clipboard of what is selected; undefined when no unit and no note is. */
export function copySelected(stores: Stores): string | undefined {
  const part = copyPart(stores.sketch.getState().sketch, chosenUnits(stores), chosenNotes(stores));
  if (!part) return undefined;
  last = fragmentText(part);
  stores.session.setState({ spoken: `Copied ${whatIn(part)}` });
  return last;
}

function whatIn({ units, notes }: Fragment): string {
  if (units.length === 1 && notes.length === 0) return units[0]?.tag ?? '';
  const words = [
    units.length > 0 ? `${units.length} unit${units.length === 1 ? '' : 's'}` : '',
    notes.length > 0 ? `${notes.length} note${notes.length === 1 ? '' : 's'}` : '',
  ];
  return words.filter(Boolean).join(' and ');
}

/** Deletes the selected notes and units as one edit; the name says what it was. */
export function removal(
  sketch: Sketch,
  units: ReadonlySet<UnitId>,
  notes: ReadonlySet<string>,
  label?: string,
): Edit {
  const edits = [
    ...(units.size > 0 ? [(now: Sketch) => deleteUnits(now, units)] : []),
    ...[...notes].map((id) => (now: Sketch) => deleteNote(now, id)),
  ];
  const [first, ...rest] = edits;
  if (!first) return { ok: true, sketch, label: 'delete' };
  const edit = together(sketch, first(sketch), ...rest);
  return edit.ok && label ? { ...edit, label } : edit;
}

/** Copies what is selected and takes it off the sheet, in one step. */
export function cutSelected(stores: Stores): string | undefined {
  const text = stores.sketch.getState().writable ? copySelected(stores) : undefined;
  const part = text === undefined ? undefined : readFragment(text);
  if (text === undefined || !part) return undefined;
  const [units, notes] = [chosenUnits(stores), chosenNotes(stores)];
  tryEdit(stores, (sketch) => removal(sketch, units, notes, `cut ${whatIn(part)}`));
  stores.session.setState({ units: [], notes: [], spoken: `Cut ${whatIn(part)}` });
  return text;
}

/** Puts what a text holds on the sheet, where it stands on nothing, and selects it. */
export function pasteText(stores: Stores, text: string): void {
  const fragment = readFragment(text);
  if (!fragment) {
    stores.session.say('info', 'What was copied is no part of a sketch.', [
      'Select units and copy them, here or in another tab; then paste.',
    ]);
    return;
  }
  const shift = freeShift(stores, fragment, startOf(stores, fragment, placesIn(fragment)));
  announce(
    stores,
    tryEdit(stores, (sketch) => pasteFragment(sketch, fragment, shift)),
  );
}

export const pasteLast = (stores: Stores): void => pasteText(stores, last);
export const hasCopied = (): boolean => last !== '';

/** A copy of what is selected, beside it. */
export function duplicateSelected(stores: Stores): void {
  const [units, notes] = [chosenUnits(stores), chosenNotes(stores)];
  const part = copyPart(stores.sketch.getState().sketch, units, notes);
  if (!part) return;
  const shift = freeShift(stores, part, [BELOW, BELOW]);
  announce(
    stores,
    tryEdit(stores, (sketch) => duplicateUnits(sketch, units, shift, notes)),
  );
}

function announce(stores: Stores, made: Edited | undefined): void {
  if (!made) return;
  const { session } = stores;
  session.select(made.units ?? []);
  session.setState({ notes: made.noteIds ?? [], spoken: `Done: ${made.label}` });
  if (made.notes && made.notes.length > 0) sayNotes(stores, made.label, made.notes);
  const first = made.sketch.units.find((unit) => unit.id === made.units?.[0]);
  if (first) {
    sheetOf(stores)?.reveal(first.at);
    setTimeout(() => sheetOf(stores)?.focus({ unit: first.id }), 0);
  }
}

function sayNotes({ session, sketch }: Stores, label: string, notes: readonly Finding[]): void {
  const { units, display } = sketch.getState().sketch;
  const context = {
    measures: display.set,
    tag: (id: UnitId) => units.find((unit) => unit.id === id)?.tag ?? '',
    kind: (id: UnitId) => units.find((unit) => unit.id === id)?.kind,
  };
  session.say(
    'caution',
    `${label.charAt(0).toUpperCase()}${label.slice(1)}: not everything could come along.`,
    notes.map((note) => {
      const { sentence, next } = sayFinding(note, context);
      return `${sentence} ${next ?? ''}`.trim();
    }),
  );
}

const placesIn = ({ units, notes }: Fragment): readonly Point[] => [
  ...units.map((unit) => unit.at),
  ...notes.flatMap((note) => (note.at ? [note.at] : [])),
];

const middleOf = (places: readonly Point[]): Point => {
  const [xs, ys] = [places.map((p) => p[0]), places.map((p) => p[1])];
  return [(Math.min(...xs) + Math.max(...xs)) / 2, (Math.min(...ys) + Math.max(...ys)) / 2];
};

const onGrid = ([x, y]: Point): Point => [Math.round(x / GRID) * GRID, Math.round(y / GRID) * GRID];

/** In the sketch it came from, beside its place; elsewhere in the middle of the view. */
function startOf(stores: Stores, fragment: Fragment, places: readonly Point[]): Point {
  const { sketch } = stores.sketch.getState();
  if (fragment.of === sketch.id || places.length === 0) {
    const isGone = fragment.units.every((unit) => !sketch.units.some((known) => known.id === unit.id));
    return isGone ? [0, 0] : [BELOW, BELOW];
  }
  const [x, y] = middleOf(places);
  const [mx, my] = sheetOf(stores)?.middle() ?? [x, y];
  return onGrid([mx - x, my - y]);
}

/** Steps to try, the nearest first, rather down and to the right. */
const STEPS: readonly Point[] = Array.from(
  { length: 41 * 41 },
  (_, k): Point => [(k % 41) - 20, Math.floor(k / 41) - 20],
).sort((a, b) => far(a) - far(b));
function far([x, y]: Point): number {
  return Math.hypot(x < 0 ? 1.5 * x : x, y < 0 ? 1.5 * y : y);
}

/** The shift nearest to a given one at which nothing stands on a unit or a line; the given one when there is none. */
function freeShift(stores: Stores, part: Fragment, start: Point): Point {
  const state = sheetOf(stores)?.store.getState();
  if (!state) return start;
  const boxes = part.units.map((unit) => {
    const shape = state.units.get(unit.id);
    if (shape && shape.at[0] === unit.at[0] && shape.at[1] === unit.at[1]) return grown(shape.box, CLEAR);
    return grown(boxOnSheet(poseOf(unit), plainSymbol(unit.kind).box), CLEAR);
  });
  const taken = new BoxIndex();
  for (const unit of state.scene.units) taken.add(unit.box);
  for (const { points } of state.scene.lines)
    for (let k = 0; k + 1 < points.length; k += 1) taken.add(boxOfPiece(points[k]!, points[k + 1]!, 1));
  const isFree = ([dx, dy]: Point): boolean =>
    !boxes.some((box) => taken.hits({ ...box, x: box.x + dx, y: box.y + dy }));
  const shifts = STEPS.map(([x, y]): Point => [start[0] + x * BELOW, start[1] + y * BELOW]);
  return shifts.find(isFree) ?? start;
}
