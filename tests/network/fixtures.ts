/** Problems as compile would make them, for tests of units, network and worker. Compositions and conditions are made up. */

import { bank } from '../../src/data/bank';
import type { ChemicalData } from '../../src/engine/chemicals/types';
import type { StreamId, UnitId } from '../../src/engine/ids';
import { type Memory, makeMemory } from '../../src/engine/network/memory';
import { type SolveOptions, solveNetwork } from '../../src/engine/network/solve';
import type { Basis, Problem, ProblemUnit, SolveBatch, StreamResult } from '../../src/engine/network/types';
import type { ModelSpec } from '../../src/engine/thermo/types';

export const SITE = { pressure_Pa: 101325, ambient_K: 293.15, coolingWater_K: 301.15 };
export const unitId = (id: string): UnitId => id as UnitId;
export const streamId = (id: string): StreamId => id as StreamId;

export async function basisOf(
  ids: readonly string[],
  kind: ModelSpec['kind'] = 'peng-robinson',
  id = `${kind} ${ids.join(' ')}`,
): Promise<Basis> {
  const found = await bank.chemicals(ids);
  const chemicals: ChemicalData[] = ids.map((name) => {
    const chemical = found.get(name);
    if (!chemical) throw new Error(`no ${name} in the bank`);
    return chemical;
  });
  const pairs = kind === 'raoult' ? [] : await bank.pairsFor(chemicals, { bankPairs: true, pairs: [] });
  return {
    id,
    chemicals,
    model: { kind, alpha: '1976', liquidH: 'psat-slope', liquidVolume: 'corrected', poynting: false, pairs },
  };
}

/** 'tag kind in1=1 in2=2 > out=3' with settings: a unit in one line. */
export function unit(line: string, settings: unknown): ProblemUnit {
  const [before = '', after = ''] = line.split('>');
  const [id = '', kind = '', ...ins] = before.trim().split(/\s+/);
  const ports = (pairs: readonly string[]): Record<string, StreamId> =>
    Object.fromEntries(
      pairs.map((pair) => {
        const [port = '', stream = ''] = pair.split('=');
        return [port, streamId(stream)];
      }),
    );
  return {
    id: unitId(id),
    kind,
    settings,
    in: ports(ins),
    out: ports(after.trim().split(/\s+/).filter(Boolean)),
  };
}

export const problemOf = (
  basis: Basis,
  units: readonly ProblemUnit[],
  more: Partial<Problem> = {},
): Problem => ({
  edit: 1,
  basis: basis.id,
  site: SITE,
  units,
  reads: [],
  aims: [],
  limits: {},
  ...more,
});

export const molar = (n_mol_s: number) => ({ is: 'molar', n_mol_s }) as const;
export const parts = (...x: number[]) => {
  const sum = x.reduce((a, b) => a + b, 0);
  return { is: 'parts', basis: 'mole', parts: Float64Array.from(x, (v) => v / sum) } as const;
};

/** Runs a solve to its end. */
export function finish(
  problem: Problem,
  memory: Memory,
  options?: SolveOptions,
): SolveBatch & { steps: string[] } {
  const steps: string[] = [];
  const solve = solveNetwork(problem, memory, options);
  for (;;) {
    const step = solve.next();
    if (step.done) return { ...step.value, steps };
    steps.push(step.value.unit);
  }
}

/** Solved from nothing in a memory of its own. */
export const fresh = (problem: Problem, basis: Basis, options?: SolveOptions) =>
  finish(problem, makeMemory(basis), options);

export type SolvedStream = Extract<StreamResult, { state: 'solved' }>;
export function solvedStream(batch: SolveBatch, id: string): SolvedStream {
  const found = batch.streams.find(([name]) => name === id)?.[1];
  if (found?.state !== 'solved') throw new Error(`stream ${id} is ${found?.state ?? 'absent'}`);
  return found;
}
export const unitResult = (batch: SolveBatch, id: string) => batch.units.find(([name]) => name === id)?.[1];

/** Seven hydrocarbons let down from their bubble point into an adiabatic drum. */
export const LET_DOWN = ['methane', 'ethane', 'propane', 'n-butane', 'n-pentane', 'n-heptane', 'n-decane'];
export const letDown = (P_Pa = 7e5): ProblemUnit[] => [
  unit('f feed > out=1', {
    state: { T: 325.15, vapourFraction: 0 },
    flow: molar(150e3 / 3600),
    composition: parts(22, 8, 9, 10, 12, 21, 18),
  }),
  unit('v valve in=1 > out=2', { p: { P: P_Pa } }),
  unit('d drum in1=2 > vapour=3 liquid=4', { p: { drop: 0 } }),
];
