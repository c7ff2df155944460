// @vitest-environment jsdom
import { act, fireEvent, screen } from '@testing-library/react';
import { describe, expect, test } from 'vitest';
import { Balance } from '../../src/balance/Balance';
import type { Closure, ClosureEntry, SolveBatch, StreamResult } from '../../src/engine/network/types';
import { letDown, makePage, type Page, show, solvedStream, streamId, unitId } from '../drawers/page';

const even: ClosureEntry = { in: 2, out: 2, made: 0, relative: 0 };
const closure: Closure = {
  mass: even,
  energy: even,
  chemicals: [],
  elements: { C: even },
  complete: true,
  byUnit: {},
};

function open(streams: readonly (readonly [string, StreamResult])[], whole: Closure | undefined): Page {
  const page = makePage({
    ...letDown,
    units: [letDown.units[0], { id: 'u4', tag: 'PROD-1', name: 'Condensate', kind: 'product', settings: {} }],
    streams: [{ id: 's1', number: '1', from: ['u1', 'out'], to: ['u4', 'in'] }],
  });
  page.stores.results.take(
    1,
    true,
    {
      streams: streams.map(([id, result]) => [streamId(id), result]),
      units: [],
      gone: [],
      findings: [],
      ...(whole ? { closure: whole } : {}),
    },
    1,
  );
  window.innerWidth = 1440;
  show(page, <Balance />);
  return page;
}
const band = (): HTMLElement => screen.getByRole('region', { name: 'Balance' });

describe('the balance', () => {
  test('rules the total out twice only when it closes, and says what closure is not', () => {
    open([['s1', solvedStream()]], closure);
    expect(band().dataset.closed).toBe('yes');
    expect(document.querySelector('.totals .closed')?.textContent).toBe('7\u2009200.0');
    expect(screen.getByText('Closure shows arithmetic, not that the model is right.')).toBeTruthy();
  });

  test('holds no figure of one edit against one of another: nothing is called missing while a solve runs', () => {
    const page = makePage({
      ...letDown,
      units: [
        letDown.units[0],
        { id: 'u2', tag: 'PV-1', kind: 'valve', settings: {} },
        { id: 'u4', tag: 'PROD-1', kind: 'product', settings: {} },
      ],
      streams: [
        { id: 's1', number: '1', from: ['u1', 'out'], to: ['u2', 'in'] },
        { id: 's2', number: '2', from: ['u2', 'out'], to: ['u4', 'in'] },
      ],
    });
    const { results } = page.stores;
    const nothing = { units: [], gone: [], findings: [] };
    const [small, large] = [solvedStream(), solvedStream({ m_kg_s: 3 })];
    const both = (stream: StreamResult): SolveBatch => ({
      ...nothing,
      streams: [
        [streamId('s1'), stream],
        [streamId('s2'), stream],
      ],
    });
    results.take(1, true, both(small), 1);
    window.innerWidth = 1440;
    show(page, <Balance />);
    act(() => results.take(2, false, { ...nothing, streams: [[streamId('s1'), large]] }, 1));
    expect(band().textContent).not.toContain('missing');
    act(() => results.at(2, unitId('u2')));
    expect(band().textContent).not.toContain('missing');
    expect(band().dataset.closed).not.toBe('yes');
    act(() => results.take(2, true, both(large), 1));
    expect(band().dataset.closed).toBe('yes');
  });

  test('names feeds and products and selects a stream on a click', () => {
    const page = open([['s1', solvedStream()]], closure);
    fireEvent.click(screen.getByRole('button', { name: /Condensate/ }));
    expect(page.stores.session.getState().streams).toEqual(['s1']);
  });

  test('points at a stream while the pointer or the focus is on its piece, and selects nothing by that', () => {
    const page = open([['s1', solvedStream()]], closure);
    const pointed = () => page.stores.session.getState().pointed;
    const piece = screen.getByRole('button', { name: /Condensate/ });
    fireEvent.pointerEnter(piece);
    expect(pointed()).toEqual({ stream: 's1' });
    expect(page.stores.session.getState().streams).toEqual([]);
    fireEvent.pointerLeave(piece);
    expect(pointed()).toBeNull();
    fireEvent.focus(piece);
    expect(pointed()).toEqual({ stream: 's1' });
    act(() => page.stores.results.clear());
    expect(pointed()).toBeNull();
  });

  test('leaves the line open, with names and the cause, while something is not known', () => {
    const page = open([['s1', { state: 'waiting' }]], undefined);
    act(() =>
      page.stores.compiled.setState({
        gaps: [
          {
            code: 'sketch/needs-value',
            weight: 'caution',
            at: { unit: unitId('u1'), path: 'flow' },
            evidence: [],
          },
        ],
      }),
    );
    expect(band().dataset.closed).toBe('open');
    expect(document.querySelector('.closed')).toBeNull();
    expect(screen.getByText('not known: Condensate')).toBeTruthy();
    expect(screen.getByText('FEED-1 needs a value.')).toBeTruthy();
  });

  test('folds to one line with the same totals', () => {
    const page = open([['s1', solvedStream()]], closure);
    fireEvent.click(screen.getByRole('button', { name: 'Fold' }));
    expect(page.stores.session.getState().balanceFolded).toBe(true);
    expect(document.querySelector('.one-line')?.textContent).toContain('out 7\u2009200.0');
  });

  test('shows where feeds and products will stand on an empty sheet', () => {
    const page = makePage({ ...letDown, units: [], streams: [] });
    show(page, <Balance />);
    expect(screen.getByText('Feeds will stand here')).toBeTruthy();
    expect(document.querySelector('.totals')?.textContent).toBe('');
  });
});
