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

/** Chemicals without a liquid at 15 degC count for nothing as long as each is less of the stream's mass than this. */
const TRACE = 1e-6;

/** A volume flow [m3/s], or the chemicals, by place in the full list, for which there is none. */
export type StandardLiquid = { readonly m3_s: number } | { readonly lacking: readonly number[] };

/**
 * Volume flow as liquid at 15 degC and 101325 Pa by ideal mixing of pure liquids [m3/s]; a chemical that boils below 15 degC
 * counts with its saturated liquid. One without a liquid density at 15 degC (above its critical temperature, or that is not
 * known) is left out where it is less than 1e-6 of the stream's mass: its own volume, were there one, would move the answer
 * by a few millionths (hydrogen: by 1e-5). Where one is more than that, there is no answer: all of those are named.
 */
export function standardLiquid(n_mol_s: Float64Array, model: Model): StandardLiquid {
  const v = pureVolumes(model);
  const mass = model.chemicals.map(({ MW_g_mol }, i) => n_mol_s[i]! * MW_g_mol);
  const least = TRACE * mass.reduce((sum, m) => sum + m, 0);
  const lacking: number[] = [];
  let m3_s = 0;
  for (let i = 0; i < n_mol_s.length; i++) {
    if (n_mol_s[i] === 0) continue;
    if (Number.isFinite(v[i])) m3_s += n_mol_s[i]! * v[i]!;
    else if (mass[i]! >= least) lacking.push(i);
  }
  return lacking.length > 0 ? { lacking } : { m3_s };
}
