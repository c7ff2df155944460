// @vitest-environment jsdom
import { fireEvent, screen } from '@testing-library/react';
import { beforeAll, expect, test, vi } from 'vitest';
import { actions } from '../../src/app/actions';
import { Bar } from '../../src/app/Bar';
import { KeyList } from '../../src/app/KeyList';
import { letDown, makePage, show } from '../drawers/page';

beforeAll(() => {
  // jsdom has the element and not its methods.
  HTMLDialogElement.prototype.showModal = vi.fn(function (this: HTMLDialogElement) {
    this.open = true;
  });
  HTMLDialogElement.prototype.close = vi.fn(function (this: HTMLDialogElement) {
    this.open = false;
  });
});

const keysOf = (name: string): string | null | undefined =>
  screen.getByRole('button', { name }).closest('li')?.querySelector('kbd')?.textContent;

test('the list of actions turns single keys off, shows which are off, and the tooltips of the bar name them no longer', () => {
  const page = makePage(letDown);
  show(
    page,
    <>
      <Bar actions={actions} />
      <KeyList actions={actions} />
    </>,
  );
  const tip = (): string | null => screen.getByRole('button', { name: 'Chemicals' }).getAttribute('title');
  expect(tip()).toBe('Chemicals and thermodynamic model (H)');
  expect(keysOf('Limits')).toBe('L');
  expect(keysOf('All actions and their keys')).toBe('? or F1');
  fireEvent.click(screen.getByRole('radio', { name: 'off' }));
  expect(page.stores.session.getState().singleKeys).toBe(false);
  expect(localStorage.getItem('splitwright.singleKeys')).toBe('no');
  expect(tip()).toBe('Chemicals and thermodynamic model');
  expect(keysOf('Limits')).toBe('L: off');
  expect(keysOf('All actions and their keys')).toBe('F1');
  expect(keysOf('Single keys act: off')).toBe('Shift+F1');
  expect(keysOf('Export CSV')).toBe('Ctrl+Shift+E');
  expect(screen.getAllByText(/F1 lists all actions/)).toHaveLength(1);
  fireEvent.click(screen.getByRole('radio', { name: 'on' }));
  expect(keysOf('Limits')).toBe('L');
  expect(localStorage.getItem('splitwright.singleKeys')).toBe('yes');
});
