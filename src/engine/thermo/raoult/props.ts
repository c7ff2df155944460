import { BaseProps } from '../props';
import type { IdealGases } from '../pure/ideal';

/** Properties and scratch of one evaluation of Raoult's law. */
export class RaoultProps extends BaseProps {
  /** T [K] to which the vectors below belong; 0: none yet. */
  liquidT = 0;
  /** ln Psat_i, its first and second derivative by T. */
  readonly lnPsat: Float64Array;
  readonly slope: Float64Array;
  readonly bend: Float64Array;
  /** Liquid volume of pure i [m3/mol] and its slope. */
  readonly volume: Float64Array;
  readonly dVolume: Float64Array;

  constructor(owner: object, ideal: IdealGases) {
    super(owner, ideal);
    const vector = (): Float64Array => new Float64Array(ideal.n);
    this.lnPsat = vector();
    this.slope = vector();
    this.bend = vector();
    this.volume = vector();
    this.dVolume = vector();
  }
}
