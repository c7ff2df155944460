import { useState } from 'react';
import { PairTable } from './PairTable';
import { kijText, originOf, type PairRow } from './pairRows';

interface Chemical {
  readonly id: string;
  readonly name: string;
}

/** Every chemical against every other: the constant above the diagonal, where it comes from below. A cell opens its pair. */
export function PairMatrix({
  chemicals,
  rows,
}: {
  readonly chemicals: readonly Chemical[];
  readonly rows: readonly PairRow[];
}) {
  const [chosen, setChosen] = useState<string | null>(null);
  const keyOf = (one: string, two: string): string => [one, two].sort().join(' ');
  const by = new Map(rows.map((row) => [keyOf(row.i, row.j), row]));
  const open = chosen === null ? undefined : by.get(chosen);
  return (
    <>
      <div className="matrix-holder">
        <table className="pair-matrix">
          <thead>
            <tr>
              <td />
              {chemicals.map(({ id, name }) => (
                <th key={id} scope="col" title={name}>
                  {name}
                </th>
              ))}
            </tr>
          </thead>
          <tbody>
            {chemicals.map((one, r) => (
              <tr key={one.id}>
                <th scope="row">{one.name}</th>
                {chemicals.map((two, c) => {
                  const key = keyOf(one.id, two.id);
                  const row = by.get(key);
                  if (r === c || !row) return <td key={two.id} className="same" />;
                  const origin = originOf(row);
                  if (c < r)
                    return (
                      <td key={two.id} className="origin">
                        {origin}
                      </td>
                    );
                  const kij = kijText(row.own ?? row.bank?.kij ?? 0);
                  return (
                    <td key={two.id} data-origin={origin}>
                      <button
                        type="button"
                        aria-pressed={key === chosen}
                        aria-label={`${one.name} + ${two.name}: ${kij}, ${origin}`}
                        onClick={() => setChosen(key === chosen ? null : key)}
                      >
                        {kij}
                      </button>
                    </td>
                  );
                })}
              </tr>
            ))}
          </tbody>
        </table>
      </div>
      {open ? <PairTable rows={[open]} wide /> : <p className="muted small">Choose a number to change it.</p>}
    </>
  );
}
