import type { StreamId, UnitId } from '../engine/ids';
import type { Sketch } from '../sketch/types';
import type { Action } from '../store/action';
import {
  deleteAndJoin,
  deleteStream,
  type Edit,
  mirrorUnit,
  passingThrough,
  turnUnit,
} from '../store/commands';
import type { Stores } from '../store/react';
import { ALIGNMENTS, type Alignment, aligned, distributed } from './align';
import { bendable, bendByKeys, straighten } from './bending';
import { moveWithBends } from './bends';
import {
  copySelected,
  cutSelected,
  duplicateSelected,
  hasCopied,
  pasteLast,
  pasteText,
  removal,
} from './clipboard';
import { tryEdit } from './edit';
import { sheetOf } from './handle';
import { moveByKeys, resizeByKeys } from './moving';
import { putNote } from './noteEdits';
import { isWritable, notesChosen, onEach, sheetAction, unitsChosen } from './onSheet';
import type { Arrow } from './walk';

const someUnits = (stores: Stores): boolean => isWritable(stores) && unitsChosen(stores) > 0;
const someChosen = (stores: Stores): boolean => unitsChosen(stores) + notesChosen(stores) > 0;
const someChosenHere = (stores: Stores): boolean => isWritable(stores) && someChosen(stores);
const someThing = (stores: Stores): boolean =>
  isWritable(stores) && (someChosen(stores) || stores.session.getState().streams.length > 0);

const write = (text: string | undefined): void => {
  // Refused or not there: what was copied can still be pasted in this tab.
  if (text !== undefined) void navigator.clipboard?.writeText(text).catch(() => undefined);
};

/** The clipboard when the browser hands it over, else what was copied last in this tab. */
async function pasteAsked(stores: Stores): Promise<void> {
  const text = await navigator.clipboard?.readText().catch(() => undefined);
  if (text) pasteText(stores, text);
  else pasteLast(stores);
}

function deleteSelected(stores: Stores): void {
  const { units, streams, notes } = stores.session.getState();
  const made = tryEdit(stores, (sketch) => deletion(sketch, units, streams, notes));
  if (!made) return;
  const { sketch } = stores.sketch.getState();
  const left = streams.filter((id) => sketch.streams.some((stream) => stream.id === id));
  stores.session.setState({ units: [], notes: [], streams: left, spoken: `Done: ${made.label}` });
}

/** Streams first, then units and notes; what stays because an outlet always has a stream is no reason to keep the rest. */
function deletion(
  sketch: Sketch,
  units: readonly UnitId[],
  streams: readonly StreamId[],
  notes: readonly string[],
): Edit {
  const done: Edit[] = [];
  let now = sketch;
  for (const id of streams) {
    const edit = deleteStream(now, id);
    if (edit.ok) now = edit.sketch;
    done.push(edit);
  }
  if (units.length + notes.length > 0) {
    const edit = removal(now, new Set(units), new Set(notes));
    if (edit.ok) now = edit.sketch;
    done.push(edit);
  }
  const [first] = done;
  if (first && (now === sketch || (done.length === 1 && units.length + notes.length < 2))) return first;
  if (first && streams.length === 0 && notes.length === 0) return first;
  return { ok: true, sketch: now, label: `delete ${units.length + streams.length + notes.length} things` };
}

/** Moves the selected units to places worked out from where they stand, with a name of its own for undo. */
function place(
  stores: Stores,
  label: string,
  how: (shapes: Parameters<typeof aligned>[0]) => ReturnType<typeof aligned>,
): void {
  const state = sheetOf(stores)?.store.getState();
  if (!state) return;
  const chosen = new Set(stores.session.getState().units);
  const places = how(state.scene.units.filter((shape) => chosen.has(shape.unit)));
  if (places.size > 0) tryEdit(stores, (sketch) => moveWithBends(sketch, state.lines, places, label));
}

const ALIGN_WORDS: Readonly<Record<Alignment, readonly [string, string]>> = {
  left: ['Align left edges', 'L'],
  centre: ['Align on an upright line', 'C'],
  right: ['Align right edges', 'R'],
  top: ['Align top edges', 'T'],
  middle: ['Align on a level line', 'M'],
  bottom: ['Align bottom edges', 'B'],
};

const aligning: readonly Action[] = [
  ...ALIGNMENTS.map((how) =>
    sheetAction(
      {
        id: `align-${how}`,
        label: ALIGN_WORDS[how][0],
        group: 'edit',
        keys: [`Shift+${ALIGN_WORDS[how][1]}`],
        run: (stores) =>
          place(stores, `align ${unitsChosen(stores)} units, ${how}`, (shapes) => aligned(shapes, how)),
      },
      (stores) => isWritable(stores) && unitsChosen(stores) > 1,
    ),
  ),
  ...(
    [
      ['across', 'Equal gaps from left to right', 'H'],
      ['down', 'Equal gaps from top to bottom', 'V'],
    ] as const
  ).map(([along, label, key]) =>
    sheetAction(
      {
        id: `distribute-${along}`,
        label,
        group: 'edit',
        keys: [`Shift+${key}`],
        run: (stores) =>
          place(stores, `distribute ${unitsChosen(stores)} units`, (shapes) => distributed(shapes, along)),
      },
      (stores) => isWritable(stores) && unitsChosen(stores) > 2,
    ),
  ),
];

