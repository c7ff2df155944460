import type { UnitId } from '../engine/ids';
import type { Basis, Problem } from '../engine/network/types';
import type { FromWorker, Question, ToWorker } from '../protocol/messages';

/** What the page needs of a worker; a real Worker fits. */
export interface WorkerLike {
  postMessage(message: ToWorker): void;
  addEventListener(type: 'message', listener: (event: { readonly data: FromWorker }) => void): void;
  addEventListener(type: 'error', listener: (event: { readonly message: string }) => void): void;
  terminate(): void;
}

export type Results = Extract<FromWorker, { say: 'results' }>;
export interface Broke {
  readonly edit?: number;
  readonly job?: number;
  readonly message: string;
  /** The unit the worker was last heard of in. */
  readonly unit?: UnitId;
}

export interface SolverHandlers {
  /** Merge by id. After a restart everything is handed out anew: ids outside the edit's problem are the page's to drop. */
  results(results: Results): void;
  broke(broke: Broke): void;
  ready?(): void;
  at?(edit: number, unit: UnitId): void;
  answer?(job: number, value: unknown): void;
  /** The worker was silent, was ended and has been started anew. */
  restarted?(edit: number | undefined, unit: UnitId | undefined): void;
}

export interface SolverOptions {
  /** Silence while a job runs that means restart [ms]. */
  readonly silence_ms?: number;
  /** Restarts on one edit before it is given up. */
  readonly restarts?: number;
}

export interface Solver {
  /** Hands the problem over; its basis goes first when the worker does not have it. */
  solve(basis: Basis, problem: Problem, from?: 'warm' | 'nothing'): void;
  /** @returns the question's job number */
  ask(about: Question): number;
  drop(job: number): void;
  close(): void;
}

/** Connects the page with a solver that is restarted when it falls silent: after 3 s by default, twice on one edit at most. */
export function connectSolver(
  makeWorker: () => WorkerLike,
  handlers: SolverHandlers,
  { silence_ms = 3000, restarts = 2 }: SolverOptions = {},
): Solver {
  let worker: WorkerLike;
  let has: string | undefined;
  let inFlight: { basis: Basis; problem: Problem; from: 'warm' | 'nothing'; restarts: number } | undefined;
  const questions = new Map<number, Question>();
  let at: UnitId | undefined;
  let jobs = 0;
  let timer: ReturnType<typeof setTimeout> | undefined;
  let closed = false;
  /** Workers that ended before a word was heard of them, in a row. */
  let mute = 0;
  let dead = false;

  function watch(): void {
    clearTimeout(timer);
    timer = undefined;
    if (!closed && (inFlight || questions.size > 0)) timer = setTimeout(silent, silence_ms);
  }

  function send(announce: boolean): void {
    if (!inFlight) return;
    const { basis, problem, from } = inFlight;
    if (has !== basis.id) {
      worker.postMessage({ say: 'basis', basis });
      has = basis.id;
    }
    worker.postMessage({ say: 'solve', problem, from, ...(announce ? { announce } : {}) });
  }

  function start(): void {
    const own = makeWorker();
    dead = false;
    worker = own;
    has = undefined;
    own.addEventListener('message', ({ data }) => {
      if (own === worker && !closed && !dead) hear(data);
    });
    own.addEventListener('error', ({ message }) => {
      if (own === worker && !closed && !dead) fail(message);
    });
  }

  function hear(data: FromWorker): void {
    mute = 0;
    switch (data.say) {
      case 'ready':
        handlers.ready?.();
        break;
      case 'at':
        at = data.unit;
        handlers.at?.(data.edit, data.unit);
        break;
      case 'results':
        if (data.last && inFlight?.problem.edit === data.edit && inFlight.from === (data.from ?? 'warm'))
          inFlight = undefined;
        handlers.results(data);
        break;
      case 'answer':
        questions.delete(data.job);
        handlers.answer?.(data.job, data.value);
        break;
      case 'broke':
        if (data.edit !== undefined && inFlight?.problem.edit === data.edit) inFlight = undefined;
        if (data.job !== undefined) questions.delete(data.job);
        handlers.broke(data);
        break;
      default:
        data satisfies never;
    }
    watch();
  }

  const silent = (): void => fail(`The solver gave no sign of life for ${silence_ms / 1000} s.`);

  function fail(message: string): void {
    worker.terminate();
    const unit = at;
    at = undefined;
    // A question may be what it fell silent over: none is asked a second time.
    for (const job of questions.keys()) handlers.broke({ job, message });
    questions.clear();
    const job = inFlight;
    if (++mute > restarts) {
      // It does not even start: nothing is gained by trying for ever. The next order tries again.
      dead = true;
      inFlight = undefined;
      handlers.broke({ ...(job ? { edit: job.problem.edit } : {}), message });
      watch();
      return;
    }
    start();
    if (job && job.restarts >= restarts) {
      inFlight = undefined;
      handlers.broke({ edit: job.problem.edit, message, ...(unit === undefined ? {} : { unit }) });
    } else {
      if (job) inFlight = { ...job, restarts: job.restarts + 1 };
      handlers.restarted?.(job?.problem.edit, unit);
      send(true);
    }
    watch();
  }

  function revive(): void {
    if (!dead) return;
    mute = 0;
    start();
  }

  start();
  return {
    solve(basis, problem, from = 'warm') {
      revive();
      const again = inFlight?.problem.edit === problem.edit ? inFlight.restarts : 0;
      inFlight = { basis, problem, from, restarts: again };
      at = undefined;
      send(false);
      watch();
    },
    ask(about) {
      revive();
      const job = ++jobs;
      questions.set(job, about);
      worker.postMessage({ say: 'question', job, about });
      watch();
      return job;
    },
    drop(job) {
      if (questions.delete(job)) worker.postMessage({ say: 'drop', job });
      watch();
    },
    close() {
      closed = true;
      clearTimeout(timer);
      worker.terminate();
    },
  };
}
