import type { Choice, Moot, SettingSpec } from '../../engine/units/types';
import { evidence, finding, word } from '../findings';
import { isObject, type JsonObject, own } from '../json';
import { portSpec } from '../registry';
import type { Json } from '../types';
import { readComposition } from './composition';
import { readFlow } from './flow';
import { isGiven, outside, readQuantity } from './quantity';
import { ABSENT, type AssumptionDraft, GAP, gap, type Scope, under } from './scope';

type Fields = Readonly<Record<string, SettingSpec>>;

/**
 * A unit's settings from what was typed to what the engine reads, by their descriptions alone.
 *
 * Quantities become SI numbers, chemicals indices of the full list, maps over chemicals lists of { chemical, value };
 * everything else keeps its shape. A value that is missing or does not fit leaves a gap at its path.
 * @returns the settings, or GAP when anything is missing
 */
export function readSettings(raw: JsonObject, scope: Scope): JsonObjectSI | typeof GAP {
  const { settings, choose = [], moot = [] } = scope.kind;
  const idle = mootKeys(raw, moot, scope);
  if (idle === GAP) return GAP;
  const chosen = choose.map((choice) => checkChoice(choice, raw, scope));
  const fields = Object.fromEntries(Object.entries(settings).filter(([key]) => !idle.has(key)));
  const read = readFields(fields, raw, '', scope, Object.keys(settings));
  if (read === GAP || !chosen.every((fine) => fine)) return GAP;
  const missing = scope.kind.missing?.(read, scope.ports) ?? [];
  for (const { code, at, evidence: seen } of missing)
    scope.gaps.push({ code, weight: 'caution', at: { unit: scope.unit, ...at }, evidence: seen });
  return missing.length === 0 ? read : GAP;
}

export type JsonObjectSI = Readonly<Record<string, unknown>>;

/** Keys without meaning beside others: refused when given, left out otherwise. */
function mootKeys(raw: JsonObject, moot: readonly Moot[], scope: Scope): ReadonlySet<string> | typeof GAP {
  const keys = new Set<string>();
  let refused = false;
  for (const { when, key } of moot) {
    if (!when.every((path) => isGiven(at(raw, path)))) continue;
    keys.add(key);
    if (!isGiven(own(raw, key))) continue;
    gap(scope, 'sketch/without-meaning', key, word('beside', when.join(', ')));
    refused = true;
  }
  return refused ? GAP : keys;
}

function at(raw: JsonObject, path: string): Json | undefined {
  let value: Json | undefined = raw;
  for (const key of path.split('.')) value = isObject(value) ? own(value, key) : undefined;
  return value;
}

function checkChoice({ keys, count, pairs = [] }: Choice, raw: JsonObject, scope: Scope, path = ''): boolean {
  const given = keys.filter((key) => isGiven(own(raw, key)));
  return fitsCount(given, keys, [count], pairs, path, scope);
}

/** Whether the right number of keys is given, or one of the pairs. */
function fitsCount(
  given: readonly string[],
  keys: readonly string[],
  counts: readonly number[],
  pairs: readonly (readonly [string, string])[],
  path: string,
  scope: Scope,
): boolean {
  const isPair = given.length === 2 && pairs.some((pair) => pair.every((key) => given.includes(key)));
  if (isPair) return true;
  const [fewest, most] = [Math.min(...counts), Math.max(...counts)];
  const known = word('known', keys.join(', '));
  const wanted = evidence('wanted', fewest);
  if (given.length < fewest)
    gap(scope, 'sketch/needs-one-of', path, known, wanted, word('given', given.join(', ')));
  else if (given.length > most)
    gap(scope, 'sketch/too-many', path, known, evidence('wanted', most), word('given', given.join(', ')));
  else if (given.length === 2 && pairs.length > 0)
    gap(scope, 'sketch/not-together', path, known, word('given', given.join(', ')));
  else return true;
  return false;
}

