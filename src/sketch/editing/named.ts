import type { KindCatalogue, SettingSpec } from '../../engine/units/types';
import type { JsonObject } from '../json';
import { isObject } from '../json';
import type { Json } from '../types';
import { inside } from './path';

/** Where a walk through settings stands: the descriptions that fit here; none of an unknown kind, which is judged by its looks. */
export interface Here {
  readonly kind: KindCatalogue | undefined;
  readonly specs: readonly SettingSpec[];
}

/** The top of a unit's settings. */
export const topOf = (kind: KindCatalogue | undefined): Here => ({
  kind,
  specs: kind ? [{ is: 'record', fields: kind.settings }] : [],
});

/** One step further inside. */
export const stepInto = ({ kind, specs }: Here, key: string): Here => ({
  kind,
  specs: kind ? specs.flatMap((spec) => inside(spec, key, kind)) : [],
});

/**
 * Whether an entry is about one of these chemicals: its key in a map over chemicals, or its value where a chemical belongs. A
 * setting that happens to be called like a chemical is about none.
 */
export function isAbout(ids: ReadonlySet<string>, here: Here, key: string, value: Json): boolean {
  const isValue = typeof value === 'string' && ids.has(value);
  if (!here.kind) return ids.has(key) || (key === 'chemical' && isValue);
  if (isValue && stepInto(here, key).specs.some((spec) => spec.is === 'chemical')) return true;
  return ids.has(key) && here.specs.some((spec) => isMapOfChemicals(spec));
}

const isMapOfChemicals = (spec: SettingSpec): boolean => spec.is === 'map' && spec.keys === 'chemical';

/** Whether settings name one of these chemicals anywhere. */
export function namesAny(ids: ReadonlySet<string>, value: Json, here: Here): boolean {
  if (Array.isArray(value))
    return (value as readonly Json[]).some((item, k) => namesAny(ids, item, stepInto(here, String(k))));
  return (
    isObject(value) &&
    Object.entries(value as JsonObject).some(
      ([key, v]) => isAbout(ids, here, key, v) || namesAny(ids, v, stepInto(here, key)),
    )
  );
}
