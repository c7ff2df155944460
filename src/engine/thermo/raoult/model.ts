import type { ChemicalData } from '../../chemicals/types';
import { LiquidVolume } from '../liquidVolume';
import { type IdealGases, prepareIdealGases } from '../pure/ideal';
import { missingCritical } from '../pure/missing';
import { type PureChemical, preparePure } from '../pure/pure';
import { type PureVolume, pureVolume } from '../pureVolume';
import { type Level, type ModelSpec, type PhaseProps, R_J_molK, type Side, type ThermoModel } from '../types';
import { RaoultProps } from './props';

/** Relative step of the difference that gives the bend of ln Psat from its slope. */
const BEND_STEP = 2e-5;

/**
 * Raoult's law: an ideal-gas vapour, and a liquid whose chemicals have the fugacity x_i Psat_i(T), with
 * `poynting` times exp[v_i (P - Psat_i)/(RT)], v_i the volume of the pure liquid.
 *
 * Liquid enthalpy by `liquidH`:
 * - 'psat-slope': h_i = h_ideal,i - R T^2 d ln f_i/dT, f_i the fugacity above. Enthalpy, entropy, heat capacity and
 *   Gibbs energy are then exactly consistent with each other and with ln phi.
 * - 'hvap': h_i = h_ideal,i - Hvap_i(T) by the correlation, which also knows that the real vapour is not ideal. The
 *   entropy is (h - g)/T with g from ln phi, so that T (s_vapour - s_liquid) = h_vapour - h_liquid at saturation and
 *   G = H - TS hold exactly; dh = T ds within the liquid and -h/T^2 = d(g/T)/dT do not, by as much as the correlation
 *   differs from R T^2 d ln Psat/dT.
 *
 * Without `poynting` liquid h, s and ln f do not change with pressure, as though the liquid had no volume; v (the sum
 * of the pure volumes) is then for density only.
 * Above its critical temperature a chemical keeps a liquid fugacity: ln Psat goes on straight in 1/T.
 */
export class Raoult implements ThermoModel {
  readonly n: number;
  readonly hasEntropy: boolean;
  private readonly ideal: IdealGases;
  private readonly pure: readonly PureChemical[];
  private readonly pureVolumes: readonly PureVolume[];
  private readonly volume: LiquidVolume | undefined;

  /** @param chemicals  those present; each with a vapour pressure and an ideal-gas heat capacity, else it throws */
  constructor(
    readonly spec: ModelSpec,
    readonly chemicals: readonly ChemicalData[],
  ) {
    this.n = chemicals.length;
    this.hasEntropy = chemicals.every((c) => c.S0_J_molK !== undefined);
    this.ideal = prepareIdealGases(chemicals);
    this.pure = chemicals.map(preparePure);
    for (const p of this.pure) {
      if (!p.lnPsat) throw new Error(`${p.chemical.id} has no vapour pressure`);
      if (spec.liquidH === 'hvap' && !p.hvap) throw new Error(`${p.chemical.id} has no heat of vaporisation`);
    }
    this.pureVolumes = this.pure.map(pureVolume);
    this.volume = chemicals.every((c) => missingCritical(c).length === 0)
      ? new LiquidVolume(chemicals)
      : undefined;
  }

  makeProps(): RaoultProps {
    return new RaoultProps(this, this.ideal);
  }

  evaluate(side: Side, T: number, P: number, x: Float64Array, level: Level, props: PhaseProps): void {
    const out = props as RaoultProps;
    if (out.owner !== this || x.length !== this.n) throw new Error('props or x of another model');
    out.single = false;
    if (side !== 'vapour') this.liquidAt(T, out);
    out.side = side === 'stable' ? this.steadierSide(T, P, x, out) : side;
    if (out.side === 'vapour') this.vapour(T, P, x, level, out);
    else this.liquid(T, P, x, level, out);
  }

  startK(T: number, P: number, K: Float64Array): void {
    const lnP = Math.log(P);
    for (let i = 0; i < this.n; i++) K[i] = Math.max(Math.exp(this.pure[i]!.lnPsat!(T) - lnP), 1e-300);
  }

  hIdeal_J_mol(i: number, T: number): number {
    return this.ideal.h(i, T);
  }

  cpIdeal_J_molK(i: number, T: number): number {
    return this.ideal.cp(i, T);
  }

  saturationP_Pa(i: number, T: number): number | undefined {
    const Tc = this.chemicals[i]!.Tc_K;
    return Tc !== undefined && T >= Tc ? undefined : this.pure[i]!.psat!(T);
  }

  liquidVolume_m3_mol(T: number, P: number, x: Float64Array): number {
    if (this.volume && this.spec.liquidVolume === 'corrected') return this.volume.at(T, P, x, undefined);
    let v = 0;
    for (let i = 0; i < this.n; i++) v += x[i]! * this.pureVolumes[i]!.at(T);
    return v;
  }

  /**
   * A chemical without critical constants counts as never near its critical point: infinite T and P, and three times
   * its liquid volume.
   */
  pseudoCritical(x: Float64Array): {
    readonly T_K: number;
    readonly P_Pa: number;
    readonly v_m3_mol: number;
  } {
    let T_K = 0;
    let P_Pa = 0;
    let v_m3_mol = 0;
    this.chemicals.forEach((c, i) => {
      if (x[i] === 0) return;
      T_K += x[i]! * (c.Tc_K ?? Number.POSITIVE_INFINITY);
      P_Pa += x[i]! * (c.Pc_Pa ?? Number.POSITIVE_INFINITY);
      v_m3_mol += x[i]! * (c.Vc_m3_mol ?? 3 * this.pureVolumes[i]!.at(c.Tb_K ?? 298.15));
    });
    return { T_K, P_Pa, v_m3_mol };
  }

