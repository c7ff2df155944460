import type { Action } from '../store/action';
import { toggleStream } from './choose';
import { editActions } from './editActions';
import { sheetOf } from './handle';
import { arrow, connectByKeys, enter, focusedThing, freePorts, joinedStream, leave } from './keys';
import { idle, onSheet } from './onSheet';
import type { Arrow } from './walk';

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
    listens: onSheet,
    when: idle,
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
    listens: onSheet,
    when: idle,
    run: enter,
  },
  {
    id: 'escape',
    label: 'Leave what is under way, then the selection, then the drawer',
    group: 'sheet',
    keys: ['Esc'],
    listens: onSheet,
    when: idle,
    run: (stores) => void leave(stores),
  },
  {
    id: 'add-to-selection',
    label: 'Add to the selection, or take out',
    group: 'sheet',
    keys: ['Space'],
    listens: onSheet,
    when: () => focusedThing() !== undefined,
    run: (stores) => {
      const thing = focusedThing();
      if (thing && 'unit' in thing) stores.session.toggleUnit(thing.unit);
      else if (thing) toggleStream(stores, thing.stream);
    },
  },
  {
    id: 'connect',
    label: 'Start a connection, or lead a stream elsewhere; arrows choose, Enter ends it',
    group: 'sheet',
    keys: ['C'],
    listens: onSheet,
    when: (stores) => idle(stores) && (freePorts(stores).length > 0 || joinedStream(stores) !== undefined),
    run: connectByKeys,
  },
  ...editActions,
  view('fit', 'Whole sheet in view', ['F'], (stores) => sheetOf(stores)?.fit()),
  view('zoom-in', 'Larger', ['+', '='], (stores) => sheetOf(stores)?.zoomBy(1.25)),
  view('zoom-out', 'Smaller', ['-', '\u2212'], (stores) => sheetOf(stores)?.zoomBy(0.8)),
  view('zoom-100', 'Zoom 100 %', ['1'], (stores) => sheetOf(stores)?.zoomTo(1)),
];
