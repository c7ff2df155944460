import { describe, expect, test } from 'vitest';
import { setPair } from '../../src/sketch/edits';
import type { Json, Sketch } from '../../src/sketch/types';
import { compiled, done, feedSketch, refusedWith } from './help';

const withPairs = (pairs?: readonly Json[]): Sketch =>
  feedSketch({}, { model: { kind: 'peng-robinson', alpha: '1976', ...(pairs ? { pairs } : {}) } });

/** Pair of methane and n-butane in force, and whether the register says that no pairs are given. */
async function inForce(sketch: Sketch) {
  const { basis, assumptions } = await compiled(sketch);
  return {
    pair: basis?.model.pairs.find(({ i, j }) => i === 0 && j === 1),
    assumed: assumptions.some(({ path }) => path === 'model.pairs'),
  };
}

describe('a pair parameter of the sketch', () => {
  test('is used instead of the bank’s, which is still told, and the register follows', async () => {
    const before = withPairs();
    const bank = await inForce(before);
    expect(bank.pair?.origin).toBe('fitted');
    expect(bank.assumed).toBe(true);
    const edit = done(setPair(before, 'methane', 'n-butane', 0.02));
    expect(edit.sketch.model.pairs).toEqual([{ i: 'methane', j: 'n-butane', kij: 0.02 }]);
    expect(edit.label).toBe('set pair methane + n-butane');
    const own = await inForce(edit.sketch);
    expect(own.pair).toMatchObject({
      kij: 0.02,
      origin: 'given',
      instead: { kij: bank.pair?.kij, origin: 'fitted', source: bank.pair?.source },
    });
    expect(own.assumed).toBe(false);
  });

  test('is cleared back to the bank’s, and the file is as it was', async () => {
    const before = withPairs();
    const own = done(setPair(before, 'n-butane', 'methane', 0.02)).sketch;
    const after = done(setPair(own, 'methane', 'n-butane', undefined)).sketch;
    expect(after).toEqual(before);
    expect((await inForce(after)).pair).toEqual((await inForce(before)).pair);
  });

  test('keeps its place and further fields, and two entries of one pair become one', () => {
    const other = { i: 'methane', j: 'n-decane', kij: 0.04 };
    const sketch = withPairs([
      { i: 'methane', j: 'n-butane', kij: 0.01 },
      { i: 'n-butane', j: 'methane', kij: 0.03, note: 'own fit' },
      other,
    ]);
    const { model } = done(setPair(sketch, 'methane', 'n-butane', 0.02)).sketch;
    expect(model.pairs).toEqual([{ i: 'n-butane', j: 'methane', kij: 0.02, note: 'own fit' }, other]);
  });

  test('leaves parameters of other forms alone', () => {
    const foreign = { i: 'methane', j: 'n-butane', aij: 1, aji: 2 };
    const set = done(setPair(withPairs([foreign]), 'methane', 'n-butane', 0.02)).sketch;
    expect(set.model.pairs).toEqual([foreign, { i: 'methane', j: 'n-butane', kij: 0.02 }]);
    expect(done(setPair(set, 'methane', 'n-butane', undefined)).sketch.model.pairs).toEqual([foreign]);
  });

  test('is the same document when nothing changes', () => {
    const sketch = withPairs([{ i: 'methane', j: 'n-butane', kij: 0.02 }]);
    expect(done(setPair(sketch, 'n-butane', 'methane', 0.02)).sketch).toBe(sketch);
    expect(done(setPair(sketch, 'methane', 'n-decane', undefined)).sketch).toBe(sketch);
  });

  test('needs two chemicals and a number', () => {
    expect(refusedWith(setPair(withPairs(), 'methane', 'methane', 0))).toBe('edit/same-chemical');
    expect(refusedWith(setPair(withPairs(), 'methane', 'n-butane', Number.NaN))).toBe('edit/not-a-number');
  });
});
