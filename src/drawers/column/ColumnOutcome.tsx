import type { ReactNode } from 'react';
import { columnResults } from '../../drawing/columnProfiles';
import { FigureRow } from '../../parts/Figure';
import { useMeasures } from '../../parts/measures';
import type { Dimension } from '../../quantity';
import { show } from '../../quantity';
import { useUnitResult } from '../../store/react';
import { stagesText } from '../../wording';
import { useForm } from '../unit/useForm';
import { Profiles } from './Profiles';
import { useFixingWords } from './words';

/** What became of a column: duties, ratios, temperatures, what fixed it; then the profiles over its stages. */
export function ColumnOutcome() {
  const form = useForm();
  const measures = useMeasures();
  const entry = useUnitResult(form.unit.id);
  const latest = entry?.latest;
  const outOfDate = latest?.state !== 'solved' && entry?.older !== undefined;
  const shown = outOfDate ? entry?.older : latest?.state === 'solved' ? latest : undefined;
  const results = columnResults(shown?.results);
  if (!results) return null;
  const row = (label: ReactNode, value: number | undefined, dim: Dimension) => {
    if (value === undefined) return null;
    const { number, unit } = show(value, dim, measures);
    return <FigureRow label={label} text={number} unit={unit} outOfDate={outOfDate} />;
  };
  const duty = (end: string, value: number | undefined) =>
    row(
      `${end} duty, ${(value ?? 0) < 0 ? 'removed' : 'added'}`,
      value === undefined ? undefined : Math.abs(value),
      'power',
    );
  const { condenser, reboiler, stages } = results;
  return (
    <>
      <section className="section">
        <div className="section-head">
          <h3>Results</h3>
          {outOfDate ? <span className="muted">out of date</span> : null}
        </div>
        <dl className="figures">
          {duty('Condenser', results.condenserDuty_W)}
          {duty('Reboiler', results.reboilerDuty_W)}
          {row('Reflux ratio, mol', results.refluxRatio, 'number')}
          {row('Boil-up ratio, mol', results.boilup, 'number')}
          {row('Condenser temperature', condenser?.T_K, 'temperature')}
          {row('Top temperature, stage 1', results.topT_K, 'temperature')}
          {row(`Bottom temperature, stage ${stages.T_K.length}`, results.bottomT_K, 'temperature')}
          {row('Reboiler temperature', reboiler?.T_K, 'temperature')}
        </dl>
        {outOfDate ? null : <FixedText />}
      </section>
      <Profiles results={results} outOfDate={outOfDate} />
    </>
  );
}

/** Stages, ends and what fixes the column, as set. */
function FixedText() {
  const words = useFixingWords();
  const text = useForm().ask(({ unit: { settings } }) => {
    const fixed = words.all(settings);
    return `${stagesText(settings)}${fixed === '' ? '.' : `; fixed by ${fixed}.`}`;
  });
  return <p className="fixed-text">{text}</p>;
}
