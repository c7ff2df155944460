// @vitest-environment jsdom
import { act, fireEvent, screen, waitFor } from '@testing-library/react';
import { describe, expect, test } from 'vitest';
import { actions } from '../../src/app/actions';
import { FindField, NAMES } from '../../src/app/find/FindField';
import { findThings, thingsOf } from '../../src/app/find/things';
import { DrawerHost } from '../../src/drawers/DrawerHost';
import { actionFor } from '../../src/store/action';
import { useSession } from '../../src/store/react';
import { letDown, makePage, type Page, show, sketchOf } from '../drawers/page';

const chemicals = [
  { id: 'methane', name: 'Methane', formula: 'CH4' },
  { id: 'n-butane', name: 'n-Butane', formula: 'C4H10' },
] as never;
const namesFor = (page: Page, text: string): readonly string[] =>
  findThings(thingsOf(sketchOf(page), chemicals, NAMES), text).map(({ name }) => name);

/** As the app shows it: over the sheet, for as long as it is asked for. */
function Over() {
  return useSession((state) => state.over) === 'find' ? <FindField /> : null;
}

/** The page with a button that has the focus, the search opened from there. */
function open(): Page {
  const page = makePage(letDown);
  page.stores.compiled.setState({
    basis: { chemicals, model: { kind: 'peng-robinson', pairs: [] } } as never,
  });
  show(
    page,
    <>
      <button type="button">before</button>
      <Over />
      <DrawerHost />
    </>,
  );
  screen.getByRole('button', { name: 'before' }).focus();
  act(() => page.stores.session.setState({ over: 'find' }));
  return page;
}
const field = (): HTMLElement => screen.getByRole('combobox', { name: /^Find/ });
const type = (text: string): void => void fireEvent.change(field(), { target: { value: text } });
const active = (): string | null | undefined =>
  document.getElementById(field().getAttribute('aria-activedescendant') ?? '')?.textContent;

describe('what is found', () => {
  test('a number is first of all a stream’s, then part of a tag; a tag needs no hyphen', () => {
    const page = makePage(letDown);
    expect(namesFor(page, '1')).toEqual(['Stream 1', 'FEED-1', 'PV-101', 'V-101']);
    expect(namesFor(page, 'pv101')).toEqual(['PV-101', 'Stream 2']);
    expect(namesFor(page, 'drum')).toEqual(['V-101']);
    expect(namesFor(page, 'butane')).toEqual(['n-Butane']);
    expect(namesFor(page, 'c4h10')).toEqual(['n-Butane']);
    expect(namesFor(page, 'nothing of the kind')).toEqual([]);
    expect(namesFor(page, ' ')).toHaveLength(9);
  });

  test('a stream goes by its description, and a tag leads to the streams that leave it, after the unit', () => {
    const page = makePage(letDown);
    expect(namesFor(page, 'V-101 vapour')).toEqual(['Stream 3']);
    expect(namesFor(page, 'v-101')).toEqual(['V-101', 'Stream 3', 'Stream 4', 'PV-101', 'Stream 2']);
  });
});

describe('the search field', () => {
  test('opens with / anywhere and with Ctrl+F where the sheet has the keyboard, never while text is typed', () => {
    const { stores } = makePage(letDown);
    const press = (key: string, ctrlKey = false): KeyboardEvent =>
      ({ key, ctrlKey, metaKey: false, altKey: false, shiftKey: false }) as KeyboardEvent;
    const found = (event: KeyboardEvent, typing: boolean) => actionFor(actions, event, typing, stores)?.id;
    expect(found(press('/'), false)).toBe('find');
    expect(found(press('/'), true)).toBeUndefined();
    // No sheet on this page: the browser keeps its own search.
    expect(found(press('f', true), false)).toBeUndefined();
    const find = actions.find(({ id }) => id === 'find')!;
    expect(find.keys).toContain('Ctrl+F');
    stores.sketch.apply('clear', (sketch) => ({ ...sketch, units: [], streams: [] }));
    expect(found(press('/'), false)).toBeUndefined();
  });

  test('has the focus at once, names what the arrows choose, and reads out how many are found', async () => {
    open();
    expect(document.activeElement).toBe(field());
    expect(field().getAttribute('aria-expanded')).toBe('false');
    type('v-101');
    await waitFor(() => expect(screen.getByRole('status').textContent).toBe('5 found'));
    expect(field().getAttribute('aria-expanded')).toBe('true');
    expect(document.getElementById(field().getAttribute('aria-controls')!)?.getAttribute('role')).toBe(
      'listbox',
    );
    expect(active()).toBe('V-101 flash drum');
    fireEvent.keyDown(field(), { key: 'ArrowDown' });
    expect(active()).toBe('Stream 3 V-101 to nowhere yet');
    fireEvent.keyDown(field(), { key: 'ArrowUp' });
    fireEvent.keyDown(field(), { key: 'ArrowUp' });
    expect(active()).toMatch(/^Stream 2/);
    expect(screen.getAllByRole('option', { selected: true })).toHaveLength(1);
    type('nonesuch');
    expect(screen.getByRole('status').textContent).toBe('Nothing here goes by these words.');
    expect(field().hasAttribute('aria-activedescendant')).toBe(false);
  });

  test('Enter selects what is chosen, opens its drawer and brings it to the middle of the sheet', async () => {
    const { stores } = open();
    type('v-101');
    await screen.findAllByRole('option');
    fireEvent.keyDown(field(), { key: 'ArrowDown' });
    fireEvent.keyDown(field(), { key: 'Enter' });
    await waitFor(() => expect(stores.session.getState().centred?.thing).toEqual({ stream: 's3' }));
    const { over, streams, units, drawer } = stores.session.getState();
    expect({ over, streams, units, drawer }).toEqual({
      over: 'none',
      streams: ['s3'],
      units: [],
      drawer: { is: 'stream', id: 's3' },
    });
  });

  test('Enter before the search has been fetched is kept until it is there', async () => {
    const { stores } = open();
    type('PV-101');
    fireEvent.keyDown(field(), { key: 'Enter' });
    await waitFor(() => expect(stores.session.getState().units).toEqual(['u2']));
  });

  test('a chemical leads to its row in the chemicals drawer', async () => {
    const { stores } = open();
    type('butane');
    fireEvent.pointerDown(await screen.findByRole('option'));
    await waitFor(() => expect(document.activeElement?.getAttribute('data-chemical')).toBe('n-butane'));
    expect(stores.session.getState()).toMatchObject({ over: 'none', drawer: { is: 'chemicals' } });
    // Esc leaves the drawer for where the search was begun.
    fireEvent.keyDown(document.activeElement!, { key: 'Escape' });
    expect(document.activeElement?.textContent).toBe('before');
  });

  test('Esc closes it and gives the focus back; leaving it by Tab closes it and keeps the focus there', async () => {
    const { stores } = open();
    type('v');
    fireEvent.keyDown(field(), { key: 'Escape' });
    expect(stores.session.getState().over).toBe('none');
    expect(document.activeElement?.textContent).toBe('before');
    act(() => stores.session.setState({ over: 'find' }));
    expect(document.activeElement).toBe(field());
    act(() => screen.getByRole('button', { name: 'before' }).focus());
    expect(stores.session.getState().over).toBe('none');
    expect(document.activeElement?.textContent).toBe('before');
  });
});
