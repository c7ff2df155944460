// @vitest-environment jsdom
import { act, fireEvent, screen } from '@testing-library/react';
import { describe, expect, test } from 'vitest';
import { PairsPage } from '../../src/drawers/chemicals/Pairs';
import { loadBankData } from '../../src/sketch/bank';
import { compile } from '../../src/sketch/compile';
import { field, letDown, makePage, type Page, show, sketchOf, undoLabels } from './page';

const KIJ = 'model.pairs.methane.n-butane';

/** A page that compiles what is shown, as the app does. */
async function compiling(document: unknown = letDown): Promise<Page> {
  const page = makePage(document);
  const { sketch, compiled } = page.stores;
  const data = await loadBankData(sketch.getState().sketch);
  const run = (): void => {
    const { basis, problem, gaps, notes, assumptions } = compile(sketch.getState().sketch, data);
    compiled.setState({ basis: basis ?? null, problem, gaps, notes, assumptions });
  };
  run();
  sketch.subscribe((now, before) => {
    if (now.sketch !== before.sketch) act(run);
  });
  return page;
}

async function openDrawer(document?: unknown): Promise<Page> {
  const page = await compiling(document);
  page.stores.session.openDrawer({ is: 'chemicals' });
  show(page);
  const disclosure = screen.queryByRole('button', { name: /in force/ });
  if (disclosure) fireEvent.click(disclosure);
  return page;
}
const rows = (): HTMLElement[] => [...document.querySelectorAll<HTMLElement>('[data-pair]')];
const row = (pair: string): HTMLElement => rows().find((r) => r.dataset.pair === pair) as HTMLElement;
const type = (path: string, text: string): void => {
  fireEvent.change(field(path), { target: { value: text } });
  fireEvent.blur(field(path));
};

describe('the pairs of the sketch', () => {
  test('stand in a table with value, origin and source', async () => {
    await openDrawer();
    expect(rows().map((r) => r.dataset.pair)).toEqual([
      'methane n-butane',
      'methane n-decane',
      'n-butane n-decane',
    ]);
    const first = row('methane n-butane');
    expect(first.dataset.origin).toBe('fitted');
    expect(first.querySelector('.quantity-field')?.getAttribute('data-state')).toBe('assumed');
    expect(first.querySelector('.source')?.textContent).not.toBe('');
  });

  test('take a value of one’s own, in one step, and give it back', async () => {
    const page = await openDrawer();
    const before = sketchOf(page);
    type(KIJ, '0.02');
    expect(sketchOf(page).model.pairs).toEqual([{ i: 'methane', j: 'n-butane', kij: 0.02 }]);
    expect(row('methane n-butane').dataset.origin).toBe('given');
    expect(row('methane n-butane').querySelector('.source')?.textContent).toMatch(/^instead of .*, fitted$/);
    expect(page.stores.compiled.getState().assumptions.some((a) => a.path === 'model.pairs')).toBe(false);
    fireEvent.click(screen.getByRole('button', { name: 'Clear your own value of Methane + n-Butane' }));
    expect(sketchOf(page)).toEqual(before);
    expect(row('methane n-butane').dataset.origin).toBe('fitted');
    expect(undoLabels(page)).toEqual(['set pair methane + n-butane', 'clear pair methane + n-butane']);
  });

  test('refuse what is no number and what no pair can have, and keep the document', async () => {
    const page = await openDrawer();
    const before = sketchOf(page);
    type(KIJ, '2 bar');
    expect(row('methane n-butane').querySelector('.refusal')).not.toBeNull();
    type(KIJ, '1.5');
    expect(row('methane n-butane').querySelector('.refusal')?.textContent).toContain('above 1');
    expect(sketchOf(page)).toBe(before);
  });

  test('slide as one step', async () => {
    const page = await openDrawer({
      ...letDown,
      model: { kind: 'peng-robinson', pairs: [{ i: 'methane', j: 'n-butane', kij: 0.02 }] },
    });
    for (let k = 0; k < 3; k += 1) fireEvent.keyDown(field(KIJ), { key: 'ArrowUp', altKey: true });
    fireEvent.keyUp(field(KIJ), { key: 'Alt' });
    expect(sketchOf(page).model.pairs).toEqual([{ i: 'methane', j: 'n-butane', kij: 0.0203 }]);
    expect(undoLabels(page)).toEqual(['slide pair methane + n-butane']);
  });

  test('are filtered by component', async () => {
    await openDrawer();
    fireEvent.change(field('pairs.only'), { target: { value: 'n-decane' } });
    expect(rows().map((r) => r.dataset.pair)).toEqual(['methane n-decane', 'n-butane n-decane']);
  });

  test('of chemicals that have gone are told and can be removed', async () => {
    const page = await openDrawer({
      ...letDown,
      model: { kind: 'peng-robinson', pairs: [{ i: 'methane', j: 'ethane', kij: 0.01 }] },
    });
    fireEvent.click(screen.getByRole('button', { name: 'Remove the pair methane + ethane' }));
    expect(sketchOf(page).model.pairs).toBeUndefined();
  });

  test('are none with Raoult’s law, and that is said', async () => {
    await openDrawer({ ...letDown, model: { kind: 'raoult' } });
    expect(screen.getByText(/knows no pairs/)).toBeTruthy();
    expect(rows()).toEqual([]);
  });

  test('cannot be changed in a sketch that another tab holds', async () => {
    const page = await openDrawer();
    act(() => page.stores.sketch.setWritable(false));
    expect(field(KIJ).disabled).toBe(true);
  });

  test('stand in a matrix too, where a number opens its pair', async () => {
    const page = await compiling();
    show(page, <PairsPage />);
    fireEvent.click(screen.getByRole('radio', { name: 'matrix' }));
    expect(document.querySelectorAll('.pair-matrix tbody button')).toHaveLength(3);
    expect(document.querySelectorAll('.pair-matrix .origin')).toHaveLength(3);
    fireEvent.click(screen.getByRole('button', { name: /^Methane \+ n-Butane: .*fitted/ }));
    type(KIJ, '-0.01');
    expect(screen.getByRole('button', { name: 'Methane + n-Butane: −0.0100, given' })).toBeTruthy();
    expect(sketchOf(page).model.pairs).toEqual([{ i: 'methane', j: 'n-butane', kij: -0.01 }]);
  });
});
