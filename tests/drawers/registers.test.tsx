// @vitest-environment jsdom
import { fireEvent, screen } from '@testing-library/react';
import { describe, expect, test } from 'vitest';
import { searchBank } from '../../src/drawers/chemicals/search';
import type { Finding } from '../../src/engine/outcome';
import { field, makePage, type Page, show, sketchOf, undoLabels, unitId } from './page';

const finding = (
  weight: Finding['weight'],
  unit: string,
  code: Finding['code'] = 'cooling/below-air',
): Finding => ({
  code,
  weight,
  at: { unit: unitId(unit) },
  evidence: [
    { name: 'temperature', value: 300, dim: 'temperature' },
    { name: 'limit', value: 318.15, dim: 'temperature' },
    { name: 'basis', value: 0, dim: 'number', text: 'common-practice' },
  ],
});

function openDrawer(
  is: 'limits' | 'assumptions' | 'chemicals' | 'sketch',
  prepare: (page: Page) => void = () => undefined,
): Page {
  const page = makePage();
  prepare(page);
  page.stores.session.openDrawer({ is });
  show(page);
  return page;
}

describe('the limits drawer', () => {
  test('lists the worst first, with a ruler and the basis, and selects the unit on a click', () => {
    const page = openDrawer('limits', ({ stores }) =>
      stores.results.setState({ findings: [finding('note', 'u2'), finding('beyond-limit', 'u3')] }),
    );
    const rows = [...document.querySelectorAll('.limit')];
    expect(rows.map((row) => row.getAttribute('data-weight'))).toEqual(['beyond-limit', 'note']);
    expect(rows[0]?.querySelector('.limit-ruler')).not.toBeNull();
    expect(screen.getAllByText('common practice')).toHaveLength(2);
    fireEvent.click(screen.getByRole('button', { name: /V-101.*beyond limit/ }));
    expect(page.stores.session.getState().units).toEqual(['u3']);
    expect(page.stores.session.getState().drawer).toEqual({ is: 'limits' });
  });

  test('tells the zone, and asks the sheet to bring the unit to its middle', () => {
    const page = openDrawer('limits', ({ stores }) => {
      stores.results.setState({ findings: [finding('caution', 'u3')] });
      stores.session.setState({ zones: new Map([['u3', 'C4']]) });
    });
    expect(document.querySelector('.limit .zone')?.textContent).toBe(', zone C4');
    const row = screen.getByRole('button', { name: /V-101.*, zone\s*C4/ });
    fireEvent.click(row);
    const asked = page.stores.session.getState().centred;
    expect(asked?.thing).toEqual({ unit: 'u3' });
    fireEvent.click(row);
    expect(page.stores.session.getState().centred).not.toBe(asked);
    expect(page.stores.session.getState().drawer).toEqual({ is: 'limits' });
  });

  test('leads from a pair without a parameter to the table of pairs', () => {
    const page = openDrawer('limits', ({ stores }) =>
      stores.results.setState({ findings: [finding('caution', 'u3', 'model/pair-none')] }),
    );
    fireEvent.click(screen.getByRole('button', { name: 'Open the pair parameters' }));
    expect(page.stores.session.getState().over).toBe('pairs');
  });

  test('keeps what is noted about the sketch apart from the limits', () => {
    openDrawer('limits', ({ stores }) => {
      stores.results.setState({ findings: [finding('caution', 'u2')] });
      stores.compiled.setState({ notes: [{ ...finding('note', 'u3'), code: 'sketch/parts-normalised' }] });
    });
    expect(document.querySelector('.counts')?.textContent?.trim()).toBe('1 caution');
    expect(document.querySelectorAll('.about-sketch .limit')).toHaveLength(1);
  });

  test('says that none fired and what is checked, without calling anything fine', () => {
    openDrawer('limits');
    expect(screen.getByText(/none of these checks fired/i)).toBeTruthy();
    expect(document.querySelectorAll('.checked li').length).toBeGreaterThan(5);
  });
});

