import type { Sketch } from '../sketch/types';
import { writeSketch } from '../sketch/write';
import { SketchStorage } from '../store/autosave';
import type { Stores } from '../store/react';
import type { SessionState } from '../store/session';
import { showSketch } from './documents';
import { createHolding } from './holding';
import { setStorage, setTakeOver } from './storage';

const LAST = 'splitwright.last';

const remembered = (): string | null => {
  try {
    return localStorage.getItem(LAST);
  } catch (error) {
    if (error instanceof DOMException) return null;
    throw error;
  }
};
const remember = (id: string): void => {
  try {
    localStorage.setItem(LAST, id);
  } catch (error) {
    if (!(error instanceof DOMException)) throw error;
  }
};

export interface Autosave {
  readonly storage: SketchStorage | null;
  /** The sketch that was open last, if it is still here. */
  readonly last: Sketch | null;
  /** Saves every edit from now on; the editing tab holds a lock on the sketch. */
  watch(stores: Stores): void;
}

const isEmpty = (sketch: Sketch): boolean => sketch.units.length === 0 && sketch.chemicals.length === 0;

/** Opens storage softly: without it the page works, and the title bar says that nothing is kept. */
export async function startAutosave(): Promise<Autosave> {
  try {
    const storage = await SketchStorage.open();
    setStorage(storage);
    const id = remembered();
    const stored = id ? await storage.latest(id) : undefined;
    return { storage, last: stored?.document ?? null, watch: (stores) => watch(stores, storage) };
  } catch (error) {
    const detail = error instanceof Error ? error.message : String(error);
    return {
      storage: null,
      last: null,
      watch: ({ session }) =>
        session.setState({ saved: { state: 'failed', detail: `Storage is not available: ${detail}` } }),
    };
  }
}

const ELSEWHERE = 'Another tab is editing this sketch.';

/** Writes one document after the other, always the newest next; never two writes at once. */
function watch(stores: Stores, storage: SketchStorage): void {
  let counter = 0;
  let current = '';
  let writing: Promise<void> | null = null;
  let waiting: { sketch: Sketch; label: string } | null = null;

  const tell = (saved: SessionState['saved']): void => {
    const { writable } = stores.sketch.getState();
    stores.session.setState({ saved: writable ? saved : { state: 'read-only', detail: ELSEWHERE } });
  };
  const holding = createHolding({
    lost() {
      // What was under the hand is kept: it is the last thing this tab writes.
      stores.sketch.commit();
      stores.sketch.setWritable(false);
      tell({ state: 'read-only' });
    },
    finish: async () => {
      await writing;
    },
  });
  const take = async (id: string): Promise<void> => {
    const isHeld = await holding.take(id);
    if (isHeld || stores.sketch.getState().sketch.id !== id) return;
    stores.sketch.setWritable(false);
    tell({ state: 'read-only' });
  };

  const writeNext = async ({ sketch, label }: { sketch: Sketch; label: string }): Promise<void> => {
    tell({ state: 'saving' });
    if (sketch.id !== current) {
      current = sketch.id;
      counter = (await storage.latest(sketch.id))?.counter ?? 0;
      void take(sketch.id);
    }
    const outcome = await storage.save(sketch, counter, label, Date.now());
    if (outcome.ok) {
      counter = outcome.counter;
      remember(sketch.id);
      tell({ state: 'saved' });
      return;
    }
    const detail = {
      'newer-elsewhere':
        'Another tab has saved a newer state of this sketch. Save this one as a file, or reload.',
      'storage-full': 'The browser has no room left. Save the sketch as a file now.',
      'storage-denied': 'The browser does not let this page store anything. Save the sketch as a file.',
    }[outcome.why];
    tell({ state: 'failed', detail });
    stores.session.say('beyond', 'This edit is not saved on this computer.', [detail]);
  };
  const write = async (): Promise<void> => {
    while (waiting) {
      const next = waiting;
      waiting = null;
      await writeNext(next);
    }
    writing = null;
  };

  stores.sketch.subscribe((state, before) => {
    // A gesture is saved when it ends; results, selection and viewport are never saved.
    if (state.gesture || (state.sketch === before.sketch && before.gesture === null)) return;
    if (isEmpty(state.sketch) && state.past.length === 0) return;
    waiting = { sketch: state.sketch, label: state.past.at(-1)?.label ?? 'open' };
    writing ??= write();
  });

  setTakeOver(async () => {
    const { sketch } = stores.sketch.getState();
    await holding.takeOver(sketch.id);
    const stored = await storage.latest(sketch.id);
    counter = stored?.counter ?? 0;
    current = sketch.id;
    stores.sketch.setWritable(true);
    tell({ state: 'saved' });
    if (stored && writeSketch(stored.document) !== writeSketch(sketch)) showSketch(stores, stored.document);
  });

  const { sketch } = stores.sketch.getState();
  if (!isEmpty(sketch)) {
    current = sketch.id;
    void storage.latest(sketch.id).then((stored) => {
      counter = stored?.counter ?? 0;
      void take(sketch.id);
      tell({ state: 'saved' });
    });
  }
}
