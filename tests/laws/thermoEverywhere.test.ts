import { describe, expect, test } from 'vitest';
import { positiveRoots } from '../../src/engine/numerics/cubic';
import { seeded } from '../numerics/seeded';
import { MODELS, modelFor } from './thermoCases';

const ids = [
  'hydrogen',
  'helium',
  'nitrogen',
  'methane',
  'carbon-dioxide',
  'water',
  'n-decane',
  'n-eicosane',
  'glycerol',
];

describe.each(Object.keys(MODELS))('%s', (name) => {
  test('gives finite numbers from 10 to 3000 K, 1 mPa to 1 GPa, absent and trace chemicals (seed 42)', () => {
    const next = seeded(42);
    const model = modelFor(name, ids);
    const { n } = model;
    const out = model.makeProps();
    const bad: string[] = [];
    for (let trial = 0; trial < 6000; trial++) {
      const T = 10 * 300 ** next();
      const P = 10 ** (-3 + 12 * next());
      const x = Float64Array.from({ length: n }, () => (next() < 0.4 ? 0 : 10 ** (-6 * next() * next())));
      const sum = x.reduce((a, b) => a + b, 0);
      if (sum === 0) continue;
      for (let i = 0; i < n; i++) x[i]! /= sum;
      const side = (['vapour', 'liquid', 'stable'] as const)[trial % 3]!;
      model.evaluate(side, T, P, x, 2, out);
      const vectors = [out.lnPhi, out.dT, out.dP, out.dN, out.hPartial];
      const scalars = [out.h_J_mol, out.s_J_molK, out.cp_J_molK, out.v_m3_mol, out.Z];
      const volume = model.liquidVolume_m3_mol(T, P, x);
      if (
        vectors.some((v) => !v.every(Number.isFinite)) ||
        !scalars.every(Number.isFinite) ||
        !(out.v_m3_mol > 0 && volume > 0 && Number.isFinite(volume))
      )
        bad.push(`${side} ${T} K ${P} Pa ${[...x].join(' ')}`);
    }
    expect(bad).toEqual([]);
  });
});

describe('the cubic of Peng-Robinson', () => {
  test('is fulfilled to rounding by every root handed out, for any a and b (seed 43)', () => {
    const next = seeded(43);
    const ends = new Float64Array(2);
    let worst = 0;
    for (let trial = 0; trial < 100_000; trial++) {
      const q = 0.05 + 60 * next() * next();
      const B = 10 ** (-8 + 10 * next());
      const A = q * B;
      positiveRoots(4 * B - 1, A - 4 * B + 2 * B * B, -2 * B * B, ends);
      for (const w of ends) {
        const plus = w ** 3 + 4 * B * w * w + 2 * B * B * w + A * w;
        const minus = w * w + 4 * B * w + 2 * B * B;
        worst = Math.max(worst, Math.abs(plus - minus) / (plus + minus));
      }
    }
    expect(worst).toBeLessThan(1e-15);
  });
});
