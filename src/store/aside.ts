import type { Shown } from './shown';

/**
 * Solved results of an earlier edit that are shown as out of date for as long as the newer answer is missing. What the last
 * batch of a solve does not name is unchanged and stands again as it was: the worker hands out only what differs.
 */
export function makeAside<K extends string, T extends { readonly state: string }>(waiting: (solved: T) => T) {
  const aside = new Map<K, Shown<T>>();
  /** Ids that the edit under way has answered already, and that edit. */
  const fresh = new Set<K>();
  let of = 0;
  return {
    /** What was handed out for an edit is of that edit. */
    heard(edit: number, ids: Iterable<K>): void {
      if (edit !== of) fresh.clear();
      of = edit;
      for (const id of ids) {
        fresh.add(id);
        aside.delete(id);
      }
    },
    /** Everything that this edit has not answered, as out of date. */
    putAside(edit: number, known: ReadonlyMap<K, Shown<T>>): ReadonlyMap<K, Shown<T>> {
      if (edit !== of) fresh.clear();
      of = edit;
      const next = new Map(known);
      for (const [id, entry] of known) {
        if (entry.latest.state !== 'solved' || fresh.has(id)) continue;
        aside.set(id, entry);
        next.set(id, { latest: waiting(entry.latest), older: entry.latest });
      }
      return next;
    },
    /** With a complete answer: what was aside and is still known stands again. */
    putBack(known: ReadonlyMap<K, Shown<T>>): ReadonlyMap<K, Shown<T>> {
      if (aside.size === 0) return known;
      const next = new Map(known);
      for (const [id, entry] of aside) if (known.has(id)) next.set(id, entry);
      aside.clear();
      return next;
    },
    clear(): void {
      aside.clear();
      fresh.clear();
      of = 0;
    },
  };
}
