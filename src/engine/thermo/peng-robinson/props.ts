import { BaseProps } from '../props';
import type { IdealGases } from '../pure/ideal';

/** Properties and scratch of one evaluation of a cubic equation of state. */
export class CubicProps extends BaseProps {
  /** T [K] to which root and slope belong; 0: none yet. */
  rootT = 0;
  /** sqrt(a_i) and d sqrt(a_i)/dT. */
  readonly root: Float64Array;
  readonly slope: Float64Array;
  /** x_j sqrt(a_j), x_j d sqrt(a_j)/dT. */
  readonly xRoot: Float64Array;
  readonly xSlope: Float64Array;
  /** Sum_j x_j a_ij, and d of it by T. */
  readonly s: Float64Array;
  readonly ds: Float64Array;
  /** dP/dn_i at constant T, V. */
  readonly p: Float64Array;
  /** b [m3/mol], a [Pa m6/mol2] of the mixture and the first and second derivative of a by T. */
  readonly mixed = { b: 0, a: 0, a1: 0, a2: 0 };
  /** Smallest and largest Z - B. */
  readonly ends = new Float64Array(2);

  constructor(owner: object, ideal: IdealGases) {
    super(owner, ideal);
    const vector = (): Float64Array => new Float64Array(ideal.n);
    this.root = vector();
    this.slope = vector();
    this.xRoot = vector();
    this.xSlope = vector();
    this.s = vector();
    this.ds = vector();
    this.p = vector();
  }
}
