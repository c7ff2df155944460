import { makeMemory } from '../engine/network/memory';
import { solveNetwork } from '../engine/network/solve';
import type { Turns } from './port';
import { WARMING, warmingProblem } from './prewarmProblem';

/** Long enough for the compiler of the browser to settle [ms]. */
const ENOUGH_MS = 700;
const SLICE_MS = 8;

export interface Prewarm {
  readonly turns: Turns;
  readonly now: () => number;
  overtaken(): boolean;
}

/**
 * Solves a small train over and over, so that the first sketch does not pay for cold code. Gives way to any solve, between
 * two units.
 *
 * @returns how many solves were made, and whether it was let run to its end
 */
export async function prewarm(d: Prewarm): Promise<{ readonly solves: number; readonly enough: boolean }> {
  const memory = makeMemory(WARMING);
  const begun = d.now();
  let slice = begun;
  let solves = 0;
  while (d.now() - begun < ENOUGH_MS) {
    const from = solves % 2 === 0 ? 'nothing' : 'warm';
    for (const _ of solveNetwork(warmingProblem(solves), memory, { from })) {
      if (d.now() - slice < SLICE_MS) continue;
      await d.turns.turn();
      if (d.overtaken()) return { solves, enough: false };
      slice = d.now();
    }
    solves += 1;
  }
  return { solves, enough: true };
}
