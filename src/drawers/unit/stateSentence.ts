import type { UnitResult } from '../../engine/network/types';
import type { Finding } from '../../engine/outcome';
import { formatSignificant } from '../../quantity';
import { drawnState, type Shown } from '../../store/resultsStore';
import type { Said } from '../../wording';

/** How a unit stands, in one sentence: the state's word, then the reason. */
export function stateSentence(
  entry: Shown<UnitResult> | undefined,
  gaps: readonly Finding[],
  say: (finding: Finding) => Said,
): string {
  const [gap] = gaps;
  if (gap) return say(gap).sentence;
  switch (drawnState(entry)) {
    case 'solved': {
      const { iterations, residual } = entry?.latest ?? {};
      if (!iterations) return 'Solved.';
      return `Solved, ${iterations} iterations${residual ? `, residual ${formatSignificant(residual, 2)}` : ''}.`;
    }
    case 'needs-value': {
      const [reason] = entry?.latest.reasons ?? [];
      return reason ? say(reason).sentence : 'Needs a value.';
    }
    case 'no-solution':
      return 'No solution; no result is shown.';
    case 'out-of-date':
      return 'Out of date: an older result is shown until what is upstream has an answer.';
    case 'waiting':
      return entry ? 'Waiting for what is upstream.' : 'Not solved yet.';
  }
}
