import { createStore } from 'zustand/vanilla';
import type { Sketch } from '../sketch/types';

/** One entry of the history: what a user did, in words, and the documents before and after. */
export interface HistoryEntry {
  readonly label: string;
  readonly before: Sketch;
  readonly after: Sketch;
}

export type Change = (sketch: Sketch) => Sketch;

/** The document on the sheet and its undo history, the next to undo last in `past`, the next to redo first in `future`. */
export interface SketchState {
  readonly sketch: Sketch;
  /** Counts every document shown, undone ones too; results carry the number they answer. */
  readonly edit: number;
  readonly past: readonly HistoryEntry[];
  readonly future: readonly HistoryEntry[];
  /** A gesture in progress (drag, slide): many changes, one entry. */
  readonly gesture: { readonly label: string; readonly before: Sketch } | null;
  /** False when another tab holds this sketch. */
  readonly writable: boolean;
}

const HISTORY_LENGTH = 200;

/**
 * The document with its history. Selection, viewport and results live elsewhere and are never undone.
 * `onEdit` is told the number of each new document in the same turn, before anybody renders.
 */
export function createSketchStore(first: Sketch, onEdit: (edit: number) => void = () => undefined) {
  const store = createStore<SketchState>()(() => ({
    sketch: first,
    edit: 1,
    past: [],
    future: [],
    gesture: null,
    writable: true,
  }));
  const { getState: get, setState: set } = store;

  const show = (sketch: Sketch, rest: Partial<SketchState>): void => {
    const edit = sketch === get().sketch ? get().edit : get().edit + 1;
    if (edit !== get().edit) onEdit(edit);
    set({ sketch, edit, ...rest });
  };
  const push = (entry: HistoryEntry): readonly HistoryEntry[] =>
    [...get().past, entry].slice(-HISTORY_LENGTH);

  return {
    ...store,

    /** One edit, one entry. A change that returns the same document leaves no entry. */
    apply(label: string, change: Change): boolean {
      const state = get();
      if (!state.writable) return false;
      if (state.gesture) this.commit();
      const before = get().sketch;
      const after = change(before);
      if (after === before) return false;
      show(after, { past: push({ label, before, after }), future: [] });
      return true;
    },

    begin(label: string): void {
      const state = get();
      if (!state.writable) return;
      if (state.gesture) this.commit();
      set({ gesture: { label, before: get().sketch } });
    },
    /** A step within the gesture; always counted from the document before it, so that steps do not pile up. */
    change(change: Change): void {
      const { gesture } = get();
      if (gesture) show(change(gesture.before), {});
    },
    /** Ends the gesture as one entry; `label` names it where that was not known when it began. */
    commit(label?: string): void {
      const { gesture, sketch } = get();
      if (!gesture) return;
      if (sketch === gesture.before) set({ gesture: null });
      else
        set({
          gesture: null,
          past: push({ label: label ?? gesture.label, before: gesture.before, after: sketch }),
          future: [],
        });
    },
    cancel(): void {
      const { gesture } = get();
      if (gesture) show(gesture.before, { gesture: null });
    },

    undo(): string | undefined {
      this.commit();
      const { past, future, writable } = get();
      const entry = past.at(-1);
      if (!entry || !writable) return undefined;
      show(entry.before, { past: past.slice(0, -1), future: [entry, ...future] });
      return entry.label;
    },
    redo(): string | undefined {
      this.commit();
      const { past, future, writable } = get();
      const entry = future[0];
      if (!entry || !writable) return undefined;
      show(entry.after, { past: [...past, entry], future: future.slice(1) });
      return entry.label;
    },

    /** Another document takes the sheet; its history starts empty. */
    open(sketch: Sketch, writable = true): void {
      show(sketch, { past: [], future: [], gesture: null, writable });
    },
    setWritable(writable: boolean): void {
      set({ writable });
    },
  };
}

export type SketchStore = ReturnType<typeof createSketchStore>;
