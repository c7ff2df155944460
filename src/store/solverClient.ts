import type { UnitId } from '../engine/ids';
import type { Basis, LoopProgress, Problem, SolveBatch } from '../engine/network/types';
import type { FromWorker, ToWorker } from '../protocol/messages';

/** What the page's side needs of a worker; a real one, or a port in tests. */
export interface WorkerLike {
  postMessage(message: ToWorker): void;
  terminate(): void;
  onmessage: ((event: MessageEvent<FromWorker>) => void) | null;
  onerror: ((event: ErrorEvent) => void) | null;
}

/** What the solver tells the page. */
export interface SolverHandlers {
  results(edit: number, last: boolean, batch: SolveBatch): void;
  at(edit: number, unit: UnitId, loop?: LoopProgress): void;
  /** The worker gave up on this edit, or was ended for silence twice; `unit` is where it was last heard. */
  broke(edit: number, message: string, unit: UnitId | null): void;
  answer(job: number, value: unknown): void;
}

export interface SolverClient {
  /**
   * Sends the problem; anything older still waiting is dropped by the worker.
   * `blank`: no results are held any more, so everything is handed out, changed or not.
   */
  solve(basis: Basis, problem: Problem, from: 'warm' | 'nothing', blank?: boolean): void;
  /** Gives the solve in flight up; what comes of it all the same is handed on. */
  stop(): void;
  ask(job: number, about: Extract<ToWorker, { say: 'question' }>['about']): void;
  close(): void;
}

/** Silence of a busy worker after which it is ended [ms]. */
const SILENCE_MS = 3000;
const RESTARTS = 2;

/**
 * One worker kept alive. While an edit is unanswered and the worker stays silent for three seconds it is ended, started
 * again, and the problem sent once more, now with every unit named before it is solved; after two restarts on one edit it
 * is reported as broken, with the unit the worker was last heard of in. A restarted worker hands everything out anew.
 */
export function connectSolver(make: () => WorkerLike, handlers: SolverHandlers): SolverClient {
  let worker: WorkerLike | null = null;
  let basisSent = '';
  let pending: { basis: Basis; problem: Problem; from: 'warm' | 'nothing' } | null = null;
  let restarts = 0;
  let where: UnitId | null = null;
  let timer: ReturnType<typeof setTimeout> | undefined;
  let closed = false;

  const watch = (): void => {
    clearTimeout(timer);
    if (pending) timer = setTimeout(() => restart('silent for three seconds'), SILENCE_MS);
  };

  const restart = (why: string): void => {
    worker?.terminate();
    worker = null;
    basisSent = '';
    if (closed || !pending) return;
    restarts += 1;
    if (restarts > RESTARTS) {
      const { edit } = pending.problem;
      giveUp(edit, why);
      return;
    }
    send(true);
  };

  const giveUp = (edit: number, why: string): void => {
    pending = null;
    restarts = 0;
    clearTimeout(timer);
    handlers.broke(edit, why, where);
  };

  const start = (): WorkerLike => {
    const fresh = make();
    fresh.onmessage = (event) => {
      if (fresh !== worker) return;
      const message = event.data;
      watch();
      if (message.say === 'results') {
        const { edit, last, from = 'warm' } = message;
        // The live answer of an edit may come while its answer from nothing is still awaited.
        if (last && pending?.problem.edit === edit && pending.from === from) {
          pending = null;
          restarts = 0;
          clearTimeout(timer);
        }
        handlers.results(message.edit, message.last, message);
      } else if (message.say === 'at') {
        where = message.unit;
        handlers.at(message.edit, message.unit, message.loop);
      } else if (message.say === 'answer') handlers.answer(message.job, message.value);
      else if (message.say === 'broke' && message.edit !== undefined) {
        // A mistake of ours that the worker survived: the same again would end the same way.
        if (pending?.problem.edit === message.edit) giveUp(message.edit, message.message);
      }
    };
    fresh.onerror = (event) => {
      if (fresh === worker) restart(event.message || 'the solver stopped');
    };
    return fresh;
  };

  const send = (announce = false, blank = false): void => {
    if (!pending) return;
    worker ??= start();
    if (basisSent !== pending.basis.id) {
      worker.postMessage({ say: 'basis', basis: pending.basis });
      basisSent = pending.basis.id;
    }
    worker.postMessage({
      say: 'solve',
      problem: pending.problem,
      from: pending.from,
      ...(announce ? { announce } : {}),
      ...(blank ? { blank } : {}),
    });
    watch();
  };

  return {
    solve(basis, problem, from, blank = false) {
      if (pending?.problem.edit !== problem.edit) restarts = 0;
      pending = { basis, problem, from };
      where = null;
      send(false, blank);
    },
    stop() {
      pending = null;
      clearTimeout(timer);
      worker?.postMessage({ say: 'stop' });
    },
    ask(job, about) {
      worker ??= start();
      worker.postMessage({ say: 'question', job, about });
    },
    close() {
      closed = true;
      clearTimeout(timer);
      worker?.terminate();
      worker = null;
    },
  };
}
