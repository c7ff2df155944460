import type { ChemicalData } from '../../chemicals/types';
import { positiveRoots } from '../../numerics/cubic';
import { LiquidVolume } from '../liquidVolume';
import { type IdealGases, prepareIdealGases } from '../pure/ideal';
import { type Level, type ModelSpec, type PhaseProps, R_J_molK, type Side, type ThermoModel } from '../types';
import { attraction } from './attraction';
import { cubicConstants, OMEGA_B, Z_CRITICAL } from './constants';
import { CubicProps } from './props';
import { saturationReduced } from './saturation';

/** Compressibilities at the mechanical limit of stability are kept finite: at most this many times the ideal gas's. */
const STIFFEST = 1e-12;

/**
 * The Peng-Robinson equation of state, P = RT/(v - b) - a/(v^2 + 2bv - b^2), with quadratic mixing of a (constant
 * k_ij) and linear mixing of b. All properties are derivatives of the residual Helmholtz energy of n moles in V,
 *
 *   A^r/(RT) = -n ln(1 - B/V) - D f/(RT),  f = ln[(V + (1+sqrt 2) B)/(V + (1-sqrt 2) B)] / (2 sqrt 2 B),
 *   B = Sum n_i b_i,  D = Sum n_i n_j a_ij,
 *
 * taken by hand and written at n = 1. Since sqrt(a_i) is linear in sqrt(T), a, da/dT and d2a/dT2 come from two
 * matrix-vector products.
 *
 * Source: Peng & Robinson, Ind. Eng. Chem. Fundam. 15 (1976) 59; Helmholtz route: Michelsen & Mollerup,
 * Thermodynamic Models: Fundamentals and Computational Aspects, 2nd ed. (2007), ch. 2 and 3.
 */
export class PengRobinson implements ThermoModel {
  readonly n: number;
  readonly hasEntropy: boolean;
  private readonly ideal: IdealGases;
  /** 1 - k_ij, row-major. */
  private readonly one_k: Float64Array;
  private readonly rootA0: Float64Array;
  private readonly rootA1: Float64Array;
  private readonly b: Float64Array;
  private readonly Tc: Float64Array;
  private readonly Pc: Float64Array;
  private readonly omega: Float64Array;
  private readonly volume: LiquidVolume;
  private readonly own: CubicProps;

  /**
   * @param chemicals  those present; each with Tc, Pc, omega and an ideal-gas heat capacity, else an error is thrown
   * @param spec       pairs index `chemicals`
   */
  constructor(
    readonly spec: ModelSpec,
    readonly chemicals: readonly ChemicalData[],
  ) {
    const n = chemicals.length;
    this.n = n;
    this.hasEntropy = chemicals.every((c) => c.S0_J_molK !== undefined);
    this.ideal = prepareIdealGases(chemicals);
    const constants = chemicals.map((c) => cubicConstants(c, spec.alpha));
    const of = (name: 'rootA0' | 'rootA1' | 'b' | 'Tc' | 'Pc' | 'omega'): Float64Array =>
      Float64Array.from(constants, (c) => c[name]);
    this.rootA0 = of('rootA0');
    this.rootA1 = of('rootA1');
    this.b = of('b');
    this.Tc = of('Tc');
    this.Pc = of('Pc');
    this.omega = of('omega');
    this.one_k = new Float64Array(n * n).fill(1);
    for (const { i, j, kij } of spec.pairs) {
      this.one_k[i * n + j] = 1 - kij;
      this.one_k[j * n + i] = 1 - kij;
    }
    this.volume = new LiquidVolume(chemicals);
    this.own = this.makeProps();
  }

  makeProps(): CubicProps {
    return new CubicProps(this, this.ideal);
  }

  evaluate(side: Side, T: number, P: number, x: Float64Array, level: Level, props: PhaseProps): void {
    const out = props as CubicProps;
    if (out.owner !== this || x.length !== this.n) throw new Error('props or x of another model');
    if (out.rootT !== T) this.rootsAt(T, out);
    if (level < 2) this.mix(x, out);
    else this.mixWithSlopes(x, out);
    const { n, b } = this;
    const { s, lnPhi, mixed } = out;
    const bm = mixed.b;
    const a = mixed.a;

    const RT = R_J_molK * T;
    const B = (bm * P) / RT;
    const q = a / (bm * RT);
    const w = chooseRoot(side, q, B, out);
    const Z = w + B;
    const L = attraction(Z, B);
    const lnW = Math.log(w);
    const cb = (Z - 1 + q * L) / bm;
    const cs = (-2 * L) / (bm * RT);
    for (let i = 0; i < n; i++) lnPhi[i] = cb * b[i]! + cs * s[i]! - lnW;
    const v = (Z * RT) / P;
    out.Z = Z;
    out.v_m3_mol = v;
    if (level === 0) return;

    const f = L / bm;
    out.idealAt(T);
    const { hIdeal } = out;
    let h = 0;
    for (let i = 0; i < n; i++) h += x[i]! * hIdeal[i]!;
    out.h_J_mol = h + RT * (Z - 1) + (T * mixed.a1 - a) * f;
    out.keepForEntropy(T, P, x, R_J_molK * lnW + mixed.a1 * f);
    if (level === 2) this.derivatives(T, P, x, v, (w * RT) / P, f, out);
  }

