import { type DBSchema, type IDBPDatabase, openDB } from 'idb';
import type { Sketch } from '../sketch/types';

/** A stored state of one sketch. */
export interface StoredState {
  readonly sketch: string;
  /** Counts the writes of this sketch; a write that does not follow the stored one is refused. */
  readonly counter: number;
  readonly at: number;
  readonly label: string;
  readonly document: Sketch;
}

export interface SketchHead {
  readonly id: string;
  readonly counter: number;
  readonly at: number;
  readonly title: string;
}

interface Store extends DBSchema {
  heads: { key: string; value: SketchHead; indexes: { at: number } };
  states: { key: [string, number]; value: StoredState; indexes: { when: [string, number] } };
}

export type SaveOutcome =
  | { readonly ok: true; readonly counter: number }
  | {
      readonly ok: false;
      readonly why: 'newer-elsewhere' | 'storage-full' | 'storage-denied';
      readonly detail: string;
    };

const KEEP_LAST = 20;
const HOUR_MS = 3_600_000;

/** States to drop: all but the last 20 and the newest of each hour. Pure, so that it can be tested. */
export function statesToDrop(states: readonly { readonly counter: number; readonly at: number }[]): number[] {
  const newestFirst = [...states].sort((a, b) => b.counter - a.counter);
  const hours = new Set<number>();
  return newestFirst
    .filter((state, rank) => {
      const hour = Math.floor(state.at / HOUR_MS);
      const firstOfHour = !hours.has(hour);
      hours.add(hour);
      return rank >= KEEP_LAST && !firstOfHour;
    })
    .map((state) => state.counter);
}

const ofSketch = (id: string): IDBKeyRange => IDBKeyRange.bound([id, 0], [id, Number.MAX_SAFE_INTEGER]);

function whyOf(error: unknown): SaveOutcome {
  const name = error instanceof Error ? error.name : '';
  const detail = error instanceof Error ? error.message : String(error);
  return { ok: false, why: name === 'QuotaExceededError' ? 'storage-full' : 'storage-denied', detail };
}

/**
 * Sketches on this computer, in IndexedDB. Each edit is one transaction that checks the stored counter.
 * Opening fails softly: without storage every call answers 'storage-denied' and the title bar says so.
 */
export class SketchStorage {
  private constructor(private readonly db: IDBPDatabase<Store>) {}

  static async open(name = 'splitwright'): Promise<SketchStorage> {
    const db = await openDB<Store>(name, 1, {
      upgrade(fresh) {
        fresh.createObjectStore('heads', { keyPath: 'id' }).createIndex('at', 'at');
        fresh
          .createObjectStore('states', { keyPath: ['sketch', 'counter'] })
          .createIndex('when', ['sketch', 'at']);
      },
    });
    return new SketchStorage(db);
  }

  async save(document: Sketch, expected: number, label: string, at: number): Promise<SaveOutcome> {
    try {
      const tx = this.db.transaction(['heads', 'states'], 'readwrite');
      const heads = tx.objectStore('heads');
      const states = tx.objectStore('states');
      const head = await heads.get(document.id);
      if ((head?.counter ?? 0) !== expected) {
        tx.abort();
        await tx.done.catch(() => undefined);
        return { ok: false, why: 'newer-elsewhere', detail: String(head?.counter ?? 0) };
      }
      const counter = expected + 1;
      await states.put({ sketch: document.id, counter, at, label, document });
      await heads.put({ id: document.id, counter, at, title: document.title.title ?? '' });
      // Keys only: the documents themselves are not read back to find out which are old.
      const kept: { counter: number; at: number }[] = [];
      let cursor = await states.index('when').openKeyCursor(ofSketch(document.id));
      while (cursor) {
        kept.push({ counter: cursor.primaryKey[1], at: cursor.key[1] });
        cursor = await cursor.continue();
      }
      for (const drop of statesToDrop(kept)) await states.delete([document.id, drop]);
      await tx.done;
      return { ok: true, counter };
    } catch (error) {
      return whyOf(error);
    }
  }

  /** The latest stored state of a sketch. */
  async latest(id: string): Promise<StoredState | undefined> {
    const head = await this.db.get('heads', id);
    return head ? this.db.get('states', [id, head.counter]) : undefined;
  }

  /** Heads of all sketches, the most recent first. */
  async list(): Promise<SketchHead[]> {
    const heads = await this.db.getAllFromIndex('heads', 'at');
    return heads.reverse();
  }

  /** Kept states of a sketch, the most recent first. */
  async history(id: string): Promise<StoredState[]> {
    const states = await this.db.getAllFromIndex('states', 'when', ofSketch(id));
    return states.sort((a, b) => b.counter - a.counter);
  }

  async remove(id: string): Promise<void> {
    const tx = this.db.transaction(['heads', 'states'], 'readwrite');
    await tx.objectStore('heads').delete(id);
    for (const key of await tx.objectStore('states').index('when').getAllKeys(ofSketch(id)))
      await tx.objectStore('states').delete(key);
    await tx.done;
  }

  close(): void {
    this.db.close();
  }
}
