import type { StageSystem } from './system';
import { flowTarget, type Target } from './targets';
import type { Fixing } from './types';

/** A fixing with its place in the task's list. */
export interface Placed {
  readonly index: number;
  readonly fixed: Fixing;
}

/** What the side draws ask. */
export const drawTargets = (s: StageSystem): Target[] => s.task.draws.map((d, k) => flowTarget(s, k, d.flow));

/** Fixings that are parameters themselves, by parameter; and the others. */
export function directParameters(
  s: StageSystem,
  fixed: readonly Fixing[],
): { readonly direct: ReadonlyMap<number, number>; readonly left: readonly Placed[] } {
  const direct = new Map<number, number>();
  const left: Placed[] = [];
  const bottoms = s.movers.findIndex((m) => m.moves === 'bottoms');
  const { draws } = s.task;
  fixed.forEach((x, index) => {
    if (x.fix === 'refluxRatio') direct.set(0, s.totalCondenser ? 1 / x.value : x.value);
    else if (x.fix === 'flow' && x.flow.basis === 'mole' && bottoms >= 0 && x.product === 'bottoms')
      direct.set(bottoms, x.flow.value);
    else if (
      x.fix === 'flow' &&
      x.flow.basis === 'mole' &&
      bottoms >= 0 &&
      x.product === 'top' &&
      draws.every((d) => d.flow.basis === 'mole')
    )
      direct.set(bottoms, s.feedTotal - x.flow.value - draws.reduce((sum, d) => sum + d.flow.value, 0));
    else left.push({ index, fixed: x });
  });
  return { direct, left };
}
