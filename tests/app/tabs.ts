import type { createHolding } from '../../src/app/holding';

type Means = NonNullable<Parameters<typeof createHolding>[1]>;
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

/** What the tabs of one browser share. A tab that is asleep hears nothing. */
export function fakeBrowser(): (asleep?: boolean) => Means {
  const locks = fakeLocks();
  const listeners: { readonly tab: object; readonly hear: (event: { data: unknown }) => void }[] = [];
  return (asleep = false) => {
    const me = {};
    const channel = {
      postMessage: (data: unknown) => {
        for (const { tab, hear } of listeners) if (tab !== me) hear({ data });
      },
      addEventListener: (_type: string, hear: (event: { data: unknown }) => void) => {
        if (!asleep) listeners.push({ tab: me, hear });
      },
    } as unknown as NonNullable<Means['channel']>;
    return { locks, channel, patience_ms: 50 };
  };
}
