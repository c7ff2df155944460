import type { FromWorker, ToWorker } from '../protocol/messages';

/** The worker's side of the line: its global scope, or one end of a MessageChannel in a test. */
export interface JobPort {
  postMessage(message: FromWorker): void;
  addEventListener(type: 'message', listener: (event: { readonly data: ToWorker }) => void): void;
  /** Ends of a channel wait until they are started. */
  start?(): void;
}

/** A turn of the event loop by way of a MessageChannel: what lies in the queue is handled first. About 10 us. */
export interface Turns {
  turn(): Promise<void>;
  close(): void;
}

export function makeTurns(): Turns {
  const { port1, port2 } = new MessageChannel();
  const waiting: (() => void)[] = [];
  port1.onmessage = () => waiting.shift()?.();
  return {
    turn: () =>
      new Promise((resolve) => {
        waiting.push(resolve);
        port2.postMessage(undefined);
      }),
    close: () => {
      port1.close();
      port2.close();
    },
  };
}
