import { afterEach, beforeAll, describe, expect, test } from 'vitest';
import { type Kinds, KNOWN_KINDS } from '../../src/engine/network/kinds';
import type { Basis, Problem, ProblemUnit } from '../../src/engine/network/types';
import { solved } from '../../src/engine/outcome';
import { answerOf } from '../../src/engine/units/answer';
import type { AnyKind } from '../../src/engine/units/solvers';
import { scaledStream } from '../../src/engine/units/streams';
import type { Call } from '../../src/engine/units/types';
import type { FromWorker, ToWorker } from '../../src/protocol/messages';
import { type ServeOptions, serveSolver } from '../../src/worker/jobs';
import type { JobPort } from '../../src/worker/port';
import { basisOf, LET_DOWN, letDown, molar, parts, problemOf, unit } from '../network/fixtures';

let basis: Basis;
beforeAll(async () => {
  basis = await basisOf(LET_DOWN);
});

type Results = Extract<FromWorker, { say: 'results' }>;

/** A page's end of a channel to a service that runs in this thread; messages are cloned as between threads. */
class Page {
  readonly heard: FromWorker[] = [];
  private readonly port: MessagePort;
  private readonly end: () => void;
  private readonly listeners = new Set<() => void>();

  constructor(options: ServeOptions = {}) {
    const { port1, port2 } = new MessageChannel();
    this.port = port1;
    port1.onmessage = ({ data }: { data: FromWorker }) => {
      this.heard.push(data);
      for (const listener of this.listeners) listener();
    };
    const stop = serveSolver(port2 as unknown as JobPort, options);
    this.end = () => {
      stop();
      port1.close();
    };
  }

  say(message: ToWorker): void {
    this.port.postMessage(message);
  }

  close(): void {
    this.end();
  }

  /** The first message that fits, heard or still to come. */
  until<T extends FromWorker>(fits: (m: FromWorker) => m is T): Promise<T> {
    return new Promise((resolve) => {
      const look = (): void => {
        const found = this.heard.find(fits);
        if (!found) return;
        this.listeners.delete(look);
        resolve(found);
      };
      this.listeners.add(look);
      look();
    });
  }

  last(edit: number): Promise<Results> {
    return this.until((m): m is Results => m.say === 'results' && m.last && m.edit === edit);
  }
}

const pages: Page[] = [];
const open = (options: ServeOptions = {}): Page => {
  const page = new Page({ now: new Clock().now, ...options });
  pages.push(page);
  return page;
};
afterEach(() => {
  for (const page of pages.splice(0)) page.close();
});

/** A clock that only the units move, so that no test hangs on the speed of the machine. */
class Clock {
  t = 0;
  readonly now = (): number => this.t;
}

/** Kinds with a pipe that takes so many milliseconds, and one that breaks by our own mistake. */
function kindsWith(clock: Clock, cost_ms: number, each?: (unit: string) => void): Kinds {
  const pipe: AnyKind = {
    solve: (call: Call<never>) => {
      clock.t += cost_ms;
      each?.(call.unit);
      return solved(answerOf({ out: scaledStream(call.in.in!, 1) }, {} as never, []));
    },
    limits: () => [],
  };
  const broken: AnyKind = {
    solve: () => {
      throw new Error('a mistake of ours');
    },
    limits: () => [],
  };
  const like = KNOWN_KINDS.catalogue.valve!;
  return {
    catalogue: {
      ...KNOWN_KINDS.catalogue,
      pipe: { ...like, kind: 'pipe', settings: {} },
      broken: { ...like, kind: 'broken', settings: {} },
    },
    solvers: { ...KNOWN_KINDS.solvers, pipe, broken },
  };
}

const pipeline = (count: number, n = 10): ProblemUnit[] => [
  unit('f feed > out=s0', {
    state: { T: 300, P: 1e6 },
    flow: molar(n),
    composition: parts(1, 1, 1, 1, 1, 1, 1),
  }),
  ...Array.from({ length: count }, (_, k) => unit(`p${k} pipe in=s${k} > out=s${k + 1}`, {})),
];
const edit = (number: number, units: ProblemUnit[], of: Basis = basis): Problem =>
  problemOf(of, units, { edit: number });

