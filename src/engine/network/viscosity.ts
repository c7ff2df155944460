import type { Phase } from '../equilibrium/types';
import { prepareViscosities, type Viscosities } from '../thermo/transport';
import type { Model } from '../thermo/types';

/** Prepared when first asked for. */
const kept = new WeakMap<Model, Viscosities>();

function viscosities(model: Model): Viscosities {
  const known = kept.get(model);
  if (known) return known;
  const made = prepareViscosities(model.chemicals);
  kept.set(model, made);
  return made;
}

/**
 * Viscosity of a phase [Pa s] and the key of the mixture rule behind it; undefined where a chemical has no data, and for dense
 * phases, for which no rule is built.
 */
export function phaseViscosity(
  phase: Phase,
  T_K: number,
  model: Model,
): { readonly viscosity_Pa_s: number; readonly viscosityRule: string } | undefined {
  if (phase.kind === 'dense') return undefined;
  const of = viscosities(model);
  const ruled = phase.kind === 'vapour' ? of.gas_Pa_s(T_K, phase.x) : of.liquid_Pa_s(T_K, phase.x);
  return ruled && { viscosity_Pa_s: ruled.value, viscosityRule: `viscosity/${ruled.rule}` };
}