describe('the assumption register', () => {
  test('lists number, value and reason, and leads to the field', () => {
    const page = openDrawer('assumptions', ({ stores }) =>
      stores.compiled.setState({
        assumptions: [
          {
            no: 'A1',
            unit: unitId('u3'),
            path: 'p.drop',
            value: 0,
            unitText: '0 bar',
            reason: 'No pressure drop was given.',
          },
        ],
      }),
    );
    expect(screen.getByText('A1')).toBeTruthy();
    expect(screen.getByText('0 bar')).toBeTruthy();
    fireEvent.click(screen.getByRole('button', { name: 'Change in V-101' }));
    expect(page.stores.session.getState().drawer).toEqual({ is: 'unit', id: 'u3' });
  });
});

describe('the chemicals drawer', () => {
  test('adds a chemical found by its CAS number with Enter', () => {
    const page = openDrawer('chemicals');
    fireEvent.change(field('chemicals.add'), { target: { value: '106-99-0' } });
    fireEvent.keyDown(field('chemicals.add'), { key: 'Enter' });
    expect(sketchOf(page).chemicals).toEqual(['methane', 'n-butane', 'n-decane', '1,3-butadiene']);
  });

  test('tells where a chemical is used before it goes, and removes it there on demand in one step', () => {
    const page = openDrawer('chemicals');
    fireEvent.click(screen.getByRole('button', { name: 'Remove Methane' }));
    expect(screen.getByRole('alert').textContent).toContain('FEED-1');
    expect(sketchOf(page).chemicals).toHaveLength(3);
    fireEvent.click(screen.getByRole('button', { name: 'Remove it there too' }));
    expect(sketchOf(page).chemicals).toEqual(['n-butane', 'n-decane']);
    expect(undoLabels(page)).toHaveLength(1);
  });

  test('changes the order, which is the order everywhere', () => {
    const page = openDrawer('chemicals');
    fireEvent.click(screen.getByRole('button', { name: 'Move n-Decane up' }));
    expect(sketchOf(page).chemicals).toEqual(['methane', 'n-decane', 'n-butane']);
  });

  test('chooses the model and its options', () => {
    const page = openDrawer('chemicals');
    fireEvent.click(screen.getByRole('radio', { name: '1978' }));
    expect(sketchOf(page).model).toEqual({ kind: 'peng-robinson', alpha: '1978' });
    fireEvent.change(field('model.kind'), { target: { value: 'raoult' } });
    expect(sketchOf(page).model.kind).toBe('raoult');
  });

  test('the search prefers a whole name to a part of one', () => {
    const index = [
      { id: 'n-butane', name: 'n-Butane', MW_g_mol: 58 },
      { id: 'butane-thiol', name: 'Butane thiol', MW_g_mol: 90 },
      { id: 'ethane', name: 'Ethane', formula: 'C2H6', MW_g_mol: 30 },
      { id: 'methane', name: 'Methane', MW_g_mol: 16 },
    ];
    expect(searchBank(index, 'ethane').map((e) => e.id)).toEqual(['ethane', 'methane']);
    expect(searchBank(index, 'c2h6').map((e) => e.id)).toEqual(['ethane']);
    expect(searchBank(index, ' ')).toEqual([]);
  });
});

describe('the sketch drawer', () => {
  test('writes the title block, the site and the measures', () => {
    const page = openDrawer('sketch');
    fireEvent.change(field('title.title'), { target: { value: 'Let-down' } });
    fireEvent.blur(field('title.title'));
    fireEvent.change(field('site.pressure'), { target: { value: '0.9 atm' } });
    fireEvent.blur(field('site.pressure'));
    fireEvent.click(screen.getByRole('radio', { name: 'US' }));
    fireEvent.click(screen.getByRole('radio', { name: 'gauge (g)' }));
    const { title, site, display } = sketchOf(page);
    expect(title).toEqual({ title: 'Let-down' });
    expect(site).toEqual({ pressure: '0.9 atm' });
    expect(display).toMatchObject({ set: 'US', gauge: true });
  });

  test('lets the labels show up to three quantities', () => {
    const page = openDrawer('sketch');
    const box = screen.getByRole('checkbox', { name: 'Mass flow' });
    expect((box as HTMLInputElement).disabled).toBe(true);
    fireEvent.click(screen.getByRole('checkbox', { name: 'Pressure' }));
    fireEvent.click(screen.getByRole('checkbox', { name: 'Mass flow' }));
    expect(sketchOf(page).display.labels).toEqual(['molarFlow', 'massFlow', 'temperature']);
  });
});
