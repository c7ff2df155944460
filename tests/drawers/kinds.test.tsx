// @vitest-environment jsdom
import { act, fireEvent, screen } from '@testing-library/react';
import { describe, expect, test } from 'vitest';
import { CATALOGUE } from '../../src/engine/units/catalogue';
import type { KindCatalogue } from '../../src/engine/units/types';
import { field, letDown, makePage, settingsOf, show, unitId } from './page';

/** A kind that no code knows: every form of setting once. */
const stranger: KindCatalogue = {
  kind: 'stranger',
  group: 'vessels',
  tag: { letters: 'X', drawn: true },
  ports: [
    { name: 'in', dir: 'in' },
    { name: 'out', dir: 'out', numbered: { min: 1, max: 4 } },
  ],
  settings: {
    holdUp: { is: 'quantity', dim: 'time', min: 0 },
    draw: { is: 'flow' },
    stages: { is: 'whole', min: 1, max: 100 },
    feedStage: { is: 'stage', ends: true },
    mode: { is: 'option', values: ['slow', 'fast'] },
    lined: { is: 'yesNo' },
    keyChemical: { is: 'chemical' },
    efficiency: {
      is: 'some',
      count: 1,
      of: {
        isentropic: { is: 'quantity', dim: 'fraction' },
        polytropic: { is: 'quantity', dim: 'fraction' },
      },
    },
    shell: {
      is: 'record',
      fields: {
        diameter: {
          is: 'quantity',
          dim: 'length',
          otherwise: { value: 1, text: '1 m', why: 'No diameter was given.' },
        },
      },
    },
    outs: { is: 'map', keys: 'port', of: { is: 'flow', share: true } },
    yields: { is: 'map', keys: 'chemical', of: { is: 'quantity', dim: 'fraction' }, optional: true },
    passes: {
      is: 'list',
      min: 1,
      max: 3,
      of: { is: 'record', fields: { length: { is: 'quantity', dim: 'length' } } },
    },
    heating: {
      is: 'cases',
      by: 'how',
      cases: {
        duty: { is: 'quantity', dim: 'power' },
        jacket: { is: 'record', fields: { area: { is: 'quantity', dim: 'area' } } },
      },
    },
  },
  results: { load_W: { dim: 'power' }, inner: { dim: 'number', hidden: true } },
  findings: [],
};
const kinds = { ...CATALOGUE, stranger };
const strangerFile = {
  ...letDown,
  units: [letDown.units[0], { id: 'x', tag: 'X-101', kind: 'stranger', settings: {} }],
  streams: [
    { id: 's1', number: '1', from: ['u1', 'out'], to: ['x', 'in'] },
    { id: 's2', number: '2', from: ['x', 'out1'] },
    { id: 's3', number: '3', from: ['x', 'out2'] },
  ],
};

function open() {
  const page = makePage(strangerFile, kinds);
  page.stores.session.select([unitId('x')]);
  show(page);
  const put = (path: string, value: string): void => {
    fireEvent.change(field(path), { target: { value } });
    fireEvent.blur(field(path));
  };
  return { page, put };
}

describe('every kind of the catalogue', () => {
  test.each(Object.keys(CATALOGUE))('%s opens with its tag, a sentence and labelled fields', (kind) => {
    const settings = CATALOGUE[kind]?.fresh ?? {};
    const page = makePage({ ...letDown, units: [{ id: 'k', tag: 'T-1', kind, settings }], streams: [] });
    page.stores.session.select([unitId('k')]);
    show(page);
    expect(screen.getByLabelText('Tag')).toHaveProperty('value', 'T-1');
    expect(document.querySelector('.drawer-head p')?.textContent).not.toBe('');
    const fields = [...document.querySelectorAll('.drawer-body input, .drawer-body select')];
    for (const element of fields) {
      const isNamed = element.getAttribute('aria-label') || element.closest('label')?.textContent;
      expect(isNamed, element.outerHTML).toBeTruthy();
    }
  });
});

