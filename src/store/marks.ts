/**
 * Performance marks that scripts read: app-ready, first-solved, offline-ready (every file is kept), edit:N (input event) and shown:N (first frame painted after
 * the text changed: a MessageChannel turn posted in requestAnimationFrame).
 */
const KEEP = 400;
const made: string[] = [];

function mark(name: string): void {
  performance.mark(name);
  made.push(name);
  if (made.length > KEEP) performance.clearMarks(made.shift() as string);
}

/** Marks the input of an edit. */
export const markEdit = (edit: number): void => mark(`edit:${edit}`);

/** Marks what happens once; later calls leave no mark. */
export const markOnce = (name: 'app-ready' | 'first-solved' | 'offline-ready'): void => {
  if (performance.getEntriesByName(name, 'mark').length === 0) performance.mark(name);
};

/** Calls back after the next frame has been painted. */
export function afterPaint(then: () => void): void {
  requestAnimationFrame(() => {
    const channel = new MessageChannel();
    channel.port1.onmessage = () => {
      channel.port1.close();
      then();
    };
    channel.port2.postMessage(null);
  });
}

/** Marks the first frame that shows an edit's results; called after it was painted. */
export const markShown = (edit: number): void => mark(`shown:${edit}`);
