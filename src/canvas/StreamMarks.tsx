import { memo, useState } from 'react';
import { useShallow } from 'zustand/react/shallow';
import { diamondPath } from '../drawing/diamonds';
import type { LabelShape, LineShape, Point } from '../drawing/types';
import type { StreamId } from '../engine/ids';
import { useSession, useStores } from '../store/react';
import { chooseStream } from './choose';
import { anchorOf, middleOf } from './lines';
import { useSheet } from './sheetStore';

const LINE_HEIGHT = 13;

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
  const line = useSheet((state) => state.lines.get(id));
  const label = useSheet((state) => state.labels.get(id));
  const name = useSheet((state) => state.streamNames.get(id));
  const quietLabel = useSheet((state) => state.quiet.labels.has(id));
  const quietDiamond = useSheet((state) => state.quiet.diamonds.has(id));
  const selected = useSession((state) => state.streams.includes(id));
  const entry = useSession((state) => state.units.length === 0 && state.streams[0] === id);
  const [near, setNear] = useState(false);
  if (!line) return null;
  const at = line.diamond ?? middleOf(line.points);
  const shown = selected || near;
  const opened = shown && (quietLabel || label?.folded === true);
  return (
    <div
      className="stream"
      data-stream={line.number}
      data-selected={selected || undefined}
      style={{ transform: `translate(${at[0]}px, ${at[1]}px)`, zIndex: opened ? 2 : undefined }}
    >
      {/* biome-ignore lint/a11y/useSemanticElements: a drawing in SVG carries the stream; a button element would clip it */}
      <div
        className="stream-body nodrag nopan"
        role="button"
        tabIndex={entry ? 0 : -1}
        aria-label={name}
        aria-pressed={selected}
        data-focus-stream={id}
        onClick={(event) => chooseStream(stores, id, event)}
        onKeyDown={undefined}
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
      </div>
      {label && ((!quietLabel && !label.folded) || shown) ? (
        <Label label={label} line={line} from={at} opened={opened} />
      ) : null}
    </div>
  );
});

function Label({
  label,
  line,
  from,
  opened,
}: {
  readonly label: LabelShape;
  readonly line: LineShape;
  readonly from: Point;
  readonly opened: boolean;
}) {
  const anchor = anchorOf(line.points, label.box);
  return (
    <svg
      className="label"
      aria-hidden="true"
      data-stale={label.stale || undefined}
      style={{ left: anchor[0] - from[0], top: anchor[1] - from[1] }}
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
