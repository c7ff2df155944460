import type { ThermoModel } from '../thermo/types';

/** ln of the activity coefficient at infinite dilution from which two liquids may part, also when cold. */
const LN_GAMMA_APART = 1;
const T_K = 298.15;
/** High enough for every chemical to be as dense as a liquid. */
const P_Pa = 5e7;

export interface Candidates {
  /** Indices into the model's chemicals, ascending. */
  readonly formers: Int32Array;
  /** By the start values of K at 298 K. */
  readonly lightest: number;
  readonly heaviest: number;
}

/**
 * Which pure liquids a stability test starts from when a second liquid may hide.
 *
 * A regular solution parts once ln gamma at infinite dilution passes 2, and it grows as 1/T; so every chemical with a
 * value above 1 in another one at 298 K, and that other one, is a candidate (water with organics; not the members of
 * one homologous series), besides the lightest and the heaviest. An ideal liquid (Raoult) gives none.
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
  if (n === 1 || model.spec.kind === 'raoult') return { formers: new Int32Array(0), lightest, heaviest };

  const props = model.makeProps();
  const x = new Float64Array(n);
  /** ln phi of i in pure j at [j * n + i]. */
  const lnPhi = new Float64Array(n * n);
  for (let j = 0; j < n; j++) {
    x.fill(0);
    x[j] = 1;
    model.evaluate('liquid', T_K, P_Pa, x, 0, props);
    lnPhi.set(props.lnPhi, j * n);
  }
  const found = new Set<number>([lightest, heaviest]);
  for (let j = 0; j < n; j++) {
    for (let i = 0; i < n; i++) {
      if (lnPhi[j * n + i]! - lnPhi[i * n + i]! < LN_GAMMA_APART) continue;
      found.add(i);
      found.add(j);
    }
  }
  return { formers: Int32Array.from([...found].sort((a, b) => a - b)), lightest, heaviest };
}
