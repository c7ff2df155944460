import type { ChemicalData } from '../chemicals/types';
import { MODELS } from './registry';
import type { Model, ModelSpec, ThermoModel } from './types';

export { missingForModel } from './pure/missing';

/**
 * The sketch's thermodynamic model over its full list of chemicals.
 *
 * @param spec       pairs index `chemicals`
 * @param chemicals  full list, each complete for this model (ask missingForModel before: a gap throws when a model
 *                   over it is first asked for)
 */
export function makeModel(spec: ModelSpec, chemicals: readonly ChemicalData[]): Model {
  const made = new Map<string, ThermoModel>();
  return {
    spec,
    chemicals,
    nc: chemicals.length,
    of(present) {
      const key = present.join(' ');
      const known = made.get(key);
      if (known) return known;
      const model = MODELS[spec.kind].make(
        specOf(spec, present),
        present.map((k) => {
          const chem = chemicals[k];
          if (!chem) throw new Error(`no chemical ${k} in a list of ${chemicals.length}`);
          return chem;
        }),
      );
      made.set(key, model);
      return model;
    },
  };
}

/** The same model over some of the chemicals: pairs between two of them, counted anew. */
function specOf(spec: ModelSpec, present: readonly number[]): ModelSpec {
  const place = new Map(present.map((k, at) => [k, at]));
  const pairs = spec.pairs.flatMap((pair) => {
    const i = place.get(pair.i);
    const j = place.get(pair.j);
    return i === undefined || j === undefined ? [] : [{ ...pair, i: Math.min(i, j), j: Math.max(i, j) }];
  });
  return { ...spec, pairs };
}