describe('the solver behind a port', () => {
  test('says ready, solves, and hands out plain data that survives the crossing', async () => {
    const page = open();
    page.say({ say: 'basis', basis });
    page.say({ say: 'solve', problem: edit(1, letDown()), from: 'warm' });
    const results = await page.last(1);
    expect(page.heard[0]).toEqual({ say: 'ready' });
    expect(results.streams.map(([id]) => id)).toEqual(['1', '2', '3', '4']);
    expect(results.closure!.complete).toBe(true);
    const [, vapour] = results.streams[2]!;
    expect(vapour.state === 'solved' && vapour.z).toBeInstanceOf(Float64Array);
    expect(page.heard.filter((m) => m.say === 'results')).toHaveLength(1);
  });

  test('hands out only what changed', async () => {
    const page = open();
    page.say({ say: 'basis', basis });
    page.say({ say: 'solve', problem: edit(1, letDown(7e5)), from: 'warm' });
    await page.last(1);
    page.say({ say: 'solve', problem: edit(2, letDown(6e5)), from: 'warm' });
    expect((await page.last(2)).streams.map(([id]) => id)).toEqual(['2', '3', '4']);
    page.say({ say: 'solve', problem: edit(3, letDown(6e5)), from: 'warm' });
    const third = await page.last(3);
    expect([third.streams, third.units, third.gone]).toEqual([[], [], []]);
  });

  test('hands everything out again to a page that holds nothing, also when another order overtakes the one that said so', async () => {
    const page = open();
    page.say({ say: 'basis', basis });
    page.say({ say: 'solve', problem: edit(1, letDown(7e5)), from: 'warm' });
    await page.last(1);
    page.say({ say: 'solve', problem: edit(2, letDown(7e5)), from: 'warm', blank: true });
    page.say({ say: 'solve', problem: edit(3, letDown(7e5)), from: 'warm' });
    const last = await page.last(3);
    const handed = page.heard.flatMap((m) =>
      m.say === 'results' && m.edit > 1 ? m.streams.map(([id]) => id) : [],
    );
    expect([...new Set(handed)].sort()).toEqual(['1', '2', '3', '4']);
    expect(last.closure!.complete).toBe(true);
  });

  test('lets the latest win: what lies between is never solved, and its answer is that of a fresh solve', async () => {
    const clock = new Clock();
    const page = open({ kinds: kindsWith(clock, 3), now: clock.now });
    page.say({ say: 'basis', basis });
    for (let k = 1; k <= 20; k++) page.say({ say: 'solve', problem: edit(k, pipeline(20, k)), from: 'warm' });
    const results = await page.last(20);
    const answered = page.heard.flatMap((m) => (m.say === 'results' && m.last ? [m.edit] : []));
    expect(answered).toEqual([20]);
    const end = results.streams.find(([id]) => id === 's20')?.[1];
    expect(end?.state === 'solved' && end.n_mol_s).toBeCloseTo(20, 9);
  });

  test('breaks off a long solve for a newer one within 8 ms and a unit, and keeps what it has solved', async () => {
    const clock = new Clock();
    const solvedUnits: string[] = [];
    const kinds = kindsWith(clock, 4, (id) => {
      solvedUnits.push(id);
      if (solvedUnits.length === 30) page.say({ say: 'solve', problem: edit(2, pipeline(3)), from: 'warm' });
    });
    const page = open({ kinds, now: clock.now });
    page.say({ say: 'basis', basis });
    page.say({ say: 'solve', problem: edit(1, pipeline(100)), from: 'warm' });
    const second = await page.last(2);
    // A look into the queue comes every 8 ms, a pipe takes 4: at most three more are solved; the second edit needs no pipe anew.
    expect(solvedUnits.length).toBeLessThanOrEqual(33);
    expect(page.heard.some((m) => m.say === 'results' && m.last && m.edit === 1)).toBe(false);
    expect(second.closure!.complete).toBe(true);
    const first = page.heard.flatMap((m) => (m.say === 'results' && m.edit === 1 ? m.streams : []));
    const beyond = first.map(([id]) => id).filter((id) => !['s0', 's1', 's2', 's3'].includes(id));
    expect(beyond.length).toBeGreaterThan(0);
    expect(second.gone).toEqual(expect.arrayContaining(beyond.map((stream) => ({ stream }))));
  });

  test('gives up a long solve, and what waits, when told to stop; the next order is solved as if nothing had been', async () => {
    const clock = new Clock();
    const solvedUnits: string[] = [];
    const kinds = kindsWith(clock, 4, (id) => {
      solvedUnits.push(id);
      if (solvedUnits.length !== 30) return;
      page.say({ say: 'solve', problem: edit(2, pipeline(90)), from: 'warm' });
      page.say({ say: 'stop' });
    });
    const page = open({ kinds, now: clock.now });
    page.say({ say: 'basis', basis });
    page.say({ say: 'solve', problem: edit(1, pipeline(100)), from: 'warm' });
    await page.until((m): m is Results => m.say === 'results' && m.edit === 1);
    // An answer to a question comes when no solve is left: the one in flight and the one that waited are given up.
    page.say({ say: 'question', job: 7, about: { ask: 'prewarm' } });
    await page.until((m): m is Extract<FromWorker, { say: 'answer' }> => m.say === 'answer');
    expect(solvedUnits.length).toBeLessThanOrEqual(33);
    expect(page.heard.some((m) => m.say === 'results' && m.last)).toBe(false);
    page.say({ say: 'solve', problem: edit(3, pipeline(100)), from: 'warm' });
    expect((await page.last(3)).closure!.complete).toBe(true);
    const handed = page.heard.flatMap((m) => (m.say === 'results' ? m.streams.map(([id]) => id) : []));
    expect(new Set(handed).size).toBe(101);
    expect(handed).toHaveLength(101);
  });

  test('hands everything out anew where the order that asked for it was stopped before it began', async () => {
    const clock = new Clock();
    let solvedUnits = 0;
    const kinds = kindsWith(clock, 4, () => {
      solvedUnits++;
      if (solvedUnits !== 130) return;
      page.say({ say: 'solve', problem: edit(3, pipeline(100)), from: 'warm', blank: true });
      page.say({ say: 'stop' });
    });
    const page = open({ kinds, now: clock.now });
    page.say({ say: 'basis', basis });
    page.say({ say: 'solve', problem: edit(1, pipeline(100)), from: 'warm' });
    await page.last(1);
    page.say({ say: 'solve', problem: edit(2, pipeline(90)), from: 'nothing' });
    page.say({ say: 'question', job: 7, about: { ask: 'prewarm' } });
    await page.until((m): m is Extract<FromWorker, { say: 'answer' }> => m.say === 'answer');
    page.say({ say: 'solve', problem: edit(4, pipeline(100)), from: 'warm' });
    await page.last(4);
    const handed = page.heard.flatMap((m) => (m.say === 'results' && m.edit === 4 ? m.streams : []));
    expect(handed).toHaveLength(101);
  });

  test('hands out what it has after 30 ms, then every 100 ms, and says where it is every 250 ms', async () => {
    const clock = new Clock();
    const page = open({ kinds: kindsWith(clock, 5), now: clock.now });
    page.say({ say: 'basis', basis });
    page.say({ say: 'solve', problem: edit(1, pipeline(120)), from: 'warm' });
    const last = await page.last(1);
    const partial = page.heard.filter((m): m is Results => m.say === 'results' && !m.last);
    // Derived: 600 ms in all; one from 30 ms on, then at 100 ms or a little more each time.
    expect(partial).toHaveLength(6);
    const seen = [...partial, last].flatMap((m) => m.streams.map(([id]) => id));
    expect(new Set(seen).size).toBe(seen.length);
    expect(seen).toHaveLength(121);
    expect(page.heard.filter((m) => m.say === 'at')).toHaveLength(2);
  });

  test('says at most every 250 ms that it still runs while one unit takes seconds', async () => {
    const clock = new Clock();
    const kinds = kindsWith(clock, 0);
    const slow: AnyKind = {
      ...kinds.solvers.pipe!,
      solve: (call: Call<never>) => {
        for (let k = 0; k < 40; k++) {
          clock.t += 100;
          call.work.alive?.();
        }
        return kinds.solvers.pipe!.solve(call);
      },
    };
    const page = open({ kinds: { ...kinds, solvers: { ...kinds.solvers, pipe: slow } }, now: clock.now });
    page.say({ say: 'basis', basis });
    page.say({ say: 'solve', problem: edit(1, pipeline(1)), from: 'warm' });
    await page.last(1);
    // Four seconds in steps of 100 ms: one word every 300 ms.
    expect(page.heard.flatMap((m) => (m.say === 'at' ? [m.unit] : []))).toEqual(Array(13).fill('p0'));
  });

  test('names every unit before it is solved when it is asked to', async () => {
    const page = open();
    page.say({ say: 'basis', basis });
    page.say({ say: 'solve', problem: edit(1, letDown()), from: 'warm', announce: true });
    await page.last(1);
    expect(page.heard.flatMap((m) => (m.say === 'at' ? [m.unit] : []))).toEqual(['f', 'v', 'd']);
  });

  test('keeps two bases apart, tells what is gone, and finds the first again', async () => {
    const small = await basisOf(['propane', 'n-pentane']);
    const page = open();
    page.say({ say: 'basis', basis });
    page.say({ say: 'solve', problem: edit(1, letDown()), from: 'warm' });
    await page.last(1);
    const other = [
      unit('g feed > out=x', { state: { T: 300, P: 1e5 }, flow: molar(1), composition: parts(1, 1) }),
    ];
    page.say({ say: 'basis', basis: small });
    page.say({ say: 'solve', problem: edit(2, other, small), from: 'warm' });
    expect((await page.last(2)).gone).toEqual([
      ...['1', '2', '3', '4'].map((stream) => ({ stream })),
      ...['f', 'v', 'd'].map((id) => ({ unit: id })),
    ]);
    page.say({ say: 'solve', problem: edit(3, letDown()), from: 'warm' });
    const back = await page.last(3);
    expect(back.streams.map(([id]) => id)).toEqual(['1', '2', '3', '4']);
    expect(back.gone).toEqual([{ stream: 'x' }, { unit: 'g' }]);
  });

  test('solves from nothing when it is asked to, and says so', async () => {
    const page = open();
    page.say({ say: 'basis', basis });
    page.say({ say: 'solve', problem: edit(1, letDown()), from: 'warm' });
    const live = await page.last(1);
    page.say({ say: 'solve', problem: edit(1, letDown()), from: 'nothing' });
    const clean = await page.until(
      (m): m is Results => m.say === 'results' && m.from === 'nothing' && m.last,
    );
    expect(clean.streams).toEqual(live.streams);
  });

  test('survives a mistake of ours: it says what broke and solves the next problem', async () => {
    const page = open({ kinds: kindsWith(new Clock(), 0) });
    page.say({ say: 'basis', basis });
    const units = [...pipeline(1), unit('x broken in=s1 > out=y', {})];
    page.say({ say: 'solve', problem: edit(1, units), from: 'warm' });
    const broke = await page.until((m): m is Extract<FromWorker, { say: 'broke' }> => m.say === 'broke');
    expect(broke).toMatchObject({ edit: 1, message: 'a mistake of ours' });
    page.say({ say: 'solve', problem: edit(2, pipeline(2)), from: 'warm' });
    expect((await page.last(2)).closure!.complete).toBe(true);
  });

  test('says so when a problem comes without its basis', async () => {
    const page = open();
    page.say({ say: 'solve', problem: edit(1, letDown()), from: 'warm' });
    const broke = await page.until((m): m is Extract<FromWorker, { say: 'broke' }> => m.say === 'broke');
    expect(broke.edit).toBe(1);
  });

  test('warms itself up, and gives way to a solve', async () => {
    const page = open({ now: () => performance.now() });
    page.say({ say: 'question', job: 7, about: { ask: 'prewarm' } });
    page.say({ say: 'basis', basis });
    page.say({ say: 'solve', problem: edit(1, letDown()), from: 'warm' });
    await page.last(1);
    const answer = await page.until((m): m is Extract<FromWorker, { say: 'answer' }> => m.say === 'answer');
    expect(answer.job).toBe(7);
    expect(answer.value).toMatchObject({ enough: false });
  });

  test('warms itself up when it starts, once, and says nothing of it', async () => {
    const page = open({ now: () => performance.now(), warmUp: true });
    page.say({ say: 'question', job: 7, about: { ask: 'prewarm' } });
    const answer = await page.until((m): m is Extract<FromWorker, { say: 'answer' }> => m.say === 'answer');
    expect(answer.value).toEqual({ solves: 0, enough: true });
    expect(page.heard.map((m) => m.say)).toEqual(['ready', 'answer']);
  });
});
