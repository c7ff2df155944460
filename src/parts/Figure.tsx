import { memo } from 'react';
import { splitAtDecimal } from '../quantity';

export interface NumberCellProps {
  /** Formatted. */
  readonly text: string;
  readonly unit?: string | undefined;
}

/** A number cut at the decimal sign, so that a column of them aligns on it, with its unit muted behind. */
export function NumberCell({ text, unit }: NumberCellProps) {
  const [whole, rest] = splitAtDecimal(text);
  return (
    <span className="number-cell">
      <span className="whole">{whole}</span>
      <span className="rest">{rest}</span>
      {unit === undefined ? null : <span className="uom">{unit}</span>}
    </span>
  );
}

export interface FigureRowProps extends NumberCellProps {
  readonly label: React.ReactNode;
  readonly title?: string | undefined;
  /** An older result: lighter and in italics. */
  readonly outOfDate?: boolean;
}

/** Name, number, unit, under a rule; drawn again when one of them is another. */
export const FigureRow = memo(function FigureRow({ label, title, outOfDate, ...cell }: FigureRowProps) {
  return (
    <div className={outOfDate ? 'figure-row older' : 'figure-row'} title={title}>
      <dt>{label}</dt>
      <dd>
        <NumberCell {...cell} />
      </dd>
    </div>
  );
});
