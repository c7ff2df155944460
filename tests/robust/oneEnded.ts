import { solveColumn } from '../../src/engine/column/solve';
import type { StageSystem } from '../../src/engine/column/system';
import { productFlow } from '../../src/engine/column/targets';
import type { Fixing } from '../../src/engine/column/types';
import { bankModel } from './bankModels';
import { type ColumnCase, chemicalsOf, FEED_MOL_S, makePool, taskOf } from './columns';
import type { GroupReport } from './groups';
import { makeRandom, type Random } from './random';
import { Tally } from './tally';

/**
 * A rectifier: saturated vapour under the last stage, a condenser, any reflux ratio. A stripper: saturated liquid on the first
 * stage, a reboiler, any share that leaves over the top. Either has an answer whatever the value.
 */
function draw(random: Random, ids: readonly string[], critical_Pa: number): ColumnCase {
  const raw = ids.map(() => 0.02 - Math.log(1 - random.next()));
  const total = raw.reduce((a, b) => a + b, 0);
  const stages = random.whole(5, 40);
  const Ptop = random.logBetween(1e5, Math.min(20e5, 0.5 * critical_Pa));
  const rectifies = random.next() < 0.5;
  const value = random.between(0.05, 0.9) * FEED_MOL_S;
  const fixed: Fixing[] = rectifies
    ? [{ fix: 'refluxRatio', value: random.logBetween(0.3, 6) }]
    : [{ fix: 'flow', product: 'top', flow: { value, basis: 'mole' } }];
  return {
    ids,
    z: raw.map((x) => x / total),
    stages,
    top: rectifies ? (random.next() < 0.5 ? 'liquid' : 'vapour') : 'none',
    reboiler: !rectifies,
    P_Pa: [Ptop, Ptop + stages * random.between(0, 1000)],
    // Places count from the condenser.
    feedPlace: rectifies ? stages : 0,
    vapourFraction: rectifies ? 1 : 0,
    fixed,
  };
}

/** What fixes the same column in another way, from what came out. */
function otherFixing(s: StageSystem): Fixing {
  const sumOf = (product: 'top' | 'bottoms'): number => {
    const flow = productFlow(s, product);
    let sum = 0;
    for (let i = 0; i < s.n; i++) sum += flow.at(i);
    return sum;
  };
  return s.first === 1
    ? { fix: 'flow', product: 'top', flow: { value: sumOf('top'), basis: 'mole' } }
    : { fix: 'boilup', value: s.V[s.places - 1]! / sumOf('bottoms') };
}

/**
 * Random columns with one end only, 3 to 12 chemicals, 5 to 40 stages, 1 to 20 bar, from nothing: plain ones, and the same ones
 * fixed by what came out.
 */
export async function oneEnded(seed: number, count: number): Promise<GroupReport> {
  const random = makeRandom(seed);
  const pool = await makePool();
  const tally = new Tally<ColumnCase>();
  while (tally.tried < count) {
    const ids = chemicalsOf(random, pool);
    const model = (await bankModel(ids)).of(ids.map((_, i) => i));
    const critical_Pa = Math.min(...model.chemicals.filter((c) => c.Tb_K! > 150).map((c) => c.Pc_Pa!));
    const of = draw(random, ids, critical_Pa);
    const task = taskOf(of, model, of.fixed);
    const plain = task && tally.take(solveColumn(task), of);
    if (!plain || tally.tried >= count) continue;
    const fixed = [otherFixing(plain)];
    tally.take(solveColumn({ ...task, fixed }), { ...of, fixed });
  }
  return tally.report();
}
