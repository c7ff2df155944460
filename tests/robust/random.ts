/** Seeded random numbers, the same on every machine. */
export interface Random {
  /** In [0, 1). */
  next(): number;
  between(low: number, high: number): number;
  /** Even in the logarithm. */
  logBetween(low: number, high: number): number;
  /** Whole number from low to high, both included. */
  whole(low: number, high: number): number;
  of<T>(list: readonly T[]): T;
  some<T>(list: readonly T[], count: number): T[];
}

/** Source: mulberry32, public domain, T. Ettinger, 2017. */
export function makeRandom(seed: number): Random {
  let state = seed >>> 0;
  const next = (): number => {
    state = (state + 0x6d2b79f5) >>> 0;
    let t = state;
    t = Math.imul(t ^ (t >>> 15), t | 1);
    t ^= t + Math.imul(t ^ (t >>> 7), t | 61);
    return ((t ^ (t >>> 14)) >>> 0) / 4294967296;
  };
  const whole = (low: number, high: number): number => low + Math.floor(next() * (high - low + 1));
  return {
    next,
    between: (low, high) => low + next() * (high - low),
    logBetween: (low, high) => Math.exp(Math.log(low) + next() * Math.log(high / low)),
    whole,
    of: (list) => list[whole(0, list.length - 1)]!,
    some: (list, count) => {
      const left = [...list];
      const taken = [];
      while (taken.length < count && left.length > 0)
        taken.push(left.splice(whole(0, left.length - 1), 1)[0]!);
      return taken;
    },
  };
}
