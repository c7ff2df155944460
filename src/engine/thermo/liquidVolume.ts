import type { ChemicalData } from '../chemicals/types';
import { type VolumeConstant, volumeConstant } from './pure/volumeConstant';
import { R_J_molK } from './types';

/** From here up to 1 in Tr the answer passes over to the model's own volume. */
const HAND_OVER_FROM = 0.98;

/**
 * Molar volume of liquid mixtures by corresponding states: the modified Rackett equation at saturation, raised to
 * pressure by a generalised compression. A chemical's constant goes with temperature where its density is known, so
 * that a pure saturated liquid has the density of its correlation (pure/volumeConstant.ts); else it is one constant.
 *
 *   v_s = R (Sum x_i Tc_i/Pc_i) Z^[1 + (1 - Tr)^(2/7)],  Z = Sum x_i Z_RA,i(T),  Tr = T/Tcm,
 *   Tcm = Sum Sum phi_i phi_j Tc_ij,  phi_i = x_i Vc_i / Sum x Vc,
 *   Tc_ij = sqrt(Tc_i Tc_j) 8 sqrt(Vc_i Vc_j) / (Vc_i^(1/3) + Vc_j^(1/3))^3
 *
 * A gas far above its critical temperature that is dissolved in a liquid enters Tcm by its share of the volume, which
 * keeps v_s bounded. A missing Vc is (0.2918 - 0.0928 omega) R Tc/Pc.
 * Below the pseudo-saturation pressure the saturated volume stands.
 * Towards and above Tcm there is no saturated liquid: between Tr 0.98 and 1 the answer passes over smoothly to the
 * volume of the thermodynamic model, which it is from there on. A model without a volume of its own keeps Tr at 1.
 *
 * Sources: Spencer & Danner, J. Chem. Eng. Data 18 (1973) 230; compression: Aalto, Keskinen, Aittamaa & Liukkonen,
 * Fluid Phase Equilib. 114 (1996) 1, after Chang & Zhao (1990); pseudo-saturation pressure: Lee & Kesler,
 * AIChE J. 21 (1975) 510; default Vc: Reid, Prausnitz & Poling, The Properties of Gases and Liquids.
 */
export class LiquidVolume {
  private readonly n: number;
  private readonly constants: readonly VolumeConstant[];
  /** Z_RA,i at zT; kept, since a temperature is seldom asked for once only. */
  private readonly zRA: Float64Array;
  private zT = 0;
  private readonly Vc: Float64Array;
  private readonly omega: Float64Array;
  /** R Tc/Pc [m3/mol] */
  private readonly size: Float64Array;
  /** Tc_ij [K], row-major */
  private readonly Tc: Float64Array;

  /** Throws when a chemical lacks Tc, Pc or omega: missingCritical is asked before. */
  constructor(chemicals: readonly ChemicalData[]) {
    const n = chemicals.length;
    this.n = n;
    const need = (c: ChemicalData, name: 'Tc_K' | 'Pc_Pa' | 'omega'): number => {
      const value = c[name];
      if (value === undefined) throw new Error(`the liquid volume needs ${name} of ${c.id}`);
      return value;
    };
    this.omega = Float64Array.from(chemicals, (c) => need(c, 'omega'));
    this.zRA = new Float64Array(n);
    this.constants = chemicals.map((c) => volumeConstant(c)!);
    this.size = Float64Array.from(chemicals, (c) => (R_J_molK * need(c, 'Tc_K')) / need(c, 'Pc_Pa'));
    this.Vc = Float64Array.from(
      chemicals,
      (c, i) => c.Vc_m3_mol ?? (0.2918 - 0.0928 * this.omega[i]!) * this.size[i]!,
    );
    this.Tc = new Float64Array(n * n);
    for (let i = 0; i < n; i++)
      for (let j = 0; j < n; j++) {
        const [vi, vj] = [this.Vc[i]!, this.Vc[j]!];
        const cube = (Math.cbrt(vi) + Math.cbrt(vj)) ** 3;
        this.Tc[i * n + j] =
          (Math.sqrt(chemicals[i]!.Tc_K! * chemicals[j]!.Tc_K!) * 8 * Math.sqrt(vi * vj)) / cube;
      }
  }

  /**
   * @param T    [K] > 0, @param P [Pa] > 0, @param x mole fractions, length n
   * @param own  the thermodynamic model's volume at the same state [m3/mol]; undefined when it has none
   * @returns    [m3/mol]
   */
  at(T: number, P: number, x: Float64Array, own: number | undefined): number {
    const { n } = this;
    if (this.zT !== T) this.constantsAt(T);
    let Vc = 0;
    let size = 0;
    let z = 0;
    let omega = 0;
    for (let i = 0; i < n; i++) {
      Vc += x[i]! * this.Vc[i]!;
      size += x[i]! * this.size[i]!;
      z += x[i]! * this.zRA[i]!;
      omega += x[i]! * this.omega[i]!;
    }
    let Tcm = 0;
    for (let i = 0, at = 0; i < n; i++) {
      let row = 0;
      for (let j = 0; j < n; j++, at++) row += x[j]! * this.Vc[j]! * this.Tc[at]!;
      Tcm += x[i]! * this.Vc[i]! * row;
    }
    Tcm /= Vc * Vc;
    const asked = T / Tcm;
    if (asked >= 1 && own !== undefined) return own;
    const Tr = Math.min(asked, 1);
    const saturated = size * z ** (1 + (1 - Tr) ** (2 / 7));
    const method = saturated * compression(Tr, (P * size) / (R_J_molK * Tcm), omega);
    if (own === undefined || Tr <= HAND_OVER_FROM) return method;
    const t = (Tr - HAND_OVER_FROM) / (1 - HAND_OVER_FROM);
    const share = t * t * (3 - 2 * t);
    return (1 - share) * method + share * own;
  }

  private constantsAt(T: number): void {
    for (let i = 0; i < this.n; i++) this.zRA[i] = Math.exp(this.constants[i]!.ln(T));
    this.zT = T;
  }
}

/** v/v_s at Tr <= 1 and Pr, 1 below the pseudo-saturation pressure. */
function compression(Tr: number, Pr: number, omega: number): number {
  const T6 = Tr ** 6;
  const ln = Math.log(Tr);
  const lnSat =
    5.92714 -
    6.09648 / Tr -
    1.28862 * ln +
    0.169347 * T6 +
    omega * (15.2518 - 15.6875 / Tr - 13.4721 * ln + 0.43577 * T6);
  const above = Pr - Math.exp(lnSat);
  if (!(above > 0)) return 1;
  const A = -170.335 - 28.578 * Tr + 124.809 * Tr ** 3 - 55.5393 * T6 + 130.01 / Tr;
  const power = Math.exp((1.00588 - Tr) ** (0.164813 - 0.0914427 * omega));
  return (A + power * above) / (A + Math.E * above);
}
