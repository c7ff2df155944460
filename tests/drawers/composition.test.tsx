// @vitest-environment jsdom
import { fireEvent, screen } from '@testing-library/react';
import { describe, expect, test } from 'vitest';
import { converted } from '../../src/drawers/unit/composition';
import { readPaste } from '../../src/drawers/unit/paste';
import { field, letDown, makePage, type Page, settingsOf, show, undoLabels, unitId } from './page';

function openFeed(document: unknown = letDown): Page {
  const page = makePage(document);
  page.stores.session.select([unitId('u1')]);
  show(page);
  return page;
}
const paste = (path: string, text: string): void =>
  void fireEvent.paste(field(path), { clipboardData: { getData: () => text } });

describe('a composition', () => {
  test('takes a column copied from a spreadsheet from the row downwards, in one step', () => {
    const page = openFeed();
    paste('composition.parts.methane', '20\n50\n30\n');
    expect(settingsOf(page, 'u1').composition).toEqual({
      basis: 'mole',
      parts: { methane: '20 %', 'n-butane': '50 %', 'n-decane': '30 %' },
    });
    expect(undoLabels(page)).toEqual(['paste FEED-1 composition']);
  });

  test('takes names with numbers in any order and tells what it left out', () => {
    const page = openFeed();
    paste(
      'composition.parts.methane',
      'Component\tmol frac\nn-Decane\t0.25\nC4H10\t0.45\nMETHANE\t0.3\nargon\t0.0',
    );
    expect(settingsOf(page, 'u1').composition).toEqual({
      basis: 'mole',
      parts: { methane: '0.3', 'n-butane': '0.45', 'n-decane': '0.25' },
    });
    expect(screen.getByRole('status').textContent).toContain('argon');
  });

  test('gives a bare number the unit that stands in its field', () => {
    const page = openFeed();
    fireEvent.focus(field('composition.parts.methane'));
    fireEvent.change(field('composition.parts.methane'), { target: { value: '25' } });
    fireEvent.blur(field('composition.parts.methane'));
    expect(settingsOf(page, 'u1').composition).toMatchObject({ parts: { methane: '25 %' } });
    expect(screen.getByText(/5.00 % missing/)).toBeTruthy();
  });

  test('offers per cent for a bare number above one among fractions, and does not assume it', () => {
    const page = openFeed({
      ...letDown,
      units: letDown.units.map((u) =>
        u.id === 'u1'
          ? {
              ...u,
              settings: {
                ...u.settings,
                composition: { basis: 'mole', parts: { methane: 0.3, 'n-butane': 0.7 } },
              },
            }
          : u,
      ),
    });
    fireEvent.change(field('composition.parts.methane'), { target: { value: '30' } });
    fireEvent.blur(field('composition.parts.methane'));
    expect(settingsOf(page, 'u1').composition).toMatchObject({ parts: { methane: 0.3 } });
    fireEvent.click(screen.getByRole('button', { name: '30 %' }));
    expect(settingsOf(page, 'u1').composition).toMatchObject({ parts: { methane: '30 %' } });
  });

  test('is scaled to 100 % on demand', () => {
    const page = openFeed({
      ...letDown,
      units: letDown.units.map((u) =>
        u.id === 'u1'
          ? {
              ...u,
              settings: {
                ...u.settings,
                composition: { basis: 'mole', parts: { methane: '49.5 %', 'n-butane': '49.5 %' } },
              },
            }
          : u,
      ),
    });
    fireEvent.click(screen.getByRole('button', { name: 'Scale to 100 %' }));
    expect(settingsOf(page, 'u1').composition).toMatchObject({
      parts: { methane: '50 %', 'n-butane': '50 %' },
    });
  });

  test.each([
    ['49 %', 'Scale to 100 %', false],
    ['48.9 %', 'Scale what was typed to 100 %', true],
  ] as const)('two of %s: the button reads “%s”', (part, name, isSaid) => {
    openFeed({
      ...letDown,
      units: letDown.units.map((u) =>
        u.id === 'u1'
          ? {
              ...u,
              settings: {
                ...u.settings,
                composition: { basis: 'mole', parts: { methane: part, 'n-butane': part } },
              },
            }
          : u,
      ),
    });
    expect(screen.getByRole('button', { name })).toBeTruthy();
    expect(screen.queryByText(/nothing is scaled unless you say so/) !== null).toBe(isSaid);
  });

  test('asks whether numbers are converted or kept when the basis changes', () => {
    const page = openFeed();
    fireEvent.click(screen.getByRole('radio', { name: 'mass' }));
    expect(settingsOf(page, 'u1').composition).toMatchObject({ basis: 'mole' });
    fireEvent.click(screen.getByRole('button', { name: 'Keep the numbers' }));
    expect(settingsOf(page, 'u1').composition).toEqual({
      basis: 'mass',
      parts: { methane: '30 %', 'n-butane': '40 %', 'n-decane': '30 %' },
    });
  });

  test('becomes ready-made air with its humidity', () => {
    const page = openFeed();
    fireEvent.click(screen.getByRole('radio', { name: 'air' }));
    expect(settingsOf(page, 'u1').composition).toEqual({ preset: 'dry air' });
    fireEvent.change(field('composition.preset'), { target: { value: 'humid air' } });
    fireEvent.change(field('composition.relativeHumidity'), { target: { value: '60' } });
    fireEvent.blur(field('composition.relativeHumidity'));
    expect(settingsOf(page, 'u1').composition).toEqual({ preset: 'humid air', relativeHumidity: '60 %' });
  });

  test('given as component flows takes the total flow away, which they carry', () => {
    const page = openFeed();
    fireEvent.click(screen.getByRole('radio', { name: 'flows' }));
    fireEvent.change(field('composition.flows.methane'), { target: { value: '30' } });
    fireEvent.blur(field('composition.flows.methane'));
    expect(settingsOf(page, 'u1')).toEqual({
      state: { T: '40 degC', P: '30 bar' },
      composition: { flows: { methane: '30 kmol/h' } },
    });
  });
});

describe('turning mole into mass', () => {
  // Derived: 0.5 x 10 : 0.5 x 30 = 1 : 3.
  test('weighs by molar mass and sums to 100 % exactly', () => {
    const weight = (id: string): number => (id === 'a' ? 10 : 30);
    expect(
      converted(
        new Map<string, string | number>([
          ['a', '50 %'],
          ['b', 0.5],
        ]),
        'mass',
        weight,
      ),
    ).toEqual({ a: '25 %', b: '75 %' });
  });

  test('gives nothing where a molar mass is not known', () => {
    expect(converted(new Map([['a', '50 %']]), 'mass', () => undefined)).toBeUndefined();
  });
});

describe('reading a paste', () => {
  const targets = [
    { id: '1,3-butadiene', names: ['1,3-butadiene'] },
    { id: 'water', names: ['water', 'H2O'] },
  ];
  test('does not split a name at its comma', () => {
    expect([...(readPaste('1,3-butadiene,40\nwater,60', targets, 0, '%')?.values ?? [])]).toEqual([
      ['1,3-butadiene', '40 %'],
      ['water', '60 %'],
    ]);
  });
  test('leaves a single number to the field', () => {
    expect(readPaste('12.5 %', targets, 0, '%')).toBeUndefined();
  });
  test('takes a row across as a column', () => {
    expect([...(readPaste('40\t60', targets, 0, '%')?.values.values() ?? [])]).toEqual(['40 %', '60 %']);
  });
  test('counts the rows that have no chemical', () => {
    expect(readPaste('40\n50\n10', targets, 0, '%')?.surplus).toBe(1);
  });
});
