import { QuantityField } from '../../parts/QuantityField';
import { parseQuantity, STANDARD_SITE } from '../../quantity';
import type { Quantity, Sketch } from '../../sketch/types';
import { setPair } from '../../store/commands';
import { useSketch, useStores } from '../../store/react';
import { run } from '../run';
import { kijText, originOf, type PairRow } from './pairRows';

/** Pairs with their constants: one of the user's own can be typed over the bank's, and taken back. */
export function PairTable({
  rows,
  wide = false,
}: {
  readonly rows: readonly PairRow[];
  readonly wide?: boolean;
}) {
  return (
    <table className={wide ? 'pairs wide' : 'pairs'}>
      <thead>
        <tr>
          <th scope="col">Pair</th>
          <th scope="col">
            k<sub>ij</sub>
          </th>
          {wide ? <th scope="col">Without your own</th> : null}
          <th scope="col">Origin{wide ? '' : ' and source'}</th>
          {wide ? <th scope="col">Source</th> : null}
        </tr>
      </thead>
      <tbody>
        {rows.map((row) => (
          <Row key={`${row.i} ${row.j}`} row={row} wide={wide} />
        ))}
      </tbody>
    </table>
  );
}

function Row({ row, wide }: { readonly row: PairRow; readonly wide: boolean }) {
  const { own, bank } = row;
  const origin = originOf(row);
  const source = own === undefined ? bank?.source : undefined;
  const instead = bank ? `${kijText(bank.kij)}, ${bank.origin}` : '';
  return (
    <tr data-pair={`${row.i} ${row.j}`} data-origin={origin}>
      <th scope="row">
        {row.iName} + {row.jName}
      </th>
      <td>
        <PairField row={row} />
      </td>
      {wide ? <td className="muted">{own === undefined ? '' : instead}</td> : null}
      <td>
        {origin}
        {own === undefined ? null : (
          <>
            {' '}
            <ClearPair row={row} />
          </>
        )}
        {wide ? null : source ? (
          <span className="muted source" title={source}>
            {source}
          </span>
        ) : own !== undefined && bank ? (
          <span className="muted source" title={bank.source}>
            instead of {instead}
          </span>
        ) : null}
      </td>
      {wide ? (
        <td className="muted">{source ?? (own !== undefined && bank ? `instead of: ${bank.source}` : '')}</td>
      ) : null}
    </tr>
  );
}

function ClearPair({ row }: { readonly row: PairRow }) {
  const { sketch } = useStores();
  const writable = useSketch((state) => state.writable);
  return (
    <button
      type="button"
      className="link quiet"
      disabled={!writable}
      aria-label={`Clear your own value of ${row.iName} + ${row.jName}`}
      onClick={() => run(sketch, (s) => setPair(s, row.i, row.j, undefined))}
    >
      Clear
    </button>
  );
}

/** A pair's constant: dashed while it comes from the bank, solid once it is the user's own. */
export function PairField({ row }: { readonly row: PairRow }) {
  const { sketch } = useStores();
  const disabled = useSketch((state) => !state.writable);
  const { i, j, own, bank } = row;
  const numberOf = (text: Quantity): number | undefined => {
    const read = parseQuantity(text, 'number');
    return read.ok ? read.si : undefined;
  };
  const after = (s: Sketch, text: Quantity): Sketch => {
    const edit = setPair(s, i, j, numberOf(text));
    return edit.ok ? edit.sketch : s;
  };
  return (
    <QuantityField
      label={`Pair parameter of ${row.iName} and ${row.jName}`}
      path={`model.pairs.${i}.${j}`}
      value={own}
      dims="number"
      max={1}
      site={STANDARD_SITE}
      assumed={bank ? { text: kijText(bank.kij), why: bank.source } : undefined}
      disabled={disabled}
      edit={{
        set: (next) =>
          void run(sketch, (s) => setPair(s, i, j, next === undefined ? undefined : numberOf(next))),
        begin: () => sketch.begin(`slide pair ${i} + ${j}`),
        change: (next) => sketch.change((s) => after(s, next)),
        commit: () => sketch.commit(),
        cancel: () => sketch.cancel(),
      }}
    />
  );
}
