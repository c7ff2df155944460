import type { Session } from '../store/session';

const TOLD = 'missing-file';

/** A file of this page could not be had: an update that another tab accepted has taken it away, or there is no network. */
export const tellMissing = (): void => void window.dispatchEvent(new Event(TOLD));

/** How browsers say that a module could not be loaded (Chromium, Firefox, Safari). */
const NOT_LOADED = /dynamically imported module|Importing a module script failed|module script.*MIME/i;

export const isMissing = (error: unknown): boolean =>
  error instanceof Error && NOT_LOADED.test(error.message);

/** Tells when a worker's script cannot be loaded: then the event carries no message, as it does of an error within. */
export function watchLoading<W extends Worker>(worker: W): W {
  worker.addEventListener('error', (event) => {
    if (!('message' in event) || !event.message) tellMissing();
  });
  return worker;
}

/**
 * Says once, and for as long as this page is open, that it needs to be loaded again. Who asked for the file says what came of
 * that; nothing that was drawn is lost.
 */
export function watchMissing(session: Session): () => void {
  const say = (): void => session.setState({ outdated: true });
  // What the build's own loader tells when a part of the page cannot be fetched.
  const events = ['vite:preloadError', TOLD];
  for (const event of events) window.addEventListener(event, say);
  return () => {
    for (const event of events) window.removeEventListener(event, say);
  };
}
