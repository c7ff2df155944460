/** Time of columns: cold, warm, and in multiples of one Peng-Robinson evaluation at the same number of chemicals. */
import { solveColumn } from '../../src/engine/column/solve';
import { stateOf } from '../../src/engine/column/state';
import { shapeOf } from '../../src/engine/column/system';
import type { ColumnFeed, ColumnTask, Fixing } from '../../src/engine/column/types';
import { workFor } from '../../src/engine/column/work';
import { flash, makeFlashWork } from '../../src/engine/equilibrium/flash';
import type { ThermoModel } from '../../src/engine/thermo/types';
import { bankModel } from '../robust/bankModels';
import { timeModels } from './models';

export interface ColumnTiming {
  readonly name: string;
  readonly stages: number;
  readonly chemicals: number;
  /** Medians [ms]. */
  readonly cold_ms: number;
  /** After a change of 1 % of the distillate. */
  readonly warm_ms: number;
  readonly coldSteps: number;
  readonly warmSteps: number;
  /** In evaluations with first derivatives at the same number of chemicals. */
  readonly cold: number;
  readonly warm: number;
}

const EIGHT = [
  'propane',
  'n-butane',
  'n-pentane',
  'n-hexane',
  'benzene',
  'toluene',
  'ethylbenzene',
  'm-xylene',
];
const FIVE = ['isobutane', 'n-butane', 'isopentane', 'n-pentane', 'n-hexane'];

interface Case {
  readonly name: string;
  readonly ids: readonly string[];
  readonly z: readonly number[];
  readonly stages: number;
  readonly P_Pa: number;
  readonly ratio: number;
  readonly share: number;
}

const MIX = [0.05, 0.06, 0.1, 0.12, 0.27, 0.2, 0.08, 0.12];

const CASES: readonly Case[] = [
  { name: '18 x 8', ids: EIGHT, z: MIX, stages: 18, P_Pa: 2.5e5, ratio: 1.8, share: 0.3 },
  { name: '30 x 8', ids: EIGHT, z: MIX, stages: 30, P_Pa: 2.5e5, ratio: 1.8, share: 0.3 },
  {
    name: '150 x 5',
    ids: FIVE,
    z: [0.2, 0.35, 0.2, 0.15, 0.1],
    stages: 150,
    P_Pa: 5e5,
    ratio: 9,
    share: 0.2,
  },
];

export async function taskFor(c: Case): Promise<(share: number) => ColumnTask> {
  const model: ThermoModel = (await bankModel(c.ids)).of(c.ids.map((_, i) => i));
  const z = Float64Array.from(c.z);
  const at = flash(model, z, { P_Pa: c.P_Pa * 1.05, vapourFraction: 0.1 }, makeFlashWork(model));
  if (at.state !== 'solved') throw new Error('no feed');
  const F = 100;
  const feed: ColumnFeed = {
    place: Math.round(c.stages / 2),
    n_mol_s: z.map((x) => x * F),
    H_W: at.value.h_J_mol * F,
    T_K: at.value.T_K,
    vapourFraction: at.value.vapourFraction,
  };
  const places = c.stages + 2;
  const P_Pa = Float64Array.from({ length: places }, (_, j) => c.P_Pa * (1 + (0.1 * j) / places));
  return (share) => {
    const fixed: Fixing[] = [
      { fix: 'refluxRatio', value: c.ratio },
      { fix: 'flow', product: 'top', flow: { value: share * F, basis: 'mole' } },
    ];
    const efficiency = new Float64Array(places).fill(1);
    return {
      model,
      top: 'liquid',
      reboiler: true,
      P_Pa,
      feeds: [feed],
      draws: [],
      efficiency,
      subcooling_K: 0,
      fixed,
    };
  };
}

const median = (x: number[]): number => x.sort((a, b) => a - b)[Math.floor(x.length / 2)]!;

/** @param now  clock in milliseconds */
async function timeCase(c: Case, now: () => number, unit_us: number, rounds: number): Promise<ColumnTiming> {
  const make = await taskFor(c);
  const task = make(c.share);
  const work = workFor(task);
  if (work.shape !== shapeOf(task)) throw new Error('a workspace of another shape');
  const cold: number[] = [];
  const warm: number[] = [];
  let coldSteps = 0;
  let warmSteps = 0;
  for (let k = 0; k < rounds; k++) {
    const t0 = now();
    const end = solveColumn(task, undefined, work);
    const t1 = now();
    if (end.state !== 'solved') throw new Error(`${c.name} does not solve`);
    const state = stateOf(end.system);
    coldSteps = end.effort.iterations;
    const moved = make(c.share * (k % 2 === 0 ? 1.01 : 0.99));
    const t2 = now();
    const again = solveColumn(moved, state, work);
    const t3 = now();
    if (again.state !== 'solved' || again.effort.tried[0] !== 'warm')
      throw new Error(`${c.name} loses its way`);
    warmSteps = again.effort.iterations;
    cold.push(t1 - t0);
    warm.push(t3 - t2);
  }
  const [cold_ms, warm_ms] = [median(cold), median(warm)];
  return {
    name: c.name,
    stages: c.stages,
    chemicals: c.ids.length,
    cold_ms,
    warm_ms,
    coldSteps,
    warmSteps,
    cold: (cold_ms * 1e3) / unit_us,
    warm: (warm_ms * 1e3) / unit_us,
  };
}

/** Columns of several sizes, JIT warm. */
export async function timeColumns(now: () => number, rounds = 60): Promise<ColumnTiming[]> {
  const units = timeModels(now, [5, 8], 5).filter((t) => t.level === 2);
  const out: ColumnTiming[] = [];
  for (const c of CASES) {
    const unit = units.find((t) => t.chemicals === c.ids.length)!.us;
    out.push(await timeCase(c, now, unit, rounds));
  }
  return out;
}

/** Time and steps of cold solves of growing columns of five chemicals [stages, ms, steps]. */
export async function growth(
  now: () => number,
  stages: readonly number[] = [10, 25, 50, 100, 200],
  rounds = 25,
): Promise<(readonly [number, number, number])[]> {
  const out: (readonly [number, number, number])[] = [];
  for (const n of stages) {
    const t = await timeCase({ ...CASES[2]!, name: `${n} x 5`, stages: n }, now, 1, rounds);
    out.push([n, t.cold_ms, t.coldSteps]);
  }
  return out;
}
