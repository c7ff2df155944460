import type { Change } from './elimination';
import { ENERGY_J_MOL, type StageSystem } from './system';
import type { AmountOf, ColumnProduct, Fixing } from './types';

/**
 * One thing that fixes a column beyond its parameters: a measure of the state, and the measure's wanted value. Purities
 * and recoveries are measured by the logarithm of the smaller part, flows by their logarithm.
 */
export interface Target {
  /** The measure at the system's present state. */
  measure(): number;
  /** Change of the measure with a change of the unknowns and of the parameters, at the present state. */
  slope(change: Change, dp: Float64Array): number;
  /** What the measure should be. */
  readonly wanted: number;
}

/** Flows of a product by chemical, and their change. */
interface ProductFlow {
  at(i: number): number;
  slope(i: number, change: Change, dp: Float64Array): number;
}

/** Where the flows of a product stand among the unknowns. */
export function productFlow(s: StageSystem, product: ColumnProduct): ProductFlow {
  const { n, places } = s;
  const plain = (liquid: boolean, at: number): ProductFlow => ({
    at: (i) => (liquid ? s.l : s.v)[at + i]!,
    slope: (i, change) => (liquid ? change.l : change.v)[at + i]!,
  });
  const drawn = (liquid: boolean, at: number, k: number): ProductFlow => ({
    at: (i) => s.p[k]! * (liquid ? s.l : s.v)[at + i]!,
    slope: (i, change, dp) =>
      s.p[k]! * (liquid ? change.l : change.v)[at + i]! + dp[k]! * (liquid ? s.l : s.v)[at + i]!,
  });
  if (product === 'bottoms') return plain(true, (places - 1) * n);
  if (product === 'top') return s.totalCondenser ? drawn(true, 0, 0) : plain(false, 0);
  const first = s.movers.length - s.task.draws.length;
  const draw = s.task.draws[product]!;
  return drawn(draw.phase === 'liquid', draw.place * n, first + product);
}

const allProducts = (s: StageSystem): ColumnProduct[] => ['top', 'bottoms', ...s.task.draws.keys()];

/** Weighted sum of a product's flows. */
function sumTarget(flow: ProductFlow, weights: Float64Array, value: number): Target {
  let sum = 0;
  return {
    measure() {
      sum = 0;
      for (let i = 0; i < weights.length; i++) sum += weights[i]! * flow.at(i);
      return Math.log(sum);
    },
    slope(change, dp) {
      let d = 0;
      for (let i = 0; i < weights.length; i++) d += weights[i]! * flow.slope(i, change, dp);
      return d / sum;
    },
    wanted: Math.log(value),
  };
}

/**
 * ln(a/b) of two weighted sums of product flows.
 *
 * @param parts  products with their weights in a and in b, by chemical
 */
function ratioTarget(
  parts: readonly { readonly flow: ProductFlow; readonly inA: Float64Array; readonly inB: Float64Array }[],
  wanted: number,
): Target {
  let a = 0;
  let b = 0;
  return {
    measure() {
      a = 0;
      b = 0;
      for (const { flow, inA, inB } of parts)
        for (let i = 0; i < inA.length; i++) {
          const x = flow.at(i);
          a += inA[i]! * x;
          b += inB[i]! * x;
        }
      return Math.log(a / b);
    },
    slope(change, dp) {
      let da = 0;
      let db = 0;
      for (const { flow, inA, inB } of parts)
        for (let i = 0; i < inA.length; i++) {
          const d = flow.slope(i, change, dp);
          da += inA[i]! * d;
          db += inB[i]! * d;
        }
      return da / a - db / b;
    },
    wanted,
  };
}

/** Kilograms, or moles, per mole. */
export const weightsOf = (s: StageSystem, basis: 'mole' | 'mass'): Float64Array =>
  Float64Array.from(s.model.chemicals, (c) => (basis === 'mole' ? 1 : c.MW_g_mol * 1e-3));

/** The flow of a product as a target, in its own basis. */
export const flowTarget = (s: StageSystem, product: ColumnProduct, flow: AmountOf): Target =>
  sumTarget(productFlow(s, product), weightsOf(s, flow.basis), flow.value);

function purityTarget(s: StageSystem, fixing: Extract<Fixing, { fix: 'purity' }>): Target {
  const { chemical, value } = fixing;
  const all = weightsOf(s, fixing.basis);
  // A main part is measured by what is not it.
  const small = value <= 0.5;
  const part = all.map((w, i) => ((i === chemical) === small ? w : 0));
  const parts = [{ flow: productFlow(s, fixing.product), inA: part, inB: all }];
  return ratioTarget(parts, Math.log(small ? value : 1 - value));
}

function recoveryTarget(s: StageSystem, fixing: Extract<Fixing, { fix: 'recovery' }>): Target {
  const { chemical, value, product } = fixing;
  const one = new Float64Array(s.n);
  one[chemical] = 1;
  const none = new Float64Array(s.n);
  const small = value <= 0.5;
  const parts = allProducts(s).map((q) => ({
    flow: productFlow(s, q),
    inA: (q === product) === small ? one : none,
    inB: one,
  }));
  return ratioTarget(parts, Math.log(small ? value : 1 - value));
}

