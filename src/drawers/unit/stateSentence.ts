import type { UnitClosure, UnitResult } from '../../engine/network/types';
import type { Finding } from '../../engine/outcome';
import { displayUnit, formatDifference, type Measures } from '../../quantity';
import { drawnState } from '../../store/resultsStore';
import type { Shown } from '../../store/shown';
import type { Said } from '../../wording';

/** How a unit stands, in one sentence: the state's word, then the reason. */
export function stateSentence(
  entry: Shown<UnitResult> | undefined,
  gaps: readonly Finding[],
  say: (finding: Finding) => Said,
  measures: Measures,
  own: UnitClosure | undefined,
): string {
  const [gap] = gaps;
  const [reason] = entry?.latest.reasons ?? [];
  if (gap) return say(gap).sentence;
  switch (drawnState(entry)) {
    case 'solved': {
      const { iterations } = entry?.latest ?? {};
      const effort = iterations ? `, ${iterations} iteration${iterations === 1 ? '' : 's'}` : '';
      return `Solved${effort}.${own ? ` ${ownClosure(own, measures)}` : ''}`;
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

/** "Own closure: mass 0 kg/h, energy 3 × 10⁻⁹ kW." */
function ownClosure({ mass, energy }: UnitClosure, measures: Measures): string {
  const off = ({ in: into, made, out }: UnitClosure['mass'], dim: 'massFlow' | 'power'): string => {
    const { label, toDisplay } = displayUnit(dim, measures);
    return `${formatDifference(toDisplay(into + made - out))} ${label}`;
  };
  return `Own closure: mass ${off(mass, 'massFlow')}, energy ${off(energy, 'power')}.`;
}
