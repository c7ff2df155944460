import { createStore } from 'zustand/vanilla';
import { CANCELLED } from './maker';

/** A document on its way: what it is, what is being done for it, and a way to give it up. */
export interface UnderWay {
  readonly key: number;
  /** "PDF of the stream summary". */
  readonly name: string;
  readonly doing: string;
  /** Share of the whole that is behind. */
  readonly share: number;
  /** Had the focus when it was asked for, and gets it back when the button to cancel goes away. */
  readonly askedFrom: Element | null;
  cancel(): void;
}

/** All documents that are being made to be saved, the newest last. */
export const documentsUnderWay = createStore<{ readonly all: readonly UnderWay[] }>()(() => ({ all: [] }));

export interface Order {
  readonly signal: AbortSignal;
  tell(doing: string, share: number): void;
}

export const isCancelled = (error: unknown): boolean => error instanceof Error && error.message === CANCELLED;

let keys = 0;

/**
 * Does what makes a document, shown as under way until it ends. Asked for once more under the same name, the newer order
 * takes the place of the older one: the sketch may have changed meanwhile.
 */
export async function whileShown(name: string, work: (order: Order) => Promise<void>): Promise<void> {
  const { getState: get, setState: set } = documentsUnderWay;
  get()
    .all.find((other) => other.name === name)
    ?.cancel();
  keys += 1;
  const key = keys;
  const end = new AbortController();
  const remove = (): void => set({ all: get().all.filter((other) => other.key !== key) });
  const entry: UnderWay = {
    key,
    name,
    doing: 'Solving once more from nothing',
    share: 0,
    askedFrom: document.activeElement,
    cancel: () => {
      remove();
      end.abort(new Error(CANCELLED));
    },
  };
  set({ all: [...get().all, entry] });
  const tell: Order['tell'] = (doing, share) =>
    set({ all: get().all.map((other) => (other.key === key ? { ...other, doing, share } : other)) });
  try {
    await work({ signal: end.signal, tell });
  } finally {
    remove();
  }
}

/** Gives up the newest document that is under way. False: there was none. */
export function cancelNewest(): boolean {
  const newest = documentsUnderWay.getState().all.at(-1);
  newest?.cancel();
  return newest !== undefined;
}