  private vapour(T: number, P: number, x: Float64Array, level: Level, out: RaoultProps): void {
    out.lnPhi.fill(0);
    out.Z = 1;
    out.v_m3_mol = (R_J_molK * T) / P;
    if (level === 0) return;
    out.idealAt(T);
    let h = 0;
    let cp = 0;
    for (let i = 0; i < this.n; i++) {
      h += x[i]! * out.hIdeal[i]!;
      cp += x[i]! * out.cpIdeal[i]!;
    }
    out.h_J_mol = h;
    out.keepForEntropy(T, P, x, 0);
    if (level === 1) return;
    out.cp_J_molK = cp;
    out.cv_J_molK = cp - R_J_molK;
    out.hPartial.set(out.hIdeal);
    out.dT.fill(0);
    out.dP.fill(0);
    out.dN.fill(0);
  }

  private liquid(T: number, P: number, x: Float64Array, level: Level, out: RaoultProps): void {
    const { n } = this;
    const { lnPhi, dT, dP, hPartial, lnPsat, slope, bend, volume, dVolume } = out;
    const { poynting } = this.spec;
    const RT = R_J_molK * T;
    const lnP = Math.log(P);
    let v = 0;
    let lnPhiMean = 0;
    for (let i = 0; i < n; i++) {
      let l = lnPsat[i]! - lnP;
      if (poynting) l += (volume[i]! * (P - Math.exp(lnPsat[i]!))) / RT;
      lnPhi[i] = l;
      lnPhiMean += x[i]! * l;
      v += x[i]! * volume[i]!;
    }
    out.v_m3_mol = v;
    out.Z = (P * v) / RT;
    if (level === 0) return;

    out.idealAt(T);
    const correlated = this.spec.liquidH === 'hvap';
    let hIdeal = 0;
    let cpIdeal = 0;
    let hResidual = 0;
    let cpResidual = 0;
    for (let i = 0; i < n; i++) {
      // First and second derivative of ln phi_i by T.
      let d1 = slope[i]!;
      let d2 = bend[i]!;
      if (poynting) {
        const psat = Math.exp(lnPsat[i]!);
        const y = volume[i]! / RT;
        const y1 = (dVolume[i]! - volume[i]! / T) / RT;
        const over = P - psat;
        d1 += y1 * over - y * psat * slope[i]!;
        if (level === 2) d2 += this.poyntingBend(i, T, over, psat, out);
      }
      dT[i] = d1;
      cpIdeal += x[i]! * out.cpIdeal[i]!;
      let hOver = -RT * T * d1;
      if (correlated) {
        const pure = this.pure[i]!;
        hOver = -pure.hvap!(T);
        if (level === 2) cpResidual -= x[i]! * pure.dHvap_dT!(T);
      } else cpResidual -= x[i]! * RT * (2 * d1 + T * d2);
      hIdeal += x[i]! * out.hIdeal[i]!;
      hResidual += x[i]! * hOver;
      hPartial[i] = out.hIdeal[i]! + hOver;
    }
    out.h_J_mol = hIdeal + hResidual;
    out.keepForEntropy(T, P, x, hResidual / T - R_J_molK * lnPhiMean);
    if (level === 1) return;
    out.cp_J_molK = cpIdeal + cpResidual;
    out.cv_J_molK = undefined;
    for (let i = 0; i < n; i++) dP[i] = (poynting ? volume[i]! / RT : 0) - 1 / P;
    out.dN.fill(0);
  }

  /** d2/dT2 of v_i (P - Psat_i)/(RT). */
  private poyntingBend(i: number, T: number, over: number, psat: number, out: RaoultProps): number {
    const { volume, dVolume, slope, bend } = out;
    const RT = R_J_molK * T;
    const step = BEND_STEP * T;
    const pure = this.pureVolumes[i]!;
    const v2 = (pure.slope(T + step) - pure.slope(T - step)) / (2 * step);
    const y = volume[i]! / RT;
    const y1 = (dVolume[i]! - volume[i]! / T) / RT;
    const y2 = (v2 - (2 * dVolume[i]!) / T + (2 * volume[i]!) / (T * T)) / RT;
    return y2 * over - 2 * y1 * psat * slope[i]! - y * psat * (slope[i]! ** 2 + bend[i]!);
  }

  /** The side of lower Gibbs energy; the ideal gas has ln phi = 0. */
  private steadierSide(T: number, P: number, x: Float64Array, out: RaoultProps): 'vapour' | 'liquid' {
    this.liquid(T, P, x, 0, out);
    let g = 0;
    for (let i = 0; i < this.n; i++) g += x[i]! * out.lnPhi[i]!;
    return g < 0 ? 'liquid' : 'vapour';
  }

  private liquidAt(T: number, out: RaoultProps): void {
    if (out.liquidT === T) return;
    const step = BEND_STEP * T;
    for (let i = 0; i < this.n; i++) {
      const pure = this.pure[i]!;
      out.lnPsat[i] = pure.lnPsat!(T);
      out.slope[i] = pure.dlnPsat_dT!(T);
      out.bend[i] = (pure.dlnPsat_dT!(T + step) - pure.dlnPsat_dT!(T - step)) / (2 * step);
      out.volume[i] = this.pureVolumes[i]!.at(T);
      out.dVolume[i] = this.pureVolumes[i]!.slope(T);
    }
    out.liquidT = T;
  }
}
