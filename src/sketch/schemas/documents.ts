import { REQUIREMENT_KINDS } from '../documentTypes';
import { quantitySchema } from './settings';
import type { Schema } from './types';

const text: Schema = { type: 'string' };
const name: Schema = { type: 'string', minLength: 1 };
const list = (items: Schema): Schema => ({ type: 'array', items });

function record(
  required: Readonly<Record<string, Schema>>,
  optional: Readonly<Record<string, Schema>>,
): Schema {
  return {
    type: 'object',
    required: Object.keys(required),
    properties: { ...required, ...optional },
  };
}

/** Revision table, design basis, HOLDs and what the documents show; all optional. */
export const DOCUMENTS: Readonly<Record<string, Schema>> = {
  revisions: list(
    record({ mark: name }, { date: text, what: text, by: text, checked: text, approved: text }),
  ),
  designBasis: {
    type: 'object',
    properties: {
      cases: list(record({ name }, { text })),
      requirements: list(
        record(
          { stream: { ...name, description: 'stream id' }, of: { enum: [...REQUIREMENT_KINDS] } },
          {
            chemical: { ...text, description: 'of a fraction or a recovery' },
            basis: { enum: ['mole', 'mass'] },
            min: { $ref: '#/$defs/quantity' },
            max: { $ref: '#/$defs/quantity' },
            note: text,
          },
        ),
      ),
      utilities: list(
        record(
          { name, use: { enum: ['heating', 'cooling'] } },
          { supply: quantitySchema(['temperature']), back: quantitySchema(['temperature']), note: text },
        ),
      ),
      approach: quantitySchema(['temperatureDifference']),
      conditions: text,
      notes: text,
    },
  },
  holds: list(record({ no: name, what: name }, { owner: text, date: text, unit: text, path: text })),
  documents: {
    type: 'object',
    properties: {
      paper: { enum: ['A3', 'A4'] },
      withoutRows: list(text),
      withoutStreams: list(text),
      withoutSections: list(text),
      pictureWidth: { type: 'number', exclusiveMinimum: 0 },
    },
  },
};
