import { type Kinds, KNOWN_KINDS } from '../engine/network/kinds';
import { nothingPosted } from '../engine/network/memory';
import { solveNetwork } from '../engine/network/solve';
import type { FromWorker, Question, ToWorker } from '../protocol/messages';
import { drive, PACE, type Pace } from './drive';
import { Memories } from './memories';
import { type JobPort, makeTurns } from './port';
import { prewarm } from './prewarm';

export interface ServeOptions {
  readonly kinds?: Kinds;
  readonly pace?: Pace;
  /** Milliseconds, never going back. */
  readonly now?: () => number;
  /** Warm up at once, before anything is asked. */
  readonly warmUp?: true;
}

type SolveOrder = Extract<ToWorker, { say: 'solve' }>;
interface QuestionOrder {
  /** Absent when nobody waits for the answer. */
  readonly job?: number;
  readonly about: Question;
}

const messageOf = (cause: unknown): string => (cause instanceof Error ? cause.message : String(cause));

/**
 * Answers the page's orders over a port: one solve in flight, one waiting, the latest wins; questions when no solve waits.
 * An error that is our own mistake becomes 'broke' and costs the memory of its basis, never the worker.
 *
 * @returns ends the service: nothing is begun any more
 */
export function serveSolver(port: JobPort, options: ServeOptions = {}): () => void {
  const service = new Service(port, options);
  port.addEventListener('message', ({ data }) => service.take(data));
  port.start?.();
  service.open(options.warmUp === true);
  return () => service.close();
}

class Service {
  private readonly turns = makeTurns();
  private readonly posted = nothingPosted();
  private readonly memories = new Memories(this.posted);
  private readonly questions: QuestionOrder[] = [];
  private readonly kinds: Kinds;
  private readonly pace: Pace;
  private readonly now: () => number;
  private waiting: SolveOrder | undefined;
  /** The page lacks what was handed out, until a solve hands it out anew; also when the order that said so is never begun. */
  private blank = false;
  private busy = false;
  private warm = false;
  private closed = false;
  private stopped = false;

  constructor(
    private readonly port: JobPort,
    { kinds = KNOWN_KINDS, pace = PACE, now = () => performance.now() }: ServeOptions,
  ) {
    this.kinds = kinds;
    this.pace = pace;
    this.now = now;
  }

  open(warmUp: boolean): void {
    this.say({ say: 'ready' });
    if (warmUp) this.question({ about: { ask: 'prewarm' } });
  }

  close(): void {
    this.closed = true;
    this.turns.close();
  }

  take(order: ToWorker): void {
    switch (order.say) {
      case 'basis':
        this.memories.learn(order.basis);
        return;
      case 'solve':
        this.blank ||= order.blank === true;
        this.waiting = order;
        void this.work();
        return;
      case 'stop':
        this.waiting = undefined;
        this.stopped = true;
        return;
      case 'question':
        this.question(order);
        return;
      case 'drop': {
        const at = this.questions.findIndex((q) => q.job === order.job);
        if (at >= 0) this.questions.splice(at, 1);
        return;
      }
      default:
        order satisfies never;
    }
  }

  private say(message: FromWorker): void {
    if (!this.closed) this.port.postMessage(message);
  }

  private question(order: QuestionOrder): void {
    this.questions.push(order);
    void this.work();
  }

  private async work(): Promise<void> {
    if (this.busy) return;
    this.busy = true;
    while (!this.closed) {
      const order = this.waiting;
      this.waiting = undefined;
      if (order) {
        await this.runSolve(order);
        continue;
      }
      const question = this.questions.shift();
      if (!question) break;
      await this.runQuestion(question);
    }
    this.busy = false;
  }

  private async runSolve({ problem, from, announce }: SolveOrder): Promise<void> {
    const { turns, now, pace, kinds } = this;
    const { edit } = problem;
    this.stopped = false;
    const clean = from === 'nothing' ? ({ from } as const) : {};
    if (this.blank) {
      this.posted.streams.clear();
      this.posted.units.clear();
      this.blank = false;
    }
    try {
      const memory = this.memories.of(problem.basis);
      const batch = await drive(solveNetwork(problem, memory, { from, kinds }), {
        turns,
        now,
        pace,
        announce: announce === true,
        overtaken: () => this.closed || this.stopped || this.waiting !== undefined,
        partial: (part) => this.say({ say: 'results', edit, last: false, ...clean, ...part }),
        at: (unit, loop) => this.say({ say: 'at', edit, unit, ...(loop ? { loop } : {}) }),
        hear: (alive) => {
          memory.work.alive = alive;
        },
      });
      if (batch) this.say({ say: 'results', edit, last: true, ...clean, ...batch });
    } catch (cause) {
      this.memories.forget(problem.basis);
      this.say({ say: 'broke', edit, message: messageOf(cause) });
    }
  }

  private async runQuestion({ job, about }: QuestionOrder): Promise<void> {
    const { turns, now } = this;
    try {
      if (about.ask === 'prewarm') {
        const overtaken = (): boolean => this.closed || this.waiting !== undefined;
        const value = this.warm ? { solves: 0, enough: true } : await prewarm({ turns, now, overtaken });
        this.warm = value.enough;
        if (job !== undefined) this.say({ say: 'answer', job, value });
      }
    } catch (cause) {
      this.say({ say: 'broke', ...(job === undefined ? {} : { job }), message: messageOf(cause) });
    }
  }
}
