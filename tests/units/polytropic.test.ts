import { expect, test } from 'vitest';
import type { StreamState } from '../../src/engine/equilibrium/types';
import type { PhaseProps, ThermoModel } from '../../src/engine/thermo/types';
import { type Entering, type Leaving, polytropicPath } from '../../src/engine/units/compression/state';

const R = 8.314462618;
const CP = 30;

/** A gas of constant heat capacity whose volume is that of an ideal gas times `bulk`: only what the path reads is there. */
function gasOf(bulk: (T_K: number) => number): ThermoModel {
  return {
    makeProps: () => ({}) as PhaseProps,
    evaluate(_: unknown, T: number, P: number, __: unknown, ___: unknown, out: PhaseProps) {
      out.h_J_mol = CP * T;
      out.v_m3_mol = (bulk(T) * R * T) / P;
      out.cp_J_molK = CP;
    },
  } as unknown as ThermoModel;
}

const state = (T_K: number, P_Pa: number): StreamState =>
  ({
    T_K,
    P_Pa,
    H_W: CP * T_K,
    n_mol_s: Float64Array.of(1),
    phases: [{ kind: 'vapour', fraction: 1 }],
  }) as unknown as StreamState;

const from = (thermo: ThermoModel): Entering => ({
  stream: state(300, 1e5),
  total_mol_s: 1,
  h_J_mol: CP * 300,
  gas: { thermo, x: Float64Array.of(1) },
});
const to = (T_K: number, isentropic_K: number): Leaving => ({
  out: state(T_K, 4e5),
  isentropic: state(isentropic_K, 4e5),
});

test('the polytropic efficiency of an ideal gas is (R/cp) ln(P2/P1) / ln(T2/T1)', () => {
  const found = polytropicPath(from(gasOf(() => 1)), to(480, 300 * 4 ** (R / CP)), 1);
  // Derived: cp dT = (1/efficiency) R T d ln P.
  expect(found?.efficiency).toBeCloseTo(((R / CP) * Math.log(4)) / Math.log(480 / 300), 6);
});

test('an efficiency whose path is not found is not reported', () => {
  // A volume that jumps about with temperature: the work of a path is no smooth function of its efficiency.
  const ragged = gasOf((T) => 1 + 0.5 * Math.sin(1e7 * T));
  expect(polytropicPath(from(ragged), to(480, 420), 1)).toBeUndefined();
});
