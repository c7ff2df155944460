import type { Sketch } from '../sketch/types';
import type { Action } from '../store/action';
import { deleteStream, deleteUnits, type Edit, mirrorUnit, turnUnit } from '../store/commands';
import type { Stores } from '../store/react';
import { toggleStream } from './choose';
import { together, tryEdit } from './edit';
import { sheetOf } from './handle';
import { arrow, connectByKeys, enter, focusedThing, freePorts, leave, moveByKeys } from './keys';
import type { Arrow } from './walk';

/** Keys work on the sheet while nothing else on the screen has the focus. */
const onSheet = (stores: Stores): boolean => {
  if (!sheetOf(stores)) return false;
  const focused = document.activeElement;
  return (
    focused === null ||
    focused === document.body ||
    (focused.closest('.sheet-view') !== null && !focused.closest('[role=menu]'))
  );
};

const someUnits = ({ session }: Stores): boolean => session.getState().units.length > 0;
const someThing = (stores: Stores): boolean =>
  someUnits(stores) || stores.session.getState().streams.length > 0;
const idle = (stores: Stores): boolean => stores.session.getState().over === 'none';

/** The same edit on every selected unit, as one step. */
function onEach(stores: Stores, edit: (sketch: Sketch, id: Parameters<typeof turnUnit>[1]) => Edit): void {
  const [first, ...rest] = stores.session.getState().units;
  if (!first) return;
  tryEdit(stores, (sketch) =>
    together(sketch, edit(sketch, first), ...rest.map((id) => (now: Sketch) => edit(now, id))),
  );
}

function deleteSelected(stores: Stores): void {
  const { units, streams } = stores.session.getState();
  const made = tryEdit(stores, (sketch) => deletion(sketch, units, streams));
  if (!made) return;
  const { sketch } = stores.sketch.getState();
  const left = streams.filter((id) => sketch.streams.some((stream) => stream.id === id));
  stores.session.setState({ units: [], streams: left, spoken: `Done: ${made.label}` });
}

/** Streams first, then units; what stays because an outlet always has a stream is no reason to keep the rest. */
function deletion(
  sketch: Sketch,
  units: readonly Parameters<typeof turnUnit>[1][],
  streams: readonly Parameters<typeof deleteStream>[1][],
): Edit {
  const done: Edit[] = [];
  let now = sketch;
  for (const id of streams) {
    const edit = deleteStream(now, id);
    if (edit.ok) now = edit.sketch;
    done.push(edit);
  }
  if (units.length > 0) {
    const edit = deleteUnits(now, new Set(units));
    if (edit.ok) now = edit.sketch;
    done.push(edit);
  }
  const [first] = done;
  if (first && (now === sketch || done.length === 1)) return first;
  return { ok: true, sketch: now, label: `delete ${units.length + streams.length} things` };
}

const arrows = (['left', 'right', 'up', 'down'] as const).map((direction: Arrow): Action => {
  const key = `Arrow ${direction[0]!.toUpperCase()}${direction.slice(1)}`;
  return {
    id: `walk-${direction}`,
    label: {
      left: 'Walk against the flow',
      right: 'Walk with the flow',
      up: 'Choose the branch above',
      down: 'Choose the branch below',
    }[direction],
    group: 'sheet',
    keys: [key],
    when: (stores) => onSheet(stores) && idle(stores),
    run: (stores) => arrow(stores, direction, false),
  };
});
const addingArrows = arrows.map(
  (walk): Action => ({
    ...walk,
    id: `${walk.id}-adding`,
    label: `${walk.label}, adding to the selection`,
    keys: walk.keys.map((key) => `Shift+${key}`),
    run: (stores) => arrow(stores, walk.id.slice('walk-'.length) as Arrow, true),
  }),
);

const onUnits = (id: string, label: string, key: string, run: Action['run']): Action => ({
  id,
  label,
  group: 'sheet',
  keys: [key],
  when: (stores) => onSheet(stores) && idle(stores) && someUnits(stores),
  run,
});

const view = (id: string, label: string, keys: readonly string[], run: Action['run']): Action => ({
  id,
  label,
  group: 'view',
  keys,
  when: (stores) => sheetOf(stores) !== undefined && idle(stores),
  run,
});

/** Everything a key can do on the sheet. */
export const sheetActions: readonly Action[] = [
  ...arrows,
  ...addingArrows,
  {
    id: 'open-drawer',
    label: 'Into the drawer; end a connection or a move',
    group: 'sheet',
    keys: ['Enter'],
    when: (stores) => onSheet(stores) && idle(stores),
    run: enter,
  },
  {
    id: 'escape',
    label: 'Leave what is under way; clear the selection',
    group: 'sheet',
    keys: ['Esc'],
    when: (stores) => onSheet(stores) && idle(stores),
    run: (stores) => void leave(stores),
  },
  {
    id: 'add-to-selection',
    label: 'Add to the selection, or take out',
    group: 'sheet',
    keys: ['Space'],
    when: (stores) => onSheet(stores) && focusedThing() !== undefined,
    run: (stores) => {
      const thing = focusedThing();
      if (thing && 'unit' in thing) stores.session.toggleUnit(thing.unit);
      else if (thing) toggleStream(stores, thing.stream);
    },
  },
  {
    id: 'connect',
    label: 'Start a connection; arrows choose, Enter ends it',
    group: 'sheet',
    keys: ['C'],
    when: (stores) => onSheet(stores) && idle(stores) && freePorts(stores).length > 0,
    run: connectByKeys,
  },
  onUnits('move', 'Move by grid steps with the arrows', 'M', moveByKeys),
  onUnits('turn', 'Turn by a quarter', 'R', (stores) => onEach(stores, turnUnit)),
  onUnits('mirror', 'Mirror', 'X', (stores) => onEach(stores, mirrorUnit)),
  {
    id: 'delete',
    label: 'Delete',
    group: 'edit',
    keys: ['Delete', 'Backspace'],
    when: (stores) => onSheet(stores) && idle(stores) && someThing(stores),
    run: deleteSelected,
  },
  {
    id: 'select-all',
    label: 'Select all',
    group: 'edit',
    keys: ['Ctrl+A'],
    when: (stores) => onSheet(stores) && idle(stores),
    run: ({ session, sketch }) => {
      const { units, streams } = sketch.getState().sketch;
      session.setState({ units: units.map((unit) => unit.id), streams: streams.map((stream) => stream.id) });
    },
  },
  view('fit', 'Whole sheet in view', ['F'], (stores) => sheetOf(stores)?.fit()),
  view('zoom-in', 'Larger', ['+', '='], (stores) => sheetOf(stores)?.zoomBy(1.25)),
  view('zoom-out', 'Smaller', ['-', '\u2212'], (stores) => sheetOf(stores)?.zoomBy(0.8)),
  view('zoom-100', 'Zoom 100 %', ['1'], (stores) => sheetOf(stores)?.zoomTo(1)),
];
