import { watchLoading } from './missing';

const makeWorker = (): Worker =>
  watchLoading(new Worker(new URL('../worker/solver.worker.ts', import.meta.url), { type: 'module' }));

let awake: Worker | undefined;

/** Begins to load the solver; it warms up by itself. */
export function wakeWorker(): void {
  awake ??= makeWorker();
}

/** A solver's worker: the one that was woken first, then new ones. */
export function takeWorker(): Worker {
  const worker = awake ?? makeWorker();
  awake = undefined;
  return worker;
}
