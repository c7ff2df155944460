// @vitest-environment jsdom
import { act, cleanup, render } from '@testing-library/react';
import { afterEach, expect, test } from 'vitest';
import { keepScene, quietAgain } from '../../src/canvas/keepScene';
import { createSheetStore, SheetProvider } from '../../src/canvas/sheetStore';
import { TitleStrip } from '../../src/canvas/TitleStrip';
import type { Omitted } from '../../src/drawing/types';
import { StoresProvider } from '../../src/store/react';
import { letDown, solveAll, storesOf, streamId, unitId } from './fixture';

afterEach(cleanup);

const OMITTED: readonly Omitted[] = [
  { what: 'label', stream: streamId('s1') },
  { what: 'label', stream: streamId('s2') },
  { what: 'duty', unit: unitId('u5'), link: 'heat' },
  { what: 'remark', unit: unitId('u3') },
  { what: 'tag', unit: unitId('u2') },
];

test('the strip counts what has no room only among what is shown at this zoom', () => {
  const stores = storesOf(letDown());
  const sheet = createSheetStore();
  keepScene(stores, sheet, () => 1);
  solveAll(stores);
  /** The scene is laid out anew at another zoom: what it leaves off is put in again. */
  const at = (zoom: number, omitted: readonly Omitted[]): void =>
    act(() => {
      quietAgain(sheet, zoom);
      sheet.setState({ scene: { ...sheet.getState().scene, omitted } });
    });
  const { container } = render(
    <StoresProvider value={stores}>
      <SheetProvider value={sheet}>
        <TitleStrip />
      </SheetProvider>
    </StoresProvider>,
  );
  const said = (): string => container.textContent ?? '';
  at(1, OMITTED);
  expect(said()).toContain('2 labels, 1 tag, 1 note and 1 duty have no room here');
  expect(said()).toContain('Labels: flow');
  // Under 30 % only symbols, tags and lines are shown.
  at(0.27, OMITTED);
  expect(said()).toContain('1 tag has no room here');
  expect(said()).not.toMatch(/\d labels?/);
  expect(said()).toContain('Labels: from 30 % zoom');
  at(0.27, OMITTED.slice(0, 4));
  expect(said()).not.toContain('no room');
  at(0.3, OMITTED);
  expect(said()).toContain('2 labels');
});

test('the strip names the revision in force: the newest entry of the table, else the word of the title block', () => {
  const stores = storesOf({ ...letDown(), title: { title: 'Let-down', revision: 'A' } });
  const { container } = render(
    <StoresProvider value={stores}>
      <SheetProvider value={createSheetStore()}>
        <TitleStrip />
      </SheetProvider>
    </StoresProvider>,
  );
  expect(container.textContent).toContain('Rev A, draft');
  act(() => stores.sketch.apply('issue', (s) => ({ ...s, revisions: [{ mark: 'B' }, { mark: 'A' }] })));
  expect(container.textContent).toContain('Rev B, draft');
});