/** `known`: names that are no mistake although they are not read here. */
function readFields(
  fields: Fields,
  raw: JsonObject,
  path: string,
  scope: Scope,
  known: readonly string[] = Object.keys(fields),
): JsonObjectSI | typeof GAP {
  const out: Record<string, unknown> = {};
  let broken = false;
  for (const key of Object.keys(raw)) {
    if (known.includes(key)) continue;
    gap(scope, 'sketch/unknown-setting', under(path, key), word('known', known.join(', ')));
    broken = true;
  }
  for (const [key, spec] of Object.entries(fields)) {
    const value = readSetting(spec, own(raw, key), under(path, key), scope);
    if (value === GAP) broken = true;
    else if (value !== ABSENT) out[key] = value;
  }
  for (const [key, spec] of Object.entries(fields))
    if (out[key] === undefined && spec.sameAs) copyBeside(key, spec.sameAs, out, raw, path, scope);
  return broken ? GAP : out;
}

/** Fills in what the setting beside has, as an assumption. */
function copyBeside(
  key: string,
  { key: beside, why, unless }: NonNullable<SettingSpec['sameAs']>,
  out: Record<string, unknown>,
  raw: JsonObject,
  path: string,
  scope: Scope,
): void {
  const value = out[beside];
  const idle = unless !== undefined && at(scope.typed, unless.path) === unless.is;
  if (value === undefined || idle) return;
  out[key] = value;
  const typed = own(raw, beside);
  const text = typeof typed === 'string' || typeof typed === 'number' ? String(typed) : '';
  const shown = typeof value === 'number' || typeof value === 'string' ? value : text;
  scope.assumptions.push({
    unit: scope.unit,
    path: under(path, key),
    value: shown,
    unitText: text,
    reason: why,
  });
}

function readSetting(spec: SettingSpec, value: Json | undefined, path: string, scope: Scope): unknown {
  if (isGiven(value)) return readGiven(spec, value, path, scope);
  if (spec.otherwise) {
    scope.assumptions.push(assumed(spec.otherwise, path, scope));
    return spec.otherwise.value;
  }
  if (spec.optional) return ABSENT;
  // A group without any value asks for its parts by name.
  if (spec.is === 'record' || spec.is === 'map' || spec.is === 'some')
    return readGiven(spec, {}, path, scope);
  return gap(scope, 'sketch/needs-value', path, ...fitting(spec));
}

/** A default of a group has one key, which ends the assumption's path. */
function assumed(
  { value, text, why }: NonNullable<SettingSpec['otherwise']>,
  path: string,
  scope: Scope,
): AssumptionDraft {
  const [only, ...others] = isObject(value as Json) ? Object.entries(value as JsonObject) : [];
  const single = only !== undefined && others.length === 0;
  const plain = single ? only[1] : value;
  return {
    unit: scope.unit,
    path: single ? under(path, only[0]) : path,
    value: typeof plain === 'number' || typeof plain === 'string' ? plain : text,
    unitText: text,
    reason: why,
  };
}

/** What would fit, for the reader of "needs a value". */
function fitting(spec: SettingSpec) {
  if (spec.is === 'quantity') return [evidence('wanted', 0, spec.dim)];
  return spec.is === 'option' ? [word('known', spec.values.join(', '))] : [];
}

function readGiven(spec: SettingSpec, value: Json, path: string, scope: Scope): unknown {
  const wrong = (wanted: string): typeof GAP => gap(scope, 'sketch/wrong-type', path, word('wanted', wanted));
  switch (spec.is) {
    case 'quantity': {
      const read = readQuantity(value, [spec.dim], path, scope, spec);
      return read === GAP ? GAP : read.si;
    }
    case 'flow':
      return readFlow(value, path, scope, spec.share === true);
    case 'composition':
      return readComposition(value, path, scope);
    case 'chemical': {
      const index = typeof value === 'string' ? scope.indexOf.get(value) : undefined;
      return index ?? gap(scope, 'sketch/unknown-chemical', path, word('chemical', String(value)));
    }
    case 'product': {
      const port = typeof value === 'string' ? portSpec(scope.kind, value) : undefined;
      return port?.dir === 'out'
        ? value
        : gap(scope, 'sketch/unknown-port', path, word('port', String(value)));
    }
    case 'whole':
      if (typeof value !== 'number' || !Number.isInteger(value)) return wrong('whole number');
      return outside(value, 'number', spec, path, scope) ?? value;
    case 'stage':
      if (spec.ends && (value === 'condenser' || value === 'reboiler')) return value;
      return typeof value === 'number' && Number.isInteger(value) && value >= 1 ? value : wrong('stage');
    case 'option':
      if (typeof value === 'string' && spec.values.includes(value)) return value;
      return gap(
        scope,
        'sketch/unknown-option',
        path,
        word('typed', typeof value === 'object' ? '' : String(value)),
        word('known', spec.values.join(', ')),
      );
    case 'yesNo':
      return typeof value === 'boolean' ? value : wrong('boolean');
    case 'record':
      return isObject(value) ? readRecord(spec, value, path, scope) : wrong('object');
    case 'some':
      return isObject(value) ? readSome(spec, value, path, scope) : wrong('object');
    case 'list':
      return Array.isArray(value) ? readList(spec, value as readonly Json[], path, scope) : wrong('list');
    case 'map':
      return isObject(value) ? readMap(spec, value, path, scope) : wrong('object');
    case 'cases':
      return isObject(value) ? readCase(spec, value, path, scope) : wrong('object');
  }
}

