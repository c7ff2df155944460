import type { Node } from 'reactflow';
import type { Box, Point, UnitShape } from '../drawing/types';
import type { UnitId } from '../engine/ids';

const SMALLEST = 24;
const NONE = {};

/** The part of the sheet that takes the pointer for a unit: its symbol, at least 24 px wide and high. */
export function nodeBox({ box }: Pick<UnitShape, 'box'>): Box {
  const padX = Math.max(0, (SMALLEST - box.w) / 2);
  const padY = Math.max(0, (SMALLEST - box.h) / 2);
  return { x: box.x - padX, y: box.y - padY, w: box.w + 2 * padX, h: box.h + 2 * padY };
}

/** Where the hand has it, if it does. */
function boxUnderHand(shape: UnitShape, moved: ReadonlyMap<UnitId, Point> | null): Box {
  const box = nodeBox(shape);
  const at = moved?.get(shape.unit);
  return at ? { ...box, x: box.x + at[0] - shape.at[0], y: box.y + at[1] - shape.at[1] } : box;
}

/**
 * React Flow's nodes: a cache of the scene's units. A node is made anew only when its unit's place, size or selection
 * changes; `data` stays empty, for the view listens to its own unit.
 */
export function nodesOf(
  shapes: readonly UnitShape[],
  selected: ReadonlySet<UnitId>,
  before: readonly Node[],
  moved: ReadonlyMap<UnitId, Point> | null = null,
): Node[] {
  const known = new Map(before.map((node) => [node.id, node]));
  let same = before.length === shapes.length;
  const nodes = shapes.map((shape, k) => {
    const box = boxUnderHand(shape, moved);
    const old = known.get(shape.unit);
    const isSelected = selected.has(shape.unit);
    const keep =
      old?.position.x === box.x &&
      old.position.y === box.y &&
      old.width === box.w &&
      old.height === box.h &&
      old.selected === isSelected;
    const node: Node = keep
      ? old
      : {
          id: shape.unit,
          type: 'unit',
          position: { x: box.x, y: box.y },
          width: box.w,
          height: box.h,
          measured: { width: box.w, height: box.h },
          handles: [],
          data: NONE,
          selected: isSelected,
        };
    if (before[k] !== node) same = false;
    return node;
  });
  return same ? (before as Node[]) : nodes;
}

/** The nodes as they were for as long as nothing about them changes. */
export function nodeCache() {
  let nodes: Node[] = [];
  let last: readonly unknown[] = [];
  return (
    shapes: readonly UnitShape[],
    selected: readonly UnitId[],
    moved: ReadonlyMap<UnitId, Point> | null,
  ): Node[] => {
    const asked = [shapes, selected, moved];
    if (asked.every((part, k) => part === last[k])) return nodes;
    last = asked;
    nodes = nodesOf(shapes, new Set(selected), nodes, moved);
    return nodes;
  };
}
