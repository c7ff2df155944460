import { createStore } from 'zustand/vanilla';
import type { StreamId, UnitId } from '../engine/ids';
import type { Closure, LoopProgress, SolveBatch, StreamResult, UnitResult } from '../engine/network/types';
import type { Finding } from '../engine/outcome';
import { makeAside } from './aside';
import type { Shown } from './shown';

/** Results by id, as last handed out by the worker, and how its work stands. */
export interface ResultsState {
  readonly streams: ReadonlyMap<StreamId, Shown<StreamResult>>;
  readonly units: ReadonlyMap<UnitId, Shown<UnitResult>>;
  readonly closure: Closure | null;
  readonly findings: readonly Finding[];
  /** Edit that the last complete answer belongs to; 0 before the first. */
  readonly solvedEdit: number;
  /** Edit that partial results belong to while a slower solve runs. */
  readonly answering: number;
  /** Unit the worker is at during a slow solve. */
  readonly at: UnitId | null;
  /** The loop it stands in, and how far that is. */
  readonly loop: LoopProgress | null;
  /** Wall time of the last complete solve, posting included [ms]. */
  readonly tookMs: number;
  /** Why there is no answer, or that the worker had to be restarted, for the title strip; null after an answer. */
  readonly trouble: string | null;
  /** The solve under way was stopped by hand: there is no answer to the newest edit, and none is awaited. */
  readonly stopped: boolean;
}

const empty: ResultsState = {
  streams: new Map(),
  units: new Map(),
  closure: null,
  findings: [],
  solvedEdit: 0,
  answering: 0,
  at: null,
  loop: null,
  tookMs: 0,
  trouble: null,
  stopped: false,
};

function merge<K extends string, T extends { readonly state: string }>(
  known: ReadonlyMap<K, Shown<T>>,
  changed: readonly (readonly [K, T])[],
  gone: readonly K[],
): ReadonlyMap<K, Shown<T>> {
  if (changed.length === 0 && !gone.some((id) => known.has(id))) return known;
  const next = new Map(known);
  for (const id of gone) next.delete(id);
  for (const [id, latest] of changed) {
    const before = known.get(id);
    const lastSolved = before && (before.latest.state === 'solved' ? before.latest : before.older);
    const keep = latest.state === 'waiting' || latest.state === 'needs-value' ? lastSolved : undefined;
    next.set(id, keep ? { latest, older: keep } : { latest });
  }
  return next;
}

/** What the worker said, tagged with the edit it answers. Neither saved nor undone; untouched records keep their identity. */
export function createResultsStore() {
  const store = createStore<ResultsState>()(() => empty);
  const { getState: get, setState: set } = store;
  const streamsAside = makeAside<StreamId, StreamResult>(() => ({ state: 'waiting' }));
  const unitsAside = makeAside<UnitId, UnitResult>(({ kind }) => ({ kind, state: 'waiting' }));
  /** Edit whose slow solve, or whose end without an answer, has made older results out of date. */
  let outdatedFor = 0;
  /** What is not of this edit is out of date from now on, and so is what was drawn from it. */
  const outdate = (edit: number): void => {
    if (edit === outdatedFor) return;
    outdatedFor = edit;
    const { streams, units } = get();
    set({
      streams: streamsAside.putAside(edit, streams),
      units: unitsAside.putAside(edit, units),
      closure: null,
    });
  };
  return {
    ...store,
    take(edit: number, last: boolean, batch: SolveBatch, tookMs: number): void {
      const goneStreams = batch.gone.flatMap((g) => ('stream' in g ? [g.stream] : []));
      const goneUnits = batch.gone.flatMap((g) => ('unit' in g ? [g.unit] : []));
      streamsAside.heard(
        edit,
        batch.streams.map(([id]) => id),
      );
      unitsAside.heard(
        edit,
        batch.units.map(([id]) => id),
      );
      if (last) outdatedFor = 0;
      const streams = merge(get().streams, batch.streams, goneStreams);
      const units = merge(get().units, batch.units, goneUnits);
      set(
        last
          ? {
              streams: streamsAside.putBack(streams),
              units: unitsAside.putBack(units),
              findings: batch.findings,
              closure: batch.closure ?? null,
              solvedEdit: edit,
              answering: edit,
              at: null,
              loop: null,
              tookMs,
              trouble: null,
              stopped: false,
            }
          : { streams, units, answering: edit },
      );
    },
    /** A solve that takes long enough to be told of: older results are out of date from here on. */
    at(edit: number, unit: UnitId, loop: LoopProgress | null = null): void {
      outdate(edit);
      set({ answering: edit, at: unit, loop, stopped: false });
    },
    /** There will be no answer to what was asked last. */
    broke(message: string): void {
      outdate(Number.POSITIVE_INFINITY);
      set({ trouble: message, at: null, loop: null });
    },
    /** By hand: the solve under way is given up. */
    stop(): void {
      outdate(Number.POSITIVE_INFINITY);
      set({ stopped: true, at: null, loop: null });
    },
    /** What was stopped is asked for once more. */
    resume(): void {
      set({ stopped: false });
    },
    clear(): void {
      streamsAside.clear();
      unitsAside.clear();
      outdatedFor = 0;
      set(empty);
    },
  };
}

export type ResultsStore = ReturnType<typeof createResultsStore>;

/** The stream's result fit for numbers on the screen: the latest solved one, or an older one marked so. */
export function shownStream(
  entry: Shown<StreamResult> | undefined,
): { readonly result: Extract<StreamResult, { state: 'solved' }>; readonly outOfDate: boolean } | undefined {
  if (!entry) return undefined;
  if (entry.latest.state === 'solved') return { result: entry.latest, outOfDate: false };
  if (entry.older?.state === 'solved') return { result: entry.older, outOfDate: true };
  return undefined;
}

/** The unit's state as drawn: the worker's four, and 'out-of-date' where an older result is shown. */
export function drawnState(entry: Shown<UnitResult> | undefined): UnitResult['state'] | 'out-of-date' {
  if (!entry) return 'waiting';
  if (entry.latest.state === 'waiting' && entry.older) return 'out-of-date';
  return entry.latest.state;
}
