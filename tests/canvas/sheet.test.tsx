// @vitest-environment jsdom
import { act, cleanup, fireEvent, render } from '@testing-library/react';
import { afterEach, beforeAll, expect, test, vi } from 'vitest';
import { sheetActions } from '../../src/canvas/actions';
import { sheetOf } from '../../src/canvas/handle';
import { Sheet } from '../../src/canvas/Sheet';
import { Shelf } from '../../src/canvas/Shelf';
import { actionFor } from '../../src/store/action';
import { type Stores, StoresProvider } from '../../src/store/react';
import { answer, letDown, solveAll, solvedStream, storesOf, streamId, unitId } from './fixture';

/** The hook must stand before React is loaded. */
const { rendered } = await vi.hoisted(() => import('../app/rendered'));

/** Views of this project; the rest belongs to the libraries. */
const OURS =
  /^(UnitNode|Drawing|UnitPorts|Marks|Line|Lines|StreamMark|StreamMarks|Frame|TitleStrip|WholeState|Flow|View|Sheet|PullLayer|DropLayer|OfferMenu|Shelf|ShelfIcon)$/;

beforeAll(() => {
  vi.stubGlobal(
    'ResizeObserver',
    class {
      observe() {}
      unobserve() {}
      disconnect() {}
    },
  );
  vi.stubGlobal(
    'DOMMatrixReadOnly',
    class {
      m22 = 1;
    },
  );
});
afterEach(cleanup);

function show(sketch = letDown()): { stores: Stores; page: HTMLElement } {
  const stores = storesOf(sketch);
  const { container } = render(
    <StoresProvider value={stores}>
      <Shelf />
      <Sheet />
    </StoresProvider>,
  );
  return { stores, page: container };
}

/** A key as the app hands it on. */
function press(stores: Stores, key: string, more: KeyboardEventInit = {}): boolean {
  const action = actionFor(sheetActions, new KeyboardEvent('keydown', { key, ...more }), false, stores);
  act(() => action?.run(stores));
  return action !== undefined;
}

test('every unit and stream stands on the sheet under its tag or number, with its state', () => {
  const { stores, page } = show();
  act(() => solveAll(stores));
  const units = [...page.querySelectorAll<HTMLElement>('[data-unit]')];
  expect(units.map((u) => u.dataset.unit)).toEqual(['FEED-1', 'PV-101', 'V-101', 'PROD-1', 'E-101']);
  expect(units.every((u) => u.dataset.state === 'solved')).toBe(true);
  expect([...page.querySelectorAll<HTMLElement>('[data-stream]')].map((s) => s.dataset.stream)).toEqual([
    '1',
    '2',
    '3',
    '4',
    '5',
  ]);
  expect(page.querySelector('[data-stream="2"]')?.textContent).toBe('2100.0kmol/h40.00°C5.000bar(a)');
  expect(page.querySelector('[aria-label="V-101, flash drum, solved"]')).not.toBeNull();
  expect(page.querySelector('[data-strip="state"]')?.textContent).toBe('Solved in 12 ms, edit 1');
});

test.each([1, 3])('when %i streams change, at most that many views and three more are drawn', (count) => {
  const { stores } = show();
  act(() => solveAll(stores));
  rendered.length = 0;
  const changed = ['s1', 's2', 's3'].slice(0, count);
  act(() =>
    answer(stores, 2, {
      streams: Object.fromEntries(changed.map((id, k) => [id, solvedStream({ T_K: 330 + k })])),
    }),
  );
  const ours = rendered.filter((name) => OURS.test(name));
  expect(ours.filter((name) => name === 'StreamMark')).toHaveLength(count);
  expect(ours.filter((name) => name === 'UnitNode' || name === 'Line' || name === 'Drawing')).toEqual([]);
  expect(ours.length).toBeLessThanOrEqual(count + 3);
});

test('selecting a unit draws the views of what was and what is selected', () => {
  const { stores, page } = show();
  act(() => stores.session.select([unitId('u2')]));
  rendered.length = 0;
  act(() => stores.session.select([unitId('u3')]));
  expect(rendered.filter((name) => name === 'Drawing').length).toBeLessThanOrEqual(2);
  expect(page.querySelector('[data-unit="V-101"]')?.hasAttribute('data-selected')).toBe(true);
  expect(page.querySelector('[data-unit="PV-101"]')?.hasAttribute('data-selected')).toBe(false);
});

test('a connection can be made by keys alone: C, an arrow, Enter', () => {
  const { stores, page } = show();
  act(() => stores.session.select([unitId('u3')]));
  press(stores, 'c');
  expect(stores.session.getState().spoken).toMatch(/^Connect from V-101 liquid.*one port fits/);
  // What the screen reader says stands on the sheet as well.
  expect(page.querySelector('[data-strip="state"]')?.textContent).toBe(
    'Connecting: arrows choose a port, Enter connects or offers units, Esc leaves it',
  );
  expect(page.querySelectorAll('.target[data-fits="yes"]')).toHaveLength(1);
  expect(page.querySelectorAll('.target[data-fits="no"]').length).toBeGreaterThan(2);
  press(stores, 'ArrowDown');
  expect(stores.session.getState().spoken).toBe('E-101 inlet');
  press(stores, 'Enter');
  const made = stores.sketch.getState().sketch.streams.find((s) => s.number === '4');
  expect(made).toMatchObject({ from: ['u3', 'liquid'], to: ['u5', 'in'] });
  expect(stores.sketch.getState().past).toHaveLength(1);
  expect(stores.session.getState().streams).toEqual(['s4']);
  expect(page.querySelector('.target')).toBeNull();
});

