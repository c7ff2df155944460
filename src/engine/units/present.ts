import type { Evidence } from '../outcome';
import type { Model, ThermoModel } from '../thermo/types';

/** Places of the entries above zero of a vector over the full list, ascending: of the chemicals that are there. */
export function placesOf(full: Float64Array): number[] {
  const at: number[] = [];
  for (let i = 0; i < full.length; i++) if (full[i]! > 0) at.push(i);
  return at;
}

/**
 * The chemicals that a vector over the full list holds: their model, their entries as they stand (not scaled to sum 1), their
 * places.
 */
export function presentOf(
  full: Float64Array,
  model: Model,
): { thermo: ThermoModel; x: Float64Array; at: number[] } {
  const at = placesOf(full);
  const x = new Float64Array(at.length);
  for (let k = 0; k < x.length; k++) x[k] = full[at[k]!]!;
  return { thermo: model.of(at), x, at };
}

/** The chemical of the largest mole fraction, for a sentence's slot: its id and the fraction. x over the full list. */
export function richestOf(x: Float64Array, model: Model): Evidence {
  let most = 0;
  for (let i = 1; i < x.length; i++) if (x[i]! > x[most]!) most = i;
  return { name: 'chemical', value: x[most]!, dim: 'fraction', text: model.chemicals[most]!.id };
}