function temperatureTarget(s: StageSystem, place: number, value: number): Target {
  const below = place === 0 && s.totalCondenser ? s.task.subcooling_K : 0;
  return {
    measure: () => (s.T[place]! - below) / 10,
    slope: (change) => change.T[place]! / 10,
    wanted: value / 10,
  };
}

/** Heat into an end [W] at the system's present state. */
export function dutyOf(s: StageSystem, at: 'condenser' | 'reboiler'): number {
  const { liq, vap, L, V, rL, rV } = s;
  if (at === 'condenser')
    return (
      rL[0]! * L[0]! * s.leaving(0).h_J_mol +
      rV[0]! * V[0]! * vap[0]!.h_J_mol -
      V[1]! * vap[1]!.h_J_mol -
      s.HF[0]!
    );
  const j = s.places - 1;
  return L[j]! * liq[j]!.h_J_mol + V[j]! * vap[j]!.h_J_mol - L[j - 1]! * s.leaving(j - 1).h_J_mol - s.HF[j]!;
}

function dutyTarget(s: StageSystem, at: 'condenser' | 'reboiler', value: number): Target {
  const { n } = s;
  const scale = s.feedTotal * ENERGY_J_MOL;
  const flowsOf = (h: Float64Array, d: Float64Array, j: number): number => {
    let sum = 0;
    for (let i = 0; i < n; i++) sum += h[i]! * d[j * n + i]!;
    return sum;
  };
  return {
    measure: () => dutyOf(s, at) / scale,
    slope({ l, v, T }, dp) {
      const { liq, vap, L, V, rL, rV } = s;
      if (at === 'condenser') {
        const out = s.leaving(0);
        let d = rL[0]! * (flowsOf(out.hPartial, l, 0) + L[0]! * out.cp_J_molK * T[0]!);
        if (s.totalCondenser) d += dp[0]! * L[0]! * out.h_J_mol;
        d += rV[0]! * (flowsOf(vap[0]!.hPartial, v, 0) + V[0]! * vap[0]!.cp_J_molK * T[0]!);
        d -= flowsOf(vap[1]!.hPartial, v, 1) + V[1]! * vap[1]!.cp_J_molK * T[1]!;
        return d / scale;
      }
      const j = s.places - 1;
      const up = s.leaving(j - 1);
      let d = flowsOf(liq[j]!.hPartial, l, j) + L[j]! * liq[j]!.cp_J_molK * T[j]!;
      d += flowsOf(vap[j]!.hPartial, v, j) + V[j]! * vap[j]!.cp_J_molK * T[j]!;
      d -= flowsOf(up.hPartial, l, j - 1) + L[j - 1]! * up.cp_J_molK * T[j - 1]!;
      return d / scale;
    },
    wanted: value / scale,
  };
}

function boilupTarget(s: StageSystem, value: number): Target {
  const ones = new Float64Array(s.n).fill(1);
  const none = new Float64Array(s.n);
  const at = (s.places - 1) * s.n;
  const vapour: ProductFlow = { at: (i) => s.v[at + i]!, slope: (i, change) => change.v[at + i]! };
  return ratioTarget(
    [
      { flow: vapour, inA: ones, inB: none },
      { flow: productFlow(s, 'bottoms'), inA: none, inB: ones },
    ],
    Math.log(value),
  );
}

function refluxTarget(s: StageSystem, flow: AmountOf): Target {
  const reflux: ProductFlow = { at: (i) => s.l[i]!, slope: (i, change) => change.l[i]! };
  return sumTarget(reflux, weightsOf(s, flow.basis), flow.value);
}

/** What a fixing asks, as a target. A reflux ratio is a parameter, but may be moved towards as a target too. */
export function targetOf(s: StageSystem, fixing: Fixing): Target {
  switch (fixing.fix) {
    case 'refluxRatio':
      return refluxRatioTarget(s, fixing.value);
    case 'boilup':
      return boilupTarget(s, fixing.value);
    case 'flow':
      return flowTarget(s, fixing.product, fixing.flow);
    case 'reflux':
      return refluxTarget(s, fixing.flow);
    case 'purity':
      return purityTarget(s, fixing);
    case 'recovery':
      return recoveryTarget(s, fixing);
    case 'temperature':
      return temperatureTarget(s, fixing.place, fixing.value);
    case 'duty':
      return dutyTarget(s, fixing.at, fixing.value);
  }
}

function refluxRatioTarget(s: StageSystem, value: number): Target {
  const sign = s.totalCondenser ? -1 : 1;
  return {
    measure: () => sign * Math.log(s.p[0]!),
    slope: (_, dp) => (sign * dp[0]!) / s.p[0]!,
    wanted: Math.log(value),
  };
}

/** A fixing's measure as a value of its own unit again. */
export function naturalOf(s: StageSystem, fixing: Fixing, measure: number): number {
  switch (fixing.fix) {
    case 'purity':
    case 'recovery':
      return fixing.value <= 0.5 ? Math.exp(measure) : 1 - Math.exp(measure);
    case 'temperature':
      return 10 * measure;
    case 'duty':
      return measure * s.feedTotal * ENERGY_J_MOL;
    case 'refluxRatio':
    case 'boilup':
    case 'flow':
    case 'reflux':
      return Math.exp(measure);
  }
}
