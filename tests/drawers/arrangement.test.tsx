// @vitest-environment jsdom
import { act, fireEvent, screen } from '@testing-library/react';
import { beforeEach, describe, expect, test, vi } from 'vitest';
import { keepFolds } from '../../src/app/folds';
import { remember, remembered, windowClass } from '../../src/store/remembered';
import { createSession } from '../../src/store/session';
import { columnSketch } from './columnSketch';
import { makePage, show, unitId } from './page';

const resize = (px: number): void => {
  window.innerWidth = px;
  act(() => void window.dispatchEvent(new Event('resize')));
};
beforeEach(() => {
  localStorage.clear();
  resize(1440);
});

describe('the width of the drawer', () => {
  const open = () => {
    const page = makePage();
    page.stores.session.openDrawer({ is: 'limits' });
    return show(page);
  };
  const width = (): string => document.querySelector<HTMLElement>('.drawer')?.style.width ?? '';
  const wider = (): void =>
    void fireEvent.keyDown(screen.getByRole('separator', { name: 'Width of the drawer' }), {
      key: 'ArrowLeft',
    });

  test('is remembered for each class of window width, and fixed in small windows', () => {
    const { unmount } = open();
    expect(width()).toBe('368px');
    wider();
    expect(width()).toBe('384px');
    resize(1900);
    expect(width()).toBe('368px');
    wider();
    wider();
    expect(width()).toBe('400px');
    resize(1024);
    expect(width()).toBe('304px');
    expect(screen.queryByRole('separator')).toBeNull();
    resize(1300);
    expect(width()).toBe('384px');
    unmount();
    open();
    expect(width()).toBe('384px');
    resize(1900);
    expect(width()).toBe('400px');
  });

  test('of a column begins wider and is remembered apart', () => {
    const page = makePage(columnSketch());
    page.stores.session.openDrawer({ is: 'unit', id: unitId('c') });
    show(page);
    expect(width()).toBe('472px');
    wider();
    expect(width()).toBe('488px');
    act(() => page.stores.session.openDrawer({ is: 'unit', id: unitId('u1') }));
    expect(width()).toBe('368px');
    act(() => page.stores.session.openDrawer({ is: 'unit', id: unitId('c') }));
    expect(width()).toBe('488px');
    fireEvent.doubleClick(screen.getByRole('separator', { name: 'Width of the drawer' }));
    expect(width()).toBe('472px');
    resize(1024);
    expect(width()).toBe('304px');
  });

  test('is the usual one where something else was stored', () => {
    localStorage.setItem('splitwright.drawer-width.medium', '9000');
    open();
    expect(width()).toBe('368px');
  });
});

describe('what is folded', () => {
  test('is remembered for each class of window width', () => {
    const first = createSession();
    const stop = keepFolds(first);
    expect(first.getState()).toMatchObject({ shelfFolded: false, balanceFolded: false });
    first.setState({ shelfFolded: true });
    resize(1900);
    expect(first.getState().shelfFolded).toBe(false);
    first.setState({ balanceFolded: true });
    resize(1440);
    expect(first.getState()).toMatchObject({ shelfFolded: true, balanceFolded: false });
    stop();
    const next = createSession();
    const end = keepFolds(next);
    expect(next.getState()).toMatchObject({ shelfFolded: true, balanceFolded: false });
    resize(1900);
    expect(next.getState()).toMatchObject({ shelfFolded: false, balanceFolded: true });
    end();
  });

  test('is forgotten without complaint where the browser denies storage', () => {
    const denied = (): never => {
      throw new DOMException('denied', 'SecurityError');
    };
    vi.spyOn(Storage.prototype, 'getItem').mockImplementation(denied);
    vi.spyOn(Storage.prototype, 'setItem').mockImplementation(denied);
    expect(remembered('folded.shelf.medium')).toBeUndefined();
    expect(() => remember('folded.shelf.medium', 'yes')).not.toThrow();
    vi.restoreAllMocks();
  });

  test.each([
    [1024, 'small'],
    [1100, 'small'],
    [1101, 'medium'],
    [1440, 'medium'],
    [1920, 'wide'],
  ])('%d px wide is %s', (px, name) => {
    expect(windowClass(px)).toBe(name);
  });
});
