import { measuresOf } from '../../parts/measures';
import { formatChange, type Measures, show } from '../../quantity';
import type { Stores } from '../../store/react';
import type { ResultsState } from '../../store/resultsStore';
import { flowNow, missedBy, type Target } from './target';

/** "120.0 kmol/h"; undefined where the stream has no answer. */
export function flowText(
  results: Pick<ResultsState, 'streams'>,
  target: Pick<Target, 'stream' | 'dim'>,
  measures: Measures,
): string | undefined {
  const now = flowNow(results, target);
  if (now === undefined) return undefined;
  const { number, unit } = show(now, target.dim, measures);
  return `${number} ${unit}`;
}

/** That a stream did not become what was wanted, and why that can be: a title and a sentence. */
export function missedSentence(
  { sketch, results }: Stores,
  target: Target,
  off: number,
): readonly [string, string] {
  const document = sketch.getState().sketch;
  const measures = measuresOf(document);
  const number = document.streams.find(({ id }) => id === target.stream)?.number ?? '?';
  const wanted = show(target.wanted, target.dim, measures);
  const now = flowText(results.getState(), target, measures) ?? 'nothing';
  return [
    `Stream ${number} came out at ${now} instead of ${wanted.number} ${wanted.unit} (${formatChange(off * 100)} %).`,
    'Something between the feeds and this stream does not follow them, such as a flow that is given as a number. Scale once more, or change it there.',
  ];
}

/** Says so if the stream missed what was wanted. */
export function tellMissed(stores: Stores, target: Target): void {
  const off = missedBy(stores.results.getState(), target);
  if (off === undefined) return;
  const [title, line] = missedSentence(stores, target, off);
  stores.session.say('caution', title, [line]);
}
