import { memo } from 'react';
import type { Point } from '../drawing/types';
import type { StreamId } from '../engine/ids';
import { useSession, useSketch, useStores } from '../store/react';
import { bendable, bendByPointer } from './bending';
import { bendAxis } from './bends';
import { useSheet, useSheetStore } from './sheetStore';

/** The pieces of the one selected stream's line that can be moved by hand. */
export const BendLayer = memo(function BendLayer() {
  const chosen = useSession((state) =>
    state.streams.length === 1 && state.units.length === 0 ? state.streams[0] : undefined,
  );
  const writable = useSketch((state) => state.writable);
  return chosen && writable ? <Pieces stream={chosen} /> : null;
});

function Pieces({ stream }: { readonly stream: StreamId }) {
  const stores = useStores();
  const sheet = useSheetStore();
  const line = useSheet((state) => state.lines.get(stream));
  const bending = useSheet((state) => state.bending);
  if (!line) return null;
  const { points, diamond } = line;
  if (bending) {
    const piece = pieceNow(points, bending.points, bending.piece, bending.by);
    return (
      <svg className="lines" aria-hidden="true">
        {piece ? <path className="bend-piece" data-bending={bending.piece} d={pathOf(piece)} /> : null}
      </svg>
    );
  }
  return (
    <svg className="lines" aria-hidden="true">
      {bendable(points).map((piece) => {
        const ends = [points[piece]!, points[piece + 1]!] as const;
        return (
          <g key={piece}>
            <path
              className="bend-hit nodrag nopan"
              data-bend={piece}
              data-axis={bendAxis(points, piece)}
              d={pathOf(ends)}
              onPointerDown={(event) => bendByPointer(stores, sheet, stream, piece, event)}
            />
            <path className="bend-grip" d={grip(gripAt(ends, diamond))} />
          </g>
        );
      })}
    </svg>
  );
}

const pathOf = ([a, b]: readonly [Point, Point]): string => `M${a[0]} ${a[1]}L${b[0]} ${b[1]}`;
const grip = ([x, y]: Point): string => `M${x - 4} ${y - 4}h8v8h-8Z`;

/** In the middle of the piece; beside the diamond where that stands there. */
function gripAt([a, b]: readonly [Point, Point], diamond: Point | undefined): Point {
  const middle: Point = [(a[0] + b[0]) / 2, (a[1] + b[1]) / 2];
  if (!diamond || Math.abs(diamond[0] - middle[0]) + Math.abs(diamond[1] - middle[1]) > 20) return middle;
  return [(3 * a[0] + b[0]) / 4, (3 * a[1] + b[1]) / 4];
}

/** The piece that is being moved, as it stands now: on its own line or the one that it was moved to. */
function pieceNow(
  points: readonly Point[],
  before: readonly Point[],
  piece: number,
  by: number,
): readonly [Point, Point] | undefined {
  const [a, b] = [before[piece], before[piece + 1]];
  if (!a || !b) return undefined;
  const axis = bendAxis(before, piece);
  const at = a[axis] + by;
  for (let k = 0; k + 1 < points.length; k += 1) {
    const [p, q] = [points[k]!, points[k + 1]!];
    if (p[axis] === at && q[axis] === at) return [p, q];
  }
  return undefined;
}
