import type { Node, NodeChange } from 'reactflow';
import { GRID } from '../drawing/tokens';
import type { Point } from '../drawing/types';
import type { UnitId } from '../engine/ids';
import type { Stores } from '../store/react';
import { bendsAfter } from './bends';
import { drawnTo, type Guide, guidePath, guidesOf, MAGNET } from './guides';
import { sheetOf } from './handle';
import { endMove } from './moving';
import { nodeBox } from './nodes';
import { AT_REST, hold, type SheetState, type SheetStore } from './sheetStore';

interface Start {
  readonly at: Point;
  /** Corner of the node's box. */
  readonly corner: Point;
}

interface Held {
  readonly starts: ReadonlyMap<UnitId, Start>;
  readonly lines: SheetState['lines'];
  /** Known once it is known which units are in the hand. */
  guides: readonly Guide[] | null;
}

/**
 * A drag of units: while it lasts their positions live on the sheet alone, on the grid or in line with others; letting go
 * makes one edit, Esc none.
 */
export function createDrag(stores: Stores, sheet: SheetStore) {
  let held: Held | null = null;
  let left = false;
  const giveUp = (event: KeyboardEvent): void => {
    if (event.key !== 'Escape' || !held) return;
    event.preventDefault();
    event.stopPropagation();
    left = true;
    sheet.setState(AT_REST);
  };

  const guidesFor = (moving: ReadonlySet<UnitId>): readonly Guide[] => {
    if (!held) return [];
    held.guides ??= guidesOf(sheet.getState().scene.units, stores.sketch.getState().sketch.streams, moving);
    return held.guides;
  };

  return {
    start(): void {
      const starts = new Map<UnitId, Start>();
      for (const shape of sheet.getState().scene.units) {
        const box = nodeBox(shape);
        starts.set(shape.unit, { at: shape.at, corner: [box.x, box.y] });
      }
      held = { starts, lines: sheet.getState().lines, guides: null };
      left = false;
      window.addEventListener('keydown', giveUp, true);
    },

    /** Positions as the hand has them; all units move by the same steps. */
    take(changes: readonly NodeChange<Node>[]): void {
      if (!held || left) return;
      const hands = new Map<UnitId, Start>();
      let raw: Point | undefined;
      for (const change of changes) {
        if (change.type !== 'position' || !change.position) continue;
        const start = held.starts.get(change.id as UnitId);
        if (!start) continue;
        raw ??= [change.position.x - start.corner[0], change.position.y - start.corner[1]];
        hands.set(change.id as UnitId, start);
      }
      if (!raw) return;
      const guides = guidesFor(new Set(hands.keys()));
      const by = drawnTo(guides, raw, MAGNET / (sheetOf(stores)?.zoom() ?? 1), GRID);
      const moved = new Map(
        [...hands].map(([id, { at }]): [UnitId, Point] => [id, [at[0] + by[0], at[1] + by[1]]]),
      );
      const now = sheet.getState().moved;
      if (now?.size === moved.size && [...moved].every(([id, p]) => samePoint(now.get(id), p))) return;
      const bends = bendsAfter(stores.sketch.getState().sketch, held.lines, moved);
      hold(sheet, { moved, bends, guide: guidePath(guides, by) });
    },

    stop(): void {
      window.removeEventListener('keydown', giveUp, true);
      held = null;
      if (!left) endMove(stores, sheet);
    },
  };
}

const samePoint = (a: Point | undefined, b: Point): boolean => a?.[0] === b[0] && a[1] === b[1];
