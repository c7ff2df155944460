import type { Model, ThermoModel } from '../thermo/types';

/** The chemicals that a vector over the full list holds: their model, their entries, their places. */
export function presentOf(
  full: Float64Array,
  model: Model,
): { thermo: ThermoModel; x: Float64Array; at: number[] } {
  const at: number[] = [];
  for (let i = 0; i < full.length; i++) if (full[i]! > 0) at.push(i);
  return { thermo: model.of(at), x: Float64Array.from(at, (i) => full[i]!), at };
}
