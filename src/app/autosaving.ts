import type { Sketch } from '../sketch/types';
import { SketchStorage, type StoredState } from '../store/autosave';
import type { Stores } from '../store/react';
import { sayFileProblem } from '../wording';
import { guardLeaving, saveFile } from './documents';
import { download } from './files';
import { createHolding } from './holding';
import { keepSketches } from './keeping';
import { makeLasting } from './lasting';
import { setStorage, setTakeOver } from './storage';
import { openStored } from './stored';

const LAST = 'splitwright.last';

/** Both places: a tab that is loaded again shows its own sketch, a new one that of the last edit anywhere. */
const places = (): readonly Storage[] => [sessionStorage, localStorage];

function remembered(): string | null {
  try {
    return places().reduce<string | null>((found, place) => found ?? place.getItem(LAST), null);
  } catch (error) {
    if (error instanceof DOMException) return null;
    throw error;
  }
}
function remember(id: string): void {
  try {
    for (const place of places()) place.setItem(LAST, id);
  } catch (error) {
    if (!(error instanceof DOMException)) throw error;
  }
}

export interface Autosave {
  /** The sketch that was open last, if it is still here. */
  readonly last: Sketch | null;
  /** Saves every edit from now on; the editing tab holds a lock on the sketch. */
  watch(stores: Stores): void;
}

/** A state that no longer opens is not thrown away: it can be had as a file, as it is stored. */
function sayDamaged(stores: Stores, stored: StoredState, reasons: readonly string[]): void {
  const name = `damaged-${stored.counter}.sketch.json`;
  stores.session.say('beyond', 'The sketch that was open last cannot be shown.', reasons, [
    {
      label: 'Save it as a file as it is',
      run: () => download(name, JSON.stringify(stored.document, null, 2), 'application/json'),
    },
  ]);
}

/**
 * What was open last. A browser that is ended at once may not have noted which sketch that was, though the sketch itself is
 * written: then it is the one that was edited last.
 */
async function lastState(storage: SketchStorage): Promise<StoredState | undefined> {
  const heads = await storage.list();
  const id = remembered();
  const last = id === null ? heads[0] : heads.find((head) => head.id === id);
  return last && storage.latest(last.id);
}

/** Opens storage softly: without it the page works, and the title bar says that nothing is kept. */
export async function startAutosave(): Promise<Autosave> {
  try {
    const storage = await SketchStorage.open();
    setStorage(storage);
    const stored = await lastState(storage);
    const opened = stored && openStored(stored);
    return {
      last: opened?.ok ? opened.sketch : null,
      watch: (stores) => {
        watch(stores, storage);
        if (stored && opened && !opened.ok) sayDamaged(stores, stored, opened.problems.map(sayFileProblem));
      },
    };
  } catch (error) {
    const detail = error instanceof Error ? error.message : String(error);
    return { last: null, watch: (stores) => withoutStorage(stores, detail) };
  }
}

function withoutStorage(stores: Stores, detail: string): void {
  guardLeaving(stores);
  stores.session.setState({ saved: { state: 'failed', detail: `Storage is not available: ${detail}` } });
  stores.session.say(
    'caution',
    'Nothing is kept on this computer.',
    [
      'The browser does not let this page store anything. Save sketches as files before you close the page.',
      detail,
    ],
    [{ label: 'Save as a file', run: () => saveFile(stores) }],
  );
}

function watch(stores: Stores, storage: SketchStorage): void {
  guardLeaving(stores);
  const keepForGood = makeLasting(navigator.storage);
  const { takeOver } = keepSketches(stores, storage, createHolding, (id) => {
    remember(id);
    void keepForGood();
  });
  setTakeOver(takeOver);
  storage
    .tidy(Date.now())
    .catch((error: unknown) => console.warn(`Deleted sketches were not cleared: ${String(error)}`));
}
