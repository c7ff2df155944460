// @vitest-environment jsdom
import { act, fireEvent, screen } from '@testing-library/react';
import { describe, expect, test } from 'vitest';
import { ScaleFeeds } from '../../src/drawers/scale/ScaleFeeds';
import { field, makePage, type Page, settingsOf, show, solvedStream, streamId, undoLabels } from './page';

const flowOf = (page: Page) => settingsOf(page, 'u1').flow;
const dataField = (path: string): string | undefined =>
  document.querySelector(`[data-field="${path}"]`)?.textContent ?? undefined;

/** An answer to the document that is shown, with so many mol/s in stream 3. */
function answer({ stores }: Page, n_mol_s: number): void {
  const { edit } = stores.sketch.getState();
  const streams = [[streamId('s3'), solvedStream({ n_mol_s, m_kg_s: n_mol_s / 50 })]] as const;
  act(() => stores.results.take(edit, true, { streams: [...streams], units: [], gone: [], findings: [] }, 1));
}

function open(solved = true): { page: Page; view: ReturnType<typeof show>; closed: () => number } {
  const page = makePage();
  if (solved) answer(page, 10);
  page.stores.session.select([], [streamId('s3')]);
  let closed = 0;
  const view = show(page, <ScaleFeeds close={() => (closed += 1)} />);
  return { page, view, closed: () => closed };
}
const type = (path: string, text: string): void => {
  fireEvent.change(field(path), { target: { value: text } });
  fireEvent.blur(field(path));
};
const byStream = (): void => void fireEvent.click(screen.getByRole('radio', { name: /a stream becomes/ }));

describe('scaling all feeds', () => {
  test('shows the sheet with the factor typed, and is one step when kept', () => {
    const { page, closed } = open();
    type('scale.factor', '1.25');
    expect(flowOf(page)).toBe('125 kmol/h');
    expect(undoLabels(page)).toEqual([]);
    type('scale.factor', '2');
    expect(flowOf(page)).toBe('200 kmol/h');
    fireEvent.click(screen.getByRole('button', { name: /^Keep/ }));
    expect(undoLabels(page)).toEqual(['scale all feeds by 2']);
    expect(closed()).toBe(1);
    page.stores.sketch.undo();
    expect(flowOf(page)).toBe('100 kmol/h');
  });

  test('leaves nothing behind when it is not kept', () => {
    const { page, view } = open();
    type('scale.factor', '3');
    view.unmount();
    expect(flowOf(page)).toBe('100 kmol/h');
    expect(undoLabels(page)).toEqual([]);
  });

  test('slides, and Esc goes back to where the slide began', () => {
    const { page } = open();
    for (let k = 0; k < 5; k += 1) fireEvent.keyDown(field('scale.factor'), { key: 'ArrowUp', altKey: true });
    expect(flowOf(page)).toBe('105 kmol/h');
    fireEvent.keyDown(window, { key: 'Escape' });
    expect(flowOf(page)).toBe('100 kmol/h');
  });

  test('refuses zero, and cannot be kept without a change', () => {
    const { page } = open();
    const keep = screen.getByRole('button', { name: 'Keep' }) as HTMLButtonElement;
    expect(keep.disabled).toBe(true);
    type('scale.factor', '0');
    expect(document.querySelector('.refusal')).not.toBeNull();
    expect(flowOf(page)).toBe('100 kmol/h');
  });

  test('so that a stream becomes a molar or mass flow, from its present flow', () => {
    const { page } = open();
    byStream();
    type('scale.flow', '72 kmol/h');
    expect(dataField('scale.computed')).toBe('2.0000');
    expect(flowOf(page)).toBe('200 kmol/h');
    // The answer to that does not change what factors are counted from.
    answer(page, 20);
    type('scale.flow', '0.3 kg/s');
    expect(flowOf(page)).toBe('150 kmol/h');
    type('scale.flow', '50 kmol/h');
    expect(flowOf(page)).toBe('138.8889 kmol/h');
  });

  test('tells in a notice that the stream came out otherwise', () => {
    const { page } = open();
    byStream();
    type('scale.flow', '72 kmol/h');
    fireEvent.click(screen.getByRole('button', { name: /^Keep/ }));
    expect(page.stores.session.getState().notice).toBeNull();
    answer(page, 19);
    expect(page.stores.session.getState().notice?.title).toBe(
      'Stream 3 came out at 68.40 kmol/h instead of 72.00 kmol/h (−5.0 %).',
    );
  });

  test.each([20, 20.01])('says nothing when it came out at %d instead of 20 mol/s', (n) => {
    const { page } = open();
    byStream();
    type('scale.flow', '72 kmol/h');
    fireEvent.click(screen.getByRole('button', { name: /^Keep/ }));
    answer(page, n);
    expect(page.stores.session.getState().notice).toBeNull();
  });

  test('says nothing about an edit that came in between', () => {
    const { page } = open();
    byStream();
    type('scale.flow', '72 kmol/h');
    fireEvent.click(screen.getByRole('button', { name: /^Keep/ }));
    act(() => void page.stores.sketch.undo());
    answer(page, 10);
    expect(page.stores.session.getState().notice).toBeNull();
  });

  test('waits for the answer that is not there yet, and scales nothing without one', () => {
    const { page } = open(false);
    byStream();
    type('scale.flow', '72 kmol/h');
    expect(flowOf(page)).toBe('100 kmol/h');
    expect(screen.getByRole('alert').textContent).toContain('Waiting');
    answer(page, 10);
    expect(dataField('scale.computed')).toBe('2.0000');
    expect(flowOf(page)).toBe('200 kmol/h');
  });

  test('tells a stream that nothing can bring there', () => {
    const page = makePage();
    answer(page, 0);
    page.stores.session.select([], [streamId('s3')]);
    show(page, <ScaleFeeds close={() => undefined} />);
    byStream();
    type('scale.flow', '72 kmol/h');
    expect(screen.getByRole('alert').textContent).toContain('Nothing flows');
  });
});
