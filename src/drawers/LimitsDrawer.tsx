import type { Finding, Weight } from '../engine/outcome';
import { LimitMark, weightWord, worstFirst } from '../parts/LimitMark';
import { useMeasures } from '../parts/measures';
import { useKinds } from '../store/kinds';
import { useCompiled, useResults, useSession, useSketch, useStores } from '../store/react';
import { Head } from './Head';
import { LimitRuler, rulerOf } from './LimitRuler';
import { useSay } from './useSay';
import { checkTitles } from './words';

const WEIGHTS: readonly Weight[] = ['beyond-limit', 'caution', 'note'];
const plural = (weight: Weight, n: number): string =>
  weight === 'beyond-limit' ? `${n} beyond limit` : `${n} ${weightWord(weight)}${n === 1 ? '' : 's'}`;

/** What the units and streams run into, worst first; then what was noticed and hinders nothing. */
export function LimitsDrawer() {
  const found = useResults((state) => state.findings);
  const notes = useCompiled((state) => state.notes);
  const rows = worstFirst(found);
  const counts = WEIGHTS.map(
    (weight) => [weight, rows.filter((row) => row.weight === weight).length] as const,
  );
  return (
    <>
      <Head label="Limits" sentence="Worst first; each with evidence, basis and next step." />
      <div className="drawer-body">
        {rows.length === 0 ? (
          <NoneFired />
        ) : (
          <>
            <p className="counts">
              {counts.map(([weight, n]) =>
                n === 0 ? null : (
                  <span key={weight}>
                    <LimitMark weight={weight} /> {plural(weight, n)}
                  </span>
                ),
              )}
            </p>
            <ul className="limits">
              {rows.map((row) => (
                <LimitRow
                  key={`${row.code} ${row.at.unit} ${row.at.stream} ${row.at.path} ${row.at.port} ${row.at.chemical}`}
                  finding={row}
                />
              ))}
            </ul>
          </>
        )}
        {notes.length > 0 ? (
          <section className="section about-sketch">
            <div className="section-head">
              <h3>About the sketch itself</h3>
            </div>
            <ul className="limits">
              {worstFirst(notes).map((note) => (
                <LimitRow
                  key={`${note.code} ${note.at.unit} ${note.at.stream} ${note.at.path}`}
                  finding={note}
                />
              ))}
            </ul>
          </section>
        ) : null}
      </div>
    </>
  );
}

function NoneFired() {
  const solved = useResults((state) => state.solvedEdit > 0 && state.closure?.complete === true);
  const kinds = useKinds();
  const units = useSketch((state) => state.sketch.units);
  const things = checkTitles(units.flatMap((unit) => kinds[unit.kind]?.findings ?? []));
  return (
    <section className="section">
      <p>
        {solved
          ? 'None of these checks fired. What is not checked is not said to be fine.'
          : 'Nothing is checked before it is solved; so far none of these checks fired.'}
      </p>
      <ul className="checked">
        {things.map((thing) => (
          <li key={thing}>{thing}</li>
        ))}
      </ul>
    </section>
  );
}

const ABOUT_PAIRS = /^model\/pair-|^sketch\/(repeated-pair|pair-)/;

function LimitRow({ finding }: { readonly finding: Finding }) {
  const { session } = useStores();
  const measures = useMeasures();
  const { unit, stream } = finding.at;
  const place = useSketch((state) => {
    const { units, streams } = state.sketch;
    if (unit) return units.find((u) => u.id === unit)?.tag;
    const number = stream && streams.find((s) => s.id === stream)?.number;
    return number ? `Stream ${number}` : undefined;
  });
  const { title, sentence, next, basis } = useSay()(finding);
  const ruler = rulerOf(finding, measures);
  const zone = useSession((state) => state.zones.get(unit ?? stream ?? ''));
  const show = (): void => {
    if (unit) session.centre({ unit });
    else if (stream) session.centre({ stream });
  };
  const open = (): void => {
    if (unit) session.select([unit]);
    else if (stream) session.select([], [stream]);
  };
  return (
    <li className="limit" data-weight={finding.weight} data-code={finding.code}>
      <button
        type="button"
        className="limit-head"
        title="Select and show in the middle of the sheet"
        onClick={show}
      >
        <LimitMark weight={finding.weight} />
        <span>
          <b>{place ?? 'Sketch'}</b> {title}, {weightWord(finding.weight)}
        </span>
        {zone ? (
          <span className="zone" title="Zone of the sheet">
            <span className="unseen">, zone </span>
            {zone}
          </span>
        ) : null}
      </button>
      <p>{sentence}</p>
      {ruler ? <LimitRuler {...ruler} weight={finding.weight} /> : null}
      {basis ? <p className="muted">{basis}</p> : null}
      {next ? <p className="next">{next}</p> : null}
      {ABOUT_PAIRS.test(finding.code) ? (
        <button type="button" className="button line" onClick={() => session.setState({ over: 'pairs' })}>
          Open the pair parameters
        </button>
      ) : null}
      {place ? (
        <button type="button" className="button line" onClick={open}>
          Open {place}
        </button>
      ) : null}
    </li>
  );
}
