/**
 * Ideal-gas heat capacity, enthalpy and entropy of many chemicals, prepared once.
 *
 * The rows of a heat capacity are joined where they meet; outside the stated range, and in a gap between two rows,
 * Cp keeps the value it had at the end. Enthalpy and entropy are the exact integrals of exactly that Cp, joined
 * without a step, and stand at Hf and S0 at 298.15 K: so H rises with T wherever Cp is positive, and dH = Cp dT,
 * dS = Cp/T dT hold everywhere.
 */
import type { ChemicalData, Corr } from '../../chemicals/types';
import { T0_K } from '../types';
import { type PowerTerms, powerIntegral, powerIntegralOverT, powerTerms, powerValue } from './powers';

/** Prepared ideal-gas properties of n chemicals. The last temperature of `caloric` is remembered, nothing else changes. */
export interface IdealGases {
  readonly n: number;
  /** Cp of chemical i [J/(mol K)] at T [K] > 0. */
  cp(i: number, T: number): number;
  /** Enthalpy of chemical i [J/mol], Hf (0 when unknown) at 298.15 K. */
  h(i: number, T: number): number;
  /** Entropy of chemical i at 1 bar [J/(mol K)], S0 (0 when unknown) at 298.15 K. */
  s(i: number, T: number): number;
  /** All n at once into arrays of length n that the caller owns; powers of T and ln T are taken once. */
  cpAll(T: number, cp: Float64Array): void;
  hAll(T: number, h: Float64Array): void;
  /** Enthalpy and Cp in one pass. Liquid and vapour of a stage ask one after the other at the same T. */
  caloric(T: number, h: Float64Array, cp: Float64Array): void;
  /** Enthalpy and entropy in one pass; `s` at 1 bar. */
  hsAll(T: number, h: Float64Array, s: Float64Array): void;
  allOf(T: number, cp: Float64Array, h: Float64Array, s: Float64Array): void;
}

interface Segment {
  /** Upper end [K]; the last is infinite. */
  readonly to_K: number;
  readonly terms: PowerTerms;
}

/** Rows in order of temperature, with the constant stretches before, between and after them. */
function segmentsOf(rows: readonly Corr[]): Segment[] {
  const sorted = [...rows].sort((a, b) => (a.Tmin ?? 0) - (b.Tmin ?? 0));
  const out: Segment[] = [];
  sorted.forEach((row, k) => {
    const terms = powerTerms(row);
    const start = row.Tmin ?? 0;
    const next = sorted[k + 1];
    const own = row.Tmax ?? Number.POSITIVE_INFINITY;
    const end = next ? Math.min(own, next.Tmin ?? 0) : own;
    if (k === 0 && start > 0) out.push({ to_K: start, terms: [0, 0, powerValue(terms, start)] });
    out.push({ to_K: end, terms });
    const gapTo = next ? (next.Tmin ?? 0) : Number.POSITIVE_INFINITY;
    if (end < gapTo) out.push({ to_K: gapTo, terms: [0, 0, powerValue(terms, end)] });
  });
  return out;
}

/**
 * Prepares the ideal-gas properties of chemicals, in their order.
 *
 * Throws when a chemical has no ideal-gas heat capacity or one of a form that is none: compiling a sketch refuses
 * such a chemical before it comes here.
 */
