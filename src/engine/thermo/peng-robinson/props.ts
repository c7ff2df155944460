import type { IdealGases } from '../pure/ideal';
import { P0_Pa, type PhaseProps, R_J_molK } from '../types';

/**
 * Properties and scratch of one evaluation. What depends on T alone is kept with the T it belongs to, so that phases
 * evaluated again at the same temperature do not pay for it twice; the numbers are the same either way.
 * The entropy is finished when it is read (n logarithms that most solvers never need), from a copy of x.
 */
export class CubicProps implements PhaseProps {
  readonly lnPhi: Float64Array;
  readonly dT: Float64Array;
  readonly dP: Float64Array;
  readonly dN: Float64Array;
  h_J_mol = 0;
  v_m3_mol = 0;
  cp_J_molK = 0;
  Z = 0;
  side: 'vapour' | 'liquid' = 'vapour';
  single = true;

  /** T [K] to which root and slope belong; 0: none yet. */
  rootT = 0;
  /** T [K] to which hIdeal and cpIdeal belong; 0: none yet. */
  idealT = 0;
  /** sqrt(a_i) and d sqrt(a_i)/dT. */
  readonly root: Float64Array;
  readonly slope: Float64Array;
  readonly hIdeal: Float64Array;
  readonly cpIdeal: Float64Array;
  /** x_j sqrt(a_j), x_j d sqrt(a_j)/dT. */
  readonly xRoot: Float64Array;
  readonly xSlope: Float64Array;
  /** Sum_j x_j a_ij, and d of it by T. */
  readonly s: Float64Array;
  readonly ds: Float64Array;
  /** dP/dn_i at constant T, V. */
  readonly p: Float64Array;
  /** Smallest and largest Z - B. */
  readonly ends = new Float64Array(2);

  /** What the entropy is finished from. */
  readonly x: Float64Array;
  atT = 0;
  atP = 0;
  sResidual = 0;

  constructor(
    readonly owner: object,
    private readonly ideal: IdealGases,
    n: number,
  ) {
    const vector = (): Float64Array => new Float64Array(n);
    this.lnPhi = vector();
    this.dT = vector();
    this.dP = vector();
    this.dN = new Float64Array(n * n);
    this.root = vector();
    this.slope = vector();
    this.hIdeal = vector();
    this.cpIdeal = vector();
    this.xRoot = vector();
    this.xSlope = vector();
    this.s = vector();
    this.ds = vector();
    this.p = vector();
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
}
