// @vitest-environment jsdom
import 'fake-indexeddb/auto';
import { fireEvent, screen, waitFor } from '@testing-library/react';
import { afterEach, beforeAll, beforeEach, describe, expect, test, vi } from 'vitest';
import { MySketches } from '../../src/app/MySketches';
import { stateNames } from '../../src/app/PastStates';
import { setStorage } from '../../src/app/storage';
import { emptySketch } from '../../src/sketch/fresh';
import { SketchStorage } from '../../src/store/autosave';
import { makePage, show } from '../drawers/page';

let storage: SketchStorage;
let no = 0;

beforeAll(() => {
  // jsdom has the element and not its methods.
  HTMLDialogElement.prototype.showModal = vi.fn(function (this: HTMLDialogElement) {
    this.open = true;
  });
  HTMLDialogElement.prototype.close = vi.fn(function (this: HTMLDialogElement) {
    this.open = false;
  });
});
beforeEach(async () => {
  no += 1;
  storage = await SketchStorage.open(`sketches-${no}`);
  for (const [k, title] of ['Third', 'Second', 'First'].entries()) {
    await storage.save({ ...emptySketch(title), title: { title } }, 0, 'open', 1000 * (k + 1));
  }
  setStorage(storage);
  show(makePage(), <MySketches />);
  await screen.findByRole('button', { name: 'Delete: First' });
});
afterEach(() => {
  setStorage(null);
  storage.close();
});

const focused = (): string | null | undefined => document.activeElement?.getAttribute('aria-label');
async function press(name: string): Promise<void> {
  const button = await screen.findByRole('button', { name });
  button.focus();
  fireEvent.click(button);
}

describe('the list of sketches, by keys', () => {
  test('deleting puts the focus on the next row, at the end on the one before, and then on the button below', async () => {
    await press('Delete: First');
    await waitFor(() => expect(focused()).toBe('Delete: Second'));
    await press('Delete: Third');
    await waitFor(() => expect(focused()).toBe('Delete: Second'));
    await press('Delete: Second');
    await waitFor(() => expect(document.activeElement?.textContent).toBe('New sketch'));
    expect(screen.getByRole('status').textContent).toBe('Second is deleted; undo below.');
  });

  test('what is brought back has the focus in the list again; what goes for good passes it on', async () => {
    await press('Delete: First');
    await press('Delete: Second');
    await press('Undo: First');
    await waitFor(() => expect(focused()).toBe('Delete: First'));
    await press('Delete: First');
    await press('Delete for good: First');
    await waitFor(() => expect(focused()).toBe('Delete for good: Second'));
  });

  test('a name that was typed, or left, gives the focus back to its row', async () => {
    await press('Rename: Second');
    expect(focused()).toBe('New name of Second');
    fireEvent.keyDown(document.activeElement!, { key: 'Escape' });
    await waitFor(() => expect(focused()).toBe('Rename: Second'));
    await press('Rename: Second');
    fireEvent.change(document.activeElement!, { target: { value: 'Other' } });
    // The key is used up: the button that has the focus next does not take it for its own.
    expect(fireEvent.keyDown(document.activeElement!, { key: 'Enter' })).toBe(false);
    await waitFor(() => expect(focused()).toBe('Rename: Other'));
  });
});

describe('past states', () => {
  test('are told apart to the second, and within one second by the count of the edit', () => {
    const at = (text: string): number => new Date(text).getTime();
    const names = stateNames([
      { counter: 9, at: at('2026-12-01T16:02:41.700'), label: 'move PV-101' },
      { counter: 8, at: at('2026-12-01T16:02:41.200'), label: 'move PV-101' },
      { counter: 7, at: at('2026-12-01T16:02:13.000'), label: 'move PV-101' },
      { counter: 6, at: at('2026-12-01T16:02:13.500'), label: 'turn PV-101' },
    ]);
    expect(names.map(({ time, label }) => `${time} ${label}`)).toEqual([
      '1 Dec 2026, 16:02:41 move PV-101 (edit 9)',
      '1 Dec 2026, 16:02:41 move PV-101 (edit 8)',
      '1 Dec 2026, 16:02:13 move PV-101',
      '1 Dec 2026, 16:02:13 turn PV-101',
    ]);
  });
});
