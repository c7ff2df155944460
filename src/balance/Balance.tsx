import { useMemo, useState, useSyncExternalStore } from 'react';
import { Choice } from '../parts/Choice';
import { useMeasures } from '../parts/measures';
import { displayUnit, formatDecimals, formatDifference, formatSignificant } from '../quantity';
import type { SketchStream, SketchUnit } from '../sketch/types';
import { describeStream } from '../store/commands';
import { useKinds } from '../store/kinds';
import { useCompiled, useResults, useSession, useSketch, useStores } from '../store/react';
import { type BalanceBasis, basisChoices, basisKey, dimOf, unitOf } from './basis';
import { ClosureTable } from './ClosureTable';
import { OpenClosure } from './OpenClosure';
import { sideBar } from './sideBar';
import { sidesOf } from './sides';
import '../parts/parts.css';
import './balance.css';

/** "Solved means this or better, everywhere." */
const CLOSED = 1e-9;

const onResize = (then: () => void): (() => void) => {
  window.addEventListener('resize', then);
  return () => window.removeEventListener('resize', then);
};
const useSmallScreen = (): boolean => useSyncExternalStore(onResize, () => window.innerWidth <= 1100);

/** A feed or product by its own name, else the stream by where it comes from. */
function nameAt(units: readonly SketchUnit[], stream: SketchStream, end: 'from' | 'to'): string {
  const unit = units.find(({ id }) => id === stream[end]?.[0]);
  return stream.name?.trim() || unit?.name?.trim() || describeStream({ units }, stream);
}

/** What goes in and what comes out as two bars that must end at the same line. */
export function Balance() {
  const { session } = useStores();
  const measures = useMeasures();
  const kinds = useKinds();
  const units = useSketch((state) => state.sketch.units);
  const streams = useSketch((state) => state.sketch.streams);
  const streamResults = useResults((state) => state.streams);
  const unitResults = useResults((state) => state.units);
  const closure = useResults((state) => state.closure);
  const between = useResults((state) => state.answering > state.solvedEdit);
  const data = useCompiled((state) => state.basis);
  const folded = useSession((state) => state.balanceFolded);
  const isSmall = useSmallScreen();
  const [wanted, setWanted] = useState('mass');
  const [told, tell] = useState('');

  const choices = useMemo(() => basisChoices(data), [data]);
  const basis: BalanceBasis = choices.find((c) => basisKey(c.basis) === wanted)?.basis ?? { is: 'mass' };
  const key = basisKey(basis);
  // biome-ignore lint/correctness/useExhaustiveDependencies: the key stands for the basis
  const sides = useMemo(
    () =>
      sidesOf({
        sketch: { units, streams },
        kinds,
        results: { streams: streamResults, units: unitResults },
        data,
        basis,
        describe: (stream, end) => nameAt(units, stream, end),
      }),
    [units, streams, kinds, streamResults, unitResults, data, key],
  );

  const { toDisplay } = displayUnit(dimOf(basis), measures);
  const unit = unitOf(basis, measures);
  const full = Math.max(sides.in.total, sides.out.total);
  const missing = sides.in.total - sides.out.total;
  const known = sides.in.unknown.length + sides.out.unknown.length === 0 && !sides.empty;
  const isOld = [...sides.in.segments, ...sides.out.segments].some((segment) => segment.outOfDate);
  const isClosed = known && !isOld && full > 0 && Math.abs(missing) <= CLOSED * full;
  // Figures of two edits against each other say nothing of what is missing.
  const gap = known && !isOld && !between && !isClosed ? missing : 0;
  const isCompact = folded || isSmall;
  const number = (si: number): string => formatSignificant(toDisplay(si), 5);
  const basisWords = `${choices.find((c) => basisKey(c.basis) === key)?.text ?? 'mass'}, ${unit}`;

  const bars = (
    <div className={sides.empty ? 'bars-of-balance empty' : 'bars-of-balance'}>
      <span className="side-word">In</span>
      {sideBar({
        label: 'In',
        side: sides.in,
        full,
        toDisplay,
        gap: Math.max(0, -gap),
        unit,
        tell,
        placeholder: 'Feeds will stand here',
      })}
      <span className="side-word">Out</span>
      {sideBar({
        label: 'Out',
        side: sides.out,
        full,
        toDisplay,
        gap: Math.max(0, gap),
        unit,
        tell,
        placeholder: 'Products will stand here; both lines end at the same place when the balance closes',
      })}
      <span className="closing-line" aria-hidden="true" />
      {told === '' ? null : (
        <span className="piece-told" aria-hidden="true">
          {told}
        </span>
      )}
    </div>
  );
  const total = (side: typeof sides.in) =>
    sides.empty ? null : side.unknown.length > 0 || side.segments.some((s) => s.outOfDate) ? (
      <span className="muted">open</span>
    ) : (
      number(side.total)
    );

  return (
    <section
      className={isCompact ? 'balance compact' : 'balance'}
      aria-label="Balance"
      data-closed={isClosed ? 'yes' : known ? 'no' : 'open'}
    >
      <div className="balance-head">
        <h2>Balance</h2>
        <Choice
          asLabel
          label="Balance: basis"
          path="balance.basis"
          value={key}
          options={choices.map((c) => ({
            value: basisKey(c.basis),
            text: basisKey(c.basis) === key ? basisWords : c.text,
          }))}
          onChange={setWanted}
        />
        {isSmall ? null : (
          <button
            type="button"
            className="link quiet"
            aria-expanded={!folded}
            onClick={() => session.setState({ balanceFolded: !folded })}
          >
            {folded ? 'Unfold' : 'Fold'}
          </button>
        )}
      </div>
      {bars}
      {isCompact ? (
        <p className="one-line">
          {sides.empty ? null : (
            <>
              <span>
                in <b>{total(sides.in)}</b>
              </span>
              <span>
                out <b className={isClosed ? 'closed' : ''}>{total(sides.out)}</b>
              </span>
              {known && !isOld ? (
                <span>
                  <span className="muted">difference</span> {formatDifference(toDisplay(missing))}
                </span>
              ) : null}
            </>
          )}
        </p>
      ) : (
        <>
          <div className="totals">
            <b title={known ? formatDecimals(toDisplay(sides.in.total), 4) : undefined}>{total(sides.in)}</b>
            <b className={isClosed ? 'closed' : ''}>{total(sides.out)}</b>
          </div>
          <div className="closure-side">
            {closure?.complete && !sides.empty ? (
              <>
                <ClosureTable closure={closure} data={data} measures={measures} />
                <p className="muted">Closure shows arithmetic, not that the model is right.</p>
              </>
            ) : sides.empty ? null : (
              <OpenClosure isOld={isOld} />
            )}
          </div>
        </>
      )}
      {basis.is === 'energy' && !isCompact && !sides.empty ? (
        <p className="datum muted">
          {sides.fromIdeal ? 'from ideal gas, 298.15 K' : 'from elements, 298.15 K'}
        </p>
      ) : null}
    </section>
  );
}
