import type { KindCatalogue, SettingSpec } from '../../engine/units/types';
import { type Dimension, QUANTITY_PATTERN, suggestedUnits } from '../../quantity';
import { AIR_OF } from '../compiling/air';
import type { Schema } from './types';
import { when } from './when';

/** Dimensions that a plain JSON number may stand for. */
const PLAIN: readonly Dimension[] = ['number', 'fraction'];

const QUANTITY: Schema = { $ref: '#/$defs/quantity' };

/** A quantity of some dimensions: text, or a number where it is dimensionless. */
export function quantitySchema(dims: readonly Dimension[], range: Schema = {}): Schema {
  const units = suggestedUnits(dims);
  const description = `${dims.join(' or ')}${units.length > 0 ? `, e.g. in ${units.join(', ')}` : ''}`;
  return dims.some((dim) => PLAIN.includes(dim))
    ? { description, anyOf: [QUANTITY, { type: 'number', ...range }] }
    : { description, ...QUANTITY };
}

/** The settings of a kind. A setting may be missing (the unit then needs a value), but none may be unknown. */
export function settingsSchema(kind: KindCatalogue): Schema {
  const choices = (kind.choose ?? []).flatMap(({ keys, pairs = [] }) => notTogether(keys, pairs));
  const moot = (kind.moot ?? []).map(({ when, key }): Schema => ({ not: given([...when, key]) }));
  const rules = [...choices, ...moot];
  return {
    ...group(kind.settings),
    ...(rules.length > 0 ? { allOf: rules } : {}),
  };
}

const group = (fields: Readonly<Record<string, SettingSpec>>): Schema => ({
  type: 'object',
  properties: Object.fromEntries(Object.entries(fields).map(([key, spec]) => [key, settingSchema(spec)])),
  additionalProperties: false,
});

/** That all of these paths are given. */
function given(paths: readonly string[]): Schema {
  const heads = [...new Set(paths.map((path) => path.split('.')[0] ?? ''))];
  const inside = heads.flatMap((head): [string, Schema][] => {
    const rest = paths.filter((p) => p.startsWith(`${head}.`)).map((p) => p.slice(head.length + 1));
    return rest.length > 0 ? [[head, { type: 'object', ...given(rest) }]] : [];
  });
  return { required: heads, ...(inside.length > 0 ? { properties: Object.fromEntries(inside) } : {}) };
}

/** Every two keys that are no allowed pair exclude each other. */
function notTogether(
  keys: readonly string[],
  pairs: readonly (readonly [string, string])[],
): readonly Schema[] {
  return keys.flatMap((a, k) =>
    keys
      .slice(k + 1)
      .filter((b) => !pairs.some((pair) => pair.includes(a) && pair.includes(b)))
      .map((b): Schema => ({ not: { required: [a, b] } })),
  );
}

function settingSchema(spec: SettingSpec): Schema {
  const schema = shapeOf(spec);
  const { otherwise, sameAs } = spec;
  if (sameAs)
    return { ...schema, description: `${schema.description ?? ''}; absent: as ${sameAs.key}. ${sameAs.why}` };
  if (!otherwise) return schema;
  const said = `absent: ${otherwise.text}. ${otherwise.why}`;
  return { ...schema, description: schema.description ? `${schema.description}; ${said}` : said };
}

