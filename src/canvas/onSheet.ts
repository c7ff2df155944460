import type { Sketch } from '../sketch/types';
import { type Action, isSheetFree } from '../store/action';
import type { Edit } from '../store/commands';
import type { Stores } from '../store/react';
import { together, tryEdit } from './edit';
import { sheetOf } from './handle';

/** Keys work on the sheet while nothing else on the screen has the focus. */
export const onSheet = (stores: Stores): boolean => {
  if (!sheetOf(stores)) return false;
  const focused = document.activeElement;
  return (
    focused === null ||
    focused === document.body ||
    (focused.closest('.sheet-view') !== null && !focused.closest('[role=menu]'))
  );
};

export const idle = isSheetFree;
export const isWritable = ({ sketch }: Stores): boolean => sketch.getState().writable;
export const unitsChosen = ({ session }: Stores): number => session.getState().units.length;
export const notesChosen = ({ session }: Stores): number => session.getState().notes.length;

/** An action of the sheet: its keys work there alone, a menu offers it as long as `when` holds. */
export const sheetAction = (
  action: Omit<Action, 'listens' | 'when'>,
  when: (stores: Stores) => boolean = () => true,
): Action => ({
  ...action,
  listens: onSheet,
  when: (stores) => sheetOf(stores) !== undefined && idle(stores) && when(stores),
});

/** The same edit on every selected unit, as one step. */
export function onEach(
  stores: Stores,
  edit: (sketch: Sketch, id: Sketch['units'][number]['id']) => Edit,
  verb: string,
): void {
  const [first, ...rest] = stores.session.getState().units;
  if (!first) return;
  tryEdit(stores, (sketch) => {
    const all = together(sketch, edit(sketch, first), ...rest.map((id) => (now: Sketch) => edit(now, id)));
    return all.ok && rest.length > 0 ? { ...all, label: `${verb} ${rest.length + 1} units` } : all;
  });
}
