// @vitest-environment jsdom
import { cleanup, fireEvent, render, screen } from '@testing-library/react';
import { afterEach, beforeEach, expect, test, vi } from 'vitest';
import { ErrorBoundary } from '../../src/app/ErrorBoundary';
import { StoresProvider, useSession, useSketch } from '../../src/store/react';
import { letDown, makePage, sketchOf } from '../drawers/page';

beforeEach(() => void vi.spyOn(console, 'error').mockImplementation(() => undefined));
afterEach(() => {
  cleanup();
  vi.restoreAllMocks();
});

/** Cannot be drawn while the limits are open, nor with a certain title. */
function Fragile() {
  const open = useSession((state) => state.drawer);
  const title = useSketch((state) => state.sketch.title.title);
  if (open?.is === 'limits') throw new Error('no limits today');
  if (title === 'fatal') throw new Error('not that title');
  return <p>drawn</p>;
}

function shown() {
  const page = makePage(letDown);
  const draw = () =>
    render(
      <StoresProvider value={page.stores}>
        <ErrorBoundary stores={page.stores}>
          <Fragile />
        </ErrorBoundary>
      </StoresProvider>,
    );
  return { page, draw };
}

test('what could not be drawn is put away before the page is shown again', () => {
  const { page, draw } = shown();
  page.stores.session.openDrawer({ is: 'limits' });
  draw();
  expect(screen.getByRole('alert').textContent).toContain('no limits today');
  // Nothing was edited: there is nothing to undo.
  expect(screen.queryByRole('button', { name: /Undo/ })).toBeNull();
  fireEvent.click(screen.getByRole('button', { name: 'Show the page again' }));
  expect(screen.getByText('drawn')).toBeTruthy();
});

test('an edit that cannot be drawn is undone from there, and the sketch is as it was before', () => {
  const { page, draw } = shown();
  page.stores.sketch.apply('title', (sketch) => ({ ...sketch, title: { title: 'fatal' } }));
  draw();
  fireEvent.click(screen.getByRole('button', { name: 'Show the page again' }));
  expect(screen.getByRole('alert').textContent).toContain('not that title');
  fireEvent.click(screen.getByRole('button', { name: 'Undo “title” and show the page again' }));
  expect(screen.getByText('drawn')).toBeTruthy();
  expect(sketchOf(page).title).toEqual({});
});
