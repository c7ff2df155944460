import type { Layout } from './vector';

/** No tear flow falls below this share of its value in one step, or grows by more than this factor [-]. */
const LEAST = 0.1;
const MOST = 100;
/** Shares of the tear below which a chemical weighs less, in the acceleration and in the measure of change [-]. */
const LIGHT = 1e-4;
const TRACE = 1e-6;
/** Size of an enthalpy per mole [J/mol]. */
const ENTHALPY_J_MOL = 1e4;

/**
 * Size of every entry, in which its residual is measured; a chemical below `least` of its tear is measured by that. Mutates:
 * out, of layout.length.
 */
export function sizes(
  x: Float64Array,
  g: Float64Array,
  layout: Layout,
  least: number,
  out: Float64Array,
): void {
  const { nc, tears, width, length } = layout;
  for (let t = 0; t < tears; t++) {
    const at = t * width;
    let total = 0;
    for (let i = at; i < at + nc; i++) total += Math.max(x[i]!, g[i]!);
    const floor = Math.max(least * total, Number.MIN_VALUE);
    for (let i = at; i < at + nc; i++) out[i] = Math.max(x[i]!, g[i]!, floor);
    out[at + nc] = ENTHALPY_J_MOL;
    out[at + nc + 1] = Math.max(x[at + nc + 1]!, g[at + nc + 1]!);
  }
  for (let i = tears * width; i < length; i++) out[i] = Math.max(x[i]!, g[i]!, Number.MIN_VALUE);
}

export interface Change {
  /** Largest over all entries, relative to their size [-]. */
  readonly most: number;
  /**
   * Root of the mean square [-], a chemical that enters measured by what enters too: what only gathers would else come out
   * the better the more of it goes round.
   */
  readonly mean: number;
  /** Tear of the largest; -1 for a read. */
  readonly tear: number;
}

/** So many times what enters of a chemical is no more than its measure [-]. */
const ENTERING = 10;

/**
 * How far what came back is from what was assumed.
 *
 * @param entering  what enters the loop of every chemical, made ones too [mol/s]
 */
export function changeOf(
  x: Float64Array,
  g: Float64Array,
  entering: (chemical: number) => number,
  layout: Layout,
  scratch: Float64Array,
): Change {
  const { nc, tears, width, length } = layout;
  sizes(x, g, layout, TRACE, scratch);
  let most = 0;
  let tear = tears > 0 ? 0 : -1;
  for (let i = 0; i < length; i++) {
    const change = Math.abs(g[i]! - x[i]!) / scratch[i]!;
    if (change > most) [most, tear] = [change, i < tears * width ? Math.floor(i / width) : -1];
  }
  sizes(x, g, layout, LIGHT, scratch);
  let sum = 0;
  for (let i = 0; i < length; i++) {
    const into = i < tears * width && i % width < nc ? ENTERING * entering(i % width) : 0;
    sum += ((g[i]! - x[i]!) / (into > 0 ? Math.min(scratch[i]!, into) : scratch[i]!)) ** 2;
  }
  return { most, mean: Math.sqrt(sum / Math.max(1, length)), tear };
}

/** Scale of the acceleration's least squares. */
export const weigh = (x: Float64Array, g: Float64Array, layout: Layout, out: Float64Array): void =>
  sizes(x, g, layout, LIGHT, out);

/**
 * Keeps a proposal within what a step may do: flows stay above a tenth of their value and below a hundred times it, what has
 * gone is gone, what is new is taken as it came; enthalpy moves at most twenty times as far as the pass did, pressure between
 * half and twice of what came back. Mutates: y.
 *
 * @param x, g  what the pass assumed and what came back, by `layout`
 */
export function hold(y: Float64Array, x: Float64Array, g: Float64Array, layout: Layout): void {
  const { nc, tears, width, length } = layout;
  const flow = (i: number): void => {
    if (g[i] === 0 || x[i] === 0) y[i] = g[i]!;
    else y[i] = between(y[i]!, Math.min(LEAST * x[i]!, g[i]!), Math.max(MOST * x[i]!, g[i]!));
  };
  for (let t = 0; t < tears; t++) {
    const at = t * width;
    for (let i = at; i < at + nc; i++) flow(i);
    const [h, P] = [at + nc, at + nc + 1];
    const reach = 20 * Math.abs(g[h]! - x[h]!);
    y[h] = between(y[h]!, x[h]! - reach, x[h]! + reach);
    y[P] = g[P] === x[P] ? g[P]! : between(y[P]!, 0.5 * g[P]!, 2 * g[P]!);
  }
  for (let i = tears * width; i < length; i++) flow(i);
}

const between = (v: number, low: number, high: number): number => (v < low ? low : Math.min(v, high));
