// @vitest-environment jsdom
import { act, fireEvent } from '@testing-library/react';
import { describe, expect, test } from 'vitest';
import { DrawerHost } from '../../src/drawers/DrawerHost';
import { field, letDown, makePage, show, sketchOf, unitId } from '../drawers/page';

/** The valve without its pressure, and a button that stands for the sheet. */
function opened() {
  const [feed, valve, drum] = letDown.units;
  const page = makePage({ ...letDown, units: [feed, { ...valve, settings: {} }, drum] });
  const { container } = show(
    page,
    <>
      <button type="button" id="sheet">
        sheet
      </button>
      <DrawerHost />
    </>,
  );
  const sheet = container.querySelector<HTMLElement>('#sheet')!;
  sheet.focus();
  const enter = (): void => act(() => page.stores.session.enterDrawer({ is: 'unit', id: unitId('u2') }));
  return { page, sheet, enter };
}
const press = (key: string): boolean => fireEvent.keyDown(document.activeElement!, { key });

describe('the keyboard goes into a drawer and out of it', () => {
  test('in: to the field that needs a value', () => {
    const { enter } = opened();
    enter();
    expect(document.activeElement).toBe(field('p.P'));
  });

  test('Esc first takes back what was typed, then closes the drawer and goes back to where it came from', () => {
    const { page, sheet, enter } = opened();
    enter();
    fireEvent.change(field('p.P'), { target: { value: '3 ba' } });
    press('Escape');
    expect(field('p.P').value).toBe('');
    expect(document.activeElement).toBe(field('p.P'));
    press('Escape');
    expect(document.querySelector('.drawer')).toBeNull();
    expect(document.activeElement).toBe(sheet);
    expect(sketchOf(page).units[1]?.settings).toEqual({});
  });

  test('a drawer that is only opened leaves the keyboard where it is; entered again, it takes it', () => {
    const { page, sheet, enter } = opened();
    act(() => page.stores.session.openDrawer({ is: 'unit', id: unitId('u2') }));
    expect(document.activeElement).toBe(sheet);
    enter();
    expect(document.activeElement).toBe(field('p.P'));
    sheet.focus();
    enter();
    expect(document.activeElement).toBe(field('p.P'));
  });

  test('the drawer of chemicals begins at its search', () => {
    const { page } = opened();
    act(() => page.stores.session.enterDrawer({ is: 'chemicals' }));
    expect(document.activeElement).toBe(field('chemicals.add'));
  });
});
