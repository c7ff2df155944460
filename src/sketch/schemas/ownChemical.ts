import type { CorrForm } from '../../engine/chemicals/types';
import { FEWEST, FORMS_OF } from '../file/ownChemical';
import type { Schema } from './types';
import { when } from './when';

const positive: Schema = { type: 'number', exclusiveMinimum: 0 };
const text: Schema = { type: 'string' };

/** Coefficients by form: as many as the form cannot do without. */
function correlation(forms: readonly CorrForm[]): Schema {
  return {
    type: 'object',
    required: ['form'],
    properties: {
      form: { enum: forms },
      Tmin: { ...positive, description: 'K' },
      Tmax: { ...positive, description: 'K' },
      c: { type: 'array', items: { type: 'number' } },
      of: { enum: ['Cp', 'Cp/R'] },
      log: { enum: ['10', 'e'] },
      P: { enum: ['Pa', 'kPa', 'bar', 'mmHg'] },
      T: { enum: ['K', 'degC'] },
    },
    allOf: forms
      .filter((form) => FEWEST[form] > 0)
      .map((form) =>
        when('form', form, {
          required: form === 'antoine' ? ['c', 'log', 'P', 'T'] : ['c'],
          properties: { c: { minItems: FEWEST[form] } },
        }),
      ),
  };
}

const groups: Schema = { type: 'object', additionalProperties: positive };

/** A chemical the user brings. */
export const OWN_CHEMICAL: Schema = {
  type: 'object',
  required: ['name', 'MW', 'Cp'],
  properties: {
    name: { ...text, minLength: 1 },
    cas: text,
    formula: text,
    MW: { ...positive, description: 'g/mol' },
    Tc: { ...positive, description: 'K' },
    Pc: { ...positive, description: 'Pa' },
    omega: { type: 'number' },
    Hf: { type: 'number', description: 'J/mol, ideal gas, 298.15 K' },
    S0: { ...positive, description: 'J/(mol K), ideal gas, 298.15 K, 1 bar' },
    ...Object.fromEntries(
      Object.entries(FORMS_OF).map(([key, forms]): [string, Schema] => [
        key,
        { type: 'array', minItems: 1, items: correlation(forms) },
      ]),
    ),
    groups: { type: 'object', properties: { unifac: groups, dortmund: groups, ppr78: groups } },
    vWilson: positive,
    r: positive,
    q: positive,
  },
};
