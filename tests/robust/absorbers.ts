import { solveColumn } from '../../src/engine/column/solve';
import type { ColumnFeed, ColumnTask } from '../../src/engine/column/types';
import { flash, makeFlashWork } from '../../src/engine/equilibrium/flash';
import type { ThermoModel } from '../../src/engine/thermo/types';
import { bankModel } from './bankModels';
import { chemicalsOf, FEED_MOL_S, makePool } from './columns';
import type { GroupReport } from './groups';
import { makeRandom, type Random } from './random';
import { Tally } from './tally';

/** What anyone needs to try an absorber again. */
interface AbsorberCase {
  readonly ids: readonly string[];
  readonly P_Pa: readonly number[];
  readonly feeds: readonly {
    readonly place: number;
    readonly T_K: number;
    readonly n_mol_s: readonly number[];
  }[];
}

/** A feed of some of the chemicals, saturated. */
function saturated(
  model: ThermoModel,
  x: readonly number[],
  P_Pa: number,
  vapourFraction: 0 | 1,
): Omit<ColumnFeed, 'place'> | undefined {
  const total = x.reduce((a, b) => a + b, 0);
  const z = Float64Array.from(x, (n) => n / total);
  const at = flash(model, z, { P_Pa, vapourFraction }, makeFlashWork(model));
  if (at.state !== 'solved') return undefined;
  return {
    n_mol_s: Float64Array.from(x),
    H_W: at.value.h_J_mol * total,
    T_K: at.value.T_K,
    vapourFraction,
  };
}

/**
 * Liquid on the first stage, rich in the heavy chemicals, against gas under the last one, rich in the light ones; both hold
 * some of every chemical, so that either phase is there on every stage.
 */
function draw(random: Random, model: ThermoModel): ColumnTask | undefined {
  const { n, chemicals } = model;
  const places = random.whole(3, 30);
  const Ptop = random.logBetween(1e5, Math.min(20e5, 0.4 * Math.min(...chemicals.map((c) => c.Pc_Pa!))));
  const P_Pa = Float64Array.from({ length: places }, (_, j) => Ptop + j * random.between(0, 500));
  P_Pa.sort();
  const byBoiling = chemicals.map((c, i) => [c.Tb_K!, i] as const).sort((a, b) => a[0] - b[0]);
  const rank = new Float64Array(n);
  byBoiling.forEach(([, i], k) => {
    rank[i] = k / (n - 1);
  });
  const amounts = (of: (r: number) => number, total: number): number[] => {
    const raw = Array.from(rank, (r) => of(r) * (0.2 + random.next()));
    const sum = raw.reduce((a, b) => a + b, 0);
    return raw.map((v) => (v / sum) * total);
  };
  const oil = random.logBetween(0.4, 3) * FEED_MOL_S;
  const liquid = saturated(
    model,
    amounts((r) => 0.05 + r * r, oil),
    P_Pa[0]!,
    0,
  );
  const gas = saturated(
    model,
    amounts((r) => 0.05 + (1 - r) ** 2, FEED_MOL_S),
    P_Pa[places - 1]!,
    1,
  );
  if (!liquid || !gas) return undefined;
  return {
    model,
    top: 'none',
    reboiler: false,
    P_Pa,
    feeds: [
      { ...liquid, place: 0 },
      { ...gas, place: places - 1 },
    ],
    draws: [],
    efficiency: new Float64Array(places).fill(1),
    subcooling_K: 0,
    fixed: [],
  };
}

/** Random columns without ends, 3 to 12 chemicals, 3 to 30 stages, 1 to 20 bar, from nothing. */
export async function absorbers(seed: number, count: number): Promise<GroupReport> {
  const random = makeRandom(seed);
  const pool = await makePool();
  const tally = new Tally<AbsorberCase>();
  while (tally.tried < count) {
    const ids = chemicalsOf(random, pool);
    const model = (await bankModel(ids)).of(ids.map((_, i) => i));
    const task = model.n > 1 ? draw(random, model) : undefined;
    if (!task) continue;
    const feeds = task.feeds.map((f) => ({ place: f.place, T_K: f.T_K, n_mol_s: [...f.n_mol_s] }));
    tally.take(solveColumn(task), { ids, P_Pa: [...task.P_Pa], feeds });
  }
  return tally.report();
}
