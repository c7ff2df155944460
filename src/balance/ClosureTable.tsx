import type { Basis, Closure, ClosureEntry } from '../engine/network/types';
import type { Dimension } from '../quantity';
import { displayUnit, formatDecimals, formatDifference, type Measures } from '../quantity';

/** The element that closes worst, or the chemical where formulas are missing. */
export function worstOf(
  closure: Closure,
  data: Basis | null,
): { readonly name: string; readonly entry: ClosureEntry } | undefined {
  const elements = Object.entries(closure.elements).map(([name, entry]) => ({ name, entry }));
  const chemicals = closure.chemicals.map((entry, k) => ({ name: data?.chemicals[k]?.name ?? '?', entry }));
  const [first, ...rest] = elements.length > 0 ? elements : chemicals;
  return (
    first && rest.reduce((worst, next) => (next.entry.relative > worst.entry.relative ? next : worst), first)
  );
}

interface Props {
  readonly closure: Closure;
  readonly data: Basis | null;
  readonly measures: Measures;
}

/** Closure of mass, energy and the worst element as figures. */
export function ClosureTable({ closure, data, measures }: Props) {
  const worst = worstOf(closure, data);
  const row = (name: string, entry: ClosureEntry, dim: Dimension, title?: string) => {
    const { label, toDisplay } = displayUnit(dim, measures);
    const [into, out] = [toDisplay(entry.in + entry.made), toDisplay(entry.out)];
    const size = Math.max(Math.abs(into), Math.abs(out));
    const decimals = size >= 1e5 ? 1 : size >= 1000 ? 2 : 3;
    return (
      <tr title={`${title ?? ''} Relative: ${formatDifference(entry.relative)}`.trim()}>
        <th scope="row">
          {name}, {label}
        </th>
        <td>{formatDecimals(into, decimals)}</td>
        <td>{formatDecimals(out, decimals)}</td>
        <td>{formatDifference(into - out)}</td>
      </tr>
    );
  };
  return (
    <table className="closure">
      <thead>
        <tr>
          <th scope="col">Closure</th>
          <th scope="col">in</th>
          <th scope="col">out</th>
          <th scope="col">difference</th>
        </tr>
      </thead>
      <tbody>
        {row('Mass', closure.mass, 'massFlow')}
        {row('Energy', closure.energy, 'power', 'Enthalpy from elements; in with heat and shaft power.')}
        {worst ? row(`Worst: ${worst.name}`, worst.entry, 'molarFlow') : null}
      </tbody>
    </table>
  );
}
