/** Columns inside loops: bottoms that return, and the oil between an absorber and a stripper, its flow given by a read. */
import { describe, expect, test } from 'vitest';
import { worstOf } from '../../src/engine/network/closure';
import { makeMemory } from '../../src/engine/network/memory';
import type { ProblemUnit } from '../../src/engine/network/types';
import {
  basisOf,
  finish,
  fresh,
  molar,
  parts,
  problemOf,
  solvedStream,
  streamId,
  unit,
  unitId,
  unitResult,
} from '../network/fixtures';

const share = (value: number, of: 'feed' | { stream: string } = 'feed') => ({
  is: 'share',
  share: value,
  of,
  basis: 'mole',
});

describe('a column whose bottoms return to its feed', () => {
  const loop = (purge: number, flow: number): ProblemUnit[] => [
    unit('f feed > out=1', {
      state: { T: 340, P: 5e5 },
      flow: molar(flow),
      composition: parts(2, 3, 4, 1, 0.5),
    }),
    unit('j join in1=1 in2=r > out=2', { p: { P: 4.5e5 } }),
    unit('h heater in=2 > out=3', { p: { drop: 0 }, T: 345 }),
    unit('c column feed1=3 > liquidDistillate=4 bottoms=5', {
      stages: 12,
      top: { distillate: 'liquid' },
      bottom: { reboiler: true },
      feeds: { feed1: { stage: 6 } },
      pressure: { condenser: 4e5, top: 4e5, bottom: 4.2e5, reboiler: 4.2e5 },
      fixedBy: [
        { fix: 'refluxRatio', value: 2 },
        { fix: 'recovery', product: 'liquidDistillate', chemical: 1, value: 0.9 },
      ],
    }),
    unit('d divide in=5 > out1=6 out2=7', { shares: { out2: share(purge) } }),
    unit('p pump in=6 > out=8', { p: { P: 6e5 }, efficiency: 0.7 }),
    unit('e cooler in=8 > out=r', { p: { drop: 0 }, T: 320 }),
  ];

  test.each([
    [0.2, 20],
    [0.05, 25],
    [0.01, 31],
  ])(
    'closes with a purge of %d within %i passes, and within 13 after a change of a tenth',
    async (purge, most) => {
      const basis = await basisOf(['propane', 'n-butane', 'n-pentane', 'n-hexane', 'n-heptane']);
      const memory = makeMemory(basis);
      const cold = finish(problemOf(basis, loop(purge, 30)), memory);
      expect(unitResult(cold, 'c')!.loop!.passes).toBeLessThanOrEqual(most);
      expect(worstOf(cold.closure!)).toBeLessThan(1e-9);
      const live = finish(problemOf(basis, loop(purge, 33), { edit: 2 }), memory);
      expect(unitResult(live, 'c')!.loop!.passes).toBeLessThanOrEqual(13);
      // Derived: the loop is linear in what is fed, so a tenth more of it gives a tenth more everywhere.
      for (const id of ['4', '7', 'r'])
        expect(solvedStream(live, id).n_mol_s / solvedStream(cold, id).n_mol_s).toBeCloseTo(1.1, 6);
      // Derived: what enters leaves by the distillate and the purge.
      expect(solvedStream(live, '4').n_mol_s + solvedStream(live, '7').n_mol_s).toBeCloseTo(33, 6);
    },
  );
});

describe('absorber and stripper with oil between them', () => {
  /** As much oil goes round as `share` of the gas; what the make-up brings too much leaves as a bleed. */
  const loop = (gas: number): ProblemUnit[] => [
    unit('f feed > out=g', {
      state: { T: 310, P: 10e5 },
      flow: molar(gas),
      composition: parts(80, 12, 8, 0),
    }),
    unit('m feed > out=mk', { state: { T: 300, P: 10e5 }, flow: molar(0.1), composition: parts(0, 0, 0, 1) }),
    unit('j join in1=mk in2=lean > out=oil', { p: { P: 10e5 } }),
    unit('a column feed1=oil feed2=g > vapourDistillate=lg bottoms=rich', {
      stages: 8,
      top: { distillate: 'none' },
      bottom: { reboiler: false },
      feeds: { feed1: { stage: 1 }, feed2: { stage: 8 } },
      pressure: { top: 9.8e5, bottom: 10e5 },
      fixedBy: [],
    }),
    unit('v valve in=rich > out=r2', { p: { P: 2e5 } }),
    unit('h heater in=r2 > out=r3', { p: { drop: 0 }, T: 350 }),
    unit('s column feed1=r3 > vapourDistillate=og bottoms=hot', {
      stages: 8,
      top: { distillate: 'none' },
      bottom: { reboiler: true },
      feeds: { feed1: { stage: 1 } },
      pressure: { top: 1.8e5, bottom: 2e5, reboiler: 2e5 },
      fixedBy: [{ fix: 'boilup', value: 0.3 }],
    }),
    unit('p pump in=hot > out=hp', { p: { P: 10.5e5 }, efficiency: 0.7 }),
    unit('e cooler in=hp > out=cold', { p: { drop: 0.2e5 }, T: 305 }),
    unit('d divide in=cold > out1=lean out2=bleed', { shares: { out1: share(0.3, { stream: 'g' }) } }),
  ];
  const reads = [{ unit: unitId('d'), path: 'shares.out1', stream: streamId('g'), of: 'mol' } as const];

  test('fills from the make-up and goes round as told', async () => {
    const basis = await basisOf(['methane', 'propane', 'n-butane', 'n-decane']);
    const batch = fresh(problemOf(basis, loop(20), { reads }), basis);
    expect(worstOf(batch.closure!)).toBeLessThan(1e-9);
    expect(batch.closure!.complete).toBe(true);
    // Derived: 30 % of 20 mol/s; the make-up of oil leaves with both gases and the bleed.
    expect(solvedStream(batch, 'lean').n_mol_s).toBeCloseTo(6, 8);
    const oil = (id: string) => solvedStream(batch, id).n_mol_s * solvedStream(batch, id).z[3]!;
    expect(oil('lg') + oil('og') + oil('bleed')).toBeCloseTo(0.1, 8);
    expect(unitResult(batch, 'a')!.loop!.passes).toBeLessThanOrEqual(16);
  });
});
