import type { ChemicalData, CorrProperty } from '../../chemicals/types';
import type { ModelSpec } from '../types';

/** Names of the critical constants that corresponding states need and the chemical lacks. */
export const missingCritical = (chem: ChemicalData): readonly ('Tc_K' | 'Pc_Pa' | 'omega')[] =>
  (['Tc_K', 'Pc_Pa', 'omega'] as const).filter((name) => chem[name] === undefined);

const without = (chem: ChemicalData, ...names: readonly CorrProperty[]): readonly CorrProperty[] =>
  names.filter((of) => (chem.corr[of] ?? []).length === 0);

/** What each thermodynamic model cannot do without. */
const MISSING: Readonly<
  Record<ModelSpec['kind'], (spec: Pick<ModelSpec, 'liquidH'>, chem: ChemicalData) => readonly string[]>
> = {
  'peng-robinson': (_, chem) => [...missingCritical(chem), ...without(chem, 'ideal_gas_cp')],
  raoult: ({ liquidH }, chem) => [
    ...without(chem, 'vapor_pressure', 'ideal_gas_cp'),
    ...(liquidH === 'hvap' ? without(chem, 'enthalpy_of_vaporization') : []),
  ],
};

/** Data by field or correlation name that the model needs of a chemical and that it lacks; empty when it can be used. */
export const missingForModel = (
  spec: Pick<ModelSpec, 'kind' | 'liquidH'>,
  chem: ChemicalData,
): readonly string[] => MISSING[spec.kind](spec, chem);