describe('a kind described by its catalogue alone', () => {
  test('has a working field for every form of setting', () => {
    const { page, put } = open();
    put('holdUp', '5 min');
    put('draw', '20 kg/h');
    put('stages', '12');
    put('feedStage', '6');
    fireEvent.click(screen.getByRole('radio', { name: 'fast' }));
    fireEvent.click(screen.getByRole('radio', { name: 'yes' }));
    fireEvent.change(field('keyChemical'), { target: { value: 'n-butane' } });
    put('efficiency.isentropic', '75 %');
    put('shell.diameter', '1200 mm');
    put('outs.out1', '8 %');
    fireEvent.change(screen.getByLabelText('Yields: add a chemical'), { target: { value: 'methane' } });
    put('yields.methane', '3 %');
    fireEvent.click(screen.getByRole('button', { name: 'Add' }));
    put('passes.0.length', '4 m');
    fireEvent.change(field('heating.how'), { target: { value: 'jacket' } });
    put('heating.area', '3 m2');
    expect(settingsOf(page, 'x')).toEqual({
      holdUp: '5 min',
      draw: '20 kg/h',
      stages: 12,
      feedStage: 6,
      mode: 'fast',
      lined: true,
      keyChemical: 'n-butane',
      efficiency: { isentropic: '75 %' },
      shell: { diameter: '1200 mm' },
      outs: { out1: '8 %' },
      yields: { methane: '3 %' },
      passes: [{ length: '4 m' }],
      heating: { how: 'jacket', area: '3 m2' },
    });
  });

  test('says that the one outlet left blank takes the rest', () => {
    const { put } = open();
    expect(field('outs.out2').getAttribute('aria-required')).toBe('true');
    put('outs.out1', '8 %');
    expect(screen.getByText('the rest')).toBeTruthy();
    expect(field('outs.out2').getAttribute('aria-required')).toBeNull();
  });

  test('takes a flow as a share of a stream, with its basis in words', () => {
    const { page, put } = open();
    fireEvent.change(screen.getByLabelText('Draw: what it counts from'), { target: { value: 's1' } });
    put('draw', '14');
    expect(settingsOf(page, 'x').draw).toEqual({ basis: 'mole', share: '14 %', of: { stream: 's1' } });
    expect(screen.getByText('of stream 1, mol')).toBeTruthy();
  });

  test('refuses a stage that is no whole number and keeps the text', () => {
    const { page, put } = open();
    put('stages', '2.5');
    expect(field('stages').value).toBe('2.5');
    expect(settingsOf(page, 'x')).toEqual({});
  });

  test('shows the results its catalogue lists, in the measures, and hides the hidden', () => {
    const { page } = open();
    act(() =>
      page.stores.results.take(
        1,
        true,
        {
          streams: [],
          units: [[unitId('x'), { kind: 'stranger', state: 'solved', results: { load_W: 25000, inner: 7 } }]],
          gone: [],
          findings: [],
        },
        1,
      ),
    );
    expect(screen.getByText('Load')).toBeTruthy();
    expect(screen.getByText('25')).toBeTruthy();
    expect(screen.queryByText('Inner')).toBeNull();
  });

  test('of a kind that is not known the drawer says so and keeps the unit', () => {
    const page = makePage({
      ...letDown,
      units: [{ id: 'u9', tag: 'Z-1', kind: 'unheard', settings: { a: 1 } }],
      streams: [],
    });
    page.stores.session.select([unitId('u9')]);
    show(page);
    expect(screen.getByText(/not available in this version/)).toBeTruthy();
  });

  test('a drawer goes when its unit goes and comes back with it', () => {
    const { page } = open();
    act(
      () =>
        void page.stores.sketch.apply('delete X-101', (sketch) => ({ ...sketch, units: [], streams: [] })),
    );
    expect(screen.queryByRole('complementary')).toBeNull();
    act(() => void page.stores.sketch.undo());
    expect(screen.getByRole('complementary')).toBeTruthy();
  });
});
