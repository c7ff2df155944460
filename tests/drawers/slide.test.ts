import { describe, expect, test } from 'vitest';
import { farther, START, slidText, tenthsOf, type Way } from '../../src/parts/slide';
import { STANDARD_SITE } from '../../src/quantity';

const walk = (steps: readonly (readonly [number, Way['times']])[]): readonly (string | undefined)[] => {
  let way = START;
  return steps.map(([by, times]) => {
    way = farther(way, by, times);
    return slidText('7.0 bar', tenthsOf(way), 'pressure', STANDARD_SITE, {});
  });
};

// Derived: one step from 7.0 bar is 0.01 bar, a coarse one 0.1, a fine one 0.001.
describe('steps of mixed size', () => {
  test('add up: none is lost when the size changes', () => {
    expect(
      walk([
        [1, 1],
        [1, 10],
        [1, 1],
        [3, 0.1],
        [1, 10],
        [-1, 1],
      ]),
    ).toEqual(['7.01 bar', '7.11 bar', '7.12 bar', '7.123 bar', '7.223 bar', '7.213 bar']);
  });

  test('come back to the text they began with', () => {
    expect(
      walk([
        [4, 0.1],
        [2, 10],
        [-2, 10],
        [-4, 0.1],
      ]).at(-1),
    ).toBe('7.0 bar');
  });

  test('of a hand are whole ones of the size that counts', () => {
    expect(
      walk([
        [0.4, 1],
        [0.4, 1],
        [0.4, 10],
        [0.4, 10],
      ]),
    ).toEqual(['7.0 bar', '7.01 bar', '7.01 bar', '7.11 bar']);
  });
});

test('a slide ends where the range does', () => {
  const range = { min: 0, max: 7.05e5 };
  expect(slidText('7.0 bar', 50, 'pressure', STANDARD_SITE, range)).toBe('7.05 bar');
  expect(slidText('7.0 bar', 60, 'pressure', STANDARD_SITE, range)).toBeUndefined();
});
