import { type SimpleK, simpleK, simplePoint } from './simpleK';
import type { StageSystem } from './system';
import { weightsOf } from './targets';
import type { AmountOf, ColumnProduct, Fixing } from './types';

/** First idea of what leaves where. */
export interface Guess {
  /** Distillate, or vapour from the top [mol/s]. */
  readonly top: number;
  readonly bottoms: number;
  /** Side draws in their order [mol/s]. */
  readonly draws: readonly number[];
  readonly refluxRatio: number;
  readonly topT_K: number;
  readonly bottomT_K: number;
  /** Vapour that the feeds bring [mol/s]. */
  readonly vapour: number;
  readonly simple: SimpleK;
}

/** Heat of vaporisation that stands for all in a first idea of duties [J/mol]. */
const LATENT_J_MOL = 30e3;
const COMMON_REFLUX_RATIO = 2;

/** Part of each chemical that goes over the top, for volatilities K, a cut c and a number of stages m (Fenske, 1932). */
function splitInto(d: Float64Array, f: Float64Array, lnK: Float64Array, lnC: number, m: number): number {
  let sum = 0;
  for (let i = 0; i < f.length; i++) {
    const e = lnC + m * lnK[i]!;
    d[i] = f[i]! * (e > 0 ? 1 / (1 + Math.exp(-e)) : Math.exp(e) / (1 + Math.exp(e)));
    sum += d[i]!;
  }
  return sum;
}

const logSmall = (part: number): number => Math.log(Math.max(part <= 0.5 ? part : 1 - part, 1e-12));

interface SplitView {
  readonly d: Float64Array;
  readonly f: Float64Array;
  readonly D: number;
  readonly F: number;
  readonly mass: Float64Array;
  readonly simple: SimpleK;
  readonly P: readonly [number, number];
  readonly places: number;
}

const totalOf = (x: Float64Array): number => x.reduce((a, b) => a + b, 0);

/** How far a split is from a fixing, in logarithms; undefined when the fixing says nothing about the split. */
function missOf(fixing: Fixing, s: SplitView): number | undefined {
  const { d, f } = s;
  const part = (product: ColumnProduct, i: number): number => (product === 'top' ? d[i]! : f[i]! - d[i]!);
  const sum = (product: ColumnProduct, basis: 'mole' | 'mass'): number => {
    let all = 0;
    for (let i = 0; i < d.length; i++) all += part(product, i) * (basis === 'mole' ? 1 : s.mass[i]!);
    return all;
  };
  if ('product' in fixing && typeof fixing.product === 'number') return undefined;
  switch (fixing.fix) {
    case 'flow': {
      const have = sum(fixing.product, fixing.flow.basis);
      return 10 * Math.log(have / fixing.flow.value);
    }
    case 'purity': {
      const { chemical: i, product, basis, value } = fixing;
      const x = (part(product, i) * (basis === 'mole' ? 1 : s.mass[i]!)) / sum(product, basis);
      return logSmall(value) - (value <= 0.5 ? Math.log(x + 1e-12) : Math.log(1 - x + 1e-12));
    }
    case 'recovery': {
      const { chemical: i, product, value } = fixing;
      const r = part(product, i) / f[i]!;
      return logSmall(value) - (value <= 0.5 ? Math.log(r + 1e-12) : Math.log(1 - r + 1e-12));
    }
    case 'temperature': {
      const z = d.map((x) => x / s.D);
      const x = f.map((a, i) => Math.max(a - d[i]!, 0) / Math.max(s.F - s.D, 1e-300));
      const Ttop = simplePoint(s.simple, z, s.P[0], 'bubble');
      const Tbottom = simplePoint(s.simple, x, s.P[1], 'bubble');
      const t = fixing.place / (s.places - 1);
      return ((Ttop + t * (Tbottom - Ttop)) / fixing.value - 1) * 20;
    }
    default:
      return undefined;
  }
}

/** Molar flow of an amount whose composition is not known yet. */
const molar = (flow: AmountOf, meanMass: number): number =>
  flow.basis === 'mole' ? flow.value : flow.value / meanMass;