test('Esc on the sheet clears the selection first, and then closes the drawer', () => {
  const { stores } = show();
  act(() => stores.session.select([unitId('u3')]));
  press(stores, 'Escape');
  expect(stores.session.getState()).toMatchObject({ units: [], drawer: { is: 'unit' } });
  press(stores, 'Escape');
  expect(stores.session.getState().drawer).toBeNull();
});

test('Esc leaves a connection that was started', () => {
  const { stores, page } = show();
  act(() => stores.session.select([unitId('u3')]));
  press(stores, 'c');
  press(stores, 'Escape');
  expect(page.querySelector('.target')).toBeNull();
  expect(stores.session.getState()).toMatchObject({ connecting: null, units: ['u3'] });
  expect(stores.sketch.getState().past).toEqual([]);
});

test('M and arrows move a unit by grid steps, in one undo step; Esc puts it back', () => {
  const { stores } = show();
  const at = () => stores.sketch.getState().sketch.units.find((u) => u.id === 'u5')?.at;
  act(() => stores.session.select([unitId('u5')]));
  for (const key of ['m', 'ArrowRight', 'ArrowRight', 'ArrowUp']) press(stores, key);
  expect(at()).toEqual([600, 520]);
  press(stores, 'Enter');
  expect(at()).toEqual([616, 512]);
  expect(stores.sketch.getState().past.map((entry) => entry.label)).toEqual(['move E-101']);
  for (const key of ['m', 'ArrowDown', 'Escape']) press(stores, key);
  expect(at()).toEqual([616, 512]);
  expect(stores.sketch.getState().past).toHaveLength(1);
});

test('arrows walk with the flow and move the focus along', () => {
  const { stores } = show();
  act(() => stores.session.select([unitId('u1')]));
  press(stores, 'ArrowRight');
  expect(stores.session.getState()).toMatchObject({ units: [], streams: ['s1'] });
  expect((document.activeElement as HTMLElement).dataset.focusStream).toBe('s1');
  press(stores, 'ArrowRight');
  expect(stores.session.getState()).toMatchObject({ units: ['u2'], streams: [] });
});

test('R turns, X mirrors, Delete deletes with the streams that leave, each in one step', () => {
  const { stores, page } = show();
  act(() => stores.session.select([unitId('u2'), unitId('u5')]));
  press(stores, 'r');
  press(stores, 'x');
  expect(stores.sketch.getState().sketch.units.filter((u) => u.turn === 90 && u.mirror)).toHaveLength(2);
  press(stores, 'Delete');
  expect(stores.sketch.getState().past).toHaveLength(3);
  expect([...page.querySelectorAll('[data-unit]')]).toHaveLength(3);
  expect(stores.session.getState().units).toEqual([]);
});

test('a stream at an outlet that always has one loses its target first; a loose one says why it stays', () => {
  const { stores } = show();
  const target = () => stores.sketch.getState().sketch.streams.find((s) => s.id === 's3')?.to;
  act(() => stores.session.select([], [streamId('s3')]));
  press(stores, 'Delete');
  expect(target()).toBeUndefined();
  act(() => stores.session.select([], [streamId('s3')]));
  press(stores, 'Delete');
  expect(stores.session.getState().notice?.title).toMatch(/Stream 3/);
  expect(stores.sketch.getState().sketch.streams).toHaveLength(5);
});

test('a click on a diamond selects its stream, with Shift it is added', () => {
  const { stores, page } = show();
  const diamond = (number: string) => page.querySelector(`[data-stream="${number}"] .stream-body`)!;
  fireEvent.click(diamond('2'));
  expect(stores.session.getState()).toMatchObject({ streams: ['s2'], drawer: { is: 'stream', id: 's2' } });
  fireEvent.click(diamond('3'), { shiftKey: true });
  expect(stores.session.getState().streams).toEqual(['s2', 's3']);
});

test('Enter on the shelf puts a unit on the sheet and selects it', () => {
  const { stores, page } = show();
  const valve = page.querySelector<HTMLElement>('[data-shelf="valve"]')!;
  fireEvent.click(valve, { detail: 0 });
  const made = stores.sketch.getState().sketch.units.at(-1);
  expect(made).toMatchObject({ kind: 'valve', tag: 'PV-102' });
  expect(stores.session.getState().units).toEqual([made?.id]);
  expect(page.querySelector('[data-unit="PV-102"]')?.getAttribute('data-state')).toBe('waiting');
});

test('a zoom changes no document and is asked of the sheet by its stores', () => {
  const { stores } = show();
  const before = stores.sketch.getState().sketch;
  press(stores, '1');
  expect(sheetOf(stores)?.zoom()).toBe(1);
  press(stores, '+');
  expect(sheetOf(stores)?.zoom()).toBeCloseTo(1.25, 9);
  press(stores, '-');
  expect(sheetOf(stores)?.zoom()).toBeCloseTo(1, 9);
  expect(stores.sketch.getState().sketch).toBe(before);
});

test('another document ends what was under way on the one before', () => {
  const { stores, page } = show();
  act(() => stores.session.select([unitId('u5')]));
  press(stores, 'r');
  press(stores, 'm');
  press(stores, 'ArrowUp');
  act(() => void stores.sketch.undo());
  expect(sheetOf(stores)?.store.getState()).toMatchObject({ moved: null, movingByKeys: false });
  expect(stores.sketch.getState().future).toHaveLength(1);
  press(stores, 'c');
  expect(page.querySelector('.target')).not.toBeNull();
  act(() => void stores.sketch.redo());
  expect(page.querySelector('.target')).toBeNull();
  expect(stores.session.getState().connecting).toBeNull();
});
