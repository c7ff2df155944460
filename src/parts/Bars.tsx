import { scaleLinear } from 'd3-scale';

export interface BarsProps {
  /** Length of the filled bar, same unit as `full`. */
  readonly filled: number | undefined;
  /** Length of the outlined bar above it, where there are two phases. */
  readonly outlined?: number | undefined;
  /** What fills the whole width. */
  readonly full: number;
}

/** One component's bars from a common zero line: filled alone, or an outlined one above a filled one. */
export function Bars({ filled, outlined, full }: BarsProps) {
  const length = scaleLinear([0, full > 0 ? full : 1], [0, 100]).clamp(true);
  const width = (x: number): string => `${length(Math.max(0, x)).toFixed(2)}%`;
  return (
    <span className={outlined === undefined ? 'bars' : 'bars two'} aria-hidden="true">
      {!outlined ? null : <i className="outlined" style={{ width: width(outlined) }} />}
      {!filled ? null : <i className="filled" style={{ width: width(filled) }} />}
    </span>
  );
}
