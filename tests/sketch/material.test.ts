import { expect, test } from 'vitest';
import { solveSketch } from '../../src/cli/run';
import { makeCompile } from '../../src/sketch/compile';
import type { Sketch } from '../../src/sketch/types';
import { bankOf, codes, feedSketch } from './help';

const cold = (material?: string): Sketch => {
  const sketch = feedSketch({ state: { T: '-60 degC', P: '2 bar' } });
  const units = sketch.units.map((unit) => (material === undefined ? unit : { ...unit, material }));
  return { ...sketch, units };
};

test('a material noted at a unit reaches the engine; blanks are none', async () => {
  const bank = await bankOf(cold());
  const compile = makeCompile();
  const noted = (material?: string) => compile(cold(material), bank, 1).problem.units[0]?.materialNoted;
  // One compile step with its memory, as when a user types, clears and types again.
  expect([undefined, 'stainless steel', undefined, '  ', '304L', ''].map(noted)).toEqual([
    undefined,
    true,
    undefined,
    undefined,
    true,
    undefined,
  ]);
});

test('noting and clearing it makes a new problem, so that the limits are looked at again', async () => {
  const bank = await bankOf(cold());
  const compile = makeCompile();
  const problems = [undefined, 'steel', undefined].map((m, k) => compile(cold(m), bank, k).problem);
  expect(new Set(problems).size).toBe(3);
});

test('below -46 °C carbon steel is beyond its limit unless a material is noted, then a caution stays', async () => {
  const coldCodes = async (material?: string) =>
    codes((await solveSketch(cold(material))).input.findings).filter((code) => code.includes('steel'));
  expect(await coldCodes()).toEqual(['stream/too-cold-for-steel']);
  expect(await coldCodes('stainless steel')).toEqual(['stream/cold-steel']);
});
