import type { Finding } from '../engine/outcome';
import type { Sketch } from '../sketch/types';
import type { ResultsState } from '../store/resultsStore';
import { sayFinding } from '../wording';
import { tagOf } from './words';

/** State of the whole train for the title strip: a word in bold, then the rest. */
export interface WholeState {
  readonly word: string;
  readonly rest: string;
}

const CAUSES = { 'needs-value': 'needs a value', 'no-solution': 'has no solution' } as const;

/** "no chemicals" for what stops the whole sketch. */
const titleOf = (gap: Finding): string => {
  const { title } = sayFinding(gap, { measures: 'SI' });
  return title.charAt(0).toLowerCase() + title.slice(1);
};

const time = (ms: number): string =>
  ms < 1000 ? `${Math.max(1, Math.round(ms))} ms` : `${(ms / 1000).toFixed(1)} s`;

/** ", loop of stream 14, pass 5, off by 2e-3": which loop, at which tear, how far. */
function loopText(sketch: Sketch, { loop }: ResultsState): string {
  if (!loop) return '';
  const number = sketch.streams.find((s) => s.id === loop.stream)?.number ?? loop.stream;
  const off = loop.residual === undefined ? '' : `, off by ${loop.residual.toExponential(0)}`;
  return `, loop of stream ${number}, pass ${loop.pass}${off}`;
}

/** "Solved in 12 ms, edit 214", or what stops the train, first cause first. */
export function wholeState(
  sketch: Sketch,
  edit: number,
  results: ResultsState,
  gaps: readonly Finding[] = [],
): WholeState {
  if (sketch.units.length === 0) return { word: '', rest: 'Nothing to solve yet' };
  if (results.trouble) return { word: 'Stopped', rest: `: ${results.trouble}` };
  if (results.at && results.answering > results.solvedEdit)
    return {
      word: 'Solving',
      rest: `, at ${tagOf(sketch, results.at)}${loopText(sketch, results)}, edit ${edit}`,
    };
  const whole = gaps.find((gap) => !gap.at.unit && !gap.at.stream);
  const stops = whole ? [titleOf(whole)] : [];
  const lacking = new Set(gaps.map((gap) => gap.at.unit));
  let solved = 0;
  for (const unit of sketch.units) {
    const entry = results.units.get(unit.id)?.latest.state;
    const state = entry ?? (lacking.has(unit.id) ? 'needs-value' : 'waiting');
    if (state === 'solved') solved += 1;
    else if (state === 'needs-value' || state === 'no-solution') stops.push(`${unit.tag} ${CAUSES[state]}`);
  }
  if (stops.length > 0) {
    const more = stops.length > 2 ? ` and ${stops.length - 2} more` : '';
    return { word: 'Not solved yet', rest: `: ${stops.slice(0, 2).join(', ')}${more}` };
  }
  if (solved < sketch.units.length) return { word: 'Not solved yet', rest: '' };
  return { word: 'Solved', rest: ` in ${time(results.tookMs)}, edit ${results.solvedEdit}` };
}
