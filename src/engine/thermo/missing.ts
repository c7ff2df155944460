import type { ChemicalData } from '../chemicals/types';

/** Names of the critical constants that corresponding states need and the chemical lacks. */
export const missingCritical = (chem: ChemicalData): readonly ('Tc_K' | 'Pc_Pa' | 'omega')[] =>
  (['Tc_K', 'Pc_Pa', 'omega'] as const).filter((name) => chem[name] === undefined);
