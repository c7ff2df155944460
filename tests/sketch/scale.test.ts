import { describe, expect, test } from 'vitest';
import { parseQuantity } from '../../src/quantity';
import { scaledFlows, scaleFeeds } from '../../src/sketch/edits';
import type { Json, Sketch } from '../../src/sketch/types';
import { done, opened, refusedWith } from './help';

const feeds = (...settings: readonly { readonly [key: string]: Json }[]): Sketch =>
  opened({
    format: 'splitwright.sketch',
    version: 1,
    chemicals: ['methane', 'n-butane'],
    model: { kind: 'peng-robinson' },
    units: [
      ...settings.map((s, k) => ({ id: `u${k}`, tag: `FEED-${k}`, kind: 'feed', settings: s })),
      { id: 'd', tag: 'D-1', kind: 'divide', settings: { shares: { out2: '10 kmol/h' } } },
    ],
    streams: [],
  });
const settingsOf = (sketch: Sketch, k: number) => sketch.units[k]?.settings;

describe('scaling all feeds', () => {
  test('multiplies flows in the units they were typed in, and nothing else', () => {
    const sketch = feeds(
      { flow: '100 kmol/h', state: { T: '40 degC', P: '3 barg' } },
      { flow: '2500  kg/h' },
      { composition: { flows: { methane: '1.1 kmol/h', 'n-butane': '30 lb/h' } } },
    );
    const { sketch: after, label } = done(scaleFeeds(sketch, 1.1));
    expect(settingsOf(after, 0)).toEqual({ flow: '110 kmol/h', state: { T: '40 degC', P: '3 barg' } });
    expect(settingsOf(after, 1)).toEqual({ flow: '2750  kg/h' });
    expect(settingsOf(after, 2)).toEqual({
      composition: { flows: { methane: '1.21 kmol/h', 'n-butane': '33 lb/h' } },
    });
    expect(after.units[3]).toBe(sketch.units[3]);
    expect(label).toBe('scale all feeds by 1.1');
  });

  test('carries a factor of many figures to the flows', () => {
    const si = (text: Json | undefined): number => {
      const read = parseQuantity(String(text), 'molarFlow');
      return read.ok ? read.si : Number.NaN;
    };
    const sketch = feeds({ flow: '100 kmol/h' }, { flow: '0.37 lbmol/min' });
    const factor = Math.PI / 7;
    const { sketch: after } = done(scaleFeeds(sketch, factor));
    for (const k of [0, 1])
      expect(si(settingsOf(after, k)?.flow) / si(settingsOf(sketch, k)?.flow)).toBeCloseTo(factor, 13);
  });

  test('leaves a share of a stream and a text that cannot be read, and does what it can', () => {
    const share = { share: '10 %', of: { stream: 's1' }, basis: 'mole' };
    const sketch = feeds({ flow: share }, { flow: 'plenty' }, { flow: '10 kmol/h' });
    const { sketch: after } = done(scaleFeeds(sketch, 2));
    expect(after.units.slice(0, 2)).toEqual(sketch.units.slice(0, 2));
    expect(settingsOf(after, 2)).toEqual({ flow: '20 kmol/h' });
    expect(scaledFlows(sketch, 2)).toEqual([
      { unit: sketch.units[2], path: 'flow', from: '10 kmol/h', to: '20 kmol/h' },
    ]);
  });

  test('by one is the same document', () => {
    const sketch = feeds({ flow: '33.3333333333333333 kmol/h' });
    expect(done(scaleFeeds(sketch, 1)).sketch).toBe(sketch);
  });

  test.each([0, -1, Number.NaN, Number.POSITIVE_INFINITY])('by %d is refused', (factor) => {
    expect(refusedWith(scaleFeeds(feeds({ flow: '1 kmol/h' }), factor))).toBe('edit/bad-factor');
  });

  test('without any flow is refused', () => {
    expect(refusedWith(scaleFeeds(feeds({}), 2))).toBe('edit/nothing-to-scale');
  });
});
