import type { ChemicalData } from '../../src/engine/chemicals/types';
import { solveColumn } from '../../src/engine/column/solve';
import type { StageSystem } from '../../src/engine/column/system';
import { dutyOf, productFlow } from '../../src/engine/column/targets';
import type { ColumnFeed, ColumnTask, Fixing } from '../../src/engine/column/types';
import { flash, makeFlashWork } from '../../src/engine/equilibrium/flash';
import type { ThermoModel } from '../../src/engine/thermo/types';
import { bankModel, usable } from './bankModels';
import type { GroupReport } from './groups';
import { makeRandom, type Random } from './random';

/** What anyone needs to try a column again. */
export interface ColumnCase {
  readonly ids: readonly string[];
  readonly z: readonly number[];
  readonly stages: number;
  readonly top: ColumnTask['top'];
  readonly reboiler: boolean;
  readonly P_Pa: readonly [number, number];
  readonly feedPlace: number;
  readonly vapourFraction: number;
  readonly fixed: readonly Fixing[];
}

export const FEED_MOL_S = 100;
const GASES = ['hydrogen', 'nitrogen', 'methane', 'carbon-monoxide', 'carbon-dioxide', 'argon'];

interface Drawn {
  readonly of: Omit<ColumnCase, 'fixed'>;
  readonly task: ColumnTask;
}

/** Chemicals that live together in a column: hydrocarbons of neighbouring volatility, now and then a gas or a wide cut. */
export async function makePool(): Promise<readonly ChemicalData[]> {
  const all = await usable('peng-robinson');
  const onlyCH = (c: ChemicalData): boolean =>
    Object.keys(c.elements ?? { X: 1 }).every((e) => e === 'C' || e === 'H');
  return all
    .filter((c) => onlyCH(c) && c.Tb_K !== undefined && c.Tb_K > 100 && c.Tb_K < 560)
    .sort((a, b) => a.Tb_K! - b.Tb_K!);
}

export function chemicalsOf(random: Random, pool: readonly ChemicalData[]): string[] {
  const count = random.whole(3, 12);
  // A window of boiling points, wide or narrow, around a middle.
  const width = random.between(25, 160);
  const middle = random.between(190, 480);
  const window = pool.filter((c) => Math.abs(c.Tb_K! - middle) < width).map((c) => c.id);
  const ids = random.some(window.length >= count ? window : pool.map((c) => c.id), count);
  if (random.next() < 0.1) ids[0] = random.of(GASES.slice(2, 3));
  return [...new Set(ids)];
}

export function taskOf(
  of: Omit<ColumnCase, 'fixed'>,
  model: ThermoModel,
  fixed: readonly Fixing[],
): ColumnTask | undefined {
  const condenser = of.top !== 'none';
  const places = of.stages + (condenser ? 1 : 0) + (of.reboiler ? 1 : 0);
  const first = condenser ? 1 : 0;
  const [Ptop, Pbottom] = of.P_Pa;
  const P_Pa = Float64Array.from({ length: places }, (_, j) => {
    const t = Math.min(Math.max((j - first) / (of.stages - 1), 0), 1);
    return Ptop + (Pbottom - Ptop) * t;
  });
  const at = flash(
    model,
    Float64Array.from(of.z),
    { P_Pa: P_Pa[of.feedPlace]!, vapourFraction: of.vapourFraction },
    makeFlashWork(model),
  );
  if (at.state !== 'solved') return undefined;
  const feed: ColumnFeed = {
    place: of.feedPlace,
    n_mol_s: Float64Array.from(of.z, (x) => x * FEED_MOL_S),
    H_W: at.value.h_J_mol * FEED_MOL_S,
    T_K: at.value.T_K,
    vapourFraction: at.value.vapourFraction,
  };
  return {
    model,
    top: of.top,
    reboiler: of.reboiler,
    P_Pa,
    feeds: [feed],
    draws: [],
    efficiency: new Float64Array(places).fill(1),
    subcooling_K: 0,
    fixed,
  };
}

