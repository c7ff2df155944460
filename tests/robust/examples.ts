import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import { makeMemory } from '../../src/engine/network/memory';
import { solveNetwork } from '../../src/engine/network/solve';
import type { Problem, SolveBatch } from '../../src/engine/network/types';
import type { Finding } from '../../src/engine/outcome';
import { loadBankData } from '../../src/sketch/bank';
import { compile } from '../../src/sketch/compile';
import { setByPath } from '../../src/sketch/edits';
import { openSketch } from '../../src/sketch/read';
import type { Sketch } from '../../src/sketch/types';
import type { GroupReport } from './groups';
import { makeRandom, type Random } from './random';
import { faultOfSheet } from './sketchReferee';
import { condensate, lightHydrocarbons, nitrogenLoop, type Setting } from './variations';

const FOLDER = join(import.meta.dirname, '../../public/examples');

const EXAMPLES: Readonly<Record<string, (random: Random) => Setting[]>> = {
  'aromatic-condensate': condensate,
  'light-hydrocarbons': lightHydrocarbons,
  'nitrogen-loop': nitrogenLoop,
};

function load(name: string): Sketch {
  const opened = openSketch(readFileSync(join(FOLDER, `${name}.sketch.json`), 'utf8'));
  if (!opened.ok) throw new Error(`${name} does not open`);
  return opened.sketch;
}

/** A seed for one case of one example, so that each can be run alone. */
const seedOf = (seed: number, example: number, number: number): number =>
  (Math.imul(seed, 0x9e3779b1) ^ Math.imul(number + 1, 0x85ebca6b) ^ (example * 0xc2b2ae35)) >>> 0;

function withSettings(sketch: Sketch, settings: readonly Setting[]): Sketch {
  let next = sketch;
  for (const [place, value] of settings) {
    const edit = setByPath(next, place, value);
    if (!edit.ok) throw new Error(`${place} = ${value}: ${edit.code}`);
    next = edit.sketch;
  }
  return next;
}

/** First causes: what the units that have no solution say, not those that wait for them. */
const reasonsOf = (batch: SolveBatch): Finding[] =>
  batch.units.flatMap(([, unit]) =>
    unit.state === 'no-solution' ? [...(unit.reasons ?? [])].slice(0, 1) : [],
  );

const hasReason = (f: Finding | undefined): boolean =>
  f !== undefined && f.at.unit !== undefined && f.evidence.length > 0;

interface Tally {
  tried: number;
  answered: number;
  slowest_ms: number;
  slowestFailure_ms: number;
}

/**
 * Variations of the train examples, each solved from nothing by way of the file, compile and the whole network.
 *
 * @param count  variations of each example
 * @param only   this case of each example and no other: how a failure is run again
 */
export async function examples(seed: number, count: number, only?: number): Promise<GroupReport> {
  const reasons: Record<string, number> = {};
  const cases: unknown[] = [];
  const byExample: Record<string, Tally & { share: number }> = {};
  let tried = 0;
  let answered = 0;
  let wrong = 0;
  for (const [k, [name, vary]] of Object.entries(EXAMPLES).entries()) {
    const base = load(name);
    const bank = await loadBankData(base);
    const tally: Tally = { tried: 0, answered: 0, slowest_ms: 0, slowestFailure_ms: 0 };
    const [from, to] = only === undefined ? [0, count] : [only, only + 1];
    for (let number = from; number < to; number++) {
      const random = makeRandom(seedOf(seed, k, number));
      const settings = vary(random);
      const { basis, problem, gaps } = compile(withSettings(base, settings), bank);
      const failed = (why: string, more: object = {}): void => {
        reasons[why] = (reasons[why] ?? 0) + 1;
        const set = settings.map(([place, value]) => `--set '${place}=${value}'`).join(' ');
        cases.push({ example: name, case: number, why, ...more, set });
      };
      tally.tried++;
      if (!basis || gaps.length > 0) {
        wrong++;
        failed(`needs a value: ${gaps[0]?.code}`);
        continue;
      }
      const begun = performance.now();
      const batch = solveAll(problem, basis);
      const ms = performance.now() - begun;
      tally.slowest_ms = Math.max(tally.slowest_ms, ms);
      const [first] = reasonsOf(batch);
      if (batch.units.some(([, u]) => u.state !== 'solved')) {
        tally.slowestFailure_ms = Math.max(tally.slowestFailure_ms, ms);
        if (!hasReason(first)) wrong++;
        failed(hasReason(first) ? first!.code : 'no reason', { ms, reason: first });
        continue;
      }
      const fault = faultOfSheet(basis, problem, batch, random);
      if (fault !== undefined) {
        wrong++;
        failed('wrong', { fault });
        continue;
      }
      tally.answered++;
    }
    byExample[name] = { ...tally, share: tally.answered / tally.tried };
    tried += tally.tried;
    answered += tally.answered;
  }
  // Each example must reach the mark, not their mean.
  const share = Math.min(...Object.values(byExample).map((t) => t.share));
  return { tried, answered, reasons, wrong, share, wanted: 0.99, cases, more: { byExample } };
}

function solveAll(problem: Problem, basis: Parameters<typeof makeMemory>[0]): SolveBatch {
  const steps = solveNetwork(problem, makeMemory(basis), { from: 'nothing' });
  let step = steps.next();
  while (!step.done) step = steps.next();
  return step.value;
}
