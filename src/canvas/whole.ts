import type { UnitId } from '../engine/ids';
import type { Finding } from '../engine/outcome';
import { formatSignificant } from '../quantity';
import type { Sketch, SketchUnit } from '../sketch/types';
import type { ResultsState } from '../store/resultsStore';
import { type SayContext, sayFinding, sayLoopStop } from '../wording';
import { tagOf } from './words';

type Names = Pick<SayContext, 'tag' | 'kind' | 'chemical'>;

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

/** ", loop torn at stream 14, pass 5, off by 0.002": at which tear, how far. */
function loopText(sketch: Sketch, { loop }: ResultsState): string {
  if (!loop) return '';
  const number = sketch.streams.find((s) => s.id === loop.stream)?.number ?? loop.stream;
  const off = loop.residual === undefined ? '' : `, off by ${formatSignificant(loop.residual, 1)}`;
  return `, loop torn at stream ${number}, pass ${loop.pass}${off}`;
}

/** What stops the units that have no answer, first cause first; what stops a whole loop is told once, and of the loop. */
function stopsOf(
  { units }: Sketch,
  results: ResultsState,
  lacking: ReadonlySet<UnitId | undefined>,
  chemical: Names['chemical'],
): readonly string[] {
  const named = (id: UnitId) => units.find((unit) => unit.id === id);
  const names: Names = {
    tag: (id) => named(id)?.tag,
    kind: (id) => named(id)?.kind,
    ...(chemical ? { chemical } : {}),
  };
  const stops = units.flatMap(({ id, tag }) => {
    const latest = results.units.get(id)?.latest;
    const state = latest?.state ?? (lacking.has(id) ? 'needs-value' : 'waiting');
    if (state !== 'needs-value' && state !== 'no-solution') return [];
    const [reason] = latest?.reasons ?? [];
    return [(reason && sayLoopStop(reason, names)) ?? `${tag} ${CAUSES[state]}`];
  });
  return [...new Set(stops)];
}

/** "Solved in 12 ms, edit 214", or what stops the train, first cause first. */
export function wholeState(
  sketch: Sketch,
  edit: number,
  results: ResultsState,
  gaps: readonly Finding[] = [],
  chemical?: Names['chemical'],
): WholeState {
  if (sketch.units.length === 0) return { word: '', rest: 'Nothing to solve yet' };
  if (results.trouble) return { word: 'Stopped', rest: `: ${results.trouble}` };
  if (results.at && results.answering > results.solvedEdit)
    return {
      word: 'Solving',
      rest: `, at ${tagOf(sketch, results.at)}${loopText(sketch, results)}, edit ${edit}`,
    };
  if (results.stopped) return { word: 'Stopped', rest: `, edit ${edit} is not solved` };
  const whole = gaps.find((gap) => !gap.at.unit && !gap.at.stream);
  const lacking = new Set(gaps.map((gap) => gap.at.unit));
  const stops = [...(whole ? [titleOf(whole)] : []), ...stopsOf(sketch, results, lacking, chemical)];
  if (stops.length > 0) {
    const more = stops.length > 2 ? ` and ${stops.length - 2} more` : '';
    return { word: 'Not solved yet', rest: `: ${stops.slice(0, 2).join(', ')}${more}` };
  }
  const isSolved = ({ id }: SketchUnit): boolean => results.units.get(id)?.latest.state === 'solved';
  if (!sketch.units.every(isSolved)) return { word: 'Not solved yet', rest: '' };
  return { word: 'Solved', rest: ` in ${time(results.tookMs)}, edit ${results.solvedEdit}` };
}
