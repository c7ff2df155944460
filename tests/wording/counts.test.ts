import { expect, test } from 'vitest';
import type { Evidence, Finding } from '../../src/engine/outcome';
import { sayFinding } from '../../src/wording';

const said = (code: Finding['code'], ...evidence: readonly Evidence[]): string =>
  sayFinding({ code, weight: 'note', at: {}, evidence }, { measures: 'metric' }).sentence;

test.each([1, 18, 1234])('a count of %d is told as a whole number', (value) => {
  const sentence = said('model/pair-predicted', { name: 'count', value, dim: 'number' });
  expect(sentence.replace(/\s/g, '')).toMatch(new RegExp(`meetinthesketch${value}have`));
});

test('a pure number that is not whole keeps its decimals, and a quantity that happens to be whole keeps its own', () => {
  expect(said('stream/near-critical', { name: 'densityRatio', value: 3.25, dim: 'number' })).toContain(
    '3.250',
  );
  const cold: Evidence = { name: 'temperature', value: 233.15, dim: 'temperature' };
  expect(said('stream/cold-steel', cold)).toMatch(/[-−]40\.0+ °C/);
});
