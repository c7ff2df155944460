import type { Json } from './types';

export type JsonObject = { readonly [key: string]: Json };

/** Whether a value is a record: no list, not null. */
export const isObject = (value: unknown): value is JsonObject =>
  typeof value === 'object' && value !== null && !Array.isArray(value);

/** A value by its own key; never one inherited from Object. */
export const own = (value: JsonObject, key: string): Json | undefined =>
  Object.hasOwn(value, key) ? value[key] : undefined;

/** Same key order as before, one value replaced or added at the end; undefined removes it. */
export function withKey(value: JsonObject, key: string, next: Json | undefined): JsonObject {
  if (next !== undefined && Object.hasOwn(value, key) && value[key] === next) return value;
  if (next === undefined && !Object.hasOwn(value, key)) return value;
  const entries = Object.entries(value);
  const kept = entries.flatMap(([k, v]): [string, Json][] => {
    if (k !== key) return [[k, v]];
    return next === undefined ? [] : [[k, next]];
  });
  if (next !== undefined && !Object.hasOwn(value, key)) kept.push([key, next]);
  return Object.fromEntries(kept);
}

/** Equal in content, whatever the order of keys. */
export function sameJson(a: Json | undefined, b: Json | undefined): boolean {
  if (a === b) return true;
  if (Array.isArray(a) && Array.isArray(b))
    return a.length === b.length && a.every((item, k) => sameJson(item as Json, b[k] as Json));
  if (!isObject(a) || !isObject(b)) return false;
  const keys = Object.keys(a);
  return (
    keys.length === Object.keys(b).length && keys.every((k) => Object.hasOwn(b, k) && sameJson(a[k], b[k]))
  );
}
