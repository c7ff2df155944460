import { expect, test } from 'vitest';
import { makeMemory } from '../../src/engine/network/memory';
import {
  basisOf,
  finish,
  fresh,
  molar,
  parts,
  problemOf,
  solvedStream,
  unit,
  unitResult,
} from '../network/fixtures';

const basis = await basisOf(['n-hexane', 'benzene', 'toluene', 'm-xylene']);
const letDown = (vapourFraction: number, P: number) =>
  problemOf(basis, [
    unit('f feed > out=1', {
      state: { P: 3e5, vapourFraction },
      flow: molar(10),
      composition: parts(5, 30, 35, 30),
    }),
    unit('v valve in=1 > out=2', { p: { P } }),
  ]);

test('a boiling liquid that is let down is found from nothing in few evaluations', () => {
  const batch = fresh(letDown(0, 1.7e5), basis);
  const out = solvedStream(batch, '2');
  expect(out.vapourFraction).toBeGreaterThan(0.05);
  expect(out.H_W).toBe(solvedStream(batch, '1').H_W);
  // From the inlet's temperature it takes more than a hundred.
  expect(unitResult(batch, 'v')!.iterations).toBeLessThan(60);
});

test.each([
  ['a liquid at its boiling point', 0, 2e4],
  ['a mixture of both phases', 0.4, 1e5],
  ['a vapour', 1, 1e5],
])('%s leaves in the same state from nothing and from another answer', (_, vapourFraction, P) => {
  const memory = makeMemory(basis);
  finish(letDown(0.1, 2.5e5), memory);
  const warm = solvedStream(finish({ ...letDown(vapourFraction, P), edit: 2 }, memory), '2');
  const cold = solvedStream(fresh(letDown(vapourFraction, P), basis), '2');
  expect(warm.T_K).toBeCloseTo(cold.T_K, 8);
  expect(warm.vapourFraction).toBeCloseTo(cold.vapourFraction, 9);
});
