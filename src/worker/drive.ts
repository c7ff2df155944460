import type { UnitId } from '../engine/ids';
import type { SolveStep } from '../engine/network/solve';
import type { LoopProgress, SolveBatch } from '../engine/network/types';
import type { Turns } from './port';

/** Milliseconds between looks into the queue, before the first partial results, between further ones, between 'at's. */
export interface Pace {
  readonly pause: number;
  readonly first: number;
  readonly next: number;
  readonly at: number;
}

/** The pace of the page's solver. */
export const PACE: Pace = { pause: 8, first: 30, next: 100, at: 250 };

/** What a solve in slices needs of its surroundings: `now` in ms, never going back; `announce`: say which unit it is at. */
export interface Drive {
  readonly turns: Turns;
  readonly now: () => number;
  readonly pace: Pace;
  /** Something newer waits: this solve is broken off. */
  overtaken(): boolean;
  partial(batch: SolveBatch): void;
  at(unit: UnitId, loop?: LoopProgress): void;
  /** Takes what is to be called while one unit takes long. */
  readonly hear?: (alive: () => void) => void;
  readonly announce: boolean;
}

/**
 * Runs a solve in slices, so that the queue is looked into while it lasts.
 *
 * @returns the last batch, or undefined when the solve was overtaken
 */
export async function drive(
  solve: Generator<SolveStep, SolveBatch, void>,
  d: Drive,
): Promise<SolveBatch | undefined> {
  const begun = d.now();
  let slice = begun;
  let posted: number | undefined;
  let said = begun;
  let going: SolveStep | undefined;
  const sayAt = ({ unit, loop }: SolveStep, t: number): void => {
    d.at(unit, loop);
    said = t;
  };
  d.hear?.(() => {
    const t = d.now();
    if (going && t - said >= d.pace.at) sayAt(going, t);
  });
  for (;;) {
    const step = solve.next();
    if (step.done) return step.value;
    going = step.value;
    const t = d.now();
    if (d.announce || t - said >= d.pace.at) sayAt(going, t);
    if (t - slice < d.pace.pause) continue;
    if (posted === undefined ? t - begun >= d.pace.first : t - posted >= d.pace.next) {
      d.partial(step.value.collect());
      posted = t;
    }
    await d.turns.turn();
    if (d.overtaken()) {
      // Ends the generator; what was solved stays in the memory.
      solve.return({ streams: [], units: [], gone: [], findings: [] });
      return undefined;
    }
    slice = d.now();
  }
}
