import type { ThermoModel } from '../thermo/types';

/** ln of the activity coefficient at infinite dilution from which two liquids may part (2 in a regular solution). */
export const LN_GAMMA_APART = 0.8;
/** Coldest temperature that candidates are kept for [K]. */
const COLD_K = 60;
const T_K = 298.15;
/** High enough for every chemical to be as dense as a liquid. */
const P_Pa = 5e7;

/** Chemicals of a model that matter for a second liquid, found once a model. */
export interface Candidates {
  /** Indices into the model's chemicals, ascending. */
  readonly formers: Int32Array;
  /** T ln gamma at infinite dilution, the largest found [K], in the order of `formers`. */
  readonly heat_K: Float64Array;
  /** By the start values of K at 298 K. */
  readonly lightest: number;
  readonly heaviest: number;
}

/** ln gamma of chemical i at infinite dilution in liquid j at [j * n + i], at a high pressure. */
export function lnGammasApart(model: ThermoModel, T_K: number): Float64Array {
  const { n } = model;
  const props = model.makeProps();
  const x = new Float64Array(n);
  const found = new Float64Array(n * n);
  for (let j = 0; j < n; j++) {
    x.fill(0);
    x[j] = 1;
    model.evaluate('liquid', T_K, P_Pa, x, 0, props);
    found.set(props.lnPhi, j * n);
  }
  // ln gamma of i in j: ln phi of i there less that of pure i.
  const pure = Float64Array.from({ length: n }, (_, i) => found[i * n + i]!);
  for (let k = 0; k < n * n; k++) found[k] = found[k]! - pure[k % n]!;
  return found;
}

/**
 * Which pure liquids a stability test starts from when a second liquid may hide.
 *
 * A regular solution parts once ln gamma at infinite dilution passes 2, and ln gamma grows as 1/T: a chemical is a
 * candidate where its largest ln gamma in another one, or of another one in it, passes 0.8 (water with organics; not
 * the neighbours in a homologous series). An ideal liquid gives none.
 */
export function liquidFormers(model: ThermoModel): Candidates {
  const { n } = model;
  const K = new Float64Array(n);
  model.startK(T_K, 1e5, K);
  let lightest = 0;
  let heaviest = 0;
  for (let i = 1; i < n; i++) {
    if (K[i]! > K[lightest]!) lightest = i;
    if (K[i]! < K[heaviest]!) heaviest = i;
  }
  if (n === 1 || model.spec.kind === 'raoult')
    return { formers: new Int32Array(0), heat_K: new Float64Array(0), lightest, heaviest };

  const apart = lnGammasApart(model, T_K);
  const heat = new Float64Array(n);
  for (let j = 0; j < n; j++) {
    for (let i = 0; i < n; i++) {
      const found = T_K * apart[j * n + i]!;
      if (found > heat[i]!) heat[i] = found;
      if (found > heat[j]!) heat[j] = found;
    }
  }
  const formers = Int32Array.from(
    Array.from(heat, (_, i) => i).filter((i) => heat[i]! > LN_GAMMA_APART * COLD_K),
  );
  return { formers, heat_K: Float64Array.from(formers, (i) => heat[i]!), lightest, heaviest };
}
