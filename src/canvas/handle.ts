import type { Point } from '../drawing/types';
import type { StreamId, UnitId } from '../engine/ids';
import type { Stores } from '../store/react';
import type { SheetStore } from './sheetStore';

/** What others may ask of the sheet that is on the screen: the shelf, the actions, a drawer that wants a unit shown. */
export interface SheetHandle {
  readonly store: SheetStore;
  /** Whole drawing in view. */
  fit(): void;
  zoomBy(factor: number): void;
  zoomTo(zoom: number): void;
  zoom(): number;
  /** Moves the view no further than needed to have a point well in it. */
  reveal(at: Point): void;
  /** Brings a point to the middle of the view; the zoom stays. */
  centre(at: Point): void;
  /** Middle of the view, in sheet coordinates. */
  middle(): Point;
  /** A place on the screen, in sheet coordinates; null outside the sheet. */
  toSheet(clientX: number, clientY: number): Point | null;
  /** Moves the keyboard's focus to a unit or stream. */
  focus(what: { readonly unit: UnitId } | { readonly stream: StreamId }): void;
}

// One sheet for each set of stores: the app has one, each test its own.
const handles = new WeakMap<Stores['session'], SheetHandle>();

/** Announces the sheet; call the answer when it goes. */
export function putHandle(stores: Stores, handle: SheetHandle): () => void {
  handles.set(stores.session, handle);
  return () => {
    if (handles.get(stores.session) === handle) handles.delete(stores.session);
  };
}

export const sheetOf = (stores: Stores): SheetHandle | undefined => handles.get(stores.session);
