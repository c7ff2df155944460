import { useState } from 'react';
import { Choice } from '../../parts/Choice';
import { Disclosure } from '../../parts/Disclosure';
import { Segmented } from '../../parts/Segmented';
import { setPair } from '../../store/commands';
import { useCompiled, useSketch, useStores } from '../../store/react';
import { run } from '../run';
import { PairMatrix } from './PairMatrix';
import { PairTable } from './PairTable';
import { countsOf, kijText, type PairRow, pairsOf, usePairRows } from './pairRows';

interface Chemical {
  readonly id: string;
  readonly name: string;
}

const EXPLAINED =
  'Dashed: from the bank, fitted to data or predicted by group contributions. None: nothing is known; zero is used. Typing makes a value your own.';
const NO_PAIRS = 'Raoult’s law knows no pairs: every liquid is ideal.';

const useWithPairs = (): readonly Chemical[] => {
  const basis = useCompiled((state) => state.basis);
  const { rows } = usePairRows();
  const met = new Set(rows.flatMap(({ i, j }) => [i, j]));
  return (basis?.chemicals ?? []).filter(({ id }) => met.has(id));
};

/** Every binary parameter in force, with where it comes from, folded away in the drawer. */
export function Pairs() {
  const { session } = useStores();
  const kind = useSketch((state) => state.sketch.model.kind);
  const { rows, strangers } = usePairRows();
  const [only, setOnly] = useState('');
  const chemicals = useWithPairs();
  if (kind === 'raoult') return <p className="muted small">{NO_PAIRS}</p>;
  if (rows.length === 0 && strangers.length === 0) return null;
  const title = `${rows.length} ${rows.length === 1 ? 'pair' : 'pairs'} in force`;
  return (
    <Disclosure title={title} aside={countsOf(rows)}>
      <div className="pair-tools">
        {chemicals.length > 2 ? <Only chemicals={chemicals} value={only} onChange={setOnly} /> : null}
        <button type="button" className="link" onClick={() => session.setState({ over: 'pairs' })}>
          Open as a wide table
        </button>
      </div>
      <PairTable rows={shownRows(rows, chemicals, only)} />
      <Strangers strangers={strangers} />
      <p className="muted small">{EXPLAINED}</p>
    </Disclosure>
  );
}

/** The same with room: a table with sources in full, or a matrix. */
export function PairsPage() {
  const kind = useSketch((state) => state.sketch.model.kind);
  const { rows, strangers } = usePairRows();
  const [only, setOnly] = useState('');
  const [view, setView] = useState<'table' | 'matrix'>('table');
  const chemicals = useWithPairs();
  if (kind === 'raoult') return <p>{NO_PAIRS}</p>;
  if (rows.length === 0 && strangers.length === 0)
    return <p>Pairs show here once the sketch has two chemicals that its model knows.</p>;
  return (
    <div className="pairs-page">
      <div className="pair-tools">
        <Segmented
          label="Pairs as"
          options={[
            { value: 'table', text: 'table' },
            { value: 'matrix', text: 'matrix' },
          ]}
          value={view}
          onChange={setView}
        />
        {view === 'table' && chemicals.length > 2 ? (
          <Only chemicals={chemicals} value={only} onChange={setOnly} />
        ) : null}
        <span className="muted">{countsOf(rows)}</span>
      </div>
      {view === 'matrix' ? (
        <PairMatrix chemicals={chemicals} rows={rows} />
      ) : (
        <PairTable rows={shownRows(rows, chemicals, only)} wide />
      )}
      <Strangers strangers={strangers} />
      <p className="muted small">{EXPLAINED}</p>
    </div>
  );
}

/** A chemical that has gone filters nothing any more. */
const shownRows = (
  rows: readonly PairRow[],
  chemicals: readonly Chemical[],
  only: string,
): readonly PairRow[] => pairsOf(rows, chemicals.some(({ id }) => id === only) ? only : '');

function Only(props: {
  readonly chemicals: readonly Chemical[];
  readonly value: string;
  readonly onChange: (id: string) => void;
}) {
  return (
    <Choice
      label="Pairs of"
      path="pairs.only"
      value={props.chemicals.some(({ id }) => id === props.value) ? props.value : ''}
      options={[
        { value: '', text: 'Pairs of all components' },
        ...props.chemicals.map(({ id, name }) => ({ value: id, text: `Pairs of ${name}` })),
      ]}
      onChange={props.onChange}
    />
  );
}

/** Pairs given of chemicals that the sketch does not have: kept, unused, and said. */
function Strangers({ strangers }: Pick<ReturnType<typeof usePairRows>, 'strangers'>) {
  const { sketch } = useStores();
  const disabled = useSketch((state) => !state.writable);
  if (strangers.length === 0) return null;
  return (
    <ul className="strangers muted small">
      {strangers.map(({ i, j, kij }) => (
        <li key={`${i} ${j}`}>
          {i} + {j}, {kijText(kij)}: given, but not both are in the sketch.{' '}
          <button
            type="button"
            className="link quiet"
            disabled={disabled}
            aria-label={`Remove the pair ${i} + ${j}`}
            onClick={() => run(sketch, (s) => setPair(s, i, j, undefined))}
          >
            Remove
          </button>
        </li>
      ))}
    </ul>
  );
}
