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

/** What was asked last and has no answer yet. */
interface Pending {
  readonly basis: Basis;
  readonly problem: Problem;
  readonly from: 'warm' | 'nothing';
}

/**
 * One worker kept alive. While an edit is unanswered and the worker stays silent for three seconds it is ended, started
 * again, and the problem sent once more, now with every unit named before it is solved; after two restarts on one edit it
 * is reported as broken, with the unit the worker was last heard of in. A restarted worker hands everything out anew.
 */
export const connectSolver = (make: () => WorkerLike, handlers: SolverHandlers): SolverClient =>
  new Connection(make, handlers);

class Connection implements SolverClient {
  private worker: WorkerLike | null = null;
  private basisSent = '';
  private pending: Pending | null = null;
  private restarts = 0;
  private where: UnitId | null = null;
  private timer: ReturnType<typeof setTimeout> | undefined;
  private closed = false;

  constructor(
    private readonly make: () => WorkerLike,
    private readonly handlers: SolverHandlers,
  ) {}

  solve(basis: Basis, problem: Problem, from: 'warm' | 'nothing', blank = false): void {
    if (this.pending?.problem.edit !== problem.edit) this.restarts = 0;
    this.pending = { basis, problem, from };
    this.where = null;
    this.send(this.pending, blank ? { blank: true } : {});
  }

  stop(): void {
    this.pending = null;
    clearTimeout(this.timer);
    this.worker?.postMessage({ say: 'stop' });
  }

  ask(job: number, about: Extract<ToWorker, { say: 'question' }>['about']): void {
    this.worker ??= this.start();
    this.worker.postMessage({ say: 'question', job, about });
  }

  close(): void {
    this.closed = true;
    clearTimeout(this.timer);
    this.worker?.terminate();
    this.worker = null;
  }

  private send(
    { basis, problem, from }: Pending,
    how: { readonly announce?: true; readonly blank?: true },
  ): void {
    this.worker ??= this.start();
    if (this.basisSent !== basis.id) {
      this.worker.postMessage({ say: 'basis', basis });
      this.basisSent = basis.id;
    }
    this.worker.postMessage({ say: 'solve', problem, from, ...how });
    this.watch();
  }

  private start(): WorkerLike {
    const fresh = this.make();
    fresh.onmessage = ({ data }) => {
      if (fresh === this.worker) this.hear(data);
    };
    fresh.onerror = (event) => {
      if (fresh === this.worker) this.restart(event.message || 'the solver stopped');
    };
    return fresh;
  }

  private hear(message: FromWorker): void {
    this.watch();
    switch (message.say) {
      case 'results': {
        const { edit, last, from = 'warm' } = message;
        // The live answer of an edit may come while its answer from nothing is still awaited.
        if (last && this.pending?.problem.edit === edit && this.pending.from === from) this.settled();
        this.handlers.results(edit, last, message);
        return;
      }
      case 'at':
        this.where = message.unit;
        this.handlers.at(message.edit, message.unit, message.loop);
        return;
      case 'answer':
        this.handlers.answer(message.job, message.value);
        return;
      case 'broke':
        // A mistake of ours that the worker survived: the same again would end the same way.
        if (message.edit !== undefined && this.pending?.problem.edit === message.edit)
          this.giveUp(message.edit, message.message);
    }
  }

  private watch(): void {
    clearTimeout(this.timer);
    if (this.pending) this.timer = setTimeout(() => this.restart('silent for three seconds'), SILENCE_MS);
  }

  private restart(why: string): void {
    this.worker?.terminate();
    this.worker = null;
    this.basisSent = '';
    if (this.closed || !this.pending) return;
    this.restarts += 1;
    if (this.restarts > RESTARTS) this.giveUp(this.pending.problem.edit, why);
    else this.send(this.pending, { announce: true });
  }

  private giveUp(edit: number, why: string): void {
    this.settled();
    this.handlers.broke(edit, why, this.where);
  }

  private settled(): void {
    this.pending = null;
    this.restarts = 0;
    clearTimeout(this.timer);
  }
}
