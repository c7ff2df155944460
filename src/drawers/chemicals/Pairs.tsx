import { useMemo } from 'react';
import { Disclosure } from '../../parts/Disclosure';
import { formatDecimals, MINUS } from '../../quantity';
import { useCompiled } from '../../store/react';

const ORIGINS = { given: 'given', fitted: 'fitted', predicted: 'predicted', none: 'none' } as const;

const kijText = (kij: number): string => (kij === 0 ? '0' : formatDecimals(kij, 4).replace('-', MINUS));

/** Every binary parameter in force, with where it comes from. Read only: a pair is given in the sketch's file. */
export function Pairs() {
  const basis = useCompiled((state) => state.basis);
  const pairs = basis?.model.pairs ?? [];
  const counts = useMemo(() => {
    const by = { given: 0, fitted: 0, predicted: 0, none: 0 };
    for (const { origin } of pairs) by[origin] += 1;
    return by;
  }, [pairs]);
  if (!basis || pairs.length === 0) return null;
  const said = (Object.keys(ORIGINS) as (keyof typeof ORIGINS)[])
    .filter((origin) => counts[origin] > 0)
    .map((origin) => `${counts[origin]} ${ORIGINS[origin]}`)
    .join(', ');
  const name = (k: number): string => basis.chemicals[k]?.name ?? '?';
  return (
    <Disclosure title={`${pairs.length} ${pairs.length === 1 ? 'pair' : 'pairs'} in force`} aside={said}>
      <table className="pairs">
        <thead>
          <tr>
            <th scope="col">Pair</th>
            <th scope="col">
              k<sub>ij</sub>
            </th>
            <th scope="col">Origin</th>
          </tr>
        </thead>
        <tbody>
          {pairs.map(({ i, j, kij, origin, source }) => (
            <tr key={`${i} ${j}`}>
              <th scope="row">
                {name(i)} + {name(j)}
              </th>
              <td>{kijText(kij)}</td>
              <td>
                {ORIGINS[origin]}
                {source ? (
                  <span className="muted source" title={source}>
                    {source}
                  </span>
                ) : null}
              </td>
            </tr>
          ))}
        </tbody>
      </table>
      <p className="muted small">None: no fitted value and no prediction; zero is used.</p>
    </Disclosure>
  );
}
