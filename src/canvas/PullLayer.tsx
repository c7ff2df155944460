import { memo } from 'react';
import { AWAY } from '../drawing/transform';
import type { Point } from '../drawing/types';
import type { Pulling, Target } from './sheetStore';
import { useSheet } from './sheetStore';

const STUB = 16;

/** Orthogonal rubber line from a held port to a point: straight out, then along, then across. */
export function rubberLine(from: Target, to: Point, over: Target | null): string {
  const { at, side } = from.place;
  const [ux, uy] = AWAY[side];
  const start: Point = [at[0] + ux * STUB, at[1] + uy * STUB];
  const [vx, vy] = over ? AWAY[over.place.side] : [0, 0];
  const end: Point = [to[0] + vx * STUB, to[1] + vy * STUB];
  const points: Point[] = [at, start];
  const ahead = (end[0] - start[0]) * ux + (end[1] - start[1]) * uy > 0;
  if (ux !== 0 && ahead) {
    const middle = over && vy !== 0 ? end[0] : (start[0] + end[0]) / 2;
    points.push([middle, start[1]], [middle, end[1]]);
  } else if (uy !== 0 && ahead) {
    const middle = over && vx !== 0 ? end[1] : (start[1] + end[1]) / 2;
    points.push([start[0], middle], [end[0], middle]);
  } else if (ux !== 0) {
    const middle = (start[1] + end[1]) / 2;
    points.push([start[0], middle], [end[0], middle]);
  } else {
    const middle = (start[0] + end[0]) / 2;
    points.push([middle, start[1]], [middle, end[1]]);
  }
  points.push(end, to);
  return `M${points.map(([x, y]) => `${x} ${y}`).join('L')}`;
}

/** What the hand sees while a stream looks for its end: the rubber line, and every port with whether it fits. */
export const PullLayer = memo(function PullLayer() {
  const pulling = useSheet((state) => state.pulling);
  if (!pulling) return null;
  return (
    <>
      <svg className="rubber" aria-hidden="true">
        <path d={rubberLine(pulling.from, pulling.at, pulling.over)} />
        <circle cx={pulling.from.place.at[0]} cy={pulling.from.place.at[1]} r="4" />
      </svg>
      <div className="targets">
        {pulling.targets.map((target) => (
          <Mark key={`${target.unit} ${target.port}`} target={target} over={pulling.over === target} />
        ))}
      </div>
      <Reason pulling={pulling} />
    </>
  );
});

const Mark = memo(function Mark({ target, over }: { readonly target: Target; readonly over: boolean }) {
  const [x, y] = target.place.at;
  const fits = target.reason === undefined;
  return (
    <div
      className="target"
      data-target={target.port}
      data-fits={fits ? 'yes' : 'no'}
      data-over={over || undefined}
      style={{ transform: `translate(${x}px, ${y}px)` }}
    >
      <svg aria-hidden="true">
        <circle className="ring" r={fits ? 7 : 5.5} />
        {fits ? <circle className="dot" r="2.6" /> : <path d="M-4 4L4 -4" />}
      </svg>
    </div>
  );
});

function Reason({ pulling: { over, at } }: { readonly pulling: Pulling }) {
  if (!over?.reason) return null;
  return (
    <div className="tip-place" style={{ transform: `translate(${at[0]}px, ${at[1]}px)` }}>
      <div className="tip" role="tooltip">
        {over.reason}
      </div>
    </div>
  );
}
