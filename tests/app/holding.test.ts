import { describe, expect, test, vi } from 'vitest';
import { createHolding } from '../../src/app/holding';
import { fakeBrowser } from './tabs';

/** Tabs of one browser. */
function browser() {
  const means = fakeBrowser();
  const tab = ({ asleep = false, finish = () => Promise.resolve() } = {}) => {
    const lost = vi.fn();
    return { lost, ...createHolding({ lost, finish }, means(asleep)) };
  };
  return { tab };
}

describe('one tab at a time may change a sketch', () => {
  test('the first tab has it, the second is refused, and gets it once the first goes elsewhere', async () => {
    const { tab } = browser();
    const [a, b] = [tab(), tab()];
    expect(await a.take('x')).toBe(true);
    expect(await b.take('x')).toBe(false);
    expect(await b.take('y')).toBe(true);
    expect(await a.take('z')).toBe(true);
    expect(await b.take('x')).toBe(true);
    expect(a.lost).not.toHaveBeenCalled();
  });

  test('a tab that is asked finishes its writing before it lets go', async () => {
    const { tab } = browser();
    const order: string[] = [];
    const a = tab({
      finish: async () => {
        await new Promise((done) => setTimeout(done, 10));
        order.push('written');
      },
    });
    const b = tab();
    await a.take('x');
    await b.takeOver('x');
    order.push('taken');
    expect(a.lost).toHaveBeenCalledOnce();
    expect(order).toEqual(['written', 'taken']);
    // And back again.
    await a.takeOver('x');
    expect(b.lost).toHaveBeenCalledOnce();
  });

  test('from a tab that does not answer it is taken by force', async () => {
    const { tab } = browser();
    const [a, b] = [tab({ asleep: true }), tab()];
    await a.take('x');
    await b.takeOver('x');
    await vi.waitFor(() => expect(a.lost).toHaveBeenCalledOnce());
    expect(await tab().take('x')).toBe(false);
  });

  test('a tab with another sketch is not disturbed', async () => {
    const { tab } = browser();
    const [a, b] = [tab(), tab()];
    await a.take('x');
    await b.takeOver('y');
    expect(a.lost).not.toHaveBeenCalled();
  });

  test('without locks every tab may write', async () => {
    const holding = createHolding(
      { lost: () => undefined, finish: () => Promise.resolve() },
      { locks: undefined, channel: undefined },
    );
    expect(await holding.take('x')).toBe(true);
    await holding.takeOver('x');
  });
});
