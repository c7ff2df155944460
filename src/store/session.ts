import { createStore } from 'zustand/vanilla';
import type { Port, StreamId, UnitId } from '../engine/ids';

export type DrawerChoice =
  | { readonly is: 'unit'; readonly id: UnitId }
  | { readonly is: 'stream'; readonly id: StreamId }
  | { readonly is: 'limits' }
  | { readonly is: 'assumptions' }
  | { readonly is: 'chemicals' }
  | { readonly is: 'sketch' }
  | { readonly is: 'basis' };

/** A unit or a stream, wherever it is shown. */
export type Thing = { readonly unit: UnitId } | { readonly stream: StreamId };

/** A message over the sheet. */
export interface Notice {
  readonly key: number;
  readonly tone: 'info' | 'caution' | 'beyond';
  readonly title: string;
  readonly lines: readonly string[];
  /** What can be done about it: one button each. */
  readonly steps?: readonly NoticeStep[];
}

export interface NoticeStep {
  readonly label: string;
  run(): void;
}

export type Theme = 'system' | 'light' | 'dark';

/** What is neither saved with the sketch nor undone: selection, open drawer, what lies over the sheet. */
export interface SessionState {
  readonly units: readonly UnitId[];
  readonly streams: readonly StreamId[];
  /** Notes and areas of the sheet, by id. */
  readonly notes: readonly string[];
  readonly drawer: DrawerChoice | null;
  /** Counts how often the keyboard was sent into the drawer. */
  readonly drawerEntered: number;
  /** Width that the open drawer takes from the sheet [px]; 0 while none is open. */
  readonly drawerPx: number;
  /** Pointed at in another part of the screen: drawn as if selected, for as long as that lasts. */
  readonly pointed: Thing | null;
  /** What the sheet was last asked to bring to its middle; the key tells one asking from the next. */
  readonly centred: { readonly key: number; readonly thing: Thing } | null;
  /** Zone of the page that a unit or stream stands in, by id; kept by the sheet. */
  readonly zones: ReadonlyMap<string, string>;
  /** A connection started by keyboard or pointer, waiting for its other end. */
  readonly connecting: { readonly unit: UnitId; readonly port: Port } | null;
  readonly theme: Theme;
  /** Whether keys without Ctrl or Alt run actions. */
  readonly singleKeys: boolean;
  readonly shelfFolded: boolean;
  readonly balanceFolded: boolean;
  /** Full-screen pages over the sheet. */
  readonly over:
    | 'none'
    | 'summary'
    | 'documents'
    | 'pdf'
    | 'open'
    | 'share'
    | 'keys'
    | 'find'
    | 'pairs'
    | 'scale';
  readonly notice: Notice | null;
  /** Title bar: how autosave stands. */
  readonly saved: {
    readonly state: 'saved' | 'saving' | 'failed' | 'read-only' | 'unknown';
    readonly detail?: string;
  };
  /** A new version of the page is kept and waits to be asked for. */
  readonly update: boolean;
  /** A part of the page could not be fetched: only loading it again helps. */
  readonly outdated: boolean;
  /** Read out politely by screen readers. */
  readonly spoken: string;
}

/** The session of a page that has just been opened. */
export function createSession() {
  const store = createStore<SessionState>()(() => ({
    units: [],
    streams: [],
    notes: [],
    drawer: null,
    drawerEntered: 0,
    drawerPx: 0,
    pointed: null,
    centred: null,
    zones: new Map(),
    connecting: null,
    theme: 'system',
    singleKeys: true,
    shelfFolded: false,
    balanceFolded: false,
    over: 'none',
    notice: null,
    saved: { state: 'unknown' },
    update: false,
    outdated: false,
    spoken: '',
  }));
  const { getState: get, setState: set } = store;
  let notices = 0;
  return {
    ...store,
    /** Replaces the selection and opens the drawer of a single thing. */
    select(units: readonly UnitId[], streams: readonly StreamId[] = []): void {
      const [unit] = units;
      const [stream] = streams;
      const alone = units.length + streams.length === 1;
      const drawer: DrawerChoice | null =
        alone && unit
          ? { is: 'unit', id: unit }
          : alone && stream
            ? { is: 'stream', id: stream }
            : get().drawer;
      set({ units, streams, notes: [], drawer });
    },
    /** Selects one thing and has the sheet bring it to its middle; the drawer stays. */
    centre(thing: Thing): void {
      set({
        units: 'unit' in thing ? [thing.unit] : [],
        streams: 'stream' in thing ? [thing.stream] : [],
        notes: [],
        centred: { key: (get().centred?.key ?? 0) + 1, thing },
      });
    },
    toggleUnit(id: UnitId): void {
      const { units } = get();
      set({ units: units.includes(id) ? units.filter((u) => u !== id) : [...units, id] });
    },
    openDrawer(drawer: DrawerChoice | null): void {
      set({ drawer });
    },
    /** Opens a drawer and takes the keyboard into it, to the field to begin with. */
    enterDrawer(drawer: DrawerChoice): void {
      set({ drawer, drawerEntered: get().drawerEntered + 1 });
    },
    say(
      tone: Notice['tone'],
      title: string,
      lines: readonly string[] = [],
      steps: readonly NoticeStep[] = [],
    ): void {
      notices += 1;
      set({ notice: { key: notices, tone, title, lines, steps }, spoken: [title, ...lines].join(' ') });
    },
    dismiss(): void {
      set({ notice: null });
    },
  };
}

export type Session = ReturnType<typeof createSession>;
