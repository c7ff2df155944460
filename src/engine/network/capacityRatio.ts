import type { Phase } from '../equilibrium/types';
import { heatCapacityRatio } from '../thermo/transport';
import type { Model, PhaseProps, ThermoModel } from '../thermo/types';
import { presentOf } from '../units/present';

/** Scratch by model: what an evaluation writes into is large. */
const kept = new WeakMap<ThermoModel, PhaseProps>();

function propsFor(thermo: ThermoModel): PhaseProps {
  const known = kept.get(thermo);
  if (known) return known;
  const made = thermo.makeProps();
  kept.set(thermo, made);
  return made;
}

/** Cp / Cv [-] of a vapour by the sketch's model; undefined for other phases and where the model has none. */
export function capacityRatio(phase: Phase, T_K: number, P_Pa: number, model: Model): number | undefined {
  if (phase.kind !== 'vapour') return undefined;
  const { thermo, x } = presentOf(phase.x, model);
  const props = propsFor(thermo);
  thermo.evaluate('vapour', T_K, P_Pa, x, 2, props);
  return heatCapacityRatio(props);
}
