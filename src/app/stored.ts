import { type Opened, openSketch } from '../sketch/read';
import type { Sketch } from '../sketch/types';
import type { StoredState } from '../store/autosave';

const counters = new WeakMap<Sketch, number>();

/** A stored state opens like a file: an older form is brought up to date, and a damaged one is told instead of shown. */
export function openStored(state: StoredState): Opened {
  const opened = openSketch(state.document);
  if (opened.ok) counters.set(opened.sketch, state.counter);
  return opened;
}

/** The counter of the stored state that a document was read from; undefined once it was edited, or never stored. */
export const storedAs = (sketch: Sketch): number | undefined => counters.get(sketch);
