import type { StreamState } from '../equilibrium/types';
import type { Port } from '../ids';
import { warmOf } from './streams';
import type { Answer } from './types';

/**
 * The answer of a unit without reactions and without shaft power. Iterations of the streams that were flashed in it are summed,
 * the worst of their residuals stands, and the last of them is where the next solve starts.
 *
 * @param flashed  streams made here; those passed on from an inlet do not count
 * @param heat_W   heat into the unit [W]
 */
export function answerOf<R>(
  out: Readonly<Record<Port, StreamState>>,
  results: R,
  flashed: readonly StreamState[],
  heat_W = 0,
): Answer<R> {
  let iterations = 0;
  let residual = 0;
  for (const s of flashed) {
    iterations += s.iterations;
    residual = Math.max(residual, s.residual);
  }
  const last = flashed.at(-1);
  return {
    out,
    heat_W,
    power_W: 0,
    results,
    effort: { iterations, residual },
    warm: last ? warmOf(last) : undefined,
  };
}
