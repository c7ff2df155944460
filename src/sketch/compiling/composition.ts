import type { CompositionSI } from '../../engine/units/types';
import { evidence, finding, word } from '../findings';
import { isObject, type JsonObject, own } from '../json';
import type { Json } from '../types';
import { AIR_OF, isPreset } from './air';
import { isGiven, readBasis, readQuantity } from './quantity';
import { GAP, gap, type Scope, under } from './scope';

/** Parts whose sum is off by no more than this are brought to 1, with a note. */
export const NORMALISED_WITHIN = 5e-4;
/** Parts whose sum is off by no more than this are asked about; beyond it they are refused. */
export const ASKED_WITHIN = 0.02;
/** Rounding of the sum itself; nothing to tell. */
const ROUNDING = 1e-9;

const FORMS: readonly (readonly string[])[] = [['basis', 'parts'], ['flows'], ['preset', 'relativeHumidity']];

/** A composition: fractions, component flows, or ready-made air. */
export function readComposition(value: Json, path: string, scope: Scope): CompositionSI | typeof GAP {
  if (!isObject(value)) return gap(scope, 'sketch/wrong-type', path, word('wanted', 'composition'));
  const given = Object.keys(value).filter((key) => isGiven(own(value, key)));
  const form = FORMS.find((keys) => keys.some((key) => given.includes(key)));
  const ways = word('known', 'parts, flows, preset');
  if (!form) {
    const unknown = given.map((key) => gap(scope, 'sketch/unknown-setting', under(path, key), ways));
    return unknown.length > 0 ? GAP : gap(scope, 'sketch/needs-value', path, ways);
  }
  const strange = given.filter((key) => !form.includes(key));
  for (const key of strange) {
    const code = FORMS.some((keys) => keys.includes(key)) ? 'sketch/not-together' : 'sketch/unknown-setting';
    gap(scope, code, under(path, key), word('known', form.join(', ')));
  }
  if (strange.length > 0) return GAP;
  if (form.includes('parts')) return readParts(value, path, scope);
  return form.includes('flows')
    ? readFlows(own(value, 'flows') as Json, under(path, 'flows'), scope)
    : readPreset(value, path, scope);
}

function readParts(value: JsonObject, path: string, scope: Scope): CompositionSI | typeof GAP {
  const typed = own(value, 'basis');
  if (!isGiven(typed))
    return gap(scope, 'sketch/needs-value', under(path, 'basis'), word('known', 'mole, mass'));
  const basis = readBasis(typed, under(path, 'basis'), scope);
  if (basis === GAP) return GAP;
  const at = under(path, 'parts');
  const parts = readEach(own(value, 'parts'), at, scope, (v, p, k, out) => {
    const part = readQuantity(v, ['fraction'], p, scope);
    if (part === GAP) return false;
    if (part.si < 0) {
      gap(scope, 'sketch/negative-part', p, evidence('part', part.si, 'fraction'));
      return false;
    }
    out[k] = part.si;
    return true;
  });
  if (parts === GAP) return GAP;
  let sum = 0;
  for (const part of parts) sum += part;
  const off = Math.abs(sum - 1);
  // Sums are compared as they are written: 1.02 is within 2 % although its double is not.
  const within = (limit: number): boolean => off <= limit + ROUNDING;
  if (!within(NORMALISED_WITHIN))
    return gap(
      scope,
      within(ASKED_WITHIN) ? 'sketch/parts-sum-near' : 'sketch/parts-sum',
      at,
      evidence('sum', sum, 'fraction'),
    );
  if (off > ROUNDING)
    scope.notes.push(
      finding(
        'sketch/parts-normalised',
        'note',
        { unit: scope.unit, path: at },
        evidence('sum', sum, 'fraction'),
      ),
    );
  for (let k = 0; k < parts.length; k += 1) parts[k] = parts[k]! / sum;
  return { is: 'parts', basis, parts };
}

function readFlows(value: Json, path: string, scope: Scope): CompositionSI | typeof GAP {
  const n_mol_s = readEach(value, path, scope, (v, p, k, out) => {
    const flow = readQuantity(v, ['molarFlow', 'massFlow'], p, scope, { min: 0 });
    if (flow === GAP) return false;
    const MW = scope.MW_g_mol[k];
    if (flow.dim === 'molarFlow') out[k] = flow.si;
    else if (MW !== undefined) out[k] = flow.si / (MW / 1000);
    else {
      gap(scope, 'sketch/chemical-not-in-bank', p);
      return false;
    }
    return true;
  });
  return n_mol_s === GAP ? GAP : { is: 'flows', n_mol_s };
}

/** One number per chemical named; chemicals that are not named are absent, exactly zero. */
function readEach(
  value: Json | undefined,
  path: string,
  scope: Scope,
  read: (value: Json, path: string, index: number, out: Float64Array) => boolean,
): Float64Array | typeof GAP {
  if (!isGiven(value)) return gap(scope, 'sketch/needs-value', path);
  if (!isObject(value)) return gap(scope, 'sketch/wrong-type', path, word('wanted', 'object'));
  const out = new Float64Array(scope.MW_g_mol.length);
  let given = 0;
  let broken = false;
  for (const [id, v] of Object.entries(value)) {
    if (!isGiven(v)) continue;
    given += 1;
    const index = scope.indexOf.get(id);
    if (index === undefined) gap(scope, 'sketch/unknown-chemical', under(path, id), word('chemical', id));
    if (index === undefined || !read(v, under(path, id), index, out)) broken = true;
  }
  if (given === 0) return gap(scope, 'sketch/needs-value', path);
  return broken ? GAP : out;
}

function readPreset(value: JsonObject, path: string, scope: Scope): CompositionSI | typeof GAP {
  const preset = own(value, 'preset');
  const humidity = own(value, 'relativeHumidity');
  const [presetAt, humidityAt] = [under(path, 'preset'), under(path, 'relativeHumidity')];
  if (!isGiven(preset)) return gap(scope, 'sketch/needs-value', presetAt);
  const known = word('known', Object.keys(AIR_OF).join(', '));
  if (!isPreset(preset))
    return gap(scope, 'sketch/unknown-option', presetAt, word('typed', String(preset)), known);
  for (const key of AIR_OF[preset])
    if (scope.air[key] < 0) return gap(scope, 'sketch/unknown-chemical', presetAt, word('chemical', key));
  const made = (relativeHumidity: number): CompositionSI => ({
    is: 'preset',
    preset,
    relativeHumidity,
    at: scope.air,
  });
  if (preset !== 'humid air')
    return isGiven(humidity)
      ? gap(scope, 'sketch/without-meaning', humidityAt, word('beside', preset))
      : made(0);
  if (!isGiven(humidity)) return gap(scope, 'sketch/needs-value', humidityAt);
  const read = readQuantity(humidity, ['fraction'], humidityAt, scope, { min: 0, max: 1 });
  return read === GAP ? GAP : made(read.si);
}
