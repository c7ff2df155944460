import { makeMemory } from '../engine/network/memory';
import { solveNetwork } from '../engine/network/solve';
import type { Turns } from './port';
import { WARMING, warmingProblem } from './prewarmProblem';

/** So many solves, half of them from nothing, until the compiler has settled: more bring the first sketch nothing. */
const ENOUGH = 24;
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
  let slice = d.now();
  for (let solves = 0; solves < ENOUGH; solves++) {
    const from = solves % 2 === 0 ? 'nothing' : 'warm';
    for (const _ of solveNetwork(warmingProblem(solves), memory, { from })) {
      if (d.now() - slice < SLICE_MS) continue;
      await d.turns.turn();
      if (d.overtaken()) return { solves, enough: false };
      slice = d.now();
    }
  }
  return { solves: ENOUGH, enough: true };
}
