import { useMemo } from 'react';
import type { ChemId } from '../engine/ids';
import type { SketchChemical } from '../sketch/types';
import { type BankEntry, useBank } from '../store/bank';
import { useCompiled, useSketch } from '../store/react';

export interface NamedChemical {
  readonly id: ChemId;
  readonly name: string;
  readonly formula?: string;
  readonly cas?: string;
  readonly MW_g_mol?: number;
  readonly own: boolean;
  /** A unit needs it and the sketch does not list it. */
  readonly assumed?: boolean;
}

function named(chemical: SketchChemical, index: ReadonlyMap<string, BankEntry>): NamedChemical {
  if (typeof chemical !== 'string') {
    const { name, formula, cas, MW } = chemical.own;
    return {
      id: chemical.id,
      name,
      ...(formula === undefined ? {} : { formula }),
      ...(cas === undefined ? {} : { cas }),
      MW_g_mol: MW,
      own: true,
    };
  }
  const entry = index.get(chemical);
  return { ...(entry ?? { name: chemical }), id: chemical as ChemId, own: false };
}

/** The sketch's chemicals in its order, with their names. */
export function useChemicals(): readonly NamedChemical[] {
  const chemicals = useSketch((state) => state.sketch.chemicals);
  const { index } = useBank();
  const basis = useCompiled((state) => state.basis);
  return useMemo(() => {
    const entries = new Map<string, BankEntry>(index.map((entry) => [entry.id, entry]));
    for (const chemical of basis?.chemicals ?? [])
      if (!entries.has(chemical.id)) entries.set(chemical.id, chemical);
    return chemicals.map((chemical) => named(chemical, entries));
  }, [chemicals, index, basis]);
}

/** The chemicals that results are lists over: the sketch's, then those that units brought in. */
export function useSolvedChemicals(): readonly NamedChemical[] {
  const basis = useCompiled((state) => state.basis);
  const listed = useChemicals();
  return useMemo(
    () =>
      basis
        ? basis.chemicals.map((chemical) => {
            const known = listed.find(({ id }) => id === chemical.id);
            return (
              known ?? {
                id: chemical.id as ChemId,
                name: chemical.name,
                MW_g_mol: chemical.MW_g_mol,
                own: chemical.own === true,
                assumed: chemical.assumed === true,
              }
            );
          })
        : listed,
    [basis, listed],
  );
}
