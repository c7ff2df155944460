import { expect, test } from 'vitest';
import type { StreamId, UnitId } from '../../src/engine/ids';
import type { Finding } from '../../src/engine/outcome';
import { loopName, sayLoopStop } from '../../src/wording';

const named = {
  tag: (id: string) => ({ a: 'V-101', b: 'J-1', c: 'K-101', d: 'E-9', e: 'E-10', f: 'D-1' })[id],
  kind: (id: string) => ({ b: 'join', f: 'divide' })[id],
  chemical: (id: string) => ({ nitrogen: 'nitrogen', argon: 'argon' })[id],
};
const ids = (text: string) => text.split(' ') as UnitId[];

test('a loop is called by its units in the order of their tags, dots on the line last', () => {
  expect(loopName(ids('a'), named)).toBe('V-101');
  expect(loopName(ids('b a'), named)).toBe('V-101 and J-1');
  expect(loopName(ids('e d c'), named)).toBe('E-9, E-10 and K-101');
  expect(loopName(ids('b e d c f a'), named)).toBe('E-9, E-10, K-101 and 3 more');
});

const finding = (code: string, chemicals: readonly string[] = []): Finding => ({
  code: code as Finding['code'],
  weight: 'beyond-limit',
  at: { stream: 's1' as StreamId },
  evidence: [
    ...chemicals.map((text) => ({ name: 'chemical', value: 0, dim: 'number', text }) as const),
    ...['a', 'c'].map((text) => ({ name: 'unit', value: 0, dim: 'number', text }) as const),
  ],
});

test.each([
  [finding('network/no-way-out', ['nitrogen']), 'nitrogen has no way out of the loop of K-101 and V-101'],
  [
    finding('network/no-way-out', ['nitrogen', 'argon']),
    'nitrogen and argon have no way out of the loop of K-101 and V-101',
  ],
  [finding('network/nothing-enters'), 'nothing enters the loop of K-101 and V-101'],
  [finding('network/loop-unsettled'), 'no solution for the loop of K-101 and V-101'],
  [finding('network/pressure-falls'), 'the pressure falls all round the loop of K-101 and V-101'],
])('what stops a loop is told in few words: $code', (of, says) => {
  expect(sayLoopStop(of, named)).toBe(says);
});

test('what stops one unit is not told as a loop', () => {
  expect(sayLoopStop(finding('network/inlet-missing'), named)).toBeUndefined();
});
