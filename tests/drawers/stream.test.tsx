// @vitest-environment jsdom
import { fireEvent, screen, within } from '@testing-library/react';
import { describe, expect, test } from 'vitest';
import { amounts, amountText } from '../../src/drawers/stream/amounts';
import type { StreamResult } from '../../src/engine/network/types';
import { makePage, type Page, show, sketchOf, solvedStream, streamId } from './page';

function openStream(...results: StreamResult[]): Page {
  const page = makePage();
  for (const result of results)
    page.stores.results.take(
      1,
      true,
      { streams: [[streamId('s1'), result]], units: [], gone: [], findings: [] },
      1,
    );
  page.stores.session.select([], [streamId('s1')]);
  show(page);
  return page;
}
const rowOf = (chemical: string): HTMLElement => {
  const row = document.querySelector<HTMLElement>(`[data-component="${chemical}"]`);
  if (!row) throw new Error(`no row for ${chemical}`);
  return row;
};
const cells = (chemical: string): readonly string[] =>
  [...rowOf(chemical).querySelectorAll('.number-cell')].map((cell) => cell.textContent ?? '');

describe('the stream drawer', () => {
  test('shows traces as such, absent as a dash, and the rest in four figures', () => {
    openStream(solvedStream());
    expect(cells('methane')[0]).toBe('<0.01');
    expect(cells('n-butane')[0]).toBe('100.0');
    expect(cells('n-decane')).toEqual(['–', '–']);
  });

  test('keeps the order of the sketch whatever the amounts are', () => {
    openStream(solvedStream({ z: Float64Array.of(0.1, 0.2, 0.7) }));
    const order = [...document.querySelectorAll('[data-component]')].map((row) =>
      row.getAttribute('data-component'),
    );
    expect(order).toEqual(['methane', 'n-butane', 'n-decane']);
  });

  // Derived: 0.1 x 16.04 : 0.2 x 58.12 : 0.7 x 142.28 = 1.604 : 11.624 : 99.596, sum 112.824.
  test('switches to mass and back by the radio group', () => {
    openStream(solvedStream({ z: Float64Array.of(0.1, 0.2, 0.7) }));
    fireEvent.click(screen.getByRole('radio', { name: 'mass %' }));
    expect([cells('methane')[0], cells('n-butane')[0], cells('n-decane')[0]]).toEqual([
      '1.422',
      '10.30',
      '88.28',
    ]);
  });

  test('gives pressure absolute and gauge', () => {
    openStream(solvedStream());
    const shown = [...document.querySelectorAll('.figure-row')].map((row) => row.textContent);
    expect(shown).toContain('Pressure5.000bar(a)');
    expect(shown).toContain('Pressure3.987bar(g)');
  });

  test('tells the vapour alone as gas, with the reference state in the row’s name', () => {
    const phase = { h_J_mol: 0, Z: 0.9, MW_g_mol: 20, density_kg_m3: 10, cp_J_molK: 40 } as const;
    openStream(
      solvedStream({
        n_mol_s: 10,
        vapourFraction: 0.4,
        phases: [
          { ...phase, kind: 'vapour', fraction: 0.4, x: Float64Array.of(0.9, 0.1, 0) },
          { ...phase, kind: 'liquid', fraction: 0.6, x: Float64Array.of(0.1, 0.4, 0.5) },
        ],
      }),
    );
    const shown = [...document.querySelectorAll('.figure-row')].map((row) => row.textContent);
    // Derived: 4 mol/s x 3600 s/h x 22.413969e-3 m3/mol = 322.76 m3/h.
    expect(shown).toContain('Vapour as ideal gas, 0\u00a0°C, 1.01325\u00a0bar322.8Nm³/h');
  });

  test('says which chemical leaves a stream without a standard liquid flow', () => {
    openStream(solvedStream({ noStandardLiquid: [0] }));
    const row = screen.getByText('Standard liquid, 15 °C').closest('.figure-row');
    expect(row?.textContent).toContain('–');
    expect(screen.getByText('No standard liquid: Methane has no liquid density at 15 °C.')).toBeTruthy();
  });

  test('shows an older result as out of date while a new one is missing', () => {
    openStream(solvedStream(), { state: 'waiting' });
    expect(screen.getByText(/Out of date/)).toBeTruthy();
    expect(document.querySelector('.figure-row.older')).not.toBeNull();
  });

  test('shows no figures where there is no solution', () => {
    openStream(solvedStream(), { state: 'no-solution' });
    expect(document.querySelector('.figure-row')).toBeNull();
    expect(screen.getByText(/No solution upstream/)).toBeTruthy();
  });

  test('draws two bars and a table for two phases, with the rule of a viscosity named', () => {
    const phase = { h_J_mol: 0, Z: 0.9, MW_g_mol: 20, density_kg_m3: 10, cp_J_molK: 40 } as const;
    openStream(
      solvedStream({
        vapourFraction: 0.4,
        phases: [
          {
            ...phase,
            kind: 'vapour',
            fraction: 0.4,
            x: Float64Array.of(0.9, 0.1, 0),
            viscosity_Pa_s: 1e-5,
            viscosityRule: 'viscosity/wilke',
          },
          { ...phase, kind: 'liquid', fraction: 0.6, x: Float64Array.of(0.1, 0.4, 0.5) },
        ],
        hiddenLiquid: Float64Array.of(0, 0, 1),
      }),
    );
    expect(rowOf('methane').querySelectorAll('.bars i')).toHaveLength(2);
    expect(within(rowOf('n-decane')).queryByText('0')).toBeNull();
    expect(screen.getByText(/Wilke/)).toBeTruthy();
    expect(screen.getByText(/second liquid would form/)).toBeTruthy();
  });

  test('renumbers the stream, and says why a number that is taken is not', () => {
    const page = openStream(solvedStream());
    const number = screen.getByLabelText('Stream number');
    fireEvent.change(number, { target: { value: '2' } });
    fireEvent.blur(number);
    expect(screen.getByRole('alert').textContent).toContain('2');
    fireEvent.change(number, { target: { value: '101' } });
    fireEvent.blur(number);
    expect(sketchOf(page).streams[0]?.number).toBe('101');
  });
});

describe('amounts of components', () => {
  test('mass shares are not claimed when a molar mass is missing', () => {
    expect(amounts([0.5, 0.5], [18, undefined], 1, 'mass', 'SI')).toEqual([undefined, undefined]);
  });
  test('a trace never reads as zero', () => {
    expect([amountText(0.009, 'mole'), amountText(1e-7, 'moles'), amountText(0, 'mole')]).toEqual([
      '<0.01',
      '<0.0001',
      '–',
    ]);
  });
});
