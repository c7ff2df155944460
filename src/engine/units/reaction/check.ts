import { molarMass_g_mol } from '../../chemicals/elements';
import type { ChemicalData } from '../../chemicals/types';
import { type Finding, type FindingCode, named, saw } from '../../outcome';
import type { Call } from '../types';

/** Molar mass and formula of a chemical that reacts agree within this [-]: mass would not close otherwise. */
const SAME_MASS = 1e-10;

/**
 * Why a chemical cannot take part in a reaction: no formula, no enthalpy of formation, or a molar mass that is not that of its
 * atoms to 1e-10, so that mass would not close. Undefined when it can.
 */
export function whyNotReacting(call: Pick<Call<unknown>, 'unit'>, c: ChemicalData): Finding | undefined {
  const because = (code: FindingCode, ...more: Finding['evidence']): Finding => ({
    code,
    weight: 'beyond-limit',
    at: { unit: call.unit, chemical: c.id },
    evidence: [named('chemical', c.id), ...more],
  });
  if (!c.elements) return because('reaction/no-formula');
  if (c.Hf_J_mol === undefined) return because('reaction/no-formation-enthalpy');
  const byFormula = molarMass_g_mol(c.elements);
  if (byFormula === undefined) return because('reaction/no-formula');
  if (Math.abs(byFormula / c.MW_g_mol - 1) > SAME_MASS)
    return because(
      'reaction/molar-mass',
      saw('given', c.MW_g_mol * 1e-3, 'molarMass'),
      named('byFormula', `${Number(byFormula.toPrecision(12))}`),
    );
  return undefined;
}
