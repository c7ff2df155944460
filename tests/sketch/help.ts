import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import type { StreamId, UnitId } from '../../src/engine/ids';
import type { KindCatalogue } from '../../src/engine/units/types';
import { loadBankData } from '../../src/sketch/bank';
import { type BankData, type Compiled, compile } from '../../src/sketch/compile';
import type { Edit, Edited } from '../../src/sketch/edits';
import { openSketch } from '../../src/sketch/read';
import { KNOWN_KINDS, type Registry } from '../../src/sketch/registry';
import type { Json, Sketch } from '../../src/sketch/types';

export const root = join(import.meta.dirname, '../..');
export const exampleText = (name: string): string =>
  readFileSync(join(root, 'public/examples', `${name}.sketch.json`), 'utf8');

export const u = (id: string): UnitId => id as UnitId;
export const s = (id: string): StreamId => id as StreamId;

/** A sketch that must open. */
export function opened(source: unknown, registry: Registry = KNOWN_KINDS): Sketch {
  const result = openSketch(source, { registry, newId: () => 'new-id' });
  if (!result.ok) throw new Error(JSON.stringify(result.problems));
  return result.sketch;
}

export const letDown = (): Sketch => opened(exampleText('let-down'));
export const twoFlashes = (): Sketch => opened(exampleText('condensate-flash'));

/** A parsed copy of the small example that a test may spoil. */
export type Loose = { [key: string]: unknown };
export const loose = (name = 'let-down'): Loose & { units: Loose[]; streams: Loose[] } =>
  JSON.parse(exampleText(name)) as Loose & { units: Loose[]; streams: Loose[] };

export function done(edit: Edit): Edited {
  if (!edit.ok) throw new Error(`${edit.code}: ${JSON.stringify(edit.evidence)}`);
  return edit;
}

export const refusedWith = (edit: Edit | undefined): string | undefined =>
  edit === undefined || edit.ok ? undefined : edit.code;

/** A feed alone with some settings over the usual ones. */
export function feedSketch(
  settings: Readonly<Record<string, Json>>,
  more: Readonly<Record<string, unknown>> = {},
): Sketch {
  return opened({
    format: 'splitwright.sketch',
    version: 1,
    chemicals: ['methane', 'n-butane', 'n-decane'],
    model: { kind: 'peng-robinson', alpha: '1976', liquidVolume: 'corrected', bankPairs: true, pairs: [] },
    units: [
      {
        id: 'u1',
        tag: 'FEED-1',
        kind: 'feed',
        settings: {
          state: { T: '40 degC', P: '30 bar' },
          flow: '100 kmol/h',
          composition: { basis: 'mole', parts: { methane: '30 %', 'n-butane': '40 %', 'n-decane': '30 %' } },
          ...settings,
        },
      },
    ],
    streams: [],
    ...more,
  });
}

export async function compiled(sketch: Sketch, registry: Registry = KNOWN_KINDS): Promise<Compiled> {
  return compile(sketch, await loadBankData(sketch, registry), 1, { registry });
}

export const bankOf = (sketch: Sketch): Promise<BankData> => loadBankData(sketch);

export const codes = (found: readonly { readonly code: string }[]): string[] => found.map((f) => f.code);
/** "code at path" of every gap. */
export const gapsOf = ({ gaps }: Compiled): string[] =>
  gaps.map((g) => `${g.code} at ${g.at.path ?? g.at.port ?? ''}`);
export const settingsOf = (c: Compiled, k = 0): unknown => c.problem.units[k]?.settings;

/** A kind that no product code knows, with every form that a setting can have. */
export const TEST_KIND: KindCatalogue = {
  kind: 'mill',
  group: 'separation',
  tag: { letters: 'M', drawn: true },
  ports: [
    { name: 'feed', dir: 'in', numbered: { min: 1, max: 3 } },
    { name: 'extra', dir: 'in', optional: true },
    { name: 'main', dir: 'out' },
    { name: 'side', dir: 'out', numbered: { min: 0, max: 2 } },
  ],
  settings: {
    stages: { is: 'whole', min: 1, max: 50 },
    ends: {
      is: 'record',
      fields: {
        top: { is: 'option', values: ['open', 'closed'] },
        bottom: { is: 'yesNo', otherwise: { value: true, text: 'yes', why: 'The foot is usually heated.' } },
      },
    },
    feeds: { is: 'map', keys: 'port', of: { is: 'record', fields: { stage: { is: 'stage', ends: true } } } },
    split: { is: 'map', keys: 'chemical', of: { is: 'quantity', dim: 'fraction', min: 0, max: 1 } },
    fixedBy: {
      is: 'list',
      min: 1,
      max: 2,
      of: {
        is: 'cases',
        by: 'fix',
        cases: {
          ratio: { is: 'record', fields: { value: { is: 'quantity', dim: 'number', min: 0 } } },
          flow: {
            is: 'record',
            fields: { product: { is: 'product' }, value: { is: 'flow' } },
          },
          purity: {
            is: 'record',
            fields: { chemical: { is: 'chemical' }, value: { is: 'quantity', dim: 'fraction' } },
          },
        },
      },
    },
    efficiency: {
      is: 'quantity',
      dim: 'fraction',
      otherwise: { value: 0.75, text: '75 %', why: 'A usual figure.' },
    },
    warm: { is: 'quantity', dim: 'temperature', optional: true },
    cold: { is: 'quantity', dim: 'temperature', optional: true },
  },
  choose: [{ keys: ['warm', 'cold'], count: 1 }],
  results: { duty_W: { dim: 'power' } },
  findings: ['mill/worn'],
  fresh: { stages: 10 },
};
export const WITH_MILL: Registry = { ...KNOWN_KINDS, mill: TEST_KIND };
