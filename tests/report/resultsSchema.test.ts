import { readdirSync, readFileSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, test } from 'vitest';
import { resultsJson } from '../../src/report/resultsJson';
import { resultsSchema, resultsSchemaText } from '../../src/report/resultsSchema';
import { faults } from '../sketch/validator';
import { EXAMPLES, solvedExample } from './solved';

const FILES = readdirSync(EXAMPLES).filter((name) => name.endsWith('.sketch.json'));
const asFile = (value: unknown) => JSON.parse(JSON.stringify(value));

describe('the schema of the results file', () => {
  test('is published as the code makes it', () => {
    const published = readFileSync(join(EXAMPLES, '../schema/results.schema.json'), 'utf8');
    expect(published).toBe(resultsSchemaText());
  });

  test.each(FILES)('holds for the results of %s', async (file) => {
    const results = asFile(resultsJson(await solvedExample(file), 0.1));
    expect(faults(resultsSchema(), results)).toEqual([]);
  });

  test('holds for results with waiting units and streams', async () => {
    const open = await solvedExample('let-down.sketch.json', (sketch) => ({
      ...sketch,
      units: sketch.units.map((u) => (u.kind === 'valve' ? { ...u, settings: {} } : u)),
    }));
    const results = asFile(resultsJson(open, 0.1));
    expect(results.units['PV-1'].state).toBe('needs-value');
    expect(faults(resultsSchema(), results)).toEqual([]);
  });

  test('holds for reasons that name chemicals, and those name units by their tags', async () => {
    const closed = await solvedExample('nitrogen-loop.sketch.json', (sketch) => ({
      ...sketch,
      units: sketch.units.map((u) =>
        u.kind === 'divide' ? { ...u, settings: { shares: { out2: '0 %' } } } : u,
      ),
    }));
    const results = asFile(resultsJson(closed, 0.1));
    const why = results.findings.find((f: { code: string }) => f.code === 'network/no-way-out');
    expect(why.at.chemical).toBe('nitrogen');
    const units = why.evidence.filter((e: { name: string }) => e.name === 'unit');
    expect(units.map((e: { text: string }) => e.text)).toContain('K-301');
    expect(faults(resultsSchema(), results)).toEqual([]);
  });

  test.each([
    ['a field that nobody named', (r: ReturnType<typeof asFile>) => (r.streams['1'].colour = 'red')],
    ['a temperature as text', (r: ReturnType<typeof asFile>) => (r.streams['1'].T_K = '300')],
    ['a stream without phases', (r: ReturnType<typeof asFile>) => delete r.streams['1'].phases],
    ['an unknown state', (r: ReturnType<typeof asFile>) => (r.units['V-1'].state = 'fine')],
    ['a result of a kind as text', (r: ReturnType<typeof asFile>) => (r.units['V-1'].T_K = 'warm')],
    ['another version', (r: ReturnType<typeof asFile>) => (r.version = 2)],
  ])('refuses %s', async (_, spoil) => {
    const results = asFile(resultsJson(await solvedExample('let-down.sketch.json'), 0.1));
    spoil(results);
    expect(faults(resultsSchema(), results)).not.toEqual([]);
  });
});
