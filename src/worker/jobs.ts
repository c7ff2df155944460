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
  const { kinds = KNOWN_KINDS, pace = PACE, now = () => performance.now(), warmUp } = options;
  const turns = makeTurns();
  const posted = nothingPosted();
  const memories = new Memories(posted);
  const questions: QuestionOrder[] = [];
  let waiting: SolveOrder | undefined;
  /** The page lacks what was handed out, until a solve hands it out anew; also when the order that said so is never begun. */
  let blank = false;
  let busy = false;
  let warm = false;
  let closed = false;
  let stopped = false;
  const say = (message: FromWorker): void => {
    if (!closed) port.postMessage(message);
  };

  async function runSolve({ problem, from, announce }: SolveOrder): Promise<void> {
    const { edit } = problem;
    stopped = false;
    const clean = from === 'nothing' ? ({ from } as const) : {};
    if (blank) {
      posted.streams.clear();
      posted.units.clear();
      blank = false;
    }
    try {
      const memory = memories.of(problem.basis);
      const batch = await drive(solveNetwork(problem, memory, { from, kinds }), {
        turns,
        now,
        pace,
        announce: announce === true,
        overtaken: () => closed || stopped || waiting !== undefined,
        partial: (part) => say({ say: 'results', edit, last: false, ...clean, ...part }),
        at: (unit, loop) => say({ say: 'at', edit, unit, ...(loop ? { loop } : {}) }),
      });
      if (batch) say({ say: 'results', edit, last: true, ...clean, ...batch });
    } catch (cause) {
      memories.forget(problem.basis);
      say({ say: 'broke', edit, message: messageOf(cause) });
    }
  }

  async function runQuestion({ job, about }: QuestionOrder): Promise<void> {
    try {
      if (about.ask === 'prewarm') {
        const overtaken = () => closed || waiting !== undefined;
        const value = warm ? { solves: 0, enough: true } : await prewarm({ turns, now, overtaken });
        warm = value.enough;
        if (job !== undefined) say({ say: 'answer', job, value });
      }
    } catch (cause) {
      say({ say: 'broke', ...(job === undefined ? {} : { job }), message: messageOf(cause) });
    }
  }

  async function work(): Promise<void> {
    if (busy) return;
    busy = true;
    while (!closed) {
      const order = waiting;
      waiting = undefined;
      if (order) {
        await runSolve(order);
        continue;
      }
      const question = questions.shift();
      if (!question) break;
      await runQuestion(question);
    }
    busy = false;
  }

  port.addEventListener('message', ({ data }) => {
    switch (data.say) {
      case 'basis':
        memories.learn(data.basis);
        return;
      case 'solve':
        blank ||= data.blank === true;
        waiting = data;
        void work();
        return;
      case 'stop':
        waiting = undefined;
        stopped = true;
        return;
      case 'question':
        questions.push(data);
        void work();
        return;
      case 'drop': {
        const at = questions.findIndex((q) => q.job === data.job);
        if (at >= 0) questions.splice(at, 1);
        return;
      }
      default:
        return data satisfies never;
    }
  });
  port.start?.();
  say({ say: 'ready' });
  if (warmUp) {
    questions.push({ about: { ask: 'prewarm' } });
    void work();
  }
  return () => {
    closed = true;
    turns.close();
  };
}
