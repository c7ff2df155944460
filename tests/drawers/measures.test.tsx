// @vitest-environment jsdom
import { act, fireEvent, screen } from '@testing-library/react';
import { describe, expect, test } from 'vitest';
import { measuresOf, withReference } from '../../src/drawing/measures';
import { displayUnit } from '../../src/quantity';
import { field, makePage, type Page, show, sketchOf, solvedStream, streamId, undoLabels } from './page';

function open(): Page {
  const page = makePage();
  page.stores.session.openDrawer({ is: 'sketch' });
  show(page);
  fireEvent.click(screen.getByRole('button', { name: /^Unit of each quantity/ }));
  return page;
}
const put = (path: string, value: string): void => {
  fireEvent.change(field(path), { target: { value } });
  fireEvent.blur(field(path));
};
const shownIn = (page: Page, dim: 'pressure' | 'molarFlow'): string =>
  displayUnit(dim, measuresOf(sketchOf(page))).label;

describe('a quantity shown in a unit of one’s own', () => {
  test('is saved with the sketch, counts everywhere, and is one step of undo', () => {
    const page = open();
    expect(field('display.units.molarFlow').placeholder).toBe('kmol/h');
    put('display.units.molarFlow', 'lbmol/h');
    expect(sketchOf(page).display.units).toEqual({ molarFlow: 'lbmol/h' });
    expect(shownIn(page, 'molarFlow')).toBe('lbmol/h');
    expect(undoLabels(page)).toEqual(['show molar flow in lbmol/h']);
    act(() => void page.stores.sketch.undo());
    expect(shownIn(page, 'molarFlow')).toBe('kmol/h');
    expect(field('display.units.molarFlow').value).toBe('');
  });

  test('shows in the drawer of a stream', () => {
    const page = open();
    put('display.units.molarFlow', 'mol/s');
    act(() => {
      page.stores.results.take(
        1,
        true,
        { streams: [[streamId('s1'), solvedStream({ n_mol_s: 12.5 })]], units: [], gone: [], findings: [] },
        1,
      );
      page.stores.session.openDrawer({ is: 'stream', id: streamId('s1') });
    });
    expect(document.querySelector('.drawer')?.textContent).toMatch(/12\.50mol\/s/);
  });

  test('goes back to the set when the field is emptied', () => {
    const page = open();
    put('display.units.molarFlow', 'mol/s');
    put('display.units.molarFlow', '');
    expect(sketchOf(page).display.units).toBeUndefined();
    expect(undoLabels(page)[1]).toBe('show molar flow as the set has it');
  });

  test('is refused with a reason and what would fit when it measures something else', () => {
    const page = open();
    put('display.units.pressure', 'kg/h');
    expect(screen.getByRole('alert').textContent).toMatch(/bar\(a\), bar\(g\)/);
    expect(field('display.units.pressure').value).toBe('kg/h');
    expect(sketchOf(page).display.units).toBeUndefined();
  });
});

describe('a pressure', () => {
  test('always says (a) or (g), be the unit typed without', () => {
    const page = open();
    put('display.units.pressure', 'MPa');
    expect(shownIn(page, 'pressure')).toBe('MPa(a)');
    expect(screen.getByText('shown as MPa(a)')).toBeTruthy();
    put('display.units.pressure', 'psig');
    expect(shownIn(page, 'pressure')).toBe('psi(g)');
    expect((screen.getByRole('radio', { name: 'gauge (g)' }) as HTMLInputElement).checked).toBe(true);
  });

  test('goes back to the set’s unit when absolute or gauge is chosen', () => {
    const page = open();
    put('display.units.pressure', 'MPa');
    fireEvent.click(screen.getByRole('radio', { name: 'gauge (g)' }));
    expect(shownIn(page, 'pressure')).toBe('bar(g)');
    expect(sketchOf(page).display.units).toBeUndefined();
  });

  test.each([
    ['barg', 'bar(a)', 'bar(g)'],
    ['bar', 'bar(a)', 'bar(g)'],
    ['MPa(g)', 'MPa(a)', 'MPa(g)'],
    // A unit that takes no mark is absolute; its gauge row is in the set's own.
    ['mmHg', 'mmHg(a)', 'bar(g)'],
    ['psia', 'psi(a)', 'psi(g)'],
  ])('chosen in %s stands in tables in %s and %s', (unit, absolute, gauge) => {
    const measures = { set: 'metric', units: { pressure: unit } } as const;
    expect(displayUnit('pressure', withReference(measures, 'absolute')).label).toBe(absolute);
    expect(displayUnit('pressure', withReference(measures, 'gauge')).label).toBe(gauge);
  });
});
