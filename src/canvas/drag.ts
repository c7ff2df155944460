import type { Node, NodeChange } from 'reactflow';
import { GRID } from '../drawing/tokens';
import type { Point } from '../drawing/types';
import type { UnitId } from '../engine/ids';
import type { Stores } from '../store/react';
import { endMove } from './keys';
import { nodeBox } from './nodes';
import type { SheetStore } from './sheetStore';

const snapped = (by: number): number => Math.round(by / GRID) * GRID;

interface Start {
  readonly at: Point;
  /** Corner of the node's box. */
  readonly corner: Point;
}

/**
 * A drag of units: while it lasts their positions live on the sheet alone, on the grid; letting go makes one edit, Esc none.
 */
export function createDrag(stores: Stores, sheet: SheetStore) {
  let starts: ReadonlyMap<UnitId, Start> | null = null;
  let left = false;
  const giveUp = (event: KeyboardEvent): void => {
    if (event.key !== 'Escape' || !starts) return;
    event.preventDefault();
    event.stopPropagation();
    left = true;
    sheet.setState({ moved: null });
  };

  return {
    start(): void {
      const places = new Map<UnitId, Start>();
      for (const shape of sheet.getState().scene.units) {
        const box = nodeBox(shape);
        places.set(shape.unit, { at: shape.at, corner: [box.x, box.y] });
      }
      starts = places;
      left = false;
      window.addEventListener('keydown', giveUp, true);
    },

    /** Positions as the hand has them; all units move by the same whole steps of the grid. */
    take(changes: readonly NodeChange<Node>[]): void {
      if (!starts || left) return;
      const moved = new Map<UnitId, Point>();
      let by: Point | undefined;
      for (const change of changes) {
        if (change.type !== 'position' || !change.position) continue;
        const id = change.id as UnitId;
        const start = starts.get(id);
        if (!start) continue;
        by ??= [snapped(change.position.x - start.corner[0]), snapped(change.position.y - start.corner[1])];
        moved.set(id, [start.at[0] + by[0], start.at[1] + by[1]]);
      }
      if (moved.size === 0 || !by) return;
      const now = sheet.getState().moved;
      const same = now?.size === moved.size && [...moved].every(([id, p]) => samePoint(now.get(id), p));
      if (!same) sheet.setState({ moved });
    },

    stop(): void {
      window.removeEventListener('keydown', giveUp, true);
      starts = null;
      if (!left) endMove(stores, sheet);
    },
  };
}

const samePoint = (a: Point | undefined, b: Point): boolean => a?.[0] === b[0] && a[1] === b[1];