type Of<K extends SettingSpec['is']> = Extract<SettingSpec, { readonly is: K }>;

function readRecord(spec: Of<'record'>, raw: JsonObject, path: string, scope: Scope): unknown {
  const chosen = (spec.choose ?? []).map((choice) => checkChoice(choice, raw, scope, path));
  const read = readFields(spec.fields, raw, path, scope);
  return chosen.every((fine) => fine) ? read : GAP;
}

function readSome(spec: Of<'some'>, raw: JsonObject, path: string, scope: Scope): unknown {
  const keys = Object.keys(spec.of);
  const given = keys.filter((key) => isGiven(own(raw, key)));
  const counts = typeof spec.count === 'number' ? [spec.count] : spec.count;
  const fits = fitsCount(given, keys, counts, spec.pairs ?? [], path, scope);
  const fields = Object.fromEntries(given.flatMap((key) => (spec.of[key] ? [[key, spec.of[key]]] : [])));
  const read = readFields(fields as Fields, raw, path, scope, keys);
  return fits ? read : GAP;
}

function readList(spec: Of<'list'>, items: readonly Json[], path: string, scope: Scope): unknown {
  if (items.length < spec.min)
    return gap(scope, 'sketch/too-few', path, evidence('given', items.length), evidence('wanted', spec.min));
  if (spec.max !== undefined && items.length > spec.max)
    return gap(scope, 'sketch/too-many', path, evidence('given', items.length), evidence('wanted', spec.max));
  const read = items.map((item, k) => readSetting(spec.of, item, under(path, k), scope));
  return read.includes(GAP) ? GAP : read.filter((v) => v !== ABSENT);
}

function readMap(spec: Of<'map'>, raw: JsonObject, path: string, scope: Scope): unknown {
  const read: [string, unknown][] = [];
  for (const [key, value] of Object.entries(raw)) {
    if (!isGiven(value)) continue;
    const here = under(path, key);
    const known = spec.keys === 'port' ? portSpec(scope.kind, key) : scope.indexOf.get(key);
    if (known === undefined) {
      if (spec.keys === 'port') gap(scope, 'sketch/unknown-port', here, word('port', key));
      else gap(scope, 'sketch/unknown-chemical', here, word('chemical', key));
      read.push([key, GAP]);
    } else if (spec.keys === 'port' && !scope.ports.includes(key)) {
      scope.notes.push(
        finding(
          'sketch/setting-of-unused-port',
          'caution',
          { unit: scope.unit, port: key, path: here },
          word('port', key),
        ),
      );
    } else read.push([key, readSetting(spec.of, value, here, scope)]);
  }
  if (read.some(([, v]) => v === GAP)) return GAP;
  return spec.keys === 'port'
    ? Object.fromEntries(read)
    : read.map(([key, value]) => ({ chemical: scope.indexOf.get(key), value }));
}

function readCase(spec: Of<'cases'>, raw: JsonObject, path: string, scope: Scope): unknown {
  const name = own(raw, spec.by);
  const known = word('known', Object.keys(spec.cases).join(', '));
  if (!isGiven(name)) return gap(scope, 'sketch/needs-value', under(path, spec.by), known);
  const chosen = typeof name === 'string' && Object.hasOwn(spec.cases, name) ? spec.cases[name] : undefined;
  if (!chosen)
    return gap(scope, 'sketch/unknown-option', under(path, spec.by), word('typed', String(name)), known);
  const fields = chosen.is === 'record' ? chosen.fields : { value: chosen };
  const read = readFields(fields, raw, path, scope, [spec.by, ...Object.keys(fields)]);
  return read === GAP ? GAP : { [spec.by]: name, ...read };
}