const clipboard: readonly Action[] = [
  {
    ...sheetAction(
      {
        id: 'cut',
        label: 'Cut',
        group: 'edit',
        keys: ['Ctrl+X'],
        run: (stores) => write(cutSelected(stores)),
      },
      someChosenHere,
    ),
    byBrowser: true,
  },
  {
    ...sheetAction(
      {
        id: 'copy',
        label: 'Copy',
        group: 'edit',
        keys: ['Ctrl+C'],
        run: (stores) => write(copySelected(stores)),
      },
      someChosen,
    ),
    byBrowser: true,
  },
  {
    ...sheetAction(
      {
        id: 'paste',
        label: 'Paste',
        group: 'edit',
        keys: ['Ctrl+V'],
        run: (stores) => void pasteAsked(stores),
      },
      (stores) => isWritable(stores) && (hasCopied() || typeof navigator.clipboard?.readText === 'function'),
    ),
    byBrowser: true,
  },
  sheetAction(
    { id: 'duplicate', label: 'Duplicate', group: 'edit', keys: ['Ctrl+D'], run: duplicateSelected },
    someChosenHere,
  ),
];

/** The one selected unit whose line could be joined when it goes. */
function joinable({ session, sketch }: Stores): UnitId | undefined {
  const { units } = session.getState();
  const [unit] = units;
  return unit && units.length === 1 && passingThrough(sketch.getState().sketch, unit) ? unit : undefined;
}

const deleting: readonly Action[] = [
  sheetAction(
    { id: 'delete', label: 'Delete', group: 'edit', keys: ['Delete', 'Backspace'], run: deleteSelected },
    someThing,
  ),
  sheetAction(
    {
      id: 'delete-and-join',
      label: 'Delete, and join the line',
      group: 'edit',
      keys: ['Shift+Delete', 'Shift+Backspace'],
      run: (stores) => {
        const unit = joinable(stores);
        const made = unit && tryEdit(stores, (sketch) => deleteAndJoin(sketch, unit));
        if (made) stores.session.select([], made.stream ? [made.stream] : []);
      },
    },
    (stores) => isWritable(stores) && joinable(stores) !== undefined,
  ),
];

/** The one selected stream, with a line that has room for a bend. */
function isBendable(stores: Stores): boolean {
  const { streams, units } = stores.session.getState();
  const points = streams.length === 1 && sheetOf(stores)?.store.getState().lines.get(streams[0]!)?.points;
  return isWritable(stores) && units.length === 0 && !!points && bendable(points).length > 0;
}

const shaping: readonly Action[] = [
  sheetAction(
    {
      id: 'turn',
      label: 'Turn by a quarter',
      group: 'edit',
      keys: ['R'],
      run: (s) => onEach(s, turnUnit, 'turn'),
    },
    someUnits,
  ),
  sheetAction(
    {
      id: 'mirror',
      label: 'Mirror',
      group: 'edit',
      keys: ['X'],
      run: (s) => onEach(s, mirrorUnit, 'mirror'),
    },
    someUnits,
  ),
  sheetAction(
    { id: 'move', label: 'Move by grid steps with the arrows', group: 'edit', keys: ['M'], run: moveByKeys },
    someChosenHere,
  ),
  sheetAction(
    { id: 'bend', label: 'Bend a line with the arrows', group: 'edit', keys: ['J'], run: bendByKeys },
    isBendable,
  ),
  sheetAction(
    {
      id: 'straighten',
      label: 'Take the bends off a line',
      group: 'edit',
      keys: ['Shift+J'],
      run: straighten,
    },
    (stores) => {
      const { streams } = stores.session.getState();
      const { sketch, writable } = stores.sketch.getState();
      return writable && sketch.streams.some((s) => s.via && streams.includes(s.id));
    },
  ),
];

const notes: readonly Action[] = [
  sheetAction(
    { id: 'note', label: 'Add a note', group: 'edit', keys: ['N'], run: (stores) => putNote(stores, 'text') },
    isWritable,
  ),
  sheetAction(
    {
      id: 'area',
      label: 'Add an area',
      group: 'edit',
      keys: ['Shift+N'],
      run: (stores) => putNote(stores, 'area'),
    },
    isWritable,
  ),
];

/** Alt and an arrow while notes and areas are moved by keys. */
const resizing = (['left', 'right', 'up', 'down'] as const).map(
  (direction: Arrow): Action =>
    sheetAction(
      {
        id: `resize-${direction}`,
        label: {
          left: 'Note or area under the hand: narrower',
          right: 'Note or area under the hand: wider',
          up: 'Note or area under the hand: lower',
          down: 'Note or area under the hand: higher',
        }[direction],
        group: 'sheet',
        keys: [`Alt+Arrow ${direction.charAt(0).toUpperCase()}${direction.slice(1)}`],
        run: (stores) => {
          const sheet = sheetOf(stores)?.store;
          if (sheet) resizeByKeys(sheet, direction);
        },
      },
      (stores) => {
        const state = sheetOf(stores)?.store.getState();
        return state?.movingByKeys === true && state.heldNotes !== null;
      },
    ),
);

/** What changes the sheet, beside drawing it. */
export const editActions: readonly Action[] = [
  ...clipboard,
  ...deleting,
  sheetAction(
    {
      id: 'select-all',
      label: 'Select all',
      group: 'edit',
      keys: ['Ctrl+A'],
      run: ({ session, sketch }) => {
        const { units, streams, notes: jotted } = sketch.getState().sketch;
        session.setState({
          units: units.map((unit) => unit.id),
          streams: streams.map((stream) => stream.id),
          notes: jotted.filter((note) => note.at).map((note) => note.id),
        });
      },
    },
    ({ sketch }) => sketch.getState().sketch.units.length > 0,
  ),
  ...shaping,
  ...aligning,
  ...notes,
  ...resizing,
];
