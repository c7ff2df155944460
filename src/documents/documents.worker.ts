import { makeDocument, wakePdf } from './make';
import type { FromDocuments, ToDocuments } from './messages';

interface Scope {
  postMessage(message: FromDocuments, transfer?: Transferable[]): void;
  onmessage: ((event: MessageEvent<ToDocuments>) => void) | null;
}
const scope = globalThis as unknown as Scope;

/** The page is told of progress in steps of this share; every single line written would keep it busy. */
const STEP = 0.04;

/** Entry of the documents' worker: one order at a time, nothing of the page. */
scope.onmessage = async ({ data }) => {
  if (data.say === 'wake') {
    // What does not load now is asked for again, and told, with the order itself.
    await wakePdf(data.fonts).catch(() => undefined);
    return;
  }
  const { job, order } = data;
  let told = { doing: '', share: 0 };
  const progress = (doing: string, share: number): void => {
    if (doing === told.doing && share - told.share < STEP) return;
    told = { doing, share };
    scope.postMessage({ say: 'progress', job, doing, share });
  };
  try {
    const made = await makeDocument(order, progress);
    scope.postMessage({ say: 'made', job, ...made }, [made.bytes.buffer]);
  } catch (error) {
    scope.postMessage({
      say: 'failed',
      job,
      message: error instanceof Error ? error.message : String(error),
    });
  }
};