export function prepareIdealGases(chemicals: readonly ChemicalData[]): IdealGases {
  const n = chemicals.length;
  const all = chemicals.map((c) => {
    const rows = c.corr.ideal_gas_cp;
    if (!rows || rows.length === 0) throw new Error(`${c.id} has no ideal-gas heat capacity`);
    return segmentsOf(rows);
  });
  const terms = Math.max(7, ...all.flat().map((s) => s.terms.length));
  const stride = 3 * terms + 2;
  const first = new Int32Array(n + 1);
  all.forEach((segments, i) => {
    first[i + 1] = first[i]! + segments.length;
  });
  const to = new Float64Array(first[n]!);
  // Per segment: Cp terms, their quotients for H, those for S, then the two constants of integration.
  const data = new Float64Array(first[n]! * stride);

  chemicals.forEach((chemical, i) => {
    const segments = all[i]!;
    const home = Math.max(
      0,
      segments.findIndex((s) => T0_K <= s.to_K),
    );
    const h = new Float64Array(segments.length);
    const s = new Float64Array(segments.length);
    h[home] = (chemical.Hf_J_mol ?? 0) - powerIntegral(segments[home]!.terms, T0_K);
    s[home] = (chemical.S0_J_molK ?? 0) - powerIntegralOverT(segments[home]!.terms, T0_K);
    const join = (from: number, into: number, T: number): void => {
      const a = segments[from]!.terms;
      const b = segments[into]!.terms;
      h[into] = h[from]! + powerIntegral(a, T) - powerIntegral(b, T);
      s[into] = s[from]! + powerIntegralOverT(a, T) - powerIntegralOverT(b, T);
    };
    for (let k = home + 1; k < segments.length; k += 1) join(k - 1, k, segments[k - 1]!.to_K);
    for (let k = home - 1; k >= 0; k -= 1) join(k + 1, k, segments[k]!.to_K);
    segments.forEach((segment, k) => {
      const at = (first[i]! + k) * stride;
      to[first[i]! + k] = segment.to_K;
      segment.terms.forEach((a, p) => {
        data[at + p] = a;
        data[at + terms + p] = p === 0 ? -a : p === 1 ? a : a / (p - 1);
        data[at + 2 * terms + p] = p === 0 ? -a / 2 : p === 1 ? -a : p === 2 ? a : a / (p - 2);
      });
      data[at + 3 * terms] = h[k]!;
      data[at + 3 * terms + 1] = s[k]!;
    });
  });

  const place = (i: number, T: number): number => {
    let k = first[i]!;
    while (T > to[k]!) k += 1;
    return k * stride;
  };
  // Written out for the seven terms that nearly every row has; a longer polynomial runs its tail first.
  const tail = (low: number, T: number): number => {
    let y = 0;
    for (let p = low + terms - 1; p >= low + 7; p -= 1) y = (y + data[p]!) * T;
    return y;
  };
  const cpAt = (at: number, T: number, inv: number): number => {
    const y = data[at + 6]! + (terms > 7 ? tail(at, T) : 0);
    const poly = data[at + 2]! + T * (data[at + 3]! + T * (data[at + 4]! + T * (data[at + 5]! + T * y)));
    return poly + (data[at + 1]! + data[at]! * inv) * inv;
  };
  const hAt = (at: number, T: number, inv: number, ln: number): number => {
    const a = at + terms;
    const y = data[a + 6]! + (terms > 7 ? tail(a, T) : 0);
    const poly = data[a + 2]! + T * (data[a + 3]! + T * (data[a + 4]! + T * (data[a + 5]! + T * y)));
    return poly * T + data[a + 1]! * ln + data[a]! * inv + data[at + 3 * terms]!;
  };
  const sAt = (at: number, T: number, inv: number, ln: number): number => {
    const a = at + 2 * terms;
    const y = data[a + 6]! + (terms > 7 ? tail(a, T) : 0);
    const poly = data[a + 3]! + T * (data[a + 4]! + T * (data[a + 5]! + T * y));
    return poly * T + data[a + 2]! * ln + (data[a + 1]! + data[a]! * inv) * inv + data[at + 3 * terms + 1]!;
  };

  let keptT = Number.NaN;
  const keptH = new Float64Array(n);
  const keptCp = new Float64Array(n);

  return {
    n,
    caloric(T, h, cp) {
      if (T !== keptT) {
        const inv = 1 / T;
        const ln = Math.log(T);
        for (let i = 0; i < n; i += 1) {
          const at = place(i, T);
          keptH[i] = hAt(at, T, inv, ln);
          keptCp[i] = cpAt(at, T, inv);
        }
        keptT = T;
      }
      for (let i = 0; i < n; i += 1) {
        h[i] = keptH[i]!;
        cp[i] = keptCp[i]!;
      }
    },
    cp: (i, T) => cpAt(place(i, T), T, 1 / T),
    h: (i, T) => hAt(place(i, T), T, 1 / T, Math.log(T)),
    s: (i, T) => sAt(place(i, T), T, 1 / T, Math.log(T)),
    cpAll(T, cp) {
      const inv = 1 / T;
      for (let i = 0; i < n; i += 1) cp[i] = cpAt(place(i, T), T, inv);
    },
    hAll(T, h) {
      const inv = 1 / T;
      const ln = Math.log(T);
      for (let i = 0; i < n; i += 1) h[i] = hAt(place(i, T), T, inv, ln);
    },
    hsAll(T, h, s) {
      const inv = 1 / T;
      const ln = Math.log(T);
      for (let i = 0; i < n; i += 1) {
        const at = place(i, T);
        h[i] = hAt(at, T, inv, ln);
        s[i] = sAt(at, T, inv, ln);
      }
    },
    allOf(T, cp, h, s) {
      const inv = 1 / T;
      const ln = Math.log(T);
      for (let i = 0; i < n; i += 1) {
        const at = place(i, T);
        cp[i] = cpAt(at, T, inv);
        h[i] = hAt(at, T, inv, ln);
        s[i] = sAt(at, T, inv, ln);
      }
    },
  };
}