  /** Wilson's relation (1969); not below 1e-300. */
  startK(T: number, P: number, K: Float64Array): void {
    for (let i = 0; i < this.n; i++)
      K[i] = Math.max(
        (this.Pc[i]! / P) * Math.exp(5.373 * (1 + this.omega[i]!) * (1 - this.Tc[i]! / T)),
        1e-300,
      );
  }

  hIdeal_J_mol(i: number, T: number): number {
    return this.ideal.h(i, T);
  }

  cpIdeal_J_molK(i: number, T: number): number {
    return this.ideal.cp(i, T);
  }

  saturationP_Pa(i: number, T: number): number | undefined {
    const root = this.rootA0[i]! - this.rootA1[i]! * Math.sqrt(T);
    const RT = R_J_molK * T;
    if (T >= this.Tc[i]!) return undefined;
    const B = saturationReduced((root * root) / (this.b[i]! * RT));
    return B === undefined ? undefined : (B * RT) / this.b[i]!;
  }

  liquidVolume_m3_mol(T: number, P: number, x: Float64Array): number {
    this.evaluate('liquid', T, P, x, 0, this.own);
    const own = this.own.v_m3_mol;
    return this.spec.liquidVolume === 'cubic' ? own : this.volume.at(T, P, x, own);
  }

  pseudoCritical(x: Float64Array): {
    readonly T_K: number;
    readonly P_Pa: number;
    readonly v_m3_mol: number;
  } {
    let T_K = 0;
    let P_Pa = 0;
    let b = 0;
    for (let i = 0; i < this.n; i++) {
      T_K += x[i]! * this.Tc[i]!;
      P_Pa += x[i]! * this.Pc[i]!;
      b += x[i]! * this.b[i]!;
    }
    return { T_K, P_Pa, v_m3_mol: (b * Z_CRITICAL) / OMEGA_B };
  }

  /** s_i = Sum_j x_j a_ij, a = Sum x_i s_i, da/dT, b = Sum x_i b_i. */
  private mix(x: Float64Array, out: CubicProps): void {
    const { n, one_k } = this;
    const { root, slope, xRoot, s, mixed } = out;
    let bm = 0;
    for (let j = 0; j < n; j++) {
      bm += x[j]! * this.b[j]!;
      xRoot[j] = x[j]! * root[j]!;
    }
    let a = 0;
    let halfA1 = 0;
    for (let i = 0, at = 0; i < n; i++) {
      let y = 0;
      for (let j = 0; j < n; j++, at++) y += one_k[at]! * xRoot[j]!;
      a += xRoot[i]! * y;
      halfA1 += x[i]! * slope[i]! * y;
      s[i] = root[i]! * y;
    }
    mixed.b = bm;
    mixed.a = a;
    mixed.a1 = 2 * halfA1;
  }

  /** mix, and besides ds_i/dT and d2a/dT2; a root's own second derivative is -1/(2T) times its first. */
  private mixWithSlopes(x: Float64Array, out: CubicProps): void {
    const { n, one_k } = this;
    const { root, slope, xRoot, xSlope, s, ds, mixed } = out;
    let bm = 0;
    for (let j = 0; j < n; j++) {
      bm += x[j]! * this.b[j]!;
      xRoot[j] = x[j]! * root[j]!;
      xSlope[j] = x[j]! * slope[j]!;
    }
    let a = 0;
    let halfA1 = 0;
    let slopes = 0;
    for (let i = 0, at = 0; i < n; i++) {
      let y = 0;
      let z = 0;
      for (let j = 0; j < n; j++, at++) {
        const k = one_k[at]!;
        y += k * xRoot[j]!;
        z += k * xSlope[j]!;
      }
      a += xRoot[i]! * y;
      halfA1 += xSlope[i]! * y;
      slopes += xSlope[i]! * z;
      s[i] = root[i]! * y;
      ds[i] = slope[i]! * y + root[i]! * z;
    }
    mixed.b = bm;
    mixed.a = a;
    mixed.a1 = 2 * halfA1;
    mixed.a2 = 2 * slopes - halfA1 / out.rootT;
  }

