import { type CSSProperties, memo, type ReactNode } from 'react';
import type { PathShape, Point, TextShape } from '../drawing/types';
import { inkOf, pathStyle } from './paint';

/** Strokes and fills of the scene, as they are. */
export const drawPaths = (shapes: readonly PathShape[]): ReactNode =>
  shapes.map((shape) => <path key={shape.d} d={shape.d} style={pathStyle(shape)} />);

export const Paths = memo(({ shapes }: { readonly shapes: readonly PathShape[] }) => drawPaths(shapes));
Paths.displayName = 'Paths';

/** A text of the scene. */
export const drawText = (shape: TextShape, stale?: boolean): ReactNode => (
  <text
    key={`${shape.at[1]} ${shape.text}`}
    x={shape.at[0]}
    y={shape.at[1]}
    textAnchor={shape.anchor}
    fontSize={shape.size}
    fontWeight={shape.weight}
    fontStyle={shape.italic || stale ? 'italic' : undefined}
    className={shape.halo ? 'halo' : undefined}
    style={{ fill: inkOf(stale ? 'ink3' : shape.ink) }}
  >
    {shape.text}
  </text>
);

/**
 * Keeps what is inside at its size on the screen: it grows and shrinks against the zoom, away from a fixed point, up to the
 * scale at which it has room.
 */
export function drawSteady(
  [x, y]: Point,
  upTo: number | undefined,
  children: ReactNode,
  key?: string,
): ReactNode {
  const scale = upTo === undefined ? 'var(--inv, 1)' : `min(var(--inv, 1), ${upTo})`;
  const style = { transform: `scale(${scale})`, transformOrigin: `${x}px ${y}px`, '--back': 1 };
  return (
    <g key={key} style={style as CSSProperties}>
      {children}
    </g>
  );
}
