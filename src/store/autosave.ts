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

/** A saved sketch in the list: number of its newest state, when that was saved [ms since 1970]. */
export interface SketchHead {
  readonly id: string;
  readonly counter: number;
  readonly at: number;
  readonly title: string;
  /** When it was deleted; its states are still here until then and a while longer. */
  readonly gone?: number;
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
/** How long a deleted sketch can be brought back [ms]. */
export const KEEP_DELETED_MS = 30 * 24 * HOUR_MS;
/** A browser that does not answer within this time is taken to have no storage [ms]. */
const OPEN_MS = 4000;
/**
 * When a write counts as done: 'relaxed' once the system has it, so that a browser that crashes loses nothing, in a few ms;
 * 'strict' once it is on the disk, so that a machine that stops loses nothing either, which may take longer than the next edit.
 */
export type Durability = 'relaxed' | 'strict';

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

/** A full disk shows as an error of the request, or only as the reason for which the transaction was given up. */
function whyOf(error: unknown, given: DOMException | null = null): SaveOutcome {
  const reasons = [error, given].filter((e) => e instanceof Error || e instanceof DOMException);
  const isFull = reasons.some((e) => e.name === 'QuotaExceededError');
  const detail = reasons[0]?.message ?? String(error);
  return { ok: false, why: isFull ? 'storage-full' : 'storage-denied', detail };
}

/**
 * Sketches on this computer, in IndexedDB. Each edit is one transaction that checks the stored counter.
 * Opening fails softly: without storage every call answers 'storage-denied' and the title bar says so.
 */
export class SketchStorage {
  private constructor(private readonly db: IDBPDatabase<Store>) {}

  /** Refused where the browser denies storage, or does not answer. */
  static async open(name = 'splitwright', patience_ms = OPEN_MS): Promise<SketchStorage> {
    const opening = openDB<Store>(name, 1, {
      upgrade(fresh) {
        fresh.createObjectStore('heads', { keyPath: 'id' }).createIndex('at', 'at');
        fresh
          .createObjectStore('states', { keyPath: ['sketch', 'counter'] })
          .createIndex('when', ['sketch', 'at']);
      },
    });
    let timer: ReturnType<typeof setTimeout> | undefined;
    const late = new Promise<never>((_, reject) => {
      timer = setTimeout(() => reject(new Error('the browser’s storage does not answer')), patience_ms);
    });
    try {
      return new SketchStorage(await Promise.race([opening, late]));
    } finally {
      clearTimeout(timer);
    }
  }

  /**
   * Stores the next state. `expected`: the counter of the state it follows, 0 for a new sketch; nothing is written where
   * another one is stored, nor where there is no room. Never throws.
   */
  async save(
    document: Sketch,
    expected: number,
    label: string,
    at: number,
    durability: Durability = 'strict',
  ): Promise<SaveOutcome> {
    let tx: ReturnType<SketchStorage['writing']> | undefined;
    try {
      tx = this.writing(durability);
      const heads = tx.objectStore('heads');
      const states = tx.objectStore('states');
      const head = await heads.get(document.id);
      if ((head?.counter ?? 0) !== expected) {
        tx.abort();
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
      return whyOf(error, tx?.error ?? null);
    }
  }

  /** What was written of a sketch is on the disk when this resolves. */
  async flush(id: string): Promise<void> {
    await this.mark(id, (head) => head);
  }

  private writing(durability: Durability = 'strict') {
    const tx = this.db.transaction(['heads', 'states'], 'readwrite', { durability });
    // Its end is awaited where it matters; a transaction that is given up before that is no fault of its own.
    tx.done.catch(() => undefined);
    return tx;
  }

  /** The latest stored state of a sketch. */
  async latest(id: string): Promise<StoredState | undefined> {
    const head = await this.db.get('heads', id);
    return head ? this.db.get('states', [id, head.counter]) : undefined;
  }

  /** Heads of all sketches but deleted ones, the most recent first. */
  async list(): Promise<SketchHead[]> {
    return (await this.heads()).filter((head) => head.gone === undefined);
  }

  /** Heads of deleted sketches that can be brought back, the last deleted first. */
  async deleted(): Promise<SketchHead[]> {
    const gone = (await this.heads()).filter((head) => head.gone !== undefined);
    return gone.sort((a, b) => (b.gone ?? 0) - (a.gone ?? 0));
  }

  private async heads(): Promise<SketchHead[]> {
    return (await this.db.getAllFromIndex('heads', 'at')).reverse();
  }

  /** Kept states of a sketch, the most recent first. */
  async history(id: string): Promise<StoredState[]> {
    const states = await this.db.getAllFromIndex('states', 'when', ofSketch(id));
    return states.sort((a, b) => b.counter - a.counter);
  }

  /** Takes a sketch off the list; its states stay until it is removed. */
  async markDeleted(id: string, at: number): Promise<void> {
    await this.mark(id, (head) => ({ ...head, gone: at }));
  }

  async bringBack(id: string): Promise<void> {
    await this.mark(id, ({ gone, ...head }) => head);
  }

  private async mark(id: string, change: (head: SketchHead) => SketchHead): Promise<void> {
    const tx = this.db.transaction('heads', 'readwrite', { durability: 'strict' });
    const head = await tx.store.get(id);
    if (head) await tx.store.put(change(head));
    await tx.done;
  }

  /** Removes a sketch with all its states, for good. */
  async remove(id: string): Promise<void> {
    const tx = this.writing();
    await tx.objectStore('heads').delete(id);
    for (const key of await tx.objectStore('states').index('when').getAllKeys(ofSketch(id)))
      await tx.objectStore('states').delete(key);
    await tx.done;
  }

  /** Removes for good what was deleted so long ago that it can no longer be brought back. */
  async tidy(now: number): Promise<void> {
    for (const head of await this.deleted())
      if (now - (head.gone ?? now) > KEEP_DELETED_MS) await this.remove(head.id);
  }

  close(): void {
    this.db.close();
  }
}
