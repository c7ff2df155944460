// @vitest-environment jsdom
import { fireEvent, render } from '@testing-library/react';
import { beforeAll, expect, test, vi } from 'vitest';
import { actions } from '../../src/app/actions';
import { arrangeActions } from '../../src/app/actions/arrange';
import { KeyList } from '../../src/app/KeyList';
import type { Point } from '../../src/drawing/types';
import type { UnitId } from '../../src/engine/ids';
import { moveUnits } from '../../src/store/commands';
import { type Stores, StoresProvider } from '../../src/store/react';
import { letDown, storesOf, unitId } from '../canvas/fixture';

beforeAll(() => {
  // jsdom has no modal dialogues.
  HTMLDialogElement.prototype.showModal = function showModal() {
    this.open = true;
  };
  HTMLDialogElement.prototype.close = function close() {
    this.open = false;
  };
});

const keep = arrangeActions.find((action) => action.id === 'arrange-rest')!;

function move(stores: Stores, places: readonly (readonly [string, Point])[]): void {
  const by = new Map(places.map(([id, at]): [UnitId, Point] => [unitId(id), at]));
  const edit = moveUnits(stores.sketch.getState().sketch, by);
  if (!edit.ok) throw new Error(edit.code);
  stores.sketch.apply(edit.label, () => edit.sketch);
}

test('arranging around what was placed by hand is offered once something was, and while something else is left', () => {
  const stores = storesOf(letDown());
  expect([keep.when?.(stores), keep.whyNot?.(stores)]).toEqual([
    false,
    'No unit was moved or lined up by hand since it was last arranged.',
  ]);
  move(stores, [['u4', [720, 200]]]);
  expect([keep.when?.(stores), keep.whyNot?.(stores)]).toEqual([true, undefined]);
  stores.sketch.undo();
  expect(keep.when?.(stores)).toBe(false);
  const all = letDown().units.map(({ id, at }): [string, Point] => [id, [at[0] + 8, at[1]]]);
  move(stores, all);
  expect([keep.when?.(stores), keep.whyNot?.(stores)]).toEqual([
    false,
    'Every unit was placed by hand: none is left to arrange.',
  ]);
});

test('a key of arranging belongs to no other action', () => {
  for (const { id, keys } of arrangeActions)
    for (const key of keys)
      expect(actions.filter((other) => other.keys.includes(key)).map((other) => other.id)).toEqual([id]);
});

test('the list of actions runs what the sheet can do, and says why it cannot do the rest', () => {
  const stores = storesOf(letDown());
  stores.session.setState({ over: 'keys' });
  const run = vi.fn();
  const free = arrangeActions.map((action) => ({ ...action, run }));
  const { getByText } = render(
    <StoresProvider value={stores}>
      <KeyList actions={free} />
    </StoresProvider>,
  );
  const refused = getByText(/^Arrange, keep what I placed/).closest('button')!;
  expect(refused.disabled).toBe(true);
  expect(refused.textContent).toContain('No unit was moved or lined up by hand');
  fireEvent.click(refused);
  expect(run).not.toHaveBeenCalled();
  fireEvent.click(getByText('Arrange all'));
  expect(run).toHaveBeenCalledExactlyOnceWith(stores);
  expect(stores.session.getState().over).toBe('none');
});
