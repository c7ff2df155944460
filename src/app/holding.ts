/** A tab that does not let go within this time is asleep or stuck: the sketch is taken without it. */
const PATIENCE_MS = 2000;
const CHANNEL = 'splitwright';
export const lockOf = (id: string): string => `splitwright:${id}`;

/** One tab at a time may change a sketch. */
export interface Holding {
  /** Takes hold of a sketch and lets go of the one held before. False: another tab has it. */
  take(id: string): Promise<boolean>;
  /** Asks the tab that has it to finish and let go; takes it by force from one that does not answer. */
  takeOver(id: string): Promise<void>;
}

export interface Holder {
  /** Another tab takes the sketch: nothing may be changed here from now on. */
  lost(): void;
  /** Brings what is being written to its end. */
  finish(): Promise<void>;
  /** Another tab has taken it by force: there was no time to finish. */
  taken?(): void;
}

interface Means {
  /** Undefined where the browser has no locks: then every tab may write, and the stored counter tells them apart. */
  readonly locks: Pick<LockManager, 'request'> | undefined;
  readonly channel: Pick<BroadcastChannel, 'postMessage' | 'addEventListener'> | undefined;
  readonly patience_ms?: number;
}

const browserMeans = (): Means => ({
  locks: 'locks' in navigator ? navigator.locks : undefined,
  channel: typeof BroadcastChannel === 'undefined' ? undefined : new BroadcastChannel(CHANNEL),
});

export function createHolding(holder: Holder, means: Means = browserMeans()): Holding {
  const { locks, channel, patience_ms = PATIENCE_MS } = means;
  let wanted = '';
  let held: { readonly id: string; readonly letGo: () => void } | null = null;

  const request = (id: string, options: LockOptions): Promise<boolean> =>
    new Promise((resolve, reject) => {
      locks
        ?.request(lockOf(id), options, (lock) => {
          // By now this tab may show another sketch.
          if (!lock || wanted !== id) {
            resolve(false);
            return undefined;
          }
          return new Promise<void>((letGo) => {
            held = { id, letGo };
            resolve(true);
          });
        })
        .catch((error: unknown) => {
          // A lock that was held is refused afterwards when another tab takes it by force.
          if (held?.id === id) {
            held = null;
            holder.lost();
            holder.taken?.();
          } else reject(error);
        });
    });

  channel?.addEventListener('message', ({ data }: MessageEvent<unknown>) => {
    const asked = held;
    if (!asked || data !== asked.id) return;
    holder.lost();
    void holder.finish().then(() => {
      if (held === asked) held = null;
      asked.letGo();
    });
  });

  return {
    take(id) {
      wanted = id;
      held?.letGo();
      held = null;
      return locks ? request(id, { ifAvailable: true }) : Promise.resolve(true);
    },
    async takeOver(id) {
      wanted = id;
      if (!locks) return;
      channel?.postMessage(id);
      try {
        await request(id, { signal: AbortSignal.timeout(patience_ms) });
      } catch (error) {
        if (!(error instanceof DOMException)) throw error;
        await request(id, { steal: true });
      }
    },
  };
}