/** A plain column: reflux ratio and distillate, with more vapour at the top than the feed brings. */
async function draw(
  random: Random,
  pool: readonly ChemicalData[],
): Promise<(Drawn & { fixed: Fixing[] }) | undefined> {
  const ids = chemicalsOf(random, pool);
  const model = (await bankModel(ids)).of(ids.map((_, i) => i));
  const raw = ids.map(() => 0.02 - Math.log(1 - random.next()));
  const total = raw.reduce((a, b) => a + b, 0);
  const stages = random.whole(8, 60);
  // Far enough below every critical pressure that two phases exist at both ends.
  const most = 0.5 * Math.min(...model.chemicals.filter((c) => c.Tb_K! > 150).map((c) => c.Pc_Pa!));
  const Ptop = random.logBetween(1e5, Math.min(25e5, most));
  const of = {
    ids,
    z: raw.map((x) => x / total),
    stages,
    top: random.next() < 0.5 ? ('liquid' as const) : ('vapour' as const),
    reboiler: true,
    P_Pa: [Ptop, Ptop + stages * random.between(0, 1500)] as const,
    feedPlace: random.whole(Math.ceil(0.2 * stages), Math.floor(0.85 * stages)),
    vapourFraction: random.next() < 0.5 ? 0 : random.next(),
  };
  const share = random.between(0.06, 0.94);
  const least = of.vapourFraction / share - 1;
  const ratio = Math.max(random.logBetween(0.4, 8), 1.25 * least + 0.2);
  const fixed: Fixing[] = [
    { fix: 'refluxRatio', value: ratio },
    { fix: 'flow', product: 'top', flow: { value: share * FEED_MOL_S, basis: 'mole' } },
  ];
  const task = taskOf(of, model, fixed);
  return task && { of, task, fixed };
}

/** Other pairs that fix the same column, from what came out. */
function otherFixings(random: Random, s: StageSystem): Fixing[] {
  const { n } = s;
  const top = productFlow(s, 'top');
  const bottoms = productFlow(s, 'bottoms');
  const D = Array.from({ length: n }, (_, i) => top.at(i)).reduce((a, b) => a + b, 0);
  const B = Array.from({ length: n }, (_, i) => bottoms.at(i)).reduce((a, b) => a + b, 0);
  // Keys that show in both products: a light one that mostly goes over the top, a heavy one that mostly does not.
  const all = Array.from({ length: n }, (_, i) => i);
  const share = (i: number): number => top.at(i) / (top.at(i) + bottoms.at(i));
  const lights = all.filter((i) => share(i) > 0.5 && share(i) < 1 - 1e-4);
  const heavies = all.filter((i) => share(i) <= 0.5 && share(i) > 1e-4);
  const reflux: Fixing = { fix: 'refluxRatio', value: s.L[0]! / D };
  const distillate: Fixing = { fix: 'flow', product: 'top', flow: { value: D, basis: 'mole' } };
  const boilup: Fixing = { fix: 'boilup', value: s.V[s.places - 1]! / B };
  const duty = (at: 'condenser' | 'reboiler'): Fixing => ({ fix: 'duty', at, value: dutyOf(s, at) });
  const purity = (product: 'top' | 'bottoms', i: number): Fixing => ({
    fix: 'purity',
    product,
    chemical: i,
    value: product === 'top' ? top.at(i) / D : bottoms.at(i) / B,
    basis: 'mole',
  });
  const recovery = (product: 'top' | 'bottoms', i: number): Fixing => ({
    fix: 'recovery',
    product,
    chemical: i,
    value: (product === 'top' ? top : bottoms).at(i) / (top.at(i) + bottoms.at(i)),
  });
  const simple: Fixing[][] = [
    [distillate, boilup],
    [distillate, duty('reboiler')],
    [distillate, duty('condenser')],
    [reflux, boilup],
    [reflux, { fix: 'flow', product: 'bottoms', flow: { value: B, basis: 'mole' } }],
  ];
  if (lights.length === 0 || heavies.length === 0 || random.next() < 0.25) return random.of(simple);
  const light = random.of(lights);
  const heavy = random.of(heavies);
  return random.of<Fixing[]>([
    [reflux, recovery('top', light)],
    [reflux, recovery('bottoms', heavy)],
    [reflux, purity('bottoms', light)],
    [reflux, purity('top', heavy)],
    [recovery('top', light), recovery('bottoms', heavy)],
    [purity('top', heavy), purity('bottoms', light)],
    [distillate, recovery('top', light)],
    [boilup, recovery('top', light)],
  ]);
}

const profileOf = (s: StageSystem): Float64Array => s.T.slice();

