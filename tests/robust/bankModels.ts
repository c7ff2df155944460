import { bank, loadIndex } from '../../src/data/bank';
import type { ChemicalData } from '../../src/engine/chemicals/types';
import { makeModel, missingForModel } from '../../src/engine/thermo/model';
import type { Model, ModelSpec } from '../../src/engine/thermo/types';

/** A model over bank chemicals with the bank's pairs and otherwise the defaults. */
export async function bankModel(
  ids: readonly string[],
  kind: ModelSpec['kind'] = 'peng-robinson',
  changes: Partial<ModelSpec> = {},
): Promise<Model> {
  const found = await bank.chemicals(ids);
  const chemicals = ids.map((id) => {
    const chemical = found.get(id);
    if (chemical === undefined) throw new Error(`no chemical "${id}" in the bank`);
    return chemical;
  });
  const pairs = kind === 'raoult' ? [] : await bank.pairsFor(chemicals, { bankPairs: true, pairs: [] });
  return makeModel(
    {
      kind,
      alpha: '1976',
      liquidH: 'psat-slope',
      liquidVolume: 'corrected',
      poynting: false,
      pairs,
      ...changes,
    },
    chemicals,
  );
}

/** Every chemical of the bank that a model can use. */
export async function usable(kind: ModelSpec['kind']): Promise<readonly ChemicalData[]> {
  const all = await bank.chemicals(loadIndex().map((entry) => entry.id));
  return [...all.values()].filter(
    (chemical) => missingForModel({ kind, liquidH: 'psat-slope' }, chemical).length === 0,
  );
}
