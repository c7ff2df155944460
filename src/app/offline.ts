import { markOnce } from '../store/marks';
import type { Session } from '../store/session';

/** The page's files are fetched for keeping once it is idle, or after this [ms]: drawing and solving come first. */
const IDLE_MS = 4000;

const whenIdle = (then: () => void): void => {
  if (window.requestIdleCallback) window.requestIdleCallback(then, { timeout: IDLE_MS });
  else setTimeout(then, IDLE_MS);
};

let waiting: ServiceWorker | null = null;
let asked = false;

/** A new version is complete and waits; it is told to the user and nothing more. */
function offer(session: Session, worker: ServiceWorker | null): void {
  waiting = worker;
  session.setState({ update: true });
}

async function keep(session: Session, workers: ServiceWorkerContainer): Promise<void> {
  const isFirst = workers.controller === null;
  const registration = await workers.register('./sw.js');
  if (registration.waiting && !isFirst) offer(session, registration.waiting);
  registration.addEventListener('updatefound', () => {
    const fresh = registration.installing;
    fresh?.addEventListener('statechange', () => {
      if (fresh.state === 'installed' && workers.controller) offer(session, fresh);
    });
  });
  let hadOne = !isFirst;
  workers.addEventListener('controllerchange', () => {
    // Asked for here: the page starts again. Asked for in another tab: this one goes on until its user says so.
    if (asked) location.reload();
    else if (hadOne) offer(session, null);
    hadOne = true;
  });
  await workers.ready;
  markOnce('offline-ready');
}

/**
 * Keeps the page's own files in the browser, so that the next visit needs no network. Where that is not to be had (no
 * service worker, an address without encryption), the page works as long as there is a network.
 */
export function keepOffline(session: Session): void {
  if (!import.meta.env.PROD || !('serviceWorker' in navigator)) return;
  const start = (): void =>
    whenIdle(() => {
      keep(session, navigator.serviceWorker).catch((error: unknown) => {
        console.warn(`This page is not kept for work without a network: ${String(error)}`);
      });
    });
  if (document.readyState === 'complete') start();
  else window.addEventListener('load', start, { once: true });
}

/** Goes over to the new version: only ever called by a user's hand. */
export function takeUpdate(): void {
  asked = true;
  if (waiting) waiting.postMessage({ type: 'SKIP_WAITING' });
  else location.reload();
}
