/** Keeps what is equal in content identical, so that nobody downstream takes it for new. */

/** The former list if it has the same items in the same order, else the new one. */
export function keepList<T>(former: readonly T[] | undefined, next: readonly T[]): readonly T[] {
  return former?.length === next.length && former.every((item, k) => item === next[k]) ? former : next;
}

/** The former record if it has the same values under the same keys, else the new one. */
export function keepRecord<T extends object>(former: T | undefined, next: T): T {
  if (!former) return next;
  const old = new Map(Object.entries(former));
  const entries = Object.entries(next);
  return entries.length === old.size && entries.every(([k, v]) => old.has(k) && old.get(k) === v)
    ? former
    : next;
}

/** Items of the former list in place of new ones with equal content; the list itself too when all are. */
export function keepEqual<T>(former: readonly T[] | undefined, next: readonly T[]): readonly T[] {
  if (!former) return next;
  const kept = next.map((item, k) => {
    const old = former[k];
    return old !== undefined && JSON.stringify(old) === JSON.stringify(item) ? old : item;
  });
  return keepList(former, kept);
}
