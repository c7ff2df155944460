import { evidence, word } from '../findings';
import { isObject, type JsonObject } from '../json';
import type { Json } from '../types';
import { type Problems, typeName } from './problem';

/** Small readers that put a reason on the list when a value is not what it must be. All take an absent value as fine. */

/** Text, or nothing. */
export function text(value: Json | undefined, path: string, problems: Problems): value is string {
  if (typeof value === 'string') return true;
  if (value !== undefined) problems.wrongType(path, 'text', value);
  return false;
}

/** Text that must be there and say something. */
export function name(value: Json | undefined, path: string, problems: Problems): value is string {
  if (value === undefined) problems.add(path, 'file/missing');
  else if (text(value, path, problems)) {
    if (value.trim() !== '') return true;
    problems.add(path, 'file/empty-text', word('found', value));
  }
  return false;
}

/** A record, or nothing. */
export function object(value: Json | undefined, path: string, problems: Problems): value is JsonObject {
  if (isObject(value)) return true;
  if (value !== undefined) problems.wrongType(path, 'object', value);
  return false;
}

/** A list, or nothing; its items are not looked at. */
export function list(value: Json | undefined, path: string, problems: Problems): value is readonly Json[] {
  if (Array.isArray(value)) return true;
  if (value !== undefined) problems.wrongType(path, 'list', value);
  return false;
}

/** True or false, or nothing. */
export function yesNo(value: Json | undefined, path: string, problems: Problems): void {
  if (value !== undefined && typeof value !== 'boolean') problems.wrongType(path, 'boolean', value);
}

/** A number above `min`, or nothing. */
export function number(
  value: Json | undefined,
  path: string,
  problems: Problems,
  min = Number.NEGATIVE_INFINITY,
): value is number {
  if (value === undefined) return false;
  if (typeof value !== 'number') {
    problems.wrongType(path, 'number', value);
    return false;
  }
  if (value > min) return true;
  problems.add(path, 'file/out-of-range', evidence('found', value), evidence('above', min));
  return false;
}

/** One of these values, or nothing. */
export function oneOf(
  value: Json | undefined,
  path: string,
  problems: Problems,
  wanted: readonly (string | number | boolean)[],
): void {
  if (value === undefined || (typeof value !== 'object' && wanted.includes(value))) return;
  const found = typeof value === 'object' ? typeName(value) : String(value);
  problems.add(path, 'file/not-one-of', word('found', found), word('wanted', wanted.join(', ')));
}

/** "number unit" or a number; what it measures is judged where it is used. */
export function quantity(value: Json | undefined, path: string, problems: Problems): void {
  if (value !== undefined && typeof value !== 'string' && typeof value !== 'number')
    problems.wrongType(path, 'quantity', value);
}

const FARTHEST = 100_000;

/** A place on the sheet [px]. */
export function point(value: Json | undefined, path: string, problems: Problems): void {
  if (value === undefined) return;
  if (!Array.isArray(value) || value.length !== 2 || !value.every((v) => typeof v === 'number'))
    problems.wrongType(path, 'pair of numbers', value);
  else if (value.some((v) => Math.abs(v as number) > FARTHEST))
    problems.add(path, 'file/out-of-range', evidence('largest', FARTHEST));
}
