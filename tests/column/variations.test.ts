/** A few of the many random variations of the train examples, and the referee that judges them. */
import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, test } from 'vitest';
import { makeMemory } from '../../src/engine/network/memory';
import type { SolveBatch } from '../../src/engine/network/types';
import { loadBankData } from '../../src/sketch/bank';
import { compile } from '../../src/sketch/compile';
import { openSketch } from '../../src/sketch/read';
import { finish } from '../network/fixtures';
import { examples } from '../robust/examples';
import { makeRandom } from '../robust/random';
import { faultOfSheet } from '../robust/sketchReferee';

test('six variations of each example solve from nothing, and none is wrong', async () => {
  const found = await examples(77, 6);
  expect(found).toMatchObject({ tried: 18, answered: 18, wrong: 0, cases: [] });
});

describe('the referee', async () => {
  const file = join(import.meta.dirname, '../../public/examples/light-hydrocarbons.sketch.json');
  const opened = openSketch(readFileSync(file, 'utf8'));
  if (!opened.ok) throw new Error('does not open');
  const { basis, problem } = compile(opened.sketch, await loadBankData(opened.sketch));
  const batch = finish(problem, makeMemory(basis!));
  const judge = (b: SolveBatch): string | undefined => faultOfSheet(basis!, problem, b, makeRandom(1));
  const spoilt = (id: string, change: object): SolveBatch => ({
    ...batch,
    streams: batch.streams.map(([s, r]) => (s === id ? [s, { ...r, ...change }] : [s, r])),
  });

  test('finds nothing in the example as it is', () => {
    expect(judge(batch)).toBeUndefined();
  });

  test('sees a product that is a millionth too large, an enthalpy and a temperature that cannot be', () => {
    const s3 = batch.streams.find(([id]) => id === 's3')![1];
    if (s3.state !== 'solved') throw new Error('not solved');
    expect(judge(spoilt('s3', { n_mol_s: s3.n_mol_s * 1.000001 }))).toMatch(/^u3 \(column\): closure/);
    expect(judge(spoilt('s3', { h_J_mol: s3.h_J_mol + 1 }))).toMatch(/^u3 \(column\): closure/);
    expect(judge(spoilt('s3', { T_K: 5 }))).toMatch(/^stream s3/);
  });

  test('sees a stage off equilibrium and a purity that was not met', () => {
    const [, c] = batch.units.find(([id]) => id === 'u3')!;
    const stages = (c.results as { stages: { T_K: Float64Array } }).stages;
    const warmer = { ...stages, T_K: stages.T_K.map((T) => T + 1e-4) };
    const units = batch.units.map(([id, u]): SolveBatch['units'][number] =>
      id === 'u3' ? [id, { ...u, results: { ...u.results, stages: warmer } }] : [id, u],
    );
    expect(judge({ ...batch, units })).toMatch(/fugacities differ/);
    const asked = {
      ...problem,
      units: problem.units.map((u) =>
        u.id === 'u3'
          ? {
              ...u,
              settings: JSON.parse(JSON.stringify(u.settings).replace('"value":0.02', '"value":0.0201')),
            }
          : u,
      ),
    };
    expect(faultOfSheet(basis!, asked, batch, makeRandom(1))).toMatch(/fixing 1 \(purity\) missed/);
  });
});
