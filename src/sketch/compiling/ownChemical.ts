import { elementCounts } from '../../engine/chemicals/elements';
import type { ChemicalData, Corr, CorrProperty } from '../../engine/chemicals/types';
import type { OwnChemical } from '../types';

const SOURCE = 'given in the sketch';

const PROPERTY: Readonly<Record<'Cp' | 'Psat' | 'Hvap' | 'rhoL' | 'cpL', CorrProperty>> = {
  Cp: 'ideal_gas_cp',
  Psat: 'vapor_pressure',
  Hvap: 'enthalpy_of_vaporization',
  rhoL: 'liquid_density',
  cpL: 'liquid_cp',
};

const made = new WeakMap<OwnChemical, Map<string, ChemicalData>>();

/** A chemical that the user brought, as the engine reads it. The same record gives the same object. */
export function ownChemicalData(id: string, own: OwnChemical): ChemicalData {
  const known = made.get(own) ?? new Map<string, ChemicalData>();
  made.set(own, known);
  const before = known.get(id);
  if (before) return before;
  const elements = own.formula === undefined ? undefined : elementCounts(own.formula);
  const corr: Partial<Record<CorrProperty, readonly Corr[]>> = {};
  for (const [key, property] of Object.entries(PROPERTY)) {
    const rows = own[key as keyof typeof PROPERTY];
    // A monatomic gas has no coefficients to give.
    if (rows) corr[property] = rows.map((row) => ({ ...row, c: row.c ?? [], source: row.source ?? SOURCE }));
  }
  const constants = {
    ...(own.Tc === undefined ? {} : { Tc_K: own.Tc }),
    ...(own.Pc === undefined ? {} : { Pc_Pa: own.Pc }),
    ...(own.omega === undefined ? {} : { omega: own.omega }),
    ...(own.Hf === undefined ? {} : { Hf_J_mol: own.Hf }),
    ...(own.S0 === undefined ? {} : { S0_J_molK: own.S0 }),
  };
  const data: ChemicalData = {
    id,
    name: own.name,
    ...(own.cas === undefined ? {} : { cas: own.cas }),
    ...(own.formula === undefined ? {} : { formula: own.formula }),
    MW_g_mol: own.MW,
    ...constants,
    ...(elements === undefined ? {} : { elements }),
    ...(own.groups?.ppr78 === undefined ? {} : { ppr78: own.groups.ppr78 }),
    corr,
    sources: Object.fromEntries(['MW_g_mol', ...Object.keys(constants)].map((key) => [key, SOURCE])),
    own: true,
  };
  known.set(id, data);
  return data;
}
