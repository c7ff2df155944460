import { type Kinds, KNOWN_KINDS } from '../engine/network/kinds';
import { type Memory, makeMemory, nothingPosted } from '../engine/network/memory';
import { solveNetwork } from '../engine/network/solve';
import type { Basis } from '../engine/network/types';
import type { FromWorker, Question, ToWorker } from '../protocol/messages';
import { drive, PACE, type Pace } from './drive';
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

/** Memories that are kept, so that undoing a change of chemicals or model finds its answers again. */
const KEPT_MEMORIES = 2;
/** Bases that are kept; the page posts one again when it comes back to it. */
const KEPT_BASES = 4;

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
  const bases = new Map<string, Basis>();
  const memories = new Map<string, Memory>();
  const posted = nothingPosted();
  const questions: QuestionOrder[] = [];
  let waiting: SolveOrder | undefined;
  let busy = false;
  let warm = false;
  let closed = false;
  let stopped = false;
  const say = (message: FromWorker): void => {
    if (!closed) port.postMessage(message);
  };

  function memoryOf(id: string): Memory {
    const known = memories.get(id);
    if (known) {
      // Asked for last, forgotten last.
      memories.delete(id);
      memories.set(id, known);
      return known;
    }
    const basis = bases.get(id);
    if (!basis) throw new Error(`no basis ${id} was posted`);
    const made = makeMemory(basis, posted);
    memories.set(id, made);
    for (const old of [...memories.keys()].slice(0, -KEPT_MEMORIES)) memories.delete(old);
    return made;
  }

  async function runSolve({ problem, from, announce, blank }: SolveOrder): Promise<void> {
    const { edit } = problem;
    stopped = false;
    const clean = from === 'nothing' ? ({ from } as const) : {};
    if (blank) {
      posted.streams.clear();
      posted.units.clear();
    }
    try {
      const memory = memoryOf(problem.basis);
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
      memories.delete(problem.basis);
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
        bases.delete(data.basis.id);
        bases.set(data.basis.id, data.basis);
        for (const old of [...bases.keys()].slice(0, -KEPT_BASES)) bases.delete(old);
        return;
      case 'solve':
        // What the page lacks it still lacks when a newer order takes the place of the one that said so.
        waiting = waiting?.blank ? { ...data, blank: true } : data;
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
