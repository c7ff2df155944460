/** Whether two shapes hold the same values; functions and symbols only by identity. */
export function sameValue(a: unknown, b: unknown): boolean {
  if (Object.is(a, b)) return true;
  if (typeof a !== 'object' || typeof b !== 'object' || a === null || b === null) return false;
  if (Array.isArray(a)) {
    if (!Array.isArray(b) || a.length !== b.length) return false;
    return a.every((value, k) => sameValue(value, b[k]));
  }
  const keys = Object.keys(a);
  if (keys.length !== Object.keys(b).length) return false;
  const [left, right] = [a as Record<string, unknown>, b as Record<string, unknown>];
  return keys.every((key) => Object.hasOwn(right, key) && sameValue(left[key], right[key]));
}

/** The new list, with the old objects wherever nothing changed; the old list itself when nothing changed at all. */
export function keepSame<T>(
  next: readonly T[],
  before: readonly T[],
  keyOf: (shape: T) => string,
): readonly T[] {
  if (next === before) return before;
  const old = new Map(before.map((shape) => [keyOf(shape), shape]));
  const out = next.map((shape) => {
    const was = old.get(keyOf(shape));
    return was !== undefined && sameValue(was, shape) ? was : shape;
  });
  return out.length === before.length && out.every((shape, k) => shape === before[k]) ? before : out;
}
