import { FigureRow } from '../../parts/Figure';
import { useMeasures } from '../../parts/measures';
import { inPercent, show } from '../../quantity';
import { useUnitResult } from '../../store/react';
import { capital, resultWord } from '../words';
import { useForm } from './useForm';

/** Heat and power are told by their size and a word for their direction. */
function directed(key: string, word: string, value: number): readonly [string, number] {
  if (/^duty/.test(key)) return [`${word}, ${value < 0 ? 'removed' : 'added'}`, Math.abs(value)];
  if (/^power|^shaft/i.test(key))
    return [`${word}, ${value < 0 ? 'delivered' : 'taken up'}`, Math.abs(value)];
  return [word, value];
}

/** The results that the catalogue lists, in its order. */
export function Results() {
  const form = useForm();
  const measures = useMeasures();
  const entry = useUnitResult(form.unit.id);
  const listed = Object.entries(form.kind.results).filter(([, spec]) => !spec.hidden);
  const latest = entry?.latest;
  const outOfDate = latest?.state !== 'solved' && entry?.older !== undefined;
  const shown = outOfDate ? entry?.older : latest?.state === 'solved' ? latest : undefined;
  if (listed.length === 0 || !shown?.results) return null;
  return (
    <section className="section">
      <div className="section-head">
        <h3>Results</h3>
        {outOfDate ? <span className="muted">out of date</span> : null}
      </div>
      <dl className="figures">
        {listed.map(([key, { dim, percent }]) => {
          const value = shown.results?.[key];
          if (typeof value !== 'number') return null;
          const [word, size] = directed(key, resultWord(form.kind.kind, key), value);
          const { number, unit } = show(size, dim, percent ? inPercent(measures) : measures);
          return (
            <FigureRow key={key} label={capital(word)} text={number} unit={unit} outOfDate={outOfDate} />
          );
        })}
      </dl>
    </section>
  );
}
