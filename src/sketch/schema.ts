import { FORMAT, LABEL_KEYS } from './fresh';
import { KNOWN_KINDS, type Registry } from './registry';
import { DOCUMENTS } from './schemas/documents';
import { OWN_CHEMICAL } from './schemas/ownChemical';
import { quantitySchema, SETTING_DEFS, settingsSchema } from './schemas/settings';
import type { Schema } from './schemas/types';
import { when } from './schemas/when';
import { TITLE_KEYS } from './types';

export type { Schema } from './schemas/types';

const text: Schema = { type: 'string' };
const name: Schema = { type: 'string', minLength: 1 };
const point: Schema = { type: 'array', items: { type: 'number' }, minItems: 2, maxItems: 2 };
const end: Schema = {
  type: 'array',
  description: 'unit id and port',
  items: name,
  minItems: 2,
  maxItems: 2,
};
const texts = (...keys: readonly string[]): Readonly<Record<string, Schema>> =>
  Object.fromEntries(keys.map((key) => [key, text]));

const TITLE: Schema = {
  type: 'object',
  properties: texts(...TITLE_KEYS),
};

const SITE: Schema = {
  type: 'object',
  properties: {
    pressure: quantitySchema(['pressure']),
    ambient: quantitySchema(['temperature']),
    coolingWater: quantitySchema(['temperature']),
  },
};

/** By the bank's id, or brought by the user. */
const CHEMICAL: Schema = {
  anyOf: [
    name,
    {
      type: 'object',
      required: ['id', 'own'],
      properties: { id: name, own: { $ref: '#/$defs/ownChemical' } },
    },
  ],
};

const DISPLAY: Schema = {
  type: 'object',
  properties: {
    set: { enum: ['SI', 'metric', 'US'] },
    labels: { type: 'array', items: { type: 'string', description: LABEL_KEYS.join(', ') } },
    units: { type: 'object', additionalProperties: text },
    gauge: { type: 'boolean' },
  },
};

const NOTE: Schema = {
  type: 'object',
  required: ['text'],
  properties: {
    ...texts('id', 'text', 'on'),
    at: point,
    kind: { enum: ['text', 'area'] },
    size: point,
  },
};

const LIMITS: Schema = {
  type: 'object',
  description: 'thresholds by code',
  additionalProperties: { anyOf: [{ $ref: '#/$defs/quantity' }, { type: 'number' }] },
};

const MODEL: Schema = {
  type: 'object',
  required: ['kind'],
  properties: {
    kind: { ...name, description: 'peng-robinson, raoult; another kind is kept and not solved' },
    ...texts('alpha', 'vapour', 'liquidH', 'liquidVolume'),
    poynting: { type: 'boolean' },
    bankPairs: { type: 'boolean' },
    pairs: { type: 'array' },
  },
};

const STREAM: Schema = {
  type: 'object',
  required: ['id', 'number'],
  properties: {
    id: name,
    number: name,
    name: text,
    from: end,
    to: end,
    via: { type: 'array', items: point },
  },
};

/** A unit; its settings as its kind has them. */
const unitSchema = (kinds: readonly string[]): Schema => ({
  type: 'object',
  required: ['id', 'tag', 'kind', 'settings'],
  properties: {
    id: name,
    tag: name,
    name: text,
    kind: { ...name, description: `${kinds.join(', ')}; another kind is kept` },
    at: point,
    turn: { enum: [0, 90, 180, 270] },
    mirror: { type: 'boolean' },
    byHand: { type: 'boolean', description: 'placed by hand: arranging may leave it there' },
    material: text,
    settings: { type: 'object' },
  },
  allOf: kinds.map((kind) =>
    when('kind', kind, { properties: { settings: { $ref: `#/$defs/settings.${kind}` } } }),
  ),
});

/**
 * The JSON Schema (draft 2020-12) of a sketch file, from the descriptions of the kinds' settings and the fixed parts.
 * Fields it does not name are allowed and kept, except inside settings. A setting that is missing is no fault of the file.
 */
export function sketchSchema(registry: Registry = KNOWN_KINDS): Schema {
  return {
    $schema: 'https://json-schema.org/draft/2020-12/schema',
    $id: 'sketch.schema.json',
    title: 'Splitwright sketch, version 1',
    type: 'object',
    required: ['format', 'version', 'chemicals', 'model', 'units', 'streams'],
    properties: {
      format: { const: FORMAT },
      version: { const: 1 },
      id: text,
      title: TITLE,
      site: SITE,
      chemicals: { type: 'array', items: CHEMICAL },
      model: { $ref: '#/$defs/model' },
      units: { type: 'array', items: { $ref: '#/$defs/unit' } },
      streams: { type: 'array', items: { $ref: '#/$defs/stream' } },
      display: DISPLAY,
      notes: { type: 'array', items: NOTE },
      limits: LIMITS,
      ...DOCUMENTS,
    },
    $defs: {
      ...SETTING_DEFS,
      ownChemical: OWN_CHEMICAL,
      model: MODEL,
      unit: unitSchema(Object.keys(registry)),
      stream: STREAM,
      ...Object.fromEntries(
        Object.entries(registry).map(([kind, catalogue]) => [`settings.${kind}`, settingsSchema(catalogue)]),
      ),
    },
  };
}

/** The schema as file text. */
export const schemaText = (registry: Registry = KNOWN_KINDS): string =>
  `${JSON.stringify(sketchSchema(registry), null, 2)}\n`;
