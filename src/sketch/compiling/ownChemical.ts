import { elementCounts } from '../../engine/chemicals/elements';
import type { ChemicalData, Corr, CorrProperty } from '../../engine/chemicals/types';
import type { Finding, Place } from '../../engine/outcome';
import { corrFault } from '../../engine/thermo/pure/usable';
import { evidence, finding, word } from '../findings';
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

/** Ends of what a constant can be, far beyond any chemical, in the unit of the file, and its dimension. */
const ENDS = {
  MW: { least: 1, most: 1e5, dim: 'molarMass', toSI: 1e-3 },
  Tc: { least: 1, most: 1e4, dim: 'temperature', toSI: 1 },
  Pc: { least: 1e3, most: 1e9, dim: 'pressure', toSI: 1 },
  omega: { least: -1, most: 4, dim: 'number', toSI: 1 },
  Hf: { least: -1e8, most: 1e8, dim: 'molarEnergy', toSI: 1 },
  S0: { least: 0, most: 1e6, dim: 'molarEntropy', toSI: 1 },
} as const;

/** Constants of an own chemical that no chemical can have: they would end as infinities. */
export function ownConstantFaults(own: OwnChemical, at: Place): readonly Finding[] {
  return Object.entries(ENDS).flatMap(([key, { least, most, dim, toSI }]) => {
    const value = own[key as keyof typeof ENDS];
    if (value === undefined || (value >= least && value <= most)) return [];
    const seen = evidence('value', value * toSI, dim);
    const place = { ...at, path: `${at.path}.own.${key}` };
    return value < least
      ? [finding('sketch/below-minimum', 'caution', place, seen, evidence('minimum', least * toSI, dim))]
      : [finding('sketch/above-maximum', 'caution', place, seen, evidence('maximum', most * toSI, dim))];
  });
}

/**
 * Correlations of an own chemical that cannot be used, the first fault of each property, at the place of its row; none for a
 * chemical of the bank. Whatever passes can be evaluated at every temperature.
 */
export function ownFaults(chemical: ChemicalData, at: Place): readonly Finding[] {
  if (!chemical.own) return [];
  return Object.entries(PROPERTY).flatMap(([key, property]) => {
    const rows = chemical.corr[property] ?? [];
    const found = corrFault(property, rows);
    if (!found) return [];
    const { fault, row, T_K } = found;
    return [
      finding(
        'sketch/correlation-not-usable',
        'caution',
        { ...at, path: `${at.path}.own.${key}.${row}` },
        word('chemical', chemical.id),
        word('property', property),
        word('fault', fault),
        word('form', rows[row]?.form ?? ''),
        evidence('row', row + 1),
        evidence('rows', rows.length),
        ...(T_K === undefined ? [] : [evidence('temperature', T_K, 'temperature')]),
      ),
    ];
  });
}
