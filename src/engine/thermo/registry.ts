import type { ChemicalData } from '../chemicals/types';
import { PengRobinson } from './peng-robinson/model';
import { Raoult } from './raoult/model';
import type { ModelSpec, ThermoModel } from './types';

interface ModelKind {
  make(spec: ModelSpec, chemicals: readonly ChemicalData[]): ThermoModel;
}

/** One line a thermodynamic model; what it needs of a chemical stands in missing.ts, which makes no model. */
export const MODELS: Readonly<Record<ModelSpec['kind'], ModelKind>> = {
  'peng-robinson': { make: (spec, chemicals) => new PengRobinson(spec, chemicals) },
  raoult: { make: (spec, chemicals) => new Raoult(spec, chemicals) },
};
