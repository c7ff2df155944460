import { expect, test } from 'vitest';
import { iconOf } from '../../src/drawing/symbols/icon';
import { plainSymbol } from '../../src/drawing/symbols/registry';

/** Tip of the filled arrowhead: its path begins there. */
const tip = (kind: string): readonly number[] => {
  const head = iconOf(kind).paths.find(({ fill }) => fill === 'ink');
  return (/^M(-?[\d.]+) (-?[\d.]+)/.exec(head?.d ?? '') ?? []).slice(1).map(Number);
};

test('on the shelf heat points up into the heater and down out of the cooler', () => {
  const edge = plainSymbol('heater').links![0]!.from;
  expect(tip('heater')).toEqual(edge);
  const [x, y] = tip('cooler');
  expect(x).toBe(edge[0]);
  expect(y).toBeGreaterThan(edge[1]);
  // The whole arrow is inside the picture.
  const { box } = iconOf('cooler');
  expect(y).toBeLessThanOrEqual(box.y + box.h);
});

test('on the shelf a pump is its circle alone: the shaft link shows on the sheet', () => {
  expect(iconOf('pump').box).toEqual(plainSymbol('pump').box);
  expect(iconOf('pump').paths).toEqual(plainSymbol('pump').paths);
});
