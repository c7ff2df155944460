import type { Box, Point, UnitShape } from '../drawing/types';
import type { UnitId } from '../engine/ids';

export const ALIGNMENTS = ['left', 'centre', 'right', 'top', 'middle', 'bottom'] as const;
export type Alignment = (typeof ALIGNMENTS)[number];

type Standing = Pick<UnitShape, 'unit' | 'at' | 'box'>;

/**
 * Places of units in line: by the edges of their symbols, or by their origins, through which most lines run. The outermost
 * unit gives an edge, the middle of all the centre.
 */
export function aligned(shapes: readonly Standing[], how: Alignment): ReadonlyMap<UnitId, Point> {
  const xs = shapes.map((s) => s.at[0]);
  const ys = shapes.map((s) => s.at[1]);
  const half = (values: readonly number[]): number => (Math.min(...values) + Math.max(...values)) / 2;
  const left = Math.min(...shapes.map((s) => s.box.x));
  const right = Math.max(...shapes.map((s) => s.box.x + s.box.w));
  const top = Math.min(...shapes.map((s) => s.box.y));
  const bottom = Math.max(...shapes.map((s) => s.box.y + s.box.h));
  const place = ({ at: [x, y], box }: Standing): Point => {
    switch (how) {
      case 'left':
        return [x + left - box.x, y];
      case 'right':
        return [x + right - (box.x + box.w), y];
      case 'centre':
        return [half(xs), y];
      case 'top':
        return [x, y + top - box.y];
      case 'bottom':
        return [x, y + bottom - (box.y + box.h)];
      case 'middle':
        return [x, half(ys)];
    }
  };
  return new Map(shapes.map((shape) => [shape.unit, place(shape)]));
}

/** Places of three units or more with equal gaps between their symbols; the outermost two stay. */
export function distributed(
  shapes: readonly Standing[],
  along: 'across' | 'down',
): ReadonlyMap<UnitId, Point> {
  const axis = along === 'across' ? 0 : 1;
  const start = (box: Box): number => (axis === 0 ? box.x : box.y);
  const length = (box: Box): number => (axis === 0 ? box.w : box.h);
  const inOrder = [...shapes].sort(
    (a, b) => start(a.box) + length(a.box) / 2 - start(b.box) - length(b.box) / 2,
  );
  const [first, last] = [inOrder[0], inOrder.at(-1)];
  if (!first || !last || inOrder.length < 3) return new Map();
  const room = start(last.box) + length(last.box) - start(first.box);
  const gap = (room - inOrder.reduce((sum, s) => sum + length(s.box), 0)) / (inOrder.length - 1);
  let next = start(first.box);
  return new Map(
    inOrder.map((shape): [UnitId, Point] => {
      const by = next - start(shape.box);
      next += length(shape.box) + gap;
      const [x, y] = shape.at;
      return [shape.unit, axis === 0 ? [x + by, y] : [x, y + by]];
    }),
  );
}
