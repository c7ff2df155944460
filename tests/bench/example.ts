/** Time of the aromatic condensate train as the page solves it: closure, limits, findings and the shape that is posted. */
import { spawnSync } from 'node:child_process';
import { fileURLToPath } from 'node:url';
import { timeModels } from './models';
import { CHANGES, memoryOf, readTrain, solveAll } from './train';

const ROUNDS = 60;
/** Rounds of every change before any is timed: the compiler at run time still betters the code for that long. */
const WARM_UP = 120;
const FRESH = 5;
const CHILD = fileURLToPath(new URL('./exampleFresh.ts', import.meta.url));

const at = (times: readonly number[], share: number): number =>
  [...times].sort((a, b) => a - b)[Math.floor(share * (times.length - 1))]!;

/** Multiples of one evaluation with derivatives, timed just before and after: a busy machine slows both. */
function row(what: string, times: readonly number[], unit_us: number): object {
  const [best, median] = [at(times, 0), at(times, 0.5)];
  return {
    example: what,
    'median ms': median,
    'best ms': best,
    'median, evaluations': (median * 1e3) / unit_us,
    'best, evaluations': (best * 1e3) / unit_us,
  };
}

const evaluation_us = (now: () => number): number => timeModels(now, [10], 7).find((t) => t.level === 2)!.us;

/** The first solve of a process that has solved nothing, or nothing but the built-in problem. */
function freshProcess(warmed: boolean): { readonly first_ms: number; readonly unit_us: number } {
  const child = spawnSync(process.execPath, ['--import', 'tsx', CHILD, ...(warmed ? ['warmed'] : [])], {
    encoding: 'utf8',
  });
  if (child.status !== 0) throw new Error(child.stderr);
  return JSON.parse(child.stdout);
}

/** @param now  clock in milliseconds */
export async function timeExample(now: () => number): Promise<readonly object[]> {
  const train = await readTrain();
  const memory = memoryOf(train);
  for (let k = 0; k < WARM_UP; k++) {
    solveAll(train.asItIs, memory, 'nothing');
    for (const problem of train.changed) solveAll(problem, memory, 'warm');
  }
  const rows: object[] = [];
  let unit_us = evaluation_us(now);
  rows.push({ 'one evaluation with derivatives, 10 chemicals, us': unit_us });
  const measured = (what: string, once: () => number): void => {
    const times = Array.from({ length: ROUNDS }, once);
    const after = evaluation_us(now);
    rows.push(row(what, times, (unit_us + after) / 2));
    unit_us = after;
  };
  const timed = (work: () => unknown): number => {
    const begun = now();
    work();
    return now() - begun;
  };
  CHANGES.forEach(([path], k) => {
    solveAll(train.asItIs, memory, 'warm');
    let there = false;
    measured(`warm after 1 % of ${path}`, () => {
      there = !there;
      return timed(() => solveAll(there ? train.changed[k]! : train.asItIs, memory, 'warm'));
    });
  });
  measured('from nothing', () => timed(() => solveAll(train.asItIs, memory, 'nothing')));
  const batch = { say: 'results', ...solveAll(train.asItIs, memoryOf(train), 'nothing') };
  measured('everything posted once', () => timed(() => structuredClone(batch)));
  for (const warmed of [false, true]) {
    const found = Array.from({ length: FRESH }, () => freshProcess(warmed));
    const what = warmed ? 'first in a process that was pre-warmed' : 'first in a fresh process';
    rows.push(
      row(
        what,
        found.map((f) => f.first_ms),
        at(
          found.map((f) => f.unit_us),
          0.5,
        ),
      ),
    );
  }
  return rows;
}
