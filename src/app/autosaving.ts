import type { Sketch } from '../sketch/types';
import { SketchStorage } from '../store/autosave';
import type { Stores } from '../store/react';
import { setStorage } from './storage';

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

/** Writes one document after the other, always the newest next; never two writes at once. */
function watch(stores: Stores, storage: SketchStorage): void {
  let counter = 0;
  let current = '';
  let writing = false;
  let waiting: { sketch: Sketch; label: string } | null = null;
  let release: (() => void) | null = null;

  const lock = (id: string): void => {
    release?.();
    release = null;
    if (!('locks' in navigator)) return;
    void navigator.locks.request(`splitwright:${id}`, { ifAvailable: true }, (held) => {
      if (stores.sketch.getState().sketch.id !== id) return undefined;
      if (!held) {
        stores.sketch.setWritable(false);
        stores.session.setState({
          saved: { state: 'read-only', detail: 'Another tab is editing this sketch.' },
        });
        return undefined;
      }
      return new Promise<void>((resolve) => {
        release = resolve;
      });
    });
  };

  const write = async (): Promise<void> => {
    if (writing || !waiting) return;
    writing = true;
    const { sketch, label } = waiting;
    waiting = null;
    stores.session.setState({ saved: { state: 'saving' } });
    if (sketch.id !== current) {
      current = sketch.id;
      counter = (await storage.latest(sketch.id))?.counter ?? 0;
      lock(sketch.id);
    }
    const outcome = await storage.save(sketch, counter, label, Date.now());
    if (outcome.ok) {
      counter = outcome.counter;
      remember(sketch.id);
      stores.session.setState({ saved: { state: 'saved' } });
    } else {
      const detail = {
        'newer-elsewhere':
          'Another tab has saved a newer state of this sketch. Save this one as a file, or reload.',
        'storage-full': 'The browser has no room left. Save the sketch as a file now.',
        'storage-denied': 'The browser does not let this page store anything. Save the sketch as a file.',
      }[outcome.why];
      stores.session.setState({ saved: { state: 'failed', detail } });
      stores.session.say('beyond', 'This edit is not saved on this computer.', [detail]);
    }
    writing = false;
    await write();
  };

  stores.sketch.subscribe((state, before) => {
    // A gesture is saved when it ends; results, selection and viewport are never saved.
    if (state.gesture || (state.sketch === before.sketch && before.gesture === null)) return;
    if (isEmpty(state.sketch) && state.past.length === 0) return;
    waiting = { sketch: state.sketch, label: state.past.at(-1)?.label ?? 'open' };
    void write();
  });
  const { sketch } = stores.sketch.getState();
  if (!isEmpty(sketch)) {
    current = sketch.id;
    void storage.latest(sketch.id).then((stored) => {
      counter = stored?.counter ?? 0;
      lock(sketch.id);
      stores.session.setState({ saved: { state: 'saved' } });
    });
  }
}
