// @vitest-environment jsdom
import { act, fireEvent, screen } from '@testing-library/react';
import { beforeAll, describe, expect, test, vi } from 'vitest';
import { actions } from '../../src/app/actions';
import { FindDialogue } from '../../src/app/find/FindDialogue';
import { findThings, thingsOf } from '../../src/app/find/things';
import { actionFor } from '../../src/store/action';
import { letDown, makePage, type Page, show, sketchOf } from '../drawers/page';

beforeAll(() => {
  // jsdom has the element and not its methods.
  HTMLDialogElement.prototype.showModal = vi.fn(function (this: HTMLDialogElement) {
    this.open = true;
  });
  HTMLDialogElement.prototype.close = vi.fn(function (this: HTMLDialogElement) {
    this.open = false;
  });
});

const chemicals = [{ id: 'n-butane', name: 'n-Butane', formula: 'C4H10' }] as never;
const namesFor = (page: Page, text: string): readonly string[] =>
  findThings(thingsOf(sketchOf(page), chemicals), text).map(({ name }) => name);

describe('finding on the sheet', () => {
  test('a number is first of all a stream’s, then part of a tag; a tag needs no hyphen', () => {
    const page = makePage(letDown);
    expect(namesFor(page, '1')).toEqual(['Stream 1', 'FEED-1', 'PV-101', 'V-101', 'n-Butane']);
    expect(namesFor(page, 'pv101')).toEqual(['PV-101']);
    expect(namesFor(page, 'v-1')).toEqual(['V-101', 'PV-101']);
    expect(namesFor(page, 'drum')).toEqual(['V-101']);
    expect(namesFor(page, 'butane')).toEqual(['n-Butane']);
    expect(namesFor(page, 'C4H10')).toEqual(['n-Butane']);
    expect(namesFor(page, 'nothing of the kind')).toEqual([]);
    expect(namesFor(page, ' ')).toHaveLength(8);
  });

  test('begins with its key on the sheet, never while text is typed', () => {
    const { stores } = makePage(letDown);
    const press = {
      key: '/',
      ctrlKey: false,
      metaKey: false,
      altKey: false,
      shiftKey: false,
    } as KeyboardEvent;
    expect(actionFor(actions, press, false, stores)?.id).toBe('find');
    expect(actionFor(actions, press, true, stores)).toBeUndefined();
  });

  test('Enter selects the first that is found, opens its drawer and brings it to the middle', () => {
    vi.useFakeTimers();
    const page = makePage(letDown);
    page.stores.session.setState({ over: 'find' });
    show(page, <FindDialogue />);
    const field = screen.getByRole('searchbox');
    expect(document.activeElement).toBe(field);
    fireEvent.keyDown(field, { key: 'Enter' });
    expect(page.stores.session.getState().over).toBe('find');
    fireEvent.change(field, { target: { value: '3' } });
    fireEvent.keyDown(field, { key: 'Enter' });
    act(() => vi.runAllTimers());
    const { over, streams, units, drawer, centred } = page.stores.session.getState();
    expect({ over, streams, units, drawer }).toEqual({
      over: 'none',
      streams: ['s3'],
      units: [],
      drawer: { is: 'stream', id: 's3' },
    });
    expect(centred?.thing).toEqual({ stream: 's3' });
    vi.useRealTimers();
  });

  test('the arrows walk from the field through what is found, and a component leads to its list', () => {
    const page = makePage(letDown);
    page.stores.compiled.setState({ basis: { chemicals } as never });
    show(page, <FindDialogue />);
    fireEvent.change(screen.getByRole('searchbox'), { target: { value: 'but' } });
    fireEvent.keyDown(document.activeElement!, { key: 'ArrowDown' });
    expect(document.activeElement?.textContent).toContain('n-Butane');
    fireEvent.keyDown(document.activeElement!, { key: 'ArrowDown' });
    expect(document.activeElement?.textContent).toContain('n-Butane');
    fireEvent.click(document.activeElement!);
    expect(page.stores.session.getState().drawer).toEqual({ is: 'chemicals' });
  });
});
