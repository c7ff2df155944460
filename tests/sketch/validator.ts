import type { Schema } from '../../src/sketch/schema';

type Tree = { readonly [key: string]: unknown };
const isTree = (x: unknown): x is Tree => typeof x === 'object' && x !== null && !Array.isArray(x);

/** Keywords that this validator understands; a schema with another one is not judged but refused. */
const KNOWN = new Set(
  (
    '$schema $id title description $ref $defs type const enum pattern minLength minimum maximum exclusiveMinimum ' +
    'properties additionalProperties propertyNames required maxProperties items minItems maxItems anyOf allOf not if then'
  ).split(' '),
);

function typeFits(type: string, value: unknown): boolean {
  if (type === 'integer') return Number.isInteger(value);
  if (type === 'array') return Array.isArray(value);
  if (type === 'object') return isTree(value);
  return type === 'null' ? value === null : typeof value === type;
}

/** Faults of a value against the part of JSON Schema (draft 2020-12) that the sketch's schema uses; each with its path. */
export function faults(schema: Schema, value: unknown, root: Schema = schema, path = ''): string[] {
  const unknown = Object.keys(schema).filter((key) => !KNOWN.has(key));
  if (unknown.length > 0) throw new Error(`keyword ${unknown.join()} at ${path}`);
  const found: string[] = [];
  const say = (what: string): void => {
    found.push(`${path}: ${what}`);
  };
  const inside = (part: Schema, v: unknown, key?: string | number): string[] =>
    faults(part, v, root, key === undefined ? path : `${path}/${key}`);
  if (schema.$ref !== undefined) {
    const target = root.$defs?.[schema.$ref.replace('#/$defs/', '')];
    if (!target) throw new Error(`no ${schema.$ref}`);
    found.push(...inside(target, value));
  }
  const types = typeof schema.type === 'string' ? [schema.type] : schema.type;
  if (types && !types.some((type) => typeFits(type, value))) say(`is no ${types.join(' or ')}`);
  if ('const' in schema && value !== schema.const) say(`is not ${String(schema.const)}`);
  if (schema.enum && !schema.enum.includes(value)) say(`is none of ${schema.enum.join()}`);
  if (typeof value === 'string') {
    if (schema.pattern !== undefined && !new RegExp(schema.pattern, 'u').test(value)) say('does not match');
    if (value.length < (schema.minLength ?? 0)) say('is too short');
  }
  if (typeof value === 'number') {
    if (value < (schema.minimum ?? value)) say('is too small');
    if (value > (schema.maximum ?? value)) say('is too large');
    if (schema.exclusiveMinimum !== undefined && value <= schema.exclusiveMinimum) say('is too small');
  }
  if (Array.isArray(value)) {
    if (value.length < (schema.minItems ?? 0)) say('has too few items');
    if (value.length > (schema.maxItems ?? value.length)) say('has too many items');
    const { items } = schema;
    if (items) found.push(...value.flatMap((item, k) => inside(items, item, k)));
  }
  if (isTree(value)) {
    const keys = Object.keys(value);
    for (const key of schema.required ?? []) if (!Object.hasOwn(value, key)) say(`lacks ${key}`);
    if (keys.length > (schema.maxProperties ?? keys.length)) say('has too many properties');
    for (const key of keys) {
      const { properties = {}, additionalProperties: more } = schema;
      const part = Object.hasOwn(properties, key) ? properties[key] : undefined;
      if (part) found.push(...inside(part, value[key], key));
      else if (more === false) say(`has an unknown ${key}`);
      else if (typeof more === 'object') found.push(...inside(more, value[key], key));
    }
  }
  if (schema.anyOf && !schema.anyOf.some((part) => inside(part, value).length === 0)) say('fits no way');
  for (const part of schema.allOf ?? []) found.push(...inside(part, value));
  if (schema.not && inside(schema.not, value).length === 0) say('is excluded');
  if (schema.if && schema.then && inside(schema.if, value).length === 0)
    found.push(...inside(schema.then, value));
  return found;
}
