/** Which key stands in each row of a "one of these" or "two of these" group, and which given key a row is to replace. */
export interface Slots {
  /** Keys by row; '' where a row may stay empty. */
  readonly keys: readonly string[];
  /** Row -> key whose value stays until the row's new key has one. */
  readonly replaces: Readonly<Record<number, string>>;
}

export interface Group {
  /** Every key that may be chosen, in order. */
  readonly all: readonly string[];
  /** Rows that must have a key, and rows at most. */
  readonly least: number;
  readonly most: number;
  readonly pairs: readonly (readonly [string, string])[];
  /** The key that is assumed while nothing is given. */
  readonly assumed?: string | undefined;
}

const paired = (pairs: Group['pairs'], a: string, b: string): boolean =>
  pairs.some(([x, y]) => (x === a && y === b) || (x === b && y === a));

/** Keys a row may choose, given what the other rows hold. */
export function choices(group: Group, slots: Slots, row: number): readonly string[] {
  const others = slots.keys.filter((key, k) => k !== row && key !== '');
  const isSecondOfPair = row > 0 && group.pairs.length > 0;
  return group.all.filter(
    (key) =>
      !others.includes(key) && (!isSecondOfPair || others.every((other) => paired(group.pairs, key, other))),
  );
}

/** Rows for what is given: given keys first, then what is assumed, then the first keys that are free. */
export function freshSlots(group: Group, given: readonly string[]): Slots {
  const keys = given.slice(0, group.most);
  if (keys.length === 0 && group.assumed !== undefined) keys.push(group.assumed);
  while (keys.length < group.least) keys.push(group.all.find((key) => !keys.includes(key)) ?? '');
  while (keys.length < group.most) keys.push('');
  return { keys, replaces: {} };
}

/** The same rows as long as they cover what is given; else new ones (after undo, or another document). */
export function keptSlots(group: Group, slots: Slots, given: readonly string[]): Slots {
  const covered = [...slots.keys, ...Object.values(slots.replaces)];
  return given.every((key) => covered.includes(key)) ? slots : freshSlots(group, given);
}

/** A row takes another key: the old one's value stays until the new one has a value. */
export function choose(slots: Slots, row: number, key: string, given: readonly string[]): Slots {
  const { [row]: waiting, ...rest } = slots.replaces;
  const old = waiting ?? slots.keys[row];
  const keys = slots.keys.map((k, i) => (i === row ? key : k));
  const isStill = old !== undefined && old !== key && given.includes(old);
  return { keys, replaces: isStill ? { ...rest, [row]: old } : rest };
}

/** Keys that lose their value when a row's key is given: the one it replaces, and partners that do not go with it. */
export function losers(group: Group, slots: Slots, row: number, given: readonly string[]): readonly string[] {
  const key = slots.keys[row];
  const replaced = slots.replaces[row];
  if (key === undefined) return [];
  const strangers =
    group.pairs.length === 0
      ? []
      : given.filter((other) => other !== key && !paired(group.pairs, key, other));
  return [...new Set([...(replaced === undefined ? [] : [replaced]), ...strangers])];
}