function shapeOf(spec: SettingSpec): Schema {
  switch (spec.is) {
    case 'quantity': {
      const range = {
        ...(spec.min === undefined ? {} : { minimum: spec.min }),
        ...(spec.max === undefined ? {} : { maximum: spec.max }),
      };
      return quantitySchema([spec.dim], range);
    }
    case 'flow':
      return { $ref: spec.share ? '#/$defs/flowOrShare' : '#/$defs/flow' };
    case 'composition':
      return { $ref: '#/$defs/composition' };
    case 'chemical':
      return { type: 'string', description: 'id of a chemical of the sketch' };
    case 'product':
      return { type: 'string', description: 'name of an outlet port' };
    case 'whole':
      return { type: 'integer', minimum: spec.min, ...(spec.max === undefined ? {} : { maximum: spec.max }) };
    case 'stage': {
      const stage: Schema = { type: 'integer', minimum: 1 };
      return spec.ends ? { anyOf: [stage, { enum: ['condenser', 'reboiler'] }] } : stage;
    }
    case 'option':
      return { enum: spec.values };
    case 'yesNo':
      return { type: 'boolean' };
    case 'record': {
      const rules = (spec.choose ?? []).flatMap(({ keys, pairs = [] }) => notTogether(keys, pairs));
      return { ...group(spec.fields), ...(rules.length > 0 ? { allOf: rules } : {}) };
    }
    case 'some': {
      const keys = Object.keys(spec.of);
      const most = typeof spec.count === 'number' ? spec.count : Math.max(...spec.count);
      const pairs = spec.pairs && most > 1 ? notTogether(keys, spec.pairs) : [];
      return {
        ...group(spec.of),
        maxProperties: most,
        description: `${typeof spec.count === 'number' ? spec.count : spec.count.join(' or ')} of ${keys.join(', ')}`,
        ...(pairs.length > 0 ? { allOf: pairs } : {}),
      };
    }
    case 'list':
      return {
        type: 'array',
        items: settingSchema(spec.of),
        ...(spec.max === undefined ? {} : { maxItems: spec.max }),
      };
    case 'map':
      return {
        type: 'object',
        description: spec.keys === 'port' ? 'by port' : 'by chemical',
        additionalProperties: settingSchema(spec.of),
      };
    case 'cases':
      return {
        type: 'object',
        properties: { [spec.by]: { enum: Object.keys(spec.cases) } },
        allOf: Object.entries(spec.cases).map(([name, chosen]): Schema => {
          const fields = chosen.is === 'record' ? chosen.fields : { value: chosen };
          const here = group(fields);
          return when(spec.by, name, {
            ...here,
            properties: { [spec.by]: { const: name }, ...here.properties },
          });
        }),
      };
  }
}

const FLOW_DIMS = ['molarFlow', 'massFlow'] as const;

const SHARE: Schema = {
  type: 'object',
  properties: {
    share: quantitySchema(['fraction'], { minimum: 0 }),
    of: {
      anyOf: [
        { const: 'feed' },
        { type: 'object', properties: { stream: { type: 'string' } }, additionalProperties: false },
      ],
    },
    basis: { enum: ['mole', 'mass'] },
    chemical: { type: 'string' },
  },
  additionalProperties: false,
};

/** Shapes that settings refer to. */
export const SETTING_DEFS: Readonly<Record<string, Schema>> = {
  quantity: {
    description: 'A number and its unit as typed: "10 bar", "3.5 barg", "75 %"; "." is the decimal sign.',
    type: 'string',
    pattern: QUANTITY_PATTERN,
  },
  flow: { anyOf: [quantitySchema(FLOW_DIMS), SHARE] },
  flowOrShare: { anyOf: [quantitySchema(['fraction', ...FLOW_DIMS]), SHARE] },
  composition: {
    anyOf: [
      {
        type: 'object',
        properties: {
          basis: { enum: ['mole', 'mass'] },
          parts: {
            type: 'object',
            additionalProperties: quantitySchema(['fraction'], { minimum: 0 }),
          },
        },
        additionalProperties: false,
      },
      {
        type: 'object',
        properties: { flows: { type: 'object', additionalProperties: quantitySchema(FLOW_DIMS) } },
        additionalProperties: false,
      },
      {
        type: 'object',
        properties: {
          preset: { enum: Object.keys(AIR_OF) },
          relativeHumidity: quantitySchema(['fraction'], { minimum: 0, maximum: 1 }),
        },
        additionalProperties: false,
      },
    ],
  },
};