/** First idea of flows, compositions and temperatures from what fixes the column. */
export function guessOf(s: StageSystem): Guess {
  const { n, places, task, F } = s;
  const f = new Float64Array(n);
  for (let j = 0; j < places; j++) for (let i = 0; i < n; i++) f[i]! += s.f[j * n + i]!;
  const total = totalOf(F);
  const z = f.map((x) => x / total);
  const mass = weightsOf(s, 'mass');
  const meanMass = z.reduce((sum, x, i) => sum + x * mass[i]!, 0);
  const boil = boilingPoint(s, z);
  const simple = simpleK(s, boil * 0.9, boil * 1.1);
  const lnK = simple.a.map((a, i) => a - simple.b[i]! / boil);
  const draws = task.draws.map((d) => molar(d.flow, meanMass));
  const rest = total - draws.reduce((a, b) => a + b, 0);
  const vapour = task.feeds.reduce((sum, x) => sum + totalOf(x.n_mol_s) * x.vapourFraction, 0);
  const d = new Float64Array(n);
  const P = [task.P_Pa[0]!, task.P_Pa[places - 1]!] as const;
  const view = (D: number): SplitView => ({ d, f, D, F: total, mass, simple, P, places });

  const sharp = Math.max(2, 0.35 * (places - 1));
  // With the reflux ratio given, a distillate too small to carry the feed's vapour over the top is no start.
  const ratioGiven = task.fixed.find((x) => x.fix === 'refluxRatio')?.value;
  const least = ratioGiven === undefined ? 0 : (1.05 * vapour) / (1 + ratioGiven);
  const split = bestSplit(s, (lnC, m) => view(splitInto(d, f, lnK, lnC, m)), sharp, lnK, least, rest);
  let m = split?.m ?? sharp;
  let top = split?.D;
  const ratio = refluxRatioFrom(s.task.fixed, top, { vapour, rest, meanMass, places, m });
  if (top === undefined) top = topFrom(s, { vapour, rest, ratio });
  top = Math.min(Math.max(top, 1e-6 * rest), rest * (1 - 1e-6));
  let refluxRatio = ratio ?? COMMON_REFLUX_RATIO;
  // Without a reboiler the rising vapour is what the feeds bring.
  if (s.first === 1 && !task.reboiler && split) refluxRatio = Math.max(vapour / top - 1, 0.1);
  m = Math.max(m, 1);
  meet(d, f, lnK, top / rest, total, m);
  const zTop = d.map((x) => x / totalOf(d));
  const left = f.map((x, i) => Math.max(x - d[i]!, 1e-30 * total));
  const xBottom = left.map((x) => x / totalOf(left));
  return {
    top,
    bottoms: rest - top,
    draws,
    refluxRatio,
    topT_K: simplePoint(simple, zTop, P[0], task.top === 'liquid' ? 'bubble' : 'dew'),
    bottomT_K: simplePoint(simple, xBottom, P[1], 'bubble'),
    vapour,
    simple,
  };
}

/** Where the whole feed boils by the model's start values [K]. */
function boilingPoint(s: StageSystem, z: Float64Array): number {
  const K = new Float64Array(s.n);
  const P = s.task.P_Pa[Math.floor(s.places / 2)]!;
  let low = 40;
  let high = 1500;
  for (let pass = 0; pass < 18; pass++) {
    const T = (low + high) / 2;
    s.model.startK(T, P, K);
    let sum = 0;
    for (let i = 0; i < z.length; i++) sum += z[i]! * K[i]!;
    if (sum > 1) high = T;
    else low = T;
  }
  return (low + high) / 2;
}

