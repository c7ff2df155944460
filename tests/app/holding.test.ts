import { describe, expect, test, vi } from 'vitest';
import { createHolding } from '../../src/app/holding';

type Granted = (lock: Lock | null) => unknown;
interface Waiting {
  readonly granted: Granted;
  readonly settle: (error?: unknown) => void;
}

/** Exclusive locks of one browser, as the Web Locks API describes them: a queue a name; stealing refuses the holder. */
function fakeLocks() {
  const held = new Map<string, Waiting>();
  const queue = new Map<string, Waiting[]>();
  const grant = (name: string, entry: Waiting): void => {
    held.set(name, entry);
    void Promise.resolve(entry.granted({ name, mode: 'exclusive' })).then(() => {
      if (held.get(name) !== entry) return;
      held.delete(name);
      entry.settle();
      const next = queue.get(name)?.shift();
      if (next) grant(name, next);
    });
  };
  const request = (name: string, options: LockOptions, granted: Granted): Promise<unknown> =>
    new Promise((resolve, reject) => {
      const entry: Waiting = {
        granted,
        settle: (error) => (error === undefined ? resolve(undefined) : reject(error)),
      };
      const holder = held.get(name);
      if (!holder) grant(name, entry);
      else if (options.ifAvailable) void Promise.resolve(granted(null)).then(resolve);
      else if (options.steal) {
        grant(name, entry);
        holder.settle(new DOMException('stolen', 'AbortError'));
      } else {
        queue.set(name, [...(queue.get(name) ?? []), entry]);
        options.signal?.addEventListener('abort', () => {
          queue.set(
            name,
            (queue.get(name) ?? []).filter((other) => other !== entry),
          );
          reject(options.signal?.reason);
        });
      }
    });
  return { request } as unknown as Pick<LockManager, 'request'>;
}

/** Tabs of one browser. A tab that is asleep hears nothing. */
function browser() {
  const locks = fakeLocks();
  const listeners: { readonly tab: object; readonly hear: (event: { data: unknown }) => void }[] = [];
  const tab = ({ asleep = false, finish = () => Promise.resolve() } = {}) => {
    const lost = vi.fn();
    const me = {};
    const channel = {
      postMessage: (data: unknown) => {
        for (const { tab: other, hear } of listeners) if (other !== me) hear({ data });
      },
      addEventListener: (_type: string, hear: (event: { data: unknown }) => void) => {
        if (!asleep) listeners.push({ tab: me, hear });
      },
    } as unknown as Pick<BroadcastChannel, 'postMessage' | 'addEventListener'>;
    return { lost, ...createHolding({ lost, finish }, { locks, channel, patience_ms: 50 }) };
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
