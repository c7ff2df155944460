import type { IdealGases } from './pure/ideal';
import { P0_Pa, type PhaseProps, R_J_molK } from './types';

/**
 * What the properties of one phase have in common over all models: the vectors, the ideal-gas part, and an entropy
 * that is finished when it is read, from a copy of x: it costs n logarithms that most solvers never need.
 * What depends on T alone is kept with the T it belongs to, so that a phase evaluated again at the same temperature
 * does not pay for it twice; the numbers are the same either way.
 */
export class BaseProps implements PhaseProps {
  readonly lnPhi: Float64Array;
  readonly dT: Float64Array;
  readonly dP: Float64Array;
  readonly dN: Float64Array;
  readonly hPartial: Float64Array;
  h_J_mol = 0;
  v_m3_mol = 0;
  cp_J_molK = 0;
  cv_J_molK: number | undefined = undefined;
  Z = 0;
  side: 'vapour' | 'liquid' = 'vapour';
  single = true;

  readonly hIdeal: Float64Array;
  readonly cpIdeal: Float64Array;
  /** T [K] to which hIdeal and cpIdeal belong; 0: none yet. */
  private idealT = 0;
  private readonly x: Float64Array;
  private atT = 0;
  private atP = 0;
  private sResidual = 0;

  constructor(
    readonly owner: object,
    private readonly ideal: IdealGases,
  ) {
    const { n } = ideal;
    const vector = (): Float64Array => new Float64Array(n);
    this.lnPhi = vector();
    this.dT = vector();
    this.dP = vector();
    this.dN = new Float64Array(n * n);
    this.hPartial = vector();
    this.hIdeal = vector();
    this.cpIdeal = vector();
    this.x = vector();
  }

  get s_J_molK(): number {
    let sum = 0;
    for (let i = 0; i < this.x.length; i++) {
      const x = this.x[i]!;
      if (x > 0) sum += x * (this.ideal.s(i, this.atT) - R_J_molK * Math.log(x));
    }
    return sum - R_J_molK * Math.log(this.atP / P0_Pa) + this.sResidual;
  }

  /** Brings hIdeal and cpIdeal to T. */
  idealAt(T: number): void {
    if (this.idealT === T) return;
    this.ideal.caloric(T, this.hIdeal, this.cpIdeal);
    this.idealT = T;
  }

  /** @param sResidual  what the phase has above the ideal gas mixture at the same T, P, x [J/(mol K)] */
  keepForEntropy(T: number, P: number, x: Float64Array, sResidual: number): void {
    this.x.set(x);
    this.atT = T;
    this.atP = P;
    this.sResidual = sResidual;
  }
}
