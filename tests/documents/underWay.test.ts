// @vitest-environment jsdom

import { afterEach, describe, expect, test } from 'vitest';
import { CANCELLED } from '../../src/app/export/maker';
import { cancelNewest, documentsUnderWay, whileShown } from '../../src/app/export/underWay';

const shown = (): readonly string[] => documentsUnderWay.getState().all.map(({ name }) => name);
const untilAborted = (signal: AbortSignal): Promise<never> =>
  new Promise((_, reject) => signal.addEventListener('abort', () => reject(signal.reason)));

afterEach(() => {
  while (cancelNewest());
});

describe('documents under way', () => {
  test('are shown with what is done for them until they end', async () => {
    let finish = (): void => undefined;
    const work = whileShown('CSV', async ({ tell }) => {
      tell('Writing', 0.5);
      await new Promise<void>((done) => {
        finish = done;
      });
    });
    expect(documentsUnderWay.getState().all[0]).toMatchObject({ name: 'CSV', doing: 'Writing', share: 0.5 });
    finish();
    await work;
    expect(shown()).toEqual([]);
  });

  test('go away when they fail, and the failure is handed on', async () => {
    const work = whileShown('CSV', () => Promise.reject(new Error('no font')));
    await expect(work).rejects.toThrow('no font');
    expect(shown()).toEqual([]);
  });

  test('the newest is given up first, and the others stay', async () => {
    const one = whileShown('CSV', ({ signal }) => untilAborted(signal));
    const two = whileShown('PDF', ({ signal }) => untilAborted(signal));
    expect(cancelNewest()).toBe(true);
    await expect(two).rejects.toThrow(CANCELLED);
    expect(shown()).toEqual(['CSV']);
    expect(cancelNewest()).toBe(true);
    await expect(one).rejects.toThrow(CANCELLED);
    expect(cancelNewest()).toBe(false);
  });

  test('one that is asked for once more takes the place of the older one', async () => {
    const one = whileShown('CSV', ({ signal }) => untilAborted(signal));
    const two = whileShown('CSV', ({ signal }) => untilAborted(signal));
    await expect(one).rejects.toThrow(CANCELLED);
    expect(shown()).toEqual(['CSV']);
    cancelNewest();
    await expect(two).rejects.toThrow(CANCELLED);
  });
});
