import type { ChemicalData } from '../chemicals/types';
import { preparePure } from './pure/pure';
import type { PhaseProps } from './types';

/** A mixture value and the published rule it came by. */
export interface Ruled {
  readonly value: number;
  readonly rule: 'wilke' | 'log-average';
}

/** Viscosities of mixtures of some chemicals. */
export interface Viscosities {
  /** Dilute-gas viscosity at T [K] [Pa s]; undefined when a chemical present lacks its gas viscosity. */
  gas_Pa_s(T: number, x: Float64Array): Ruled | undefined;
  /** Liquid viscosity at T [K] [Pa s]; undefined when a chemical present lacks its liquid viscosity. */
  liquid_Pa_s(T: number, x: Float64Array): Ruled | undefined;
}

/**
 * Prepares the viscosities of mixtures; x is in the order given, and a chemical with x = 0 need not be known.
 *
 * - 'wilke': mu = Sum x_i mu_i / Sum_j x_j phi_ij, phi_ij = [1 + (mu_i/mu_j)^0.5 (M_j/M_i)^0.25]^2 / [8 (1 + M_i/M_j)]^0.5.
 *   For low pressure: nothing is added for density. Source: Wilke, J. Chem. Phys. 18 (1950) 517.
 * - 'log-average': ln mu = Sum x_i ln mu_i, the equation of Grunberg & Nissan, Nature 164 (1949) 799, without its
 *   interaction. Pressure is not accounted for. A correlation used outside its range keeps its end value.
 */
export function prepareViscosities(chemicals: readonly ChemicalData[]): Viscosities {
  const pure = chemicals.map(preparePure);
  const n = chemicals.length;
  const { fourthRoot, share } = wilkeTerms(chemicals.map((c) => c.MW_g_mol));
  const values = (
    of: 'viscosityG' | 'viscosityL',
    T: number,
    x: Float64Array,
  ): readonly number[] | undefined => {
    const out: number[] = [];
    for (let i = 0; i < pure.length; i++) {
      const at = pure[i]![of];
      if (x[i] === 0) out.push(0);
      else if (!at) return undefined;
      else {
        const mu = at(T);
        if (!(mu > 0 && Number.isFinite(mu))) return undefined;
        out.push(mu);
      }
    }
    return out;
  };
  return {
    gas_Pa_s(T, x) {
      const mu = values('viscosityG', T, x);
      if (!mu) return undefined;
      const root = mu.map(Math.sqrt);
      let value = 0;
      for (let i = 0; i < n; i++) {
        if (x[i] === 0) continue;
        let sum = 0;
        for (let j = 0; j < n; j++) {
          if (x[j] === 0) continue;
          const term = 1 + (root[i]! / root[j]!) * fourthRoot[i * n + j]!;
          sum += x[j]! * term * term * share[i * n + j]!;
        }
        value += (x[i]! * mu[i]!) / sum;
      }
      return { value, rule: 'wilke' };
    },
    liquid_Pa_s(T, x) {
      const mu = values('viscosityL', T, x);
      if (!mu) return undefined;
      let ln = 0;
      for (let i = 0; i < mu.length; i++) if (x[i] !== 0) ln += x[i]! * Math.log(mu[i]!);
      return { value: Math.exp(ln), rule: 'log-average' };
    },
  };
}

/** What of Wilke's rule depends on the molar masses alone, at [i * n + j]. */
function wilkeTerms(M: readonly number[]): { fourthRoot: Float64Array; share: Float64Array } {
  const n = M.length;
  const fourthRoot = new Float64Array(n * n);
  const share = new Float64Array(n * n);
  for (let i = 0; i < n; i++)
    for (let j = 0; j < n; j++) {
      fourthRoot[i * n + j] = (M[j]! / M[i]!) ** 0.25;
      share[i * n + j] = 1 / Math.sqrt(8 * (1 + M[i]! / M[j]!));
    }
  return { fourthRoot, share };
}

/** Cp/Cv of a phase [-] evaluated at level 2; undefined for a liquid of a model in which liquids have no volume. */
export function heatCapacityRatio(props: PhaseProps): number | undefined {
  const { cp_J_molK: cp, cv_J_molK: cv } = props;
  return cv !== undefined && cv > 0 && Number.isFinite(cp) ? cp / cv : undefined;
}
