import type { DocumentOrder, FromDocuments, Made, ToDocuments } from '../../documents/messages';
import { isMissing, tellMissing, watchLoading } from '../missing';

/** What the page's side needs of the documents' worker; a real one, or a stand-in in tests. */
export interface DocumentWorker {
  postMessage(message: ToDocuments): void;
  terminate(): void;
  onmessage: ((event: MessageEvent<FromDocuments>) => void) | null;
  onerror: ((event: ErrorEvent) => void) | null;
}

export interface Making {
  readonly made: Promise<Made>;
  /** Ends the work; `made` is then refused with CANCELLED. What else was asked for is begun again and not lost. */
  cancel(): void;
}

export const CANCELLED = 'cancelled';

/**
 * Makes documents outside the page's own thread, one after the other. Cancelling ends the worker, which is the only way to
 * stop it in the middle of a page; the next order starts a new one.
 */
export function createMaker(start: () => DocumentWorker) {
  interface Order {
    readonly order: DocumentOrder;
    readonly onProgress: (doing: string, share: number) => void;
    readonly resolve: (made: Made) => void;
    readonly reject: (error: Error) => void;
  }
  const open = new Map<number, Order>();
  let worker: DocumentWorker | null = null;
  let jobs = 0;

  /** Ends the worker; every order that it still had is refused. */
  const end = (why: string): void => {
    worker?.terminate();
    worker = null;
    const refused = [...open.values()];
    open.clear();
    for (const { reject } of refused) reject(new Error(why));
  };

  const begin = (): DocumentWorker => {
    const fresh = start();
    fresh.onmessage = ({ data: message }) => {
      const order = open.get(message.job);
      if (fresh !== worker || !order) return;
      if (message.say === 'progress') order.onProgress(message.doing, message.share);
      else {
        open.delete(message.job);
        if (message.say === 'made') order.resolve(message);
        else {
          const error = new Error(message.message);
          if (isMissing(error)) tellMissing();
          order.reject(error);
        }
      }
    };
    fresh.onerror = (event) => {
      if (fresh === worker) end(event.message || 'the documents’ worker stopped');
    };
    return fresh;
  };

  const post = (job: number, order: DocumentOrder): void => {
    worker ??= begin();
    worker.postMessage({ say: 'make', job, order });
  };

  const cancel = (job: number): void => {
    const given = open.get(job);
    if (!given) return;
    open.delete(job);
    worker?.terminate();
    worker = null;
    given.reject(new Error(CANCELLED));
    for (const [other, { order }] of open) post(other, order);
  };

  return {
    /** Loads what makes pages, ahead of the first order. */
    wake(fonts: string): void {
      worker ??= begin();
      worker.postMessage({ say: 'wake', fonts });
    },
    make(order: DocumentOrder, onProgress: (doing: string, share: number) => void): Making {
      jobs += 1;
      const job = jobs;
      const made = new Promise<Made>((resolve, reject) =>
        open.set(job, { order, onProgress, resolve, reject }),
      );
      post(job, order);
      return { made, cancel: () => cancel(job) };
    },
  };
}

export type Maker = ReturnType<typeof createMaker>;

const start = (): Worker =>
  watchLoading(
    new Worker(new URL('../../documents/documents.worker.ts', import.meta.url), {
      type: 'module',
      name: 'documents',
    }),
  );

const once = (): (() => Maker) => {
  let maker: Maker | undefined;
  return () => {
    maker ??= createMaker(start);
    return maker;
  };
};

/** The page's maker of files to save. */
export const documentMaker = once();

/** Another for pages to look at: these are given up at every change, and what is being saved is not. */
export const previewMaker = once();
