import type { ChemicalData } from '../engine/chemicals/types';
import type { StreamId, UnitId } from '../engine/ids';
import { makeMemory } from '../engine/network/memory';
import { solveNetwork } from '../engine/network/solve';
import type { Basis, Problem } from '../engine/network/types';
import type { Turns } from './port';

/** Made-up chemicals, light to heavy: they only have to lead the code along its usual paths, and are never shown. */
const chemical = (
  id: string,
  MW_g_mol: number,
  Tc_K: number,
  Pc_Pa: number,
  omega: number,
): ChemicalData => ({
  id,
  name: id,
  MW_g_mol,
  Tc_K,
  Pc_Pa,
  omega,
  Hf_J_mol: 0,
  S0_J_molK: 200,
  corr: { ideal_gas_cp: [{ form: 'powers', of: 'Cp', c: [20 + MW_g_mol, 0.1] }] },
  sources: {},
});
const BASIS: Basis = {
  id: 'prewarm',
  chemicals: [
    chemical('light', 20, 200, 46e5, 0.02),
    chemical('middling', 44, 370, 42e5, 0.15),
    chemical('heavy', 86, 507, 30e5, 0.3),
    chemical('heavier', 142, 618, 21e5, 0.49),
  ],
  model: {
    kind: 'peng-robinson',
    alpha: '1976',
    liquidH: 'psat-slope',
    liquidVolume: 'corrected',
    poynting: false,
    pairs: [],
  },
};

const u = (id: string): UnitId => id as UnitId;
const s = (id: string): StreamId => id as StreamId;

/** Feed, valve, drum, heater, cooler, join, divide; the conditions change with the edit, so that nothing is reused. */
function problemOf(edit: number): Problem {
  const P = 1e6 + 1e3 * (edit % 50);
  const parts = Float64Array.of(0.25, 0.25, 0.25, 0.25);
  return {
    edit,
    basis: BASIS.id,
    site: { pressure_Pa: 101325, ambient_K: 293.15, coolingWater_K: 301.15 },
    reads: [],
    aims: [],
    limits: {},
    units: [
      {
        id: u('f'),
        kind: 'feed',
        settings: {
          state: { T: 330, P: 3 * P },
          flow: { is: 'molar', n_mol_s: 10 },
          composition: { is: 'parts', basis: 'mole', parts },
        },
        in: {},
        out: { out: s('1') },
      },
      { id: u('v'), kind: 'valve', settings: { p: { P } }, in: { in: s('1') }, out: { out: s('2') } },
      {
        id: u('d'),
        kind: 'drum',
        settings: { p: { drop: 0 } },
        in: { in1: s('2') },
        out: { vapour: s('3'), liquid: s('4') },
      },
      {
        id: u('h'),
        kind: 'heater',
        settings: { p: { drop: 1e4 }, duty: 2e4 },
        in: { in: s('4') },
        out: { out: s('5') },
      },
      {
        id: u('c'),
        kind: 'cooler',
        settings: { p: { drop: 1e4 }, subcooling: 5 },
        in: { in: s('3') },
        out: { out: s('6') },
      },
      {
        id: u('j'),
        kind: 'join',
        settings: { p: { drop: 0 } },
        in: { in1: s('5'), in2: s('6') },
        out: { out: s('7') },
      },
      { id: u('p'), kind: 'product', settings: {}, in: { in: s('7') }, out: {} },
    ],
  };
}

/** Long enough for the compiler of the browser to settle [ms]. */
const ENOUGH_MS = 250;
const SLICE_MS = 8;

/**
 * Solves a small problem over and over, so that the first sketch does not pay for cold code. Gives way to any solve.
 *
 * @returns how many solves were made
 */
export async function prewarm(d: {
  readonly turns: Turns;
  readonly now: () => number;
  overtaken(): boolean;
}): Promise<{ readonly solves: number }> {
  const memory = makeMemory(BASIS);
  const begun = d.now();
  let slice = begun;
  let solves = 0;
  while (d.now() - begun < ENOUGH_MS) {
    const from = solves % 4 === 0 ? 'nothing' : 'warm';
    for (const _ of solveNetwork(problemOf(++solves), memory, { from }));
    if (d.now() - slice < SLICE_MS) continue;
    await d.turns.turn();
    if (d.overtaken()) break;
    slice = d.now();
  }
  return { solves };
}
