// @vitest-environment jsdom
import { act, cleanup, render } from '@testing-library/react';
import { afterEach, beforeAll, expect, test, vi } from 'vitest';
import { keepCentred, keepZones, placeOf } from '../../src/canvas/asked';
import { sheetOf } from '../../src/canvas/handle';
import { Sheet } from '../../src/canvas/Sheet';
import type { SheetView } from '../../src/canvas/view';
import { pageOf, zoneOf } from '../../src/drawing/frame';
import { moveUnits } from '../../src/sketch/edits';
import { type Stores, StoresProvider } from '../../src/store/react';
import { letDown, solveAll, storesOf, streamId, unitId } from './fixture';

beforeAll(() => {
  vi.stubGlobal(
    'ResizeObserver',
    class {
      observe() {}
      unobserve() {}
      disconnect() {}
    },
  );
  vi.stubGlobal(
    'DOMMatrixReadOnly',
    class {
      m22 = 1;
    },
  );
});
afterEach(cleanup);

function show(): { stores: Stores; page: HTMLElement; view: SheetView } {
  const stores = storesOf(letDown());
  const { container } = render(
    <StoresProvider value={stores}>
      <Sheet />
    </StoresProvider>,
  );
  const view = sheetOf(stores);
  if (!view) throw new Error('no sheet');
  return { stores, page: container, view: view as SheetView };
}

test('the zone of every unit and stream is that of the page it is printed on, and follows a move', () => {
  const { stores, view } = show();
  const zones = () => stores.session.getState().zones;
  const { scene, units, lines } = view.store.getState();
  expect(zones().size).toBe(10);
  for (const id of ['u1', 'u2', 'u3', 'u4', 'u5'])
    expect(zones().get(id)).toBe(zoneOf(units.get(unitId(id))!.at, pageOf(scene.box)));
  const diamond = placeOf({ units, lines }, { stream: streamId('s2') })!;
  expect(zones().get('s2')).toBe(zoneOf(diamond, pageOf(scene.box)));

  const before = zones();
  act(() => solveAll(stores));
  const box = view.store.getState().scene.box;
  expect(zones().get('u5')).toBe(zoneOf([600, 520], pageOf(box)));
  expect(new Set(before.values()).size).toBeGreaterThan(2);
  act(() => {
    const edit = moveUnits(stores.sketch.getState().sketch, new Map([[unitId('u5'), [600, 1400]]]));
    if (edit.ok) stores.sketch.apply(edit.label, () => edit.sketch);
  });
  const page = pageOf(view.store.getState().scene.box);
  expect(zones().get('u5')).toBe(zoneOf([600, 1400], page));
  expect(zones().get('u1')).toBe(zoneOf([96, 320], page));
});

test('zones that stay the same stay the same map', () => {
  const { stores, view } = show();
  const before = stores.session.getState().zones;
  act(() => view.store.setState({ scene: { ...view.store.getState().scene } }));
  expect(stores.session.getState().zones).toBe(before);
  expect(keepZones).toBeTypeOf('function');
});

test('what another part of the screen asks for comes to the middle, each time it is asked', () => {
  const { stores, view } = show();
  const asked: unknown[] = [];
  const stop = keepCentred(stores, { ...view, centre: (at) => asked.push(at) });
  stores.session.centre({ unit: unitId('u5') });
  stores.session.centre({ unit: unitId('u5') });
  stores.session.setState({ spoken: 'something else' });
  stores.session.centre({ unit: unitId('gone') });
  expect(asked).toEqual([
    [600, 520],
    [600, 520],
  ]);
  stop();
  stores.session.centre({ stream: streamId('s2') });
  expect(asked).toHaveLength(2);
});

test('what another part of the screen points at is drawn as if selected', () => {
  const { stores, page } = show();
  const marked = (): string[] =>
    [...page.querySelectorAll<HTMLElement>('[data-selected]')].map(
      (e) => e.dataset.stream ?? e.dataset.line ?? e.dataset.unit ?? '?',
    );
  act(() => stores.session.setState({ pointed: { stream: streamId('s2') } }));
  expect(marked()).toEqual(['2', '2']);
  act(() => stores.session.setState({ pointed: { unit: unitId('u3') } }));
  expect(marked()).toEqual(['V-101']);
  act(() => stores.session.setState({ pointed: null }));
  expect(marked()).toEqual([]);
});