  /**
   * Cp, Cv, partial molar enthalpies and the derivatives of ln phi, from those of f by V and B and of the pressure by V,
   * T and n_i.
   *
   * @param vb  v - b, free of cancellation
   */
  private derivatives(
    T: number,
    P: number,
    x: Float64Array,
    v: number,
    vb: number,
    f: number,
    out: CubicProps,
  ): void {
    const { n, b, one_k } = this;
    const { root, s, ds, p, dT, dP, dN, hPartial, hIdeal, cpIdeal, mixed } = out;
    const { a, a1, b: bm } = mixed;
    const RT = R_J_molK * T;
    const D = v * v + 2 * bm * v - bm * bm;
    const fB = (v / D - f) / bm;
    const turnB = (2 * (v - bm)) / (D * D);
    const fBB = -(2 * fB + v * turnB) / bm;
    const PV = Math.min((2 * a * (v + bm)) / (D * D) - RT / (vb * vb), (-STIFFEST * RT) / (v * v));
    const PT = R_J_molK / vb - a1 / D;
    let cpIg = 0;
    for (let i = 0; i < n; i++) cpIg += x[i]! * cpIdeal[i]!;
    const cv = cpIg - R_J_molK + T * mixed.a2 * f;
    out.cv_J_molK = cv;
    out.cp_J_molK = cv - (T * PT * PT) / PV;

    const p0 = RT / vb;
    const pb = RT / (vb * vb) + a * turnB;
    const ps = -2 / D;
    const perV = -1 / (RT * PV);
    const overRT = 1 / RT;
    const tb = -(a1 - a / T) * fB * overRT;
    const ts = (2 * f * overRT) / T;
    const tds = -2 * f * overRT;
    for (let i = 0; i < n; i++) {
      const pi = p0 + pb * b[i]! + ps * s[i]!;
      const volume = pi * perV;
      const byT = tb * b[i]! + ts * s[i]! + tds * ds[i]! + 1 / T - volume * PT;
      p[i] = pi;
      dP[i] = volume - 1 / P;
      dT[i] = byT;
      hPartial[i] = hIdeal[i]! - RT * T * byT;
    }
    // Row i of the second derivatives: a term in a_ij and a form of rank three in (1, b, s).
    const nb = 1 / vb;
    const nbb = 1 / (vb * vb) - a * fBB * overRT;
    const nsb = -2 * fB * overRT;
    const na = -2 * f * overRT;
    for (let i = 0; i < n; i++) {
      const bi = b[i]!;
      const vi = p[i]! * perV;
      const c0 = 1 + nb * bi - vi * p0;
      const c1 = nb + nbb * bi + nsb * s[i]! - vi * pb;
      const c2 = nsb * bi - vi * ps;
      const c3 = na * root[i]!;
      const row = i * n;
      for (let j = i; j < n; j++) {
        const d = c0 + c1 * b[j]! + c2 * s[j]! + c3 * one_k[row + j]! * root[j]!;
        dN[row + j] = d;
        dN[j * n + i] = d;
      }
    }
  }

  private rootsAt(T: number, out: CubicProps): void {
    const rootT = Math.sqrt(T);
    const { root, slope } = out;
    for (let i = 0; i < this.n; i++) {
      root[i] = this.rootA0[i]! - this.rootA1[i]! * rootT;
      slope[i] = (-0.5 * this.rootA1[i]!) / rootT;
    }
    out.rootT = T;
  }
}

/**
 * Z - B on the side asked for; says in `out` which side it was and whether there was a choice. The equation is solved
 * as a cubic in Z - B, in which no term cancels, however dense or thin the phase.
 */
function chooseRoot(side: Side, q: number, B: number, out: CubicProps): number {
  const { ends } = out;
  const real = positiveRoots(4 * B - 1, q * B - 4 * B + 2 * B * B, -2 * B * B, ends);
  const small = ends[0]!;
  const big = ends[1]!;
  out.single = real === 1;
  if (side !== 'stable') out.side = side;
  else if (real === 1) out.side = small + B > (Z_CRITICAL / OMEGA_B) * B ? 'vapour' : 'liquid';
  else {
    const liquid = small - Math.log(small) - q * attraction(small + B, B);
    const vapour = big - Math.log(big) - q * attraction(big + B, B);
    out.side = vapour < liquid ? 'vapour' : 'liquid';
  }
  return out.side === 'vapour' ? big : small;
}
