import type { KindCatalogue, SettingSpec } from '../../engine/units/types';
import { isGiven } from '../compiling/quantity';
import { isObject, type JsonObject, own, withKey } from '../json';
import { portSpec } from '../registry';
import type { Json } from '../types';

/** A place inside settings, with dots; list numbers from 0: "fixedBy.1.value.share". Key by key where a key holds a dot. */
export type SettingPath = string | readonly string[];
export const pathKeys = (path: SettingPath): readonly string[] =>
  typeof path === 'string' ? path.split('.') : path;

/** The place with dots, for people. */
export const pathText = (path: SettingPath): string => (typeof path === 'string' ? path : path.join('.'));

const INDEX = /^(0|[1-9]\d{0,3})$/;

const COMPOSITION: SettingSpec = {
  is: 'record',
  fields: {
    basis: { is: 'option', values: ['mole', 'mass'] },
    parts: { is: 'map', keys: 'chemical', of: { is: 'quantity', dim: 'fraction' } },
    flows: { is: 'map', keys: 'chemical', of: { is: 'flow' } },
    preset: { is: 'option', values: [] },
    relativeHumidity: { is: 'quantity', dim: 'fraction' },
  },
};
const SHARE: SettingSpec = {
  is: 'record',
  fields: {
    share: { is: 'quantity', dim: 'fraction' },
    of: { is: 'record', fields: { stream: { is: 'option', values: [] } } },
    basis: { is: 'option', values: ['mole', 'mass'] },
    chemical: { is: 'chemical' },
  },
};

/** What may stand one step further inside; several where it depends on a choice made beside it. */
export function inside(spec: SettingSpec, key: string, kind: KindCatalogue): readonly SettingSpec[] {
  const field = (fields: Readonly<Record<string, SettingSpec>>): readonly SettingSpec[] => {
    const found = Object.hasOwn(fields, key) ? fields[key] : undefined;
    return found ? [found] : [];
  };
  switch (spec.is) {
    case 'record':
      return field(spec.fields);
    case 'some':
      return field(spec.of);
    case 'list':
      return INDEX.test(key) ? [spec.of] : [];
    case 'map':
      return spec.keys === 'chemical' || portSpec(kind, key) ? [spec.of] : [];
    case 'cases':
      if (key === spec.by) return [{ is: 'option', values: Object.keys(spec.cases) }];
      return Object.values(spec.cases).flatMap((chosen) =>
        chosen.is === 'record' ? inside(chosen, key, kind) : key === 'value' ? [chosen] : [],
      );
    case 'composition':
      return inside(COMPOSITION, key, kind);
    case 'flow':
      return inside(SHARE, key, kind);
    default:
      return [];
  }
}

/** The descriptions that a place in the settings can have; none when the kind has no such setting. */
export function specsAt(kind: KindCatalogue, keys: readonly string[]): readonly SettingSpec[] {
  let specs: readonly SettingSpec[] = [{ is: 'record', fields: kind.settings }];
  for (const key of keys) specs = specs.flatMap((spec) => inside(spec, key, kind));
  return specs;
}

/** The value at a place; undefined when there is none. */
export function valueAt(root: Json, keys: readonly string[]): Json | undefined {
  let value: Json | undefined = root;
  for (const key of keys) {
    if (Array.isArray(value)) value = INDEX.test(key) ? (value as readonly Json[])[Number(key)] : undefined;
    else value = isObject(value) ? own(value, key) : undefined;
  }
  return value;
}

/**
 * The same data with one value replaced, groups and lists on the way made where there are none.
 * @param isList  whether a missing value after so many keys is to be a list
 * @returns undefined when the way leads through a value that has no parts, or past the end of a list
 */
export function withValueAt(
  value: Json | undefined,
  keys: readonly string[],
  next: Json,
  isList: (depth: number) => boolean,
  depth = 0,
): Json | undefined {
  const key = keys[depth];
  if (key === undefined) return next;
  const here: Json = isGiven(value) ? value : isList(depth) ? [] : {};
  if (Array.isArray(here)) {
    const items = here as readonly Json[];
    if (!INDEX.test(key) || Number(key) > items.length) return undefined;
    const item = withValueAt(items[Number(key)], keys, next, isList, depth + 1);
    if (item === undefined || item === items[Number(key)]) return item === undefined ? undefined : here;
    const copy = [...items];
    copy[Number(key)] = item;
    return copy;
  }
  if (!isObject(here)) return undefined;
  const part = withValueAt(own(here, key), keys, next, isList, depth + 1);
  return part === undefined ? undefined : withKey(here, key, part);
}

/** The same data without one value; groups that are left empty go too, list items close up. */
export function withoutValueAt(root: JsonObject, keys: readonly string[]): JsonObject {
  const [key, ...rest] = keys;
  if (key === undefined || !Object.hasOwn(root, key)) return root;
  const before = root[key] as Json;
  const after = rest.length === 0 ? undefined : remove(before, rest);
  return withKey(root, key, after);
}

function remove(value: Json, keys: readonly string[]): Json | undefined {
  const [key = '', ...rest] = keys;
  if (Array.isArray(value)) {
    const items = value as readonly Json[];
    const index = INDEX.test(key) ? Number(key) : items.length;
    if (index >= items.length) return value;
    const item = rest.length === 0 ? undefined : remove(items[index] as Json, rest);
    return items.flatMap((v, k) => (k !== index ? [v] : item === undefined ? [] : [item]));
  }
  if (!isObject(value)) return value;
  const left = withoutValueAt(value, keys);
  return Object.keys(left).length === 0 ? undefined : left;
}
