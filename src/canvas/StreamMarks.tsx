import { memo, useState } from 'react';
import { useShallow } from 'zustand/react/shallow';
import { diamondPath } from '../drawing/diamonds';
import type { LabelShape, Point } from '../drawing/types';
import type { StreamId } from '../engine/ids';
import { useSession, useStores } from '../store/react';
import { chooseStream, isPointed } from './choose';
import { middleOf } from './lines';
import { pullByPointer } from './pointer';
import { sourcePort } from './ports';
import { useSheet, useSheetStore } from './sheetStore';
import { useField, useItem } from './watch';

const LINE_HEIGHT = 13;
/** The stream's element is a square of 24 px around its diamond. */
const HALF = 12;

/** Diamonds and labels, over units and lines. */
export const StreamMarks = memo(function StreamMarks() {
  const ids = useSheet(useShallow((state) => state.scene.lines.map((line) => line.stream)));
  return (
    <div className="stream-marks">
      {ids.map((id) => (
        <StreamMark key={id} id={id} />
      ))}
    </div>
  );
});

/** One stream's diamond and label. It listens to its own line, label, name and selection, to nothing else. */
const StreamMark = memo(function StreamMark({ id }: { readonly id: StreamId }) {
  const stores = useStores();
  const line = useItem('lines', id);
  const label = useItem('labels', id);
  const name = useItem('streamNames', id);
  const quiet = useField(
    'quiet',
    ({ labels, diamonds }) => Number(labels.has(id)) + 2 * Number(diamonds.has(id)),
  );
  const [quietLabel, quietDiamond] = [(quiet & 1) !== 0, (quiet & 2) !== 0];
  const selected = useSession((state) => state.streams.includes(id));
  const pointed = useSession((state) => isPointed(state, id));
  const entry = useSession((state) => state.units.length === 0 && state.streams[0] === id);
  const [near, setNear] = useState(false);
  if (!line) return null;
  const at = line.diamond ?? middleOf(line.points);
  const shown = selected || near || pointed;
  const opened = shown && (quietLabel || label?.folded === true);
  return (
    <div
      className="stream"
      data-stream={line.number}
      data-selected={selected || pointed || undefined}
      style={{ transform: `translate(${at[0]}px, ${at[1]}px)`, zIndex: opened ? 2 : undefined }}
    >
      <button
        type="button"
        className="stream-body nodrag nopan"
        tabIndex={entry ? 0 : -1}
        aria-label={name}
        aria-pressed={selected}
        data-focus-stream={id}
        onClick={(event) => chooseStream(stores, id, event)}
        onPointerEnter={() => setNear(true)}
        onPointerLeave={() => setNear(false)}
        onFocus={() => setNear(true)}
        onBlur={() => setNear(false)}
      >
        {(line.diamond && !quietDiamond) || shown ? (
          <svg className="diamond" aria-hidden="true">
            <path d={diamondPath([0, 0])} />
            <text textAnchor="middle" y="4">
              {line.number}
            </text>
          </svg>
        ) : null}
      </button>
      {line.arrow && (line.hanging || selected) ? (
        <StreamEnd id={id} at={line.arrow.at} from={at} loose={line.hanging} />
      ) : null}
      {label && ((!quietLabel && !label.folded) || shown) ? drawLabel(label, at, opened) : null}
    </div>
  );
});

interface EndProps {
  readonly id: StreamId;
  readonly at: Point;
  readonly from: Point;
  readonly loose: boolean;
}

/** The arrowhead of a stream that leads nowhere yet, or of a selected one: pulled, it looks for a port. */
function StreamEnd({ id, at, from, loose }: EndProps) {
  const stores = useStores();
  const sheet = useSheetStore();
  return (
    <div
      className="loose-end nodrag nopan"
      data-end={loose ? 'loose' : 'joined'}
      title={loose ? 'Pull to a port' : 'Pull to another port'}
      style={{ left: at[0] - from[0] + HALF, top: at[1] - from[1] + HALF }}
      onPointerDown={(event) => {
        const port = sourcePort(stores.sketch.getState().sketch, sheet.getState().units, id);
        if (port) pullByPointer(stores, sheet, port, event, loose ? undefined : id);
      }}
    />
  );
}

/** Rows with numbers right-aligned and units behind them; an opened label has a ground of its own. Part of its stream's view. */
function drawLabel(label: LabelShape, from: Point, opened: boolean) {
  const anchor = label.hold;
  return (
    <svg
      className="label"
      aria-hidden="true"
      data-stale={label.stale || undefined}
      style={{ left: anchor[0] - from[0] + HALF, top: anchor[1] - from[1] + HALF }}
    >
      {opened ? (
        <rect
          className="label-ground"
          x={label.box.x - anchor[0] - 4}
          y={label.box.y - anchor[1] - 2}
          width={label.box.w + 8}
          height={label.box.h + 4}
        />
      ) : null}
      {label.leader && !label.folded ? (
        <path
          className="leader"
          d={`M${label.leader[0][0] - anchor[0]} ${label.leader[0][1] - anchor[1]}L${label.leader[1][0] - anchor[0]} ${label.leader[1][1] - anchor[1]}`}
        />
      ) : null}
      {label.rows.map((row, k) => {
        const y = label.baseline - anchor[1] + k * LINE_HEIGHT;
        return (
          // biome-ignore lint/suspicious/noArrayIndexKey: rows have no name of their own, and never change places
          <g key={k}>
            <text className="number halo" x={label.numberRight - anchor[0]} y={y}>
              {row.number}
            </text>
            <text className="measure halo" x={label.unitLeft - anchor[0]} y={y}>
              {row.unit}
            </text>
          </g>
        );
      })}
    </svg>
  );
}
