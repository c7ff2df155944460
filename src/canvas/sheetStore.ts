import { createContext, useContext } from 'react';
import { useStore } from 'zustand';
import { createStore } from 'zustand/vanilla';
import type { LabelShape, LineShape, Point, PortPlace, Scene, UnitShape } from '../drawing/types';
import type { Port, StreamId, UnitId } from '../engine/ids';

/** A port that a stream can have one end at. */
export interface PortRef {
  readonly unit: UnitId;
  readonly port: Port;
  readonly dir: 'in' | 'out';
}

/** A port on the sheet while an end of a stream looks for its place; `reason`: why it cannot be had. */
export interface Target extends PortRef {
  readonly place: PortPlace;
  readonly reason?: string;
}

/** A stream being drawn: by the pointer, or by keys. */
export interface Pulling {
  readonly from: Target;
  readonly targets: readonly Target[];
  /** Free end of the rubber line, sheet coordinates. */
  readonly at: Point;
  readonly over: Target | null;
  readonly byKeys: boolean;
  /** A stream whose target end is led elsewhere. */
  readonly moving?: StreamId;
}

/** What a stream that ends on empty sheet can lead to. */
export interface Offer {
  readonly from: PortRef;
  readonly at: Point;
  /** Asked for by keys: the unit looks for a free place by itself. */
  readonly byKeys?: true;
}

/** A unit from the shelf on its way over the sheet. */
export interface Dropping {
  readonly kind: string;
  readonly at: Point;
  readonly turn: 0 | 90 | 180 | 270;
  readonly mirror: boolean;
  /** The stream it would open. */
  readonly on: StreamId | null;
  /** The loose stream that would lead to it, and the port it would take. */
  readonly onto?: { readonly from: PortRef; readonly port: Port };
  readonly tip: readonly string[];
}

export interface Bending {
  readonly stream: StreamId;
  readonly piece: number;
  /** The line before. */
  readonly points: readonly Point[];
  readonly by: number;
  readonly byKeys: boolean;
}

export interface HeldNote {
  readonly at: Point;
  readonly size?: Point;
}

export interface SheetState {
  readonly scene: Scene;
  readonly units: ReadonlyMap<UnitId, UnitShape>;
  readonly lines: ReadonlyMap<StreamId, LineShape>;
  readonly labels: ReadonlyMap<StreamId, LabelShape>;
  /** What a screen reader hears of each unit and stream. */
  readonly unitNames: ReadonlyMap<UnitId, string>;
  readonly streamNames: ReadonlyMap<StreamId, string>;
  /** Labels, diamonds and tags that step back at this zoom. */
  readonly quiet: Quiet;
  /** How much larger than the sheet texts are at this zoom, in steps. */
  readonly textScale: number;
  /** Positions while a drag or a move by keys lasts. */
  readonly moved: ReadonlyMap<UnitId, Point> | null;
  readonly movingByKeys: boolean;
  /** Guides that the moving units are in line with, as a path. */
  readonly guide: string;
  /** Bends while a gesture lasts, over the sketch's own; none straightens a line. */
  readonly bends: ReadonlyMap<StreamId, readonly Point[]> | null;
  /** The piece of a stream's line that is being moved. */
  readonly bending: Bending | null;
  /** Notes and areas as they stand while a gesture lasts. */
  readonly heldNotes: ReadonlyMap<string, HeldNote> | null;
  /** The note whose text is being typed. */
  readonly writing: string | null;
  readonly pulling: Pulling | null;
  readonly offer: Offer | null;
  readonly dropping: Dropping | null;
  /** Unit under the pointer: its port marks show. */
  readonly hovered: UnitId | null;
}

export interface Quiet {
  readonly labels: ReadonlySet<StreamId>;
  readonly diamonds: ReadonlySet<StreamId>;
  readonly duties: boolean;
}

/** Nothing is in the hand. */
export const AT_REST = {
  moved: null,
  movingByKeys: false,
  guide: '',
  bends: null,
  bending: null,
  heldNotes: null,
} as const satisfies Partial<SheetState>;

const emptyScene: Scene = {
  box: { x: 0, y: 0, w: 0, h: 0 },
  textScale: 1,
  units: [],
  lines: [],
  labels: [],
  notes: [],
  omitted: [],
};

type Followers = Pick<SheetState, 'lines' | 'labels'>;
type Hand = Pick<SheetState, 'moved' | 'bends'>;
const following = new WeakMap<object, (hand: Hand) => Followers>();

/** Says what lines and labels are while units or bends are under the hand. */
export const letFollow = (sheet: SheetStore, follow: (hand: Hand) => Followers): void => {
  following.set(sheet, follow);
};

/** Takes units or bends under the hand, and all that follows them, in one change: everybody is told once. */
export function hold(sheet: SheetStore, hand: Hand & Partial<SheetState>): void {
  sheet.setState({ ...hand, ...following.get(sheet)?.(hand) });
}

export const createSheetStore = () =>
  createStore<SheetState>()(() => ({
    scene: emptyScene,
    units: new Map(),
    lines: new Map(),
    labels: new Map(),
    unitNames: new Map(),
    streamNames: new Map(),
    quiet: { labels: new Set(), diamonds: new Set(), duties: false },
    textScale: 1,
    ...AT_REST,
    writing: null,
    pulling: null,
    offer: null,
    dropping: null,
    hovered: null,
  }));

export type SheetStore = ReturnType<typeof createSheetStore>;

const Context = createContext<SheetStore | null>(null);
export const SheetProvider = Context.Provider;

export function useSheetStore(): SheetStore {
  const store = useContext(Context);
  if (!store) throw new Error('useSheetStore outside SheetProvider');
  return store;
}

export const useSheet = <T>(pick: (state: SheetState) => T): T => useStore(useSheetStore(), pick);
