import { scaleLinear } from 'd3-scale';
import { useEffect, useRef } from 'react';
import { Diamond } from '../parts/Diamond';
import { formatSignificant, MINUS } from '../quantity';
import { useSession, useStores } from '../store/react';
import type { Thing } from '../store/session';
import type { Segment, Side } from './sides';

/** Share of the bar that a piece takes when nothing tells how long it is. */
const UNKNOWN_SHARE = 0.22;

interface Props {
  readonly side: Side;
  /** Total at which the closing line stands, SI. */
  readonly full: number;
  readonly toDisplay: (si: number) => number;
  /** Missing from this side, when the balance does not close. */
  readonly gap: number;
  readonly unit: string;
  readonly placeholder: string;
  readonly label: string;
}

/** One side of the book: a piece for each feed or product, largest first, up to the closing line. */
export function SideBar({ side, full, toDisplay, gap, unit, placeholder, label }: Props) {
  const known = side.segments.length > 0;
  const hasUnknown = side.unknown.length > 0;
  const left = full > 0 ? Math.max(0, full - side.total) / full : 1;
  // What is not known takes what is left of the bar, or a stretch of its own at the end.
  const stretch = hasUnknown && left < UNKNOWN_SHARE ? UNKNOWN_SHARE - left : 0;
  const width = scaleLinear([0, full > 0 ? full : 1], [0, 100 * (1 - stretch)]);
  const percent = (value: number): string => `${width(value).toFixed(3)}%`;
  const rest = 100 - width(side.total);
  return (
    <ul className="side-bar" aria-label={label}>
      {side.segments.map((segment) => (
        <Piece
          key={segment.key}
          segment={segment}
          width={percent(segment.value)}
          figure={(segment.turned ? MINUS : '') + formatSignificant(toDisplay(segment.value), 4)}
          unit={unit}
        />
      ))}
      {hasUnknown ? (
        <li className="piece hatched rest" style={{ width: `${rest.toFixed(3)}%` }}>
          <span>not known: {side.unknown.join(', ')}</span>
        </li>
      ) : null}
      {!hasUnknown && gap > 0 ? (
        <li className="piece hatched gap-piece" style={{ width: percent(gap) }}>
          <span>missing {formatSignificant(toDisplay(gap), 4)}</span>
        </li>
      ) : null}
      {!known && !hasUnknown ? <li className="piece dashed">{placeholder}</li> : null}
    </ul>
  );
}

interface PieceProps {
  readonly segment: Segment;
  readonly width: string;
  readonly figure: string;
  readonly unit: string;
}

function Piece({ segment, width, figure, unit }: PieceProps) {
  const { session } = useStores();
  const { stream, unit: id, number, name, what, turned, outOfDate } = segment;
  const chosen = useSession((state) => stream !== undefined && state.streams.includes(stream));
  const point = (): void => {
    const thing: Thing | null = stream ? { stream } : id ? { unit: id } : null;
    session.setState({ pointed: thing });
  };
  const unpoint = (): void => {
    const { pointed } = session.getState();
    const isOurs = pointed && ('stream' in pointed ? pointed.stream === stream : pointed.unit === id);
    if (isOurs) session.setState({ pointed: null });
  };
  const leaving = useRef(unpoint);
  leaving.current = unpoint;
  // A piece that goes away under the pointer points at nothing any more.
  useEffect(() => () => leaving.current(), []);
  const classes = [
    'piece',
    `of-${what}`,
    turned ? 'hatched' : '',
    outOfDate ? 'older' : '',
    chosen ? 'chosen' : '',
  ];
  return (
    <li className={classes.filter(Boolean).join(' ')} style={{ width }}>
      <button
        type="button"
        title={`${name}: ${figure} ${unit}${turned ? ', negative: counted on the other side' : ''}`}
        onPointerEnter={point}
        onPointerLeave={unpoint}
        onFocus={point}
        onBlur={unpoint}
        onClick={() => (stream ? session.select([], [stream]) : id && session.select([id]))}
      >
        {number === undefined ? null : <Diamond number={number} chosen={chosen} size={20} />}
        <span className="piece-name">{name}</span>
        <b className="figure">{figure}</b>
      </button>
    </li>
  );
}
