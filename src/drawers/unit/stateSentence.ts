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
  const [reason] = entry?.latest.reasons ?? [];
  if (gap) return say(gap).sentence;
  switch (drawnState(entry)) {
    case 'solved': {
      const { iterations, residual } = entry?.latest ?? {};
      if (!iterations) return 'Solved.';
      return `Solved, ${iterations} iterations${residual ? `, residual ${formatSignificant(residual, 2)}` : ''}.`;
    }
    case 'needs-value':
      return reason ? say(reason).sentence : 'Needs a value.';
    case 'no-solution':
      return 'No solution; no result is shown.';
    case 'out-of-date':
      return reason
        ? `Out of date. ${say(reason).sentence}`
        : 'Out of date: shown until there is a new answer.';
    case 'waiting':
      if (reason) return say(reason).sentence;
      return entry ? 'Waiting for what is upstream.' : 'Not solved yet.';
  }
}
