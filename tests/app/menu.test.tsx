// @vitest-environment jsdom
import { act, cleanup, fireEvent, render, screen } from '@testing-library/react';
import { afterEach, describe, expect, test, vi } from 'vitest';
import { MenuButton } from '../../src/app/Menu';
import type { Action } from '../../src/store/action';
import { StoresProvider } from '../../src/store/react';
import { letDown, makePage } from '../drawers/page';

afterEach(cleanup);

const run = vi.fn();
const action = (label: string, more: Partial<Action> = {}): Action => ({
  id: label,
  label,
  group: 'sketch',
  keys: [],
  run: () => run(label, document.activeElement),
  ...more,
});
const ACTIONS = [
  action('New sketch'),
  action('Not now', { when: () => false }),
  action('Open a file'),
  action('Save'),
  action('Move by steps', { listens: () => true }),
];

function opened() {
  const { stores } = makePage(letDown);
  const outside = vi.fn();
  window.addEventListener('keydown', outside);
  const view = render(
    <StoresProvider value={stores}>
      <MenuButton word="File" actions={ACTIONS} />
    </StoresProvider>,
  );
  const word = screen.getByRole('button', { name: 'File' });
  word.focus();
  fireEvent.keyDown(word, { key: 'ArrowDown' });
  return { word, outside, view, stores };
}
const press = (key: string): void => void fireEvent.keyDown(document.activeElement!, { key });
const focused = (): string | null | undefined => document.activeElement?.textContent;

describe('a menu of the bar', () => {
  test('opens with an arrow; arrows, Home, End and first letters lead through what can be done', () => {
    opened();
    expect(focused()).toBe('New sketch');
    press('ArrowUp');
    expect(focused()).toBe('Move by steps');
    press('Home');
    press('ArrowDown');
    expect(focused()).toBe('Open a file');
    press('End');
    expect(focused()).toBe('Move by steps');
    press('s');
    expect(focused()).toBe('Save');
    press('n');
    expect(focused()).toBe('New sketch');
  });

  test('keeps its keys to itself, and gives the keyboard back to its word with Esc', () => {
    const { word, outside } = opened();
    outside.mockClear();
    for (const key of ['s', 'ArrowDown', 'Escape']) press(key);
    expect(outside).not.toHaveBeenCalled();
    expect(screen.queryByRole('menu')).toBeNull();
    expect(document.activeElement).toBe(word);
  });

  test('has the keyboard on its word again when a choice runs; what goes on by keys on the sheet takes it away', () => {
    const { word } = opened();
    run.mockClear();
    fireEvent.click(screen.getByRole('menuitem', { name: 'Save' }));
    expect(run).toHaveBeenLastCalledWith('Save', word);
    fireEvent.click(word);
    fireEvent.click(screen.getByRole('menuitem', { name: 'Move by steps' }));
    expect(run).toHaveBeenLastCalledWith('Move by steps', document.body);
  });

  test('is left by Tab, and stays where it is when the page behind it draws itself anew', () => {
    const { view, stores } = opened();
    press('End');
    act(() =>
      view.rerender(
        <StoresProvider value={stores}>
          <MenuButton word="File" actions={[...ACTIONS]} />
        </StoresProvider>,
      ),
    );
    expect(focused()).toBe('Move by steps');
    press('Tab');
    expect(screen.queryByRole('menu')).toBeNull();
  });
});
