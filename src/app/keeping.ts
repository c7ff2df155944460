import type { Sketch } from '../sketch/types';
import { writeSketch } from '../sketch/write';
import type { SaveOutcome, SketchStorage } from '../store/autosave';
import type { Stores } from '../store/react';
import type { NoticeStep, SessionState } from '../store/session';
import { editCopy, isEmpty, saveFile, showSketch } from './documents';
import type { Holder, Holding } from './holding';
import { openStored, storedAs } from './stored';

/** Edits pause when none came for so long [ms]. */
const PAUSE_MS = 500;

const ELSEWHERE = 'Another tab is editing this sketch.';

const DETAIL = {
  'newer-elsewhere':
    'Another tab has saved a newer state of this sketch. Go on with yours as a copy, or save it as a file.',
  'storage-full':
    'The browser has no room left. Save the sketch as a file now; sketches that are deleted for good make room.',
  'storage-denied': 'The browser does not let this page store anything. Save the sketch as a file.',
} as const;

interface Job {
  readonly sketch: Sketch;
  readonly label: string;
}

export interface Keeping {
  /** Makes this the tab that may change the sketch; it shows what was stored last. */
  takeOver(): Promise<void>;
  /** Resolves when nothing is being written and nothing waits to be. */
  settled(): Promise<void>;
}

/**
 * Saves every edit from now on, one document after the other, always the newest next. The tab that edits holds the sketch;
 * in another one it can only be read. What cannot be written is said at once, with the next step.
 */
export function keepSketches(
  stores: Stores,
  storage: SketchStorage,
  makeHolding: (holder: Holder) => Holding,
  remember: (id: string) => void,
  now: () => number = Date.now,
): Keeping {
  /** The sketch that this tab keeps, its last stored state, and whether no other tab may write it. */
  let current = '';
  let counter = 0;
  let saved: Sketch | null = null;
  let held = false;
  let waiting: Job | null = null;
  let running: Promise<void> | null = null;

  const tell = (state: SessionState['saved']): void => {
    const { writable } = stores.sketch.getState();
    stores.session.setState({ saved: writable ? state : { state: 'read-only', detail: ELSEWHERE } });
  };
  const readOnly = (): void => {
    stores.sketch.setWritable(false);
    tell({ state: 'read-only' });
  };
  const isShown = (id: string): boolean => stores.sketch.getState().sketch.id === id;

  const holding = makeHolding({
    lost() {
      // What was under the hand is kept: it is the last thing this tab writes.
      stores.sketch.commit();
      readOnly();
    },
    finish: async () => {
      await running;
      held = false;
    },
    taken() {
      held = false;
    },
  });

  /** Takes hold of the sketch that is shown now. False: there is nothing (more) to write. */
  const adopt = async (sketch: Sketch): Promise<boolean> => {
    current = sketch.id;
    saved = null;
    held = await holding.take(sketch.id);
    if (!isShown(sketch.id)) return false;
    if (!held) {
      readOnly();
      return false;
    }
    const stored = await storage.latest(sketch.id);
    counter = stored?.counter ?? 0;
    remember(sketch.id);
    if (!stored) return true;
    const shown = stores.sketch.getState().sketch;
    const from = storedAs(shown);
    if (from !== undefined && from !== stored.counter) {
      // Another tab stored one more between the reading and the taking.
      const newer = openStored(stored);
      if (newer.ok) show(newer.sketch);
      return false;
    }
    if (from === undefined && writeSketch(stored.document) !== writeSketch(sketch)) return true;
    saved = sketch;
    tell({ state: 'saved' });
    return false;
  };

  const show = (sketch: Sketch): void => {
    saved = sketch;
    showSketch(stores, sketch);
    tell({ state: 'saved' });
  };

  const failed = (outcome: Extract<SaveOutcome, { ok: false }>): void => {
    const detail = DETAIL[outcome.why];
    const wasFailed = stores.session.getState().saved.state === 'failed';
    tell({ state: 'failed', detail });
    // Said once; the title bar goes on saying it until it is mended.
    if (wasFailed) return;
    const asFile: NoticeStep = { label: 'Save as a file', run: () => saveFile(stores) };
    const other: NoticeStep =
      outcome.why === 'newer-elsewhere'
        ? { label: 'Go on with a copy', run: () => editCopy(stores) }
        : { label: 'Try again', run: again };
    stores.session.say(
      'beyond',
      'This edit is not saved on this computer.',
      [detail, `It is still here as long as this page stays open. (${outcome.detail})`],
      [asFile, other],
    );
  };

  /** Onto the disk once the edits pause: the next edit never waits for the disk. */
  let flushing: ReturnType<typeof setTimeout> | undefined;
  const flushSoon = (id: string): void => {
    clearTimeout(flushing);
    flushing = setTimeout(() => {
      storage.flush(id).catch((error: unknown) => {
        const detail = error instanceof Error ? error.message : String(error);
        failed({ ok: false, why: 'storage-denied', detail });
      });
    }, PAUSE_MS);
  };

  const step = async ({ sketch, label }: Job): Promise<void> => {
    if ((sketch.id !== current || !held) && !(await adopt(sketch))) return;
    if (sketch === saved) {
      tell({ state: 'saved' });
      return;
    }
    if (stores.session.getState().saved.state !== 'failed') tell({ state: 'saving' });
    const outcome = await storage.save(sketch, counter, label, now(), 'relaxed');
    if (!outcome.ok) {
      failed(outcome);
      return;
    }
    counter = outcome.counter;
    saved = sketch;
    tell({ state: 'saved' });
    flushSoon(sketch.id);
  };

  const run = async (): Promise<void> => {
    while (waiting) {
      const job = waiting;
      waiting = null;
      try {
        await step(job);
      } catch (error) {
        const detail = error instanceof Error ? error.message : String(error);
        failed({ ok: false, why: 'storage-denied', detail });
      }
    }
    running = null;
  };
  const save = (job: Job): void => {
    waiting = job;
    running ??= run();
  };
  const again = (): void => {
    const { sketch, past } = stores.sketch.getState();
    if (!isEmpty(sketch)) save({ sketch, label: past.at(-1)?.label ?? 'open' });
  };

  stores.sketch.subscribe((state, before) => {
    // A gesture is saved when it ends; results, selection and viewport are never saved.
    if (state.gesture || (state.sketch === before.sketch && before.gesture === null)) return;
    if (isEmpty(state.sketch) && state.past.length === 0) return;
    save({ sketch: state.sketch, label: state.past.at(-1)?.label ?? 'open' });
  });
  again();

  return {
    async takeOver() {
      const { sketch } = stores.sketch.getState();
      await holding.takeOver(sketch.id);
      current = sketch.id;
      held = true;
      const stored = await storage.latest(sketch.id);
      counter = stored?.counter ?? 0;
      stores.sketch.setWritable(true);
      const newer = stored && openStored(stored);
      if (newer?.ok && writeSketch(newer.sketch) !== writeSketch(sketch)) show(newer.sketch);
      else {
        saved = sketch;
        tell({ state: 'saved' });
      }
    },
    settled: async () => {
      await running;
    },
  };
}
