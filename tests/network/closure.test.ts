import { beforeAll, describe, expect, test } from 'vitest';
import type { StreamState } from '../../src/engine/equilibrium/types';
import { type ClosureData, closureData, closureOf, worstOf } from '../../src/engine/network/closure';
import type { Basis } from '../../src/engine/network/types';
import { makeModel } from '../../src/engine/thermo/model';
import { emptyStream } from '../../src/engine/units/streams';
import { basisOf } from './fixtures';

let basis: Basis;
let data: ClosureData;
beforeAll(async () => {
  basis = await basisOf(['methane', 'oxygen', 'carbon-dioxide', 'water']);
  data = closureData(makeModel(basis.model, basis.chemicals));
});

/** Only what closure reads: amounts and an enthalpy so many joules above the ideal gas at 298.15 K. */
const stream = (n: readonly number[], above_W = 0): StreamState => {
  const n_mol_s = Float64Array.from(n);
  const H_W = n.reduce((sum, amount, i) => sum + amount * data.hIdeal_J_mol[i]!, above_W);
  return { ...emptyStream(n.length, 300, 1e5), n_mol_s, H_W };
};
const around = (a: StreamState[], b: StreamState[], heat = 0, power = 0, made?: readonly number[]) =>
  closureOf(a, b, heat, power, made && Float64Array.from(made), data);

describe('closure', () => {
  test('is zero for what comes in and leaves, however it is parted', () => {
    const closed = around(
      [stream([3, 1, 0, 2], 500)],
      [stream([1, 1, 0, 0], 100), stream([2, 0, 0, 2], 400)],
    );
    expect(worstOf(closed)).toBeLessThan(1e-15);
  });

  test('measures a chemical against its own flow, and a trace against a millionth of the whole', () => {
    const closed = around([stream([100, 1, 1e-6, 0])], [stream([100, 0.99, 0, 0])]);
    expect(closed.chemicals[0]!.relative).toBe(0);
    expect(closed.chemicals[1]!.relative).toBeCloseTo(0.01, 12);
    // Derived: the whole 1e-6 is missing; the measure is 1e-6 of 101.000001 mol/s.
    expect(closed.chemicals[2]!.relative).toBeCloseTo(1 / 101.000001, 9);
    expect(closed.chemicals[3]!.relative).toBe(0);
  });

  test('counts what reactions make: methane burns, elements and mass stay', () => {
    const before = stream([1, 2, 0, 0]);
    const after = stream([0, 0, 1, 2]);
    // Derived: heat of combustion at 298.15 K = difference of the formation enthalpies, water as vapour.
    const heat_W = after.H_W - before.H_W;
    const closed = around([before], [after], heat_W, 0, [-1, -2, 1, 2]);
    expect(worstOf(closed)).toBeLessThan(1e-4);
    for (const e of [...closed.chemicals, ...Object.values(closed.elements)])
      expect(e.relative).toBeLessThan(1e-15);
    expect(closed.energy.relative).toBeLessThan(1e-12);
    expect(Object.keys(closed.elements).sort()).toEqual(['C', 'H', 'O']);
    // The molar masses are rounded to their printed digits.
    expect(closed.mass.relative).toBeLessThan(1e-4);
    expect(around([before], [after], heat_W).chemicals[0]!.relative).toBe(1);
  });

  test('never measures energy against formation enthalpies', () => {
    // Derived: 50 W are missing; against |Q| + |W| = 200 W, against 1 kJ/mol * 10 mol/s, against 80 kW above the datum.
    const n = [0, 0, 0, 10];
    expect(
      around([stream([0, 0, 0, 0.1])], [stream([0, 0, 0, 0.1], 150)], 150, 50).energy.relative,
    ).toBeCloseTo(0.25, 9);
    expect(around([stream(n)], [stream(n, 50)]).energy.relative).toBeCloseTo(0.005, 9);
    expect(around([stream(n, 8e4)], [stream(n, 8e4 + 50)]).energy.relative).toBeCloseTo(50 / 80050, 9);
    expect(around([stream(n)], [stream(n, 50)], 30, 20).energy).toMatchObject({ made: 50 });
  });

  test('claims no elements for a chemical without a formula, and is not a number only where a stream is not', () => {
    const nameless = { ...basis.chemicals[3]!, id: 'mud' };
    Reflect.deleteProperty(nameless, 'elements');
    const muddy = closureData(makeModel(basis.model, [...basis.chemicals.slice(0, 3), nameless]));
    const flowing = stream([1, 0, 0, 1]);
    expect(closureOf([flowing], [flowing], 0, 0, undefined, muddy).elements).toEqual({});
    const dry = stream([1, 0, 0, 0]);
    expect(Object.keys(closureOf([dry], [dry], 0, 0, undefined, muddy).elements)).toContain('C');
    expect(worstOf(around([{ ...dry, H_W: Number.NaN }], [dry]))).toBeNaN();
  });

  test('of nothing is zero', () => {
    expect(worstOf(around([], []))).toBe(0);
    expect(worstOf(around([emptyStream(4, 300, 1e5)], [emptyStream(4, 300, 1e5)]))).toBe(0);
  });
});