/** Cut (and sharpness, when two fixings speak of the split) that comes nearest to what is asked. */
function bestSplit(
  s: StageSystem,
  at: (lnC: number, m: number) => SplitView,
  sharp: number,
  lnK: Float64Array,
  least: number,
  rest: number,
): { readonly D: number; readonly m: number } | undefined {
  const probe = at(0, sharp);
  const asks = s.task.fixed.filter((x) => missOf(x, probe) !== undefined);
  const [only] = asks;
  if (only === undefined) return undefined;
  // A molar flow says it all.
  if (asks.length === 1 && only.fix === 'flow' && only.flow.basis === 'mole')
    return { D: only.product === 'top' ? only.flow.value : rest - only.flow.value, m: sharp };
  const ms =
    asks.length === 1
      ? [sharp]
      : [0.15, 0.25, 0.35, 0.5, 0.7, 0.9].map((r) => Math.max(1.5, r * (s.places - 1)));
  const span = Math.max(...lnK) - Math.min(...lnK) + 1;
  let best: { D: number; m: number; miss: number } | undefined;
  for (const m of ms) {
    const miss = (lnC: number): number => {
      const view = at(lnC, m);
      let sum = 0;
      for (const ask of asks) sum += (missOf(ask, view) ?? 0) ** 2;
      if (view.D < least) sum += 100 * (1 + Math.log(least / view.D)) ** 2;
      // Towards all or nothing a purity comes back to the feed's: rather a split in between.
      const lesser = Math.min(view.D, rest - view.D) / rest;
      if (lesser < 0.04) sum += 0.5 * Math.log(0.04 / Math.max(lesser, 1e-30)) ** 2;
      if (Number.isFinite(sum) && (best === undefined || sum < best.miss)) best = { D: view.D, m, miss: sum };
      return sum;
    };
    const low = -m * (Math.max(...lnK) + 0.5) - 8;
    const step = (m * span + 16) / 40;
    let from = low;
    let nearest = Number.POSITIVE_INFINITY;
    for (let k = 0; k <= 40; k++) {
      const got = miss(low + k * step);
      if (got < nearest) {
        nearest = got;
        from = low + k * step;
      }
    }
    // Golden section around the best of the grid.
    let a = from - step;
    let b = from + step;
    for (let k = 0; k < 14; k++) {
      const u = a + 0.382 * (b - a);
      const w = a + 0.618 * (b - a);
      if (miss(u) < miss(w)) b = w;
      else a = u;
    }
  }
  return best;
}

/** Moves the cut until the share of the whole that goes over the top is met. */
function meet(
  d: Float64Array,
  f: Float64Array,
  lnK: Float64Array,
  share: number,
  total: number,
  m: number,
): void {
  let low = -m * (Math.max(...lnK) + 1) - 50;
  let high = -m * (Math.min(...lnK) - 1) + 50;
  for (let pass = 0; pass < 34; pass++) {
    const middle = (low + high) / 2;
    if (splitInto(d, f, lnK, middle, m) > share * total) high = middle;
    else low = middle;
  }
}

interface Rough {
  readonly vapour: number;
  readonly rest: number;
  readonly meanMass: number;
  readonly places: number;
  readonly m: number;
}

/**
 * Reflux ratio [-] from what is fixed, or from how sharp the split must be: Gilliland's correlation (1940) in the form of
 * Eduljee (1975), Y = 0.75 (1 - X^0.5668), with the least reflux ratio taken as 1.
 */
function refluxRatioFrom(fixed: readonly Fixing[], top: number | undefined, r: Rough): number | undefined {
  for (const x of fixed) if (x.fix === 'refluxRatio') return x.value;
  if (top === undefined) return undefined;
  const least = 0.05;
  for (const x of fixed) {
    if (x.fix === 'reflux') return Math.max(molar(x.flow, r.meanMass) / top, least);
    if (x.fix === 'boilup') return Math.max((x.value * (r.rest - top) + r.vapour) / top - 1, least);
    if (x.fix === 'duty') {
      const rising = Math.abs(x.value) / LATENT_J_MOL + (x.at === 'reboiler' ? r.vapour : 0);
      return Math.max(rising / top - 1, least);
    }
  }
  const Y = (r.places - 1 - r.m) / r.places;
  const X = Math.min(Math.max(1 - Y / 0.75, 0.05), 0.85) ** (1 / 0.5668);
  return (1 + X) / (1 - X);
}

/** Distillate when nothing that is fixed tells of the split. */
function topFrom(s: StageSystem, r: { vapour: number; rest: number; ratio: number | undefined }): number {
  const { fixed } = s.task;
  const boilup = fixed.find((x) => x.fix === 'boilup')?.value;
  const duty = fixed.find((x) => x.fix === 'duty');
  if (s.first === 0) {
    if (boilup !== undefined) return r.rest - (r.rest - r.vapour) / (1 + boilup);
    if (duty) return r.vapour + Math.abs(duty.value) / LATENT_J_MOL;
    return Math.max(r.vapour, 0.3 * r.rest);
  }
  const ratio = r.ratio ?? COMMON_REFLUX_RATIO;
  if (!s.task.reboiler) return Math.max(r.vapour, 0.02 * r.rest) / (1 + ratio);
  if (boilup !== undefined) return (boilup * r.rest + r.vapour) / (1 + ratio + boilup);
  if (duty)
    return (Math.abs(duty.value) / LATENT_J_MOL + (duty.at === 'reboiler' ? r.vapour : 0)) / (1 + ratio);
  return 0.5 * r.rest;
}
