import type { ChemicalData, CorrProperty } from '../chemicals/types';
import { missingCritical } from './missing';
import { PengRobinson } from './peng-robinson/model';
import { Raoult } from './raoult/model';
import type { ModelSpec, ThermoModel } from './types';

interface ModelKind {
  make(spec: ModelSpec, chemicals: readonly ChemicalData[]): ThermoModel;
  /** Data by field or correlation name that a chemical lacks for this model; empty when it can be used. */
  missing(spec: Pick<ModelSpec, 'liquidH'>, chem: ChemicalData): readonly string[];
}

const without = (chem: ChemicalData, ...names: readonly CorrProperty[]): readonly CorrProperty[] =>
  names.filter((of) => (chem.corr[of] ?? []).length === 0);

/** One line a thermodynamic model. */
export const MODELS: Readonly<Record<ModelSpec['kind'], ModelKind>> = {
  'peng-robinson': {
    make: (spec, chemicals) => new PengRobinson(spec, chemicals),
    missing: (_, chem) => [...missingCritical(chem), ...without(chem, 'ideal_gas_cp')],
  },
  raoult: {
    make: (spec, chemicals) => new Raoult(spec, chemicals),
    missing: ({ liquidH }, chem) => [
      ...without(chem, 'vapor_pressure', 'ideal_gas_cp'),
      ...(liquidH === 'hvap' ? without(chem, 'enthalpy_of_vaporization') : []),
    ],
  },
};
