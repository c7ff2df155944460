import { expect, test } from 'vitest';
import { solveSketch } from '../../src/cli/run';
import { resultsJson } from '../../src/report/resultsJson';
import { streamTable } from '../../src/report/streamTable';
import type { Json } from '../../src/sketch/types';
import { feedSketch } from '../sketch/help';

/** What the stream summary, the results file and the limits tell of the liquids of one feed. */
async function told(parts: Readonly<Record<string, Json>>, state: Json) {
  const sketch = feedSketch(
    { state, composition: { basis: 'mole', parts } },
    { chemicals: ['methane', 'water', 'n-hexane'] },
  );
  const { input } = await solveSketch(sketch);
  const row = streamTable(input).rows.find((r) => r.key === 'liquid2');
  const { streams } = resultsJson(input, 0) as { streams: Record<string, Record<string, unknown>> };
  return {
    row: row?.cells[0],
    stream: streams[Object.keys(streams)[0]!],
    codes: input.findings.map((f) => f.code).filter((code) => /second-liquid|liquids-together/.test(code)),
  };
}
const STATE = { T: '25 degC', P: '5 bar' };

test('two liquids without vapour are told as one, with the properties of both', async () => {
  const { row, stream, codes } = await told({ water: '50 %', 'n-hexane': '50 %' }, STATE);
  expect(row).toMatchObject({ text: 'found: both told as one' });
  expect(stream).toMatchObject({ liquidsTogether: true, hiddenLiquid: expect.anything() });
  expect(codes).toEqual(['stream/liquids-together']);
});

test('water beside gas and oil: the numbers are for one liquid', async () => {
  const { row, stream, codes } = await told({ methane: '40 %', water: '10 %', 'n-hexane': '50 %' }, STATE);
  expect(row).toMatchObject({ text: 'found: one liquid shown' });
  expect(stream).not.toHaveProperty('liquidsTogether');
  expect(codes).toEqual(['stream/second-liquid']);
});

test('dry oil: none is found', async () => {
  const { row, codes } = await told({ methane: '10 %', 'n-hexane': '90 %' }, STATE);
  expect(row).toMatchObject({ text: 'none found' });
  expect(codes).toEqual([]);
});
