import type { CorrForm } from '../../engine/chemicals/types';
import { FEWEST as FEWEST_OF_USE, FORMS } from '../../engine/thermo/pure/usable';
import { evidence, word } from '../findings';
import { isObject, type JsonObject, own } from '../json';
import type { Json } from '../types';
import type { Problems } from './problem';
import * as value from './value';

/**
 * Fewest coefficients that a row of a file may have. Of the NASA form a file may leave out more than makes sense: such files
 * were always opened, and the row is judged when it is used.
 */
export const FEWEST: Readonly<Record<CorrForm, number>> = { ...FEWEST_OF_USE, cp_nasa9: 1 };

/** The forms that can stand for a property, by its key in a file. */
export const FORMS_OF = {
  Cp: [...FORMS.ideal_gas_cp],
  Psat: [...FORMS.vapor_pressure],
  Hvap: [...FORMS.enthalpy_of_vaporization],
  rhoL: [...FORMS.liquid_density],
  cpL: [...FORMS.liquid_cp],
} as const satisfies Record<string, readonly CorrForm[]>;

const POSITIVE = ['MW', 'Tc', 'Pc', 'S0', 'vWilson', 'r', 'q'] as const;

/** Shape of a chemical that the user brings. What a model needs of it is judged where the model is chosen. */
export function checkOwnChemical(raw: JsonObject, path: string, problems: Problems): void {
  value.name(own(raw, 'name'), `${path}.name`, problems);
  value.text(own(raw, 'cas'), `${path}.cas`, problems);
  value.text(own(raw, 'formula'), `${path}.formula`, problems);
  if (own(raw, 'MW') === undefined) problems.add(`${path}.MW`, 'file/missing');
  for (const key of POSITIVE) value.number(own(raw, key), `${path}.${key}`, problems, 0);
  value.number(own(raw, 'omega'), `${path}.omega`, problems, -1);
  value.number(own(raw, 'Hf'), `${path}.Hf`, problems);
  if (own(raw, 'Cp') === undefined) problems.add(`${path}.Cp`, 'file/missing');
  for (const [key, forms] of Object.entries(FORMS_OF)) {
    const rows = own(raw, key);
    if (value.list(rows, `${path}.${key}`, problems)) {
      if (rows.length === 0) problems.add(`${path}.${key}`, 'file/missing');
      rows.forEach((row, k) => {
        checkCorr(row, `${path}.${key}.${k}`, forms, problems);
      });
    }
  }
  const groups = own(raw, 'groups');
  if (value.object(groups, `${path}.groups`, problems)) {
    for (const [method, counts] of Object.entries(groups)) {
      const at = `${path}.groups.${method}`;
      if (value.object(counts, at, problems))
        for (const [group, count] of Object.entries(counts))
          value.number(count, `${at}.${group}`, problems, 0);
    }
  }
}

function checkCorr(row: Json, path: string, forms: readonly CorrForm[], problems: Problems): void {
  if (!isObject(row)) {
    problems.wrongType(path, 'object', row);
    return;
  }
  const form = own(row, 'form');
  if (form === undefined) problems.add(`${path}.form`, 'file/missing');
  if (typeof form !== 'string' || !Object.hasOwn(FEWEST, form)) {
    value.oneOf(form, `${path}.form`, problems, forms);
    return;
  }
  if (!forms.some((f) => f === form))
    problems.add(
      `${path}.form`,
      'file/form-does-not-fit',
      word('found', form),
      word('wanted', forms.join(', ')),
    );
  const c = own(row, 'c');
  const fewest = FEWEST[form as CorrForm];
  if (c === undefined) {
    if (fewest > 0) problems.add(`${path}.c`, 'file/missing');
  } else if (value.list(c, `${path}.c`, problems)) {
    c.forEach((x, k) => {
      value.number(x, `${path}.c.${k}`, problems);
    });
    if (c.length < fewest)
      problems.add(
        `${path}.c`,
        'file/too-few-coefficients',
        evidence('found', c.length),
        evidence('wanted', fewest),
      );
  }
  const [low, high] = [own(row, 'Tmin'), own(row, 'Tmax')];
  value.number(low, `${path}.Tmin`, problems, 0);
  value.number(high, `${path}.Tmax`, problems, typeof low === 'number' ? low : 0);
  if (form === 'powers') value.oneOf(own(row, 'of'), `${path}.of`, problems, ['Cp', 'Cp/R']);
  if (form === 'antoine') {
    const words = { log: ['10', 'e'], P: ['Pa', 'kPa', 'bar', 'mmHg'], T: ['K', 'degC'] };
    for (const [key, wanted] of Object.entries(words)) {
      if (own(row, key) === undefined) problems.add(`${path}.${key}`, 'file/missing');
      value.oneOf(own(row, key), `${path}.${key}`, problems, wanted);
    }
  }
}
