import type { Model } from '../thermo/types';

const STANDARD_K = 288.15;
const STANDARD_PA = 101325;
const ONE = Float64Array.of(1);

/** Pure liquids' volumes at 15 degC by model, computed when first asked for; NaN where there is no liquid. */
const kept = new WeakMap<Model, Float64Array>();

function pureVolumes(model: Model): Float64Array {
  const known = kept.get(model);
  if (known) return known;
  const v = Float64Array.from(model.chemicals, ({ Tc_K }, i) =>
    Tc_K === undefined || Tc_K <= STANDARD_K
      ? Number.NaN
      : model.of([i]).liquidVolume_m3_mol(STANDARD_K, STANDARD_PA, ONE),
  );
  kept.set(model, v);
  return v;
}

/** Chemicals without a liquid at 15 degC count for nothing as long as they are less of the stream than this, by mole. */
const TRACE = 1e-6;

/**
 * Volume flow as liquid at 15 degC and 101325 Pa by ideal mixing of pure liquids [m3/s]; a chemical that boils below 15 degC
 * counts with its saturated liquid. Undefined when one that flows, however little, is above its critical temperature there.
 */
export function standardLiquid_m3_s(n_mol_s: Float64Array, model: Model): number | undefined {
  const v = pureVolumes(model);
  let [sum, liquid, gas] = [0, 0, 0];
  for (let i = 0; i < n_mol_s.length; i++) {
    if (n_mol_s[i] === 0) continue;
    if (Number.isNaN(v[i])) gas += n_mol_s[i]!;
    else {
      liquid += n_mol_s[i]!;
      sum += n_mol_s[i]! * v[i]!;
    }
  }
  return gas < TRACE * (gas + liquid) || gas === 0 ? sum : undefined;
}
