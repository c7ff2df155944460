import type { FromWorker, ToWorker } from '../protocol/messages';

/** The worker's side of the line: its global scope, or one end of a MessageChannel in a test. */
export interface JobPort {
  postMessage(message: FromWorker): void;
  addEventListener(type: 'message', listener: (event: { readonly data: ToWorker }) => void): void;
  /** Ends of a channel wait until they are started. */
  start?(): void;
}

/** A turn of the event loop by way of message channels: what lies in the queue is handled first. Some 20 us. */
export interface Turns {
  turn(): Promise<void>;
  close(): void;
}

/**
 * Two channels, one hop over each: a port that posts to itself from its own handler may be served again before all others
 * (Node handles up to a thousand messages of a port in a row), so one channel alone could starve the orders.
 */
export function makeTurns(): Turns {
  const hops = [makeHop(), makeHop()] as const;
  return {
    async turn() {
      await hops[0].hop();
      await hops[1].hop();
    },
    close() {
      for (const { close } of hops) close();
    },
  };
}

function makeHop(): { hop(): Promise<void>; close(): void } {
  const { port1, port2 } = new MessageChannel();
  const waiting: (() => void)[] = [];
  port1.onmessage = () => waiting.shift()?.();
  return {
    hop: () =>
      new Promise((resolve) => {
        waiting.push(resolve);
        port2.postMessage(undefined);
      }),
    close() {
      port1.close();
      port2.close();
    },
  };
}
