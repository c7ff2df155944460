/**
 * Abridged standard atomic weights [g/mol] of the elements a process chemical is likely to hold.
 * Source: Prohaska et al., Standard atomic weights of the elements 2021 (IUPAC Technical Report), Pure Appl. Chem. 94 (2022)
 * 573, table of abridged values; helium and fluorine with more digits than those.
 */
export const ATOMIC_WEIGHT: Readonly<Record<string, number>> = {
  H: 1.008,
  He: 4.002602,
  Li: 6.94,
  B: 10.81,
  C: 12.011,
  N: 14.007,
  O: 15.999,
  F: 18.9984,
  Ne: 20.18,
  Na: 22.99,
  Mg: 24.305,
  Al: 26.982,
  Si: 28.085,
  P: 30.974,
  S: 32.06,
  Cl: 35.45,
  Ar: 39.95,
  K: 39.098,
  Ca: 40.078,
  Ti: 47.867,
  Fe: 55.845,
  Ni: 58.693,
  Cu: 63.546,
  Zn: 65.38,
  Br: 79.904,
  Kr: 83.798,
  I: 126.9,
  Xe: 131.29,
  Hg: 200.59,
};

/** Atoms by element symbol. */
export type ElementCounts = Readonly<Record<string, number>>;

const TOKEN = /([A-Z][a-z]?)|([([])|([)\]])|(\d+)/y;

/**
 * Atoms in a formula such as "C2H6O", "CH3CH2OH", "Ca(OH)2" or "(CH3)2SO"; round and square brackets, no charges, no dots.
 *
 * @returns  undefined when the text is no formula or names an element without a weight above
 */
export function elementCounts(formula: string): ElementCounts | undefined {
  const stack: Record<string, number>[] = [{}];
  const openers: string[] = [];
  /** What a number that follows would multiply. */
  let last: Record<string, number> | undefined;
  const add = (part: Readonly<Record<string, number>>, times: number): void => {
    const into = stack[stack.length - 1]!;
    for (const [symbol, count] of Object.entries(part)) into[symbol] = (into[symbol] ?? 0) + count * times;
  };
  TOKEN.lastIndex = 0;
  while (TOKEN.lastIndex < formula.length) {
    const m = TOKEN.exec(formula);
    if (!m) return undefined;
    const [, symbol, open, close, digits] = m;
    if (symbol !== undefined) {
      if (ATOMIC_WEIGHT[symbol] === undefined) return undefined;
      last = { [symbol]: 1 };
      add(last, 1);
    } else if (open !== undefined) {
      stack.push({});
      openers.push(open);
      last = undefined;
    } else if (close !== undefined) {
      const opener = openers.pop();
      if (opener !== (close === ')' ? '(' : '[')) return undefined;
      last = stack.pop()!;
      if (Object.keys(last).length === 0) return undefined;
      add(last, 1);
    } else {
      const times = Number(digits);
      if (!last || times < 1) return undefined;
      add(last, times - 1);
      last = undefined;
    }
  }
  const counts = stack[0]!;
  return openers.length > 0 || Object.keys(counts).length === 0 ? undefined : counts;
}

/** Same atoms in the same numbers, whatever their order: HCl and ClH, C2H6O and CH3CH2OH. A count of zero is no atom. */
export function sameElements(a: ElementCounts, b: ElementCounts): boolean {
  const of = (x: ElementCounts): [string, number][] => Object.entries(x).filter(([, count]) => count !== 0);
  const left = of(a);
  return left.length === of(b).length && left.every(([symbol, count]) => b[symbol] === count);
}

/** Molar mass [g/mol] from atoms; undefined when an element has no weight above. */
export function molarMass_g_mol(counts: ElementCounts): number | undefined {
  let sum = 0;
  for (const [symbol, count] of Object.entries(counts)) {
    const weight = ATOMIC_WEIGHT[symbol];
    if (weight === undefined) return undefined;
    sum += weight * count;
  }
  return sum;
}
