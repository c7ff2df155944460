import { expect, test } from 'vitest';
import { resultsJson } from '../../src/report/resultsJson';
import { solvedExample } from './solved';

test('a unit of a loop says how the loop was solved and at which streams it was opened, by number', async () => {
  const input = await solvedExample('nitrogen-loop.sketch.json');
  const { units } = JSON.parse(JSON.stringify(resultsJson(input, 0.1)));
  const numbers = new Set(input.sketch.streams.map((s) => s.number));
  const looped = Object.keys(units).filter((tag) => units[tag].loop);
  // Read off the sketch: the blower and both coolers go round; feeds and products do not.
  expect(looped).toEqual(expect.arrayContaining(['K-301']));
  expect(looped.some((tag) => ['feed', 'product'].includes(units[tag].kind))).toBe(false);
  for (const tag of looped) {
    const { passes, residual, tear } = units[tag].loop;
    expect(passes).toBeGreaterThan(1);
    expect(residual).toBeLessThan(1e-9);
    expect(tear.length).toBeGreaterThan(0);
    for (const number of tear) expect(numbers.has(number), `${number}`).toBe(true);
  }
});