/** What is wrong with a solved column, by its flows and fugacities alone; undefined when nothing is. */
export function faultOf(s: StageSystem): string | undefined {
  const { n, places, model, task } = s;
  const liq = model.makeProps();
  const vap = model.makeProps();
  const x = new Float64Array(n);
  const y = new Float64Array(n);
  for (let j = 0; j < places; j++) {
    const shadow = j === 0 && s.totalCondenser;
    let L = 0;
    let V = 0;
    for (let i = 0; i < n; i++) {
      L += s.l[j * n + i]!;
      V += s.v[j * n + i]!;
    }
    if (!(L > 0 && V > 0)) return `no liquid or no vapour at ${j}`;
    let apart = 0;
    for (let i = 0; i < n; i++) {
      const at = j * n + i;
      x[i] = s.l[at]! / L;
      y[i] = s.v[at]! / V;
      apart = Math.max(apart, Math.abs(x[i]! - y[i]!));
      const into = s.f[at]! + (j > 0 ? s.l[at - n]! : 0) + (j + 1 < places ? s.v[at + n]! : 0);
      const out = s.l[at]! * (shadow ? 1 + s.p[0]! : 1) + (shadow ? 0 : s.v[at]!);
      if (Math.abs(into - out) > 1e-9 * Math.max(into, out, 1e-12))
        return `chemical ${i} does not close at ${j}`;
    }
    model.evaluate('liquid', s.T[j]!, task.P_Pa[j]!, x, 0, liq);
    model.evaluate('vapour', s.T[j]!, task.P_Pa[j]!, y, 0, vap);
    // A pure chemical has equal fractions; two phases of it still differ in volume.
    if (apart < 1e-6 && vap.v_m3_mol < 1.05 * liq.v_m3_mol) return `one phase at ${j}`;
    for (let i = 0; i < n; i++) {
      if (x[i]! < 1e-50) continue;
      const gap = Math.log(y[i]! / x[i]!) + vap.lnPhi[i]! - liq.lnPhi[i]!;
      if (Math.abs(gap) > 1e-8) return `fugacities differ by ${gap} at ${j}`;
    }
  }
  return undefined;
}

/**
 * Random columns of 3 to 12 chemicals, 8 to 60 stages, 1 to 25 bar, from nothing: plain ones, and those same columns fixed by
 * what came out of the plain ones, so that an answer exists.
 */
export async function columns(seed: number, count: number): Promise<GroupReport> {
  const random = makeRandom(seed);
  const pool = await makePool();
  const reasons: Record<string, number> = {};
  const cases: unknown[] = [];
  const byFixing: Record<string, [number, number]> = {};
  const tries: Record<string, number> = {};
  const plainTries: Record<string, number> = {};
  /** One case for each way of starting beyond the first, to be kept in tests. */
  const rescued: Record<string, ColumnCase> = {};
  let otherAnswers = 0;
  let tried = 0;
  let answered = 0;
  let wrong = 0;
  let plainTried = 0;
  let plainSolved = 0;
  while (tried < count) {
    const drawn = await draw(random, pool);
    if (!drawn) continue;
    plainTried++;
    const plain = solveColumn(drawn.task);
    if (plain.state !== 'solved') {
      const why = `plain: ${plain.failure.why}`;
      reasons[why] = (reasons[why] ?? 0) + 1;
      cases.push({ ...drawn.of, fixed: drawn.fixed, why, failure: plain.failure });
      continue;
    }
    plainSolved++;
    const how = plain.effort.tried.at(-1)!;
    plainTries[how] = (plainTries[how] ?? 0) + 1;
    if (faultOf(plain.system)) wrong++;
    const places = profileOf(plain.system);
    for (let k = 0; k < 2 && tried < count; k++) {
      const fixed = otherFixings(random, plain.system);
      const name = fixed.map((f) => f.fix).join(' + ');
      const tally = byFixing[name] ?? [0, 0];
      byFixing[name] = tally;
      tally[0]++;
      tried++;
      const end = solveColumn({ ...drawn.task, fixed });
      if (end.state !== 'solved') {
        reasons[end.failure.why] = (reasons[end.failure.why] ?? 0) + 1;
        cases.push({ ...drawn.of, fixed, why: end.failure.why, failure: end.failure });
        continue;
      }
      const fault = faultOf(end.system);
      if (fault !== undefined) {
        wrong++;
        cases.push({ ...drawn.of, fixed, why: fault });
        continue;
      }
      if (profileOf(end.system).some((T, j) => Math.abs(T - places[j]!) > 1e-3)) otherAnswers++;
      const last = end.effort.tried.at(-1)!;
      tries[last] = (tries[last] ?? 0) + 1;
      if (last !== 'plain-start') rescued[last] ??= { ...drawn.of, fixed };
      tally[1]++;
      answered++;
    }
  }
  return {
    tried,
    answered,
    reasons,
    wrong,
    share: answered / tried,
    wanted: 0.98,
    cases,
    more: { plainTried, plainSolved, plainTries, byFixing, lastTry: tries, otherAnswers, rescued },
  };
}
