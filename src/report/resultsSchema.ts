import { CATALOGUE } from '../engine/units/catalogue';
import type { KindCatalogue } from '../engine/units/types';
import type { Schema } from '../sketch/schema';
import { when } from '../sketch/schemas/when';

const number: Schema = { type: 'number' };
const text: Schema = { type: 'string' };
const share: Schema = { type: 'number', minimum: 0 };
const ref = (name: string): Schema => ({ $ref: `#/$defs/${name}` });
const listOf = (items: Schema): Schema => ({ type: 'array', items });
const byName = (additionalProperties: Schema): Schema => ({ type: 'object', additionalProperties });
const described = (schema: Schema, description: string): Schema => ({ ...schema, description });

/** A closed record: what is not named here is not in the file. */
const record = (
  required: Readonly<Record<string, Schema>>,
  optional: Readonly<Record<string, Schema>> = {},
): Schema => ({
  type: 'object',
  required: Object.keys(required),
  properties: { ...required, ...optional },
  additionalProperties: false,
});

const END: Schema = {
  anyOf: [
    { type: 'array', description: 'unit tag and port', items: text, minItems: 2, maxItems: 2 },
    { type: 'null' },
  ],
};

/** What every solved stream carries, beside the fields that a model or a chemical may leave out. */
const SOLVED: Readonly<Record<string, Schema>> = {
  T_K: number,
  P_Pa: number,
  n_mol_s: number,
  m_kg_s: number,
  H_W: described(number, 'from the elements at 298.15 K'),
  h_J_mol: number,
  vapourFraction: described(share, 'molar'),
  vapourMassFraction: share,
  MW_g_mol: number,
  HfromIdeal_W: described(number, 'from the same components as ideal gas at 298.15 K'),
  volume_m3_s: described(number, 'actual'),
  z: described(byName(share), 'mole fractions by chemical, zeros too'),
  phases: listOf(ref('phase')),
};
const PERHAPS: Readonly<Record<string, Schema>> = {
  S_W_K: number,
  s_J_molK: number,
  vapourIdealGas_m3_s: described(
    number,
    'the vapour alone, or the dense phase, as ideal gas at 273.15 K and 101325 Pa; absent without',
  ),
  standardLiquid_m3_s: described(
    number,
    'as liquid at 15 degC, ideal mixing; absent where noStandardLiquid is there; less than 1e-6 of the mass of chemicals without a liquid density there is left out',
  ),
  noStandardLiquid: described(
    listOf(text),
    'chemicals that have no liquid density at 15 degC and are 1e-6 of the mass or more',
  ),
  hiddenLiquid: byName(share),
  liquidsTogether: { type: 'boolean' },
};

const streamOf = (ends: Readonly<Record<string, Schema>>): Schema => ({
  anyOf: [
    record({ ...ends, state: { const: 'solved' }, ...SOLVED }, PERHAPS),
    record({ ...ends, state: { enum: ['waiting', 'no-solution'] } }),
  ],
});

/** The results of one kind that are plain numbers; what else a kind reports is its own. */
const kindResults = (kind: KindCatalogue): Schema => ({
  properties: Object.fromEntries(
    Object.entries(kind.results)
      .filter(([, spec]) => !spec.hidden)
      .map(([key, spec]) => [key, { type: ['number', 'null'], description: `${spec.dim}, SI` }]),
  ),
});

function unitSchema(kinds: Readonly<Record<string, KindCatalogue>>): Schema {
  const common: Readonly<Record<string, Schema>> = {
    kind: text,
    state: { enum: ['solved', 'needs-value', 'waiting', 'no-solution'] },
    in: described(byName(text), 'stream numbers by port'),
    out: described(byName(text), 'stream numbers by port'),
  };
  return {
    type: 'object',
    required: Object.keys(common),
    properties: {
      ...common,
      reasons: described(listOf(text), 'codes, of a unit that is not solved'),
      heat_W: described(number, 'into the unit'),
      power_W: described(number, 'shaft power into the fluid'),
      iterations: number,
      residual: number,
      loop: {
        type: 'object',
        description: 'how the loop was solved that the unit is part of',
        required: ['passes', 'residual', 'tear'],
        properties: {
          passes: number,
          residual: number,
          tear: described(listOf(text), 'numbers of the streams at which it was opened'),
        },
      },
      made_mol_s: byName(number),
      drawn: described(byName(ref('drawnStream')), 'streams drawn from outside without a line, by port'),
    },
    allOf: Object.entries(kinds).map(([kind, catalogue]) => when('kind', kind, kindResults(catalogue))),
  };
}

/**
 * The JSON Schema (draft 2020-12) of a results file, from the descriptions of the kinds' results and the fixed parts. All
 * figures are SI with every digit.
 */
export function resultsSchema(kinds: Readonly<Record<string, KindCatalogue>> = CATALOGUE): Schema {
  const closed: Readonly<Record<string, Schema>> = {
    mass: ref('balance'),
    energy: ref('balance'),
    chemicals: byName(ref('balance')),
    elements: byName(ref('balance')),
  };
  return {
    $schema: 'https://json-schema.org/draft/2020-12/schema',
    $id: 'results.schema.json',
    title: 'Splitwright results, version 1',
    ...record({
      format: { const: 'splitwright.results' },
      version: { const: 1 },
      solved: { type: 'boolean' },
      seconds: described(share, 'wall time of the solve'),
      streams: described(byName(ref('stream')), 'by stream number'),
      units: described(byName(ref('unit')), 'by tag'),
      closure: {
        anyOf: [
          record({ ...closed, complete: { type: 'boolean' }, byUnit: byName(record(closed)) }),
          { type: 'null' },
        ],
      },
      findings: listOf(
        record({
          code: text,
          weight: { enum: ['note', 'caution', 'beyond-limit'] },
          at: record({}, { unit: text, stream: text, port: text, path: text, stage: number, chemical: text }),
          evidence: listOf({ type: 'object', required: ['name', 'value'], properties: { name: text } }),
        }),
      ),
      assumptions: listOf(
        record(
          { no: text, path: text, value: { type: ['number', 'string'] }, unitText: text, reason: text },
          { unit: text },
        ),
      ),
      basis: record({
        model: { type: 'object', required: ['kind'], properties: { kind: text } },
        chemicals: listOf(
          record(
            { id: text, name: text, MW_g_mol: number },
            { cas: text, elements: byName(number), Hf_J_mol: number, assumed: { type: 'boolean' } },
          ),
        ),
      }),
    }),
    $defs: {
      stream: streamOf({ from: END, to: END }),
      drawnStream: streamOf({}),
      phase: record(
        {
          kind: { enum: ['vapour', 'liquid', 'liquid2', 'dense'] },
          fraction: described(share, 'molar'),
          x: byName(share),
          h_J_mol: number,
          Z: number,
          density_kg_m3: number,
          MW_g_mol: number,
          cp_J_molK: number,
        },
        {
          byConvention: described({ type: 'boolean' }, 'the name follows the naming rule only'),
          s_J_molK: number,
          cpOverCv: number,
          viscosity_Pa_s: number,
          viscosityRule: text,
        },
      ),
      balance: record({ in: number, out: number, made: number, relative: number }),
      unit: unitSchema(kinds),
    },
  };
}

/** The schema as file text. */
export const resultsSchemaText = (): string => `${JSON.stringify(resultsSchema(), null, 2)}\n`;
