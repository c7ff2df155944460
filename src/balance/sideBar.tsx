import { memo, useEffect, useRef } from 'react';
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
  /** Takes the whole text of the piece under the pointer or the focus, and nothing when it is left. */
  readonly tell: (says: string) => void;
}

/** Widths are told with this many figures: what changes in the fifteenth place draws nothing again. */
const FIGURES = 5;

/** Factor that brings totals near a thousand, and stays while they change little: a piece's share is its own value times it. */
const scaleOf = (full: number): number => 10 ** (3 - Math.floor(Math.log10(full > 0 ? full : 1)));

/**
 * One side of the book: a piece for each feed or product, largest first, up to the closing line. Lengths are shares of the
 * free room, so that a piece depends on nothing but its own stream. No view of its own.
 */
export function sideBar({ side, full, toDisplay, gap, unit, placeholder, label, tell }: Props) {
  const known = side.segments.length > 0;
  const hasUnknown = side.unknown.length > 0;
  const scale = scaleOf(full);
  const share = (value: number): number => Number((value * scale).toPrecision(FIGURES));
  const left = full > 0 ? Math.max(0, full - side.total) : 1;
  // What is not known takes what is left of the bar, or a stretch of its own at the end.
  const least = (UNKNOWN_SHARE / (1 - UNKNOWN_SHARE)) * (full > 0 ? full : 1);
  const isOpen = known && !hasUnknown && gap === 0 && left > 1e-6 * full;
  return (
    <ul className="side-bar" aria-label={label}>
      {side.segments.map(({ key, value, ...segment }) => (
        <Piece
          key={key}
          {...segment}
          value={share(value)}
          figure={(segment.turned ? MINUS : '') + formatSignificant(toDisplay(value), 4)}
          measure={unit}
          tell={tell}
        />
      ))}
      {hasUnknown ? (
        <li className="piece hatched" style={{ flexGrow: share(known ? Math.max(left, least) : 1) }}>
          <span title={`not known: ${side.unknown.join(', ')}`}>not known: {side.unknown.join(', ')}</span>
        </li>
      ) : null}
      {!hasUnknown && gap > 0 ? (
        <li className="piece hatched gap-piece" style={{ flexGrow: share(gap) }}>
          <span>missing {formatSignificant(toDisplay(gap), 4)}</span>
        </li>
      ) : null}
      {isOpen ? <li className="rest" aria-hidden="true" style={{ flexGrow: share(left) }} /> : null}
      {!known && !hasUnknown ? <li className="piece dashed">{placeholder}</li> : null}
    </ul>
  );
}

interface PieceProps extends Omit<Segment, 'key'> {
  /** "7 519". */
  readonly figure: string;
  readonly measure: string;
  readonly tell: Props['tell'];
}

const Piece = memo(function Piece(props: PieceProps) {
  const { session } = useStores();
  const { stream, unit: id, number, name, what, turned, outOfDate, value, figure, measure, tell } = props;
  const chosen = useSession((state) => stream !== undefined && state.streams.includes(stream));
  const sign = turned ? ', negative: counted on the other side' : '';
  const says = `${number === undefined ? '' : `Stream ${number}, `}${name}: ${figure} ${measure}${sign}`;
  const point = (): void => {
    tell(says);
    const thing: Thing | null = stream ? { stream } : id ? { unit: id } : null;
    session.setState({ pointed: thing });
  };
  const unpoint = (): void => {
    tell('');
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
    <li className={classes.filter(Boolean).join(' ')} style={{ flexGrow: value }}>
      <button
        type="button"
        aria-label={says}
        onPointerEnter={point}
        onPointerLeave={unpoint}
        onFocus={point}
        onBlur={unpoint}
        onClick={() => (stream ? session.select([], [stream]) : id && session.select([id]))}
      >
        {number === undefined ? null : <Diamond number={number} chosen={chosen} size={20} />}
        <span className="words">
          <span className="piece-name">{name}</span>
          <b className="figure">{figure}</b>
        </span>
      </button>
    </li>
  );
});
