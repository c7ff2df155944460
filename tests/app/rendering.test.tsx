// @vitest-environment jsdom

import { readFileSync } from 'node:fs';
import { act, cleanup, fireEvent, render } from '@testing-library/react';
import type { ReactNode } from 'react';
import { afterEach, beforeAll, describe, expect, test, vi } from 'vitest';
import { Balance } from '../../src/balance/Balance';
import { Sheet } from '../../src/canvas/Sheet';
import { solveSketch } from '../../src/cli/run';
import { DrawerHost } from '../../src/drawers/DrawerHost';
import { setSetting } from '../../src/drawers/edits';
import type { UnitId } from '../../src/engine/ids';
import type { ReportInput } from '../../src/report/input';
import { openSketch } from '../../src/sketch/read';
import type { Sketch } from '../../src/sketch/types';
import { createCompiledStore } from '../../src/store/compiledStore';
import { type Stores, StoresProvider } from '../../src/store/react';
import { createResultsStore } from '../../src/store/resultsStore';
import { createSession } from '../../src/store/session';
import { createSketchStore } from '../../src/store/sketchStore';

/** The hook must stand before React is loaded. */
const { rendered } = await vi.hoisted(() => import('./rendered'));

/** The condensate train, and the same with more reflux in its first column, both solved. */
let sketch: Sketch;
let first: ReportInput;
let second: ReportInput;
const column = 'C-101';
const idOf = (tag: string): UnitId => {
  const unit = sketch.units.find((u) => u.tag === tag);
  if (!unit) throw new Error(`no ${tag}`);
  return unit.id;
};
beforeAll(async () => {
  vi.stubGlobal(
    'ResizeObserver',
    class {
      observe() {}
      unobserve() {}
      disconnect() {}
    },
  );
  const opened = openSketch(
    JSON.parse(readFileSync('public/examples/aromatic-condensate.sketch.json', 'utf8')),
  );
  if (!opened.ok) throw new Error('the example does not open');
  sketch = opened.sketch;
  first = (await solveSketch(sketch)).input;
  second = (await solveSketch(setSetting(idOf(column), 'fixedBy.0.value', '4')(sketch))).input;
}, 60_000);
afterEach(cleanup);

const all = ({ streams, units, findings, closure }: ReportInput) => ({
  streams: [...streams],
  units: [...units],
  gone: [],
  // As they come from the worker: new objects every time.
  findings: structuredClone(findings),
  ...(closure ? { closure } : {}),
});

function show(what: ReactNode): Stores {
  const stores = {
    sketch: createSketchStore(sketch),
    results: createResultsStore(),
    session: createSession(),
    compiled: createCompiledStore(),
  };
  stores.compiled.setState({ edit: 1, basis: first.basis });
  stores.results.take(1, true, all(first), 1);
  stores.session.openDrawer({ is: 'unit', id: idOf(column) });
  render(<StoresProvider value={stores}>{what}</StoresProvider>);
  rendered.length = 0;
  return stores;
}
const tally = (): Readonly<Record<string, number>> => {
  const counts: Record<string, number> = {};
  for (const name of rendered) counts[name] = (counts[name] ?? 0) + 1;
  return counts;
};

/** What stands at each unit and stream of the sheet, by tag and number. */
const texts = (): ReadonlyMap<string, string> =>
  new Map(
    [...document.querySelectorAll<HTMLElement>('[data-unit], [data-stream]')].map((element) => [
      `${element.dataset.unit ?? ''} ${element.dataset.stream ?? ''}`,
      element.textContent ?? '',
    ]),
  );

describe('a new answer to the condensate train', () => {
  const pieces = (): ReadonlyMap<string, string> =>
    new Map(
      [...document.querySelectorAll('.piece button')].map((button) => {
        const [name = '', figure = ''] = (button.getAttribute('aria-label') ?? '').split(': ');
        return [name, figure];
      }),
    );

  test('draws the pieces of the balance whose figure or length changed, and at most three views more', () => {
    const stores = show(<Balance />);
    const before = pieces();
    expect(before.size).toBe(6);
    act(() => stores.results.take(2, true, all(second), 1));
    const after = pieces();
    const changed = [...after].filter(([name, figure]) => before.get(name) !== figure).length;
    expect(changed).toBeGreaterThan(0);
    expect(changed).toBeLessThan(6);
    expect(rendered.length).toBeLessThanOrEqual(changed + 3);
  });

  test('draws no piece of the balance when it says the same once more', () => {
    const stores = show(<Balance />);
    act(() => stores.results.take(2, true, structuredClone(all(first)), 1));
    expect(tally().Piece ?? 0).toBe(0);
    expect(rendered.length).toBeLessThanOrEqual(3);
  });

  test('leaves the settings of an open drawer alone and draws its head and results', () => {
    const stores = show(<DrawerHost />);
    const sentence = document.querySelector('.drawer')?.textContent;
    act(() => stores.results.take(2, true, all(second), 1));
    expect(document.querySelector('.drawer')?.textContent).not.toBe(sentence);
    const counts = tally();
    expect(counts.ColumnOutcome).toBe(1);
    for (const name of [
      'UnitDrawer',
      'ColumnSettings',
      'SettingRow',
      'QuantityField',
      'WholeField',
      'FixedBy',
    ])
      expect([name, counts[name] ?? 0]).toEqual([name, 0]);
  });

  test('draws on the sheet the units and streams whose text changed, and at most three views more', () => {
    // Wide enough for the whole train at a zoom at which texts stand.
    vi.spyOn(HTMLElement.prototype, 'clientWidth', 'get').mockReturnValue(1400);
    vi.spyOn(HTMLElement.prototype, 'clientHeight', 'get').mockReturnValue(900);
    const stores = show(<Sheet />);
    act(() => stores.results.take(2, true, all(second), 1));
    const before = texts();
    expect(before.size).toBeGreaterThan(40);
    rendered.length = 0;
    act(() => stores.results.take(3, true, all(first), 1));
    const after = texts();
    const changed = [...after].filter(([name, text]) => before.get(name) !== text).length;
    expect(changed).toBeGreaterThan(0);
    expect(changed).toBeLessThan(before.size / 2);
    expect(rendered.length).toBeLessThanOrEqual(changed + 3);
  });
});

