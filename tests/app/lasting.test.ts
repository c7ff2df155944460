import { describe, expect, test, vi } from 'vitest';
import { makeLasting } from '../../src/app/lasting';

const means = (already: boolean, persist: () => Promise<boolean> = async () => true) => ({
  persisted: vi.fn(async () => already),
  persist: vi.fn(persist),
});

describe('the browser is asked to keep sketches for good', () => {
  test('once, however often something is kept', async () => {
    const browser = means(false);
    const keep = makeLasting(browser);
    await Promise.all([keep(), keep()]);
    await keep();
    expect(browser.persist).toHaveBeenCalledTimes(1);
  });

  test('not where it does so already, and not where it cannot be asked', async () => {
    const browser = means(true);
    await makeLasting(browser)();
    expect(browser.persist).not.toHaveBeenCalled();
    await expect(makeLasting(undefined)()).resolves.toBeUndefined();
  });

  test('a refusal or a failure is no fault of the sketch', async () => {
    const warned = vi.spyOn(console, 'warn').mockImplementation(() => undefined);
    await expect(makeLasting(means(false, async () => false))()).resolves.toBeUndefined();
    expect(warned).not.toHaveBeenCalled();
    await makeLasting(means(false, () => Promise.reject(new Error('not here'))))();
    expect(warned.mock.calls.flat().join()).toContain('not here');
    warned.mockRestore();
  });
});
