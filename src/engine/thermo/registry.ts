import type { ChemicalData } from '../chemicals/types';
import { missingConstants } from './peng-robinson/constants';
import { PengRobinson } from './peng-robinson/model';
import type { ModelSpec, ThermoModel } from './types';

interface ModelKind {
  make(spec: ModelSpec, chemicals: readonly ChemicalData[]): ThermoModel;
  /** Data by name that a chemical lacks for this model; empty when it can be used. */
  missing(chem: ChemicalData): readonly string[];
}

const without = (chem: ChemicalData, of: 'ideal_gas_cp' | 'vapor_pressure'): string[] =>
  (chem.corr[of] ?? []).length > 0 ? [] : [of];

/** One line a thermodynamic model. */
export const MODELS: Readonly<Record<ModelSpec['kind'], ModelKind>> = {
  'peng-robinson': {
    make: (spec, chemicals) => new PengRobinson(spec, chemicals),
    missing: (chem) => [...missingConstants(chem), ...without(chem, 'ideal_gas_cp')],
  },
  raoult: {
    make: () => {
      throw new Error("Raoult's law is not ready");
    },
    missing: (chem) => [...without(chem, 'vapor_pressure'), ...without(chem, 'ideal_gas_cp')],
  },
};