describe('an open unit drawer', () => {
  const fieldOf = (path: string): HTMLInputElement => {
    const found = document.querySelector<HTMLInputElement>(`.drawer [data-field="${path}"]`);
    if (!found) throw new Error(`no field ${path}`);
    return found;
  };
  const drawer = (stores: Stores, tag: string): void =>
    act(() => stores.session.openDrawer({ is: 'unit', id: idOf(tag) }));
  /** Steps a number as Alt and an arrow do; what is drawn is counted from the second step on: the first opens the ruler. */
  const step = (path: string): string => {
    const field = fieldOf(path);
    const before = field.value;
    for (const _ of [1, 2]) {
      rendered.length = 0;
      act(() => void fireEvent.keyDown(field, { key: 'ArrowUp', altKey: true }));
    }
    expect(field.value).not.toBe(before);
    return field.value;
  };
  const RULED = { QuantityField: 1, SlideRuler: 1 };

  test.each([
    ['C-101', 'fixedBy.0.value', { ValueField: 1, FixedText: 1 }],
    ['C-101', 'pressure.top', { SettingControl: 1 }],
    // A share says of what it is one: its lists stand beside the number.
    ['C-101', 'fixedBy.1.value.share', { FlowEditor: 1, Choice: 2, Segmented: 1, FixedText: 1 }],
    ['FEED-1', 'state.T', { SettingControl: 1 }],
    ['P-101', 'efficiency', { SettingControl: 1 }],
  ])(
    'of %s draws, when %s is dragged, that field and what repeats it, of the rest nothing',
    (tag, path, more) => {
      drawer(show(<DrawerHost />), tag);
      step(path);
      expect(tally()).toEqual({ ...RULED, ...more });
    },
  );

  test('draws, when a part of a composition is dragged, that part and the sum', () => {
    drawer(show(<DrawerHost />), 'FEED-1');
    step('composition.parts.benzene');
    const { SumNote = 0, ...counts } = tally();
    expect(counts).toEqual({ ...RULED, Part: 1, FieldFindings: 1, FieldFindingList: 1, Sum: 1 });
    expect(SumNote).toBeLessThanOrEqual(1);
  });

  test('goes on from the number as it stands, in every field that shows it', () => {
    const stores = show(<DrawerHost />);
    const value = step('fixedBy.0.value');
    expect(document.querySelector('.fixed-text')?.textContent).toContain(`reflux ratio ${value}`);
    act(() => void fireEvent.keyUp(fieldOf('fixedBy.0.value'), { key: 'Alt' }));
    // Another hand changes the same number: undo, a second view.
    act(() => void stores.sketch.undo());
    expect(fieldOf('fixedBy.0.value').value).toBe('2.4');
    expect(document.querySelector('.fixed-text')?.textContent).toContain('reflux ratio 2.4');
  });

  test('leaves the sheet’s count as it is; its own is that of its changed figures and fifteen views that hold them', () => {
    vi.spyOn(HTMLElement.prototype, 'clientWidth', 'get').mockReturnValue(1400);
    vi.spyOn(HTMLElement.prototype, 'clientHeight', 'get').mockReturnValue(900);
    const figures = (): readonly string[] =>
      [...document.querySelectorAll('.drawer .figure-row, .drawer .field-findings li')].map(
        (e) => e.textContent ?? '',
      );
    const stores = show(
      <>
        <Sheet />
        <DrawerHost />
      </>,
    );
    act(() => stores.results.take(2, true, all(second), 1));
    const [sheet, own] = [texts(), figures()];
    rendered.length = 0;
    act(() => stores.results.take(3, true, all(first), 1));
    const count = (before: Iterable<unknown>, after: Iterable<unknown>): number => {
      const old = [...before];
      return [...after].filter((text, k) => JSON.stringify(text) !== JSON.stringify(old[k])).length;
    };
    const [k, m] = [count(sheet, texts()), count(own, figures())];
    expect(k).toBeGreaterThan(0);
    expect(m).toBeGreaterThan(5);
    // Every changed figure is a row and a number, every changed finding a row and a mark.
    expect(rendered.length).toBeLessThanOrEqual(k + 3 + 2 * m + 15);
  });
});
