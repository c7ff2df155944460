import type { ChemicalData } from '../../src/engine/chemicals/types';
import { flash, makeFlashWork } from '../../src/engine/equilibrium/flash';
import type { Condition, FlashAnswer } from '../../src/engine/equilibrium/types';
import type { Outcome } from '../../src/engine/outcome';
import type { ModelSpec, ThermoModel } from '../../src/engine/thermo/types';
import { bankModel, usable } from './bankModels';
import type { GroupReport } from './groups';
import { makeRandom, type Random } from './random';
import { faultOf } from './referee';

/** One flash that anyone can try again. */
export interface FlashCase {
  readonly kind: ModelSpec['kind'];
  readonly sort: string;
  readonly ids: readonly string[];
  readonly z: readonly number[];
  readonly at: Condition;
}

const SORTS = ['generic', 'wide', 'near-critical', 'trace', 'pure', 'nearly pure', 'anything'] as const;
type Sort = (typeof SORTS)[number];
const PAIRS = ['TP', 'TP', 'TP', 'PH', 'PH', 'PS', 'PV', 'TV'] as const;
const GASES = ['hydrogen', 'nitrogen', 'methane', 'carbon-monoxide', 'carbon-dioxide', 'argon'];

interface Pool {
  readonly mild: readonly string[];
  readonly heavy: readonly string[];
  readonly all: readonly string[];
  readonly raoult: readonly string[];
}

/** Hydrocarbons and gases, which a cubic equation is made for; and all that the models can use. */
async function makePool(): Promise<Pool> {
  const chemicals = await usable('peng-robinson');
  const onlyCH = (c: ChemicalData): boolean =>
    Object.keys(c.elements ?? { X: 1 }).every((e) => e === 'C' || e === 'H');
  const mild = chemicals.filter((c) => onlyCH(c) || GASES.includes(c.id)).map((c) => c.id);
  const heavy = chemicals.filter((c) => onlyCH(c) && (c.Tc_K ?? 0) > 560).map((c) => c.id);
  const raoult = (await usable('raoult')).filter((c) => (c.Tc_K ?? 0) > 400).map((c) => c.id);
  return { mild, heavy, all: chemicals.map((c) => c.id), raoult };
}

function chemicalsOf(random: Random, sort: Sort, pool: Pool, count: number): string[] {
  // Hydrogen alone boils below the coldest temperature that is asked.
  if (sort === 'pure') return [random.of(pool.mild.filter((id) => id !== 'hydrogen'))];
  if (sort === 'nearly pure')
    return random.some(
      pool.mild.filter((id) => id !== 'hydrogen'),
      count,
    );
  if (sort === 'wide') {
    const light = random.some(GASES, Math.min(2, count - 1));
    return [...light, ...random.some(pool.heavy, count - light.length)];
  }
  return random.some(sort === 'anything' ? pool.all : pool.mild, count);
}

function fractionsOf(random: Random, sort: Sort, count: number): Float64Array {
  const z = new Float64Array(count);
  for (let i = 0; i < count; i++) {
    z[i] = -Math.log(1 - random.next()) + 1e-3;
    if (sort === 'trace' && i > 0 && random.next() < 0.6) z[i] = z[i]! * random.logBetween(1e-14, 1e-4);
    if (sort === 'nearly pure' && i > 0) z[i] = z[i]! * random.logBetween(1e-12, 1e-3);
  }
  const total = z.reduce((a, b) => a + b, 0);
  return z.map((v) => v / total);
}

export interface Made {
  readonly model: ThermoModel;
  readonly z: Float64Array;
  readonly at: Condition;
  readonly sort: Sort;
  readonly kind: ModelSpec['kind'];
}

/** Two conditions of the asked pair; enthalpies and entropies are those of some equilibrium state. */
function conditionOf(
  random: Random,
  sort: Sort,
  model: ThermoModel,
  z: Float64Array,
  work: ReturnType<typeof makeFlashWork>,
): Condition {
  const critical = model.pseudoCritical(z);
  const Tc = Math.min(critical.T_K, 1200);
  const Pc = Math.min(critical.P_Pa, 1e7);
  const near = sort === 'near-critical';
  const T_K = Math.max(70, near ? Tc * random.between(0.9, 1.3) : Tc * random.between(0.4, 1.5));
  const P_Pa = near ? Pc * random.between(0.6, 2.5) : random.logBetween(1e3, 2e7);
  const pair = random.of(PAIRS);
  if (pair === 'TP') return { T_K, P_Pa };
  // A bubble point is asked of mixtures that have one: no chemical in them is far above its critical temperature when
  // the others boil (methane and ethylene may be there; of nitrogen or hydrogen over an oil many have none).
  const condenses = model.chemicals.every((c) => (c.Tc_K ?? 0) > 180);
  const end = condenses && random.next() < 0.5 ? 0 : 1;
  const some = flash(model, z, { T_K, P_Pa }, work);
  const inside = some.state === 'solved' && some.value.phases.length === 2 && random.next() < 0.6;
  const vapourFraction = inside ? some.value.vapourFraction : end;
  if (pair === 'PV') return { P_Pa: inside ? P_Pa : Math.min(P_Pa, 0.5 * Pc), vapourFraction };
  if (pair === 'TV') return { T_K: inside ? T_K : Tc * random.between(0.5, 0.8), vapourFraction };
  // Half of the caloric targets inside the two-phase region, where the work is.
  const from: Condition =
    inside || random.next() < 0.5 ? { T_K, P_Pa } : { P_Pa: Math.min(P_Pa, 0.5 * Pc), vapourFraction };
  const state = flash(model, z, from, work);
  // A state that is not found counts as a trial of its own.
  if (state.state !== 'solved') return from;
  const { value } = state;
  if (pair === 'PS' && model.hasEntropy) return { P_Pa: value.P_Pa, s_J_molK: value.s_J_molK };
  return { P_Pa: value.P_Pa, h_J_mol: value.h_J_mol };
}

/** How well the answer has what was asked, in units of what is allowed; above 1 is a fault. */
export function missOf(at: Condition, answer: FlashAnswer): number {
  let worst = 0;
  const check = (asked: number, got: number, allowed: number): void => {
    worst = Math.max(worst, Math.abs(asked - got) / allowed);
  };
  if ('T_K' in at) check(at.T_K, answer.T_K, 1e-12 * at.T_K);
  if ('P_Pa' in at) check(at.P_Pa, answer.P_Pa, 1e-12 * at.P_Pa);
  if ('h_J_mol' in at) check(at.h_J_mol, answer.h_J_mol, 1e-8 + 1e-12 * Math.abs(at.h_J_mol));
  if ('s_J_molK' in at) check(at.s_J_molK, answer.s_J_molK, 1e-10 + 1e-12 * Math.abs(at.s_J_molK));
  if ('vapourFraction' in at) check(at.vapourFraction, answer.vapourFraction, 1e-12);
  return worst;
}

/** Random flashes over the bank: each ends with equal fugacities and passes the stability test, or with a reason. */
export async function flashes(seed: number, count: number): Promise<GroupReport> {
  const random = makeRandom(seed);
  const pool = await makePool();
  const reasons: Record<string, number> = {};
  const cases: (FlashCase & { readonly why: string })[] = [];
  let tried = 0;
  let answered = 0;
  let wrong = 0;
  let hidden = 0;
  let together = 0;
  const bySort: Record<string, [number, number]> = {};
  while (tried < count) {
    const sort = random.of(SORTS);
    const kind: ModelSpec['kind'] = random.next() < 0.12 ? 'raoult' : 'peng-robinson';
    const size = random.next() < 0.7 ? random.whole(2, 8) : random.whole(2, 20);
    const ids =
      kind === 'raoult'
        ? random.some(pool.raoult, sort === 'pure' ? 1 : size)
        : chemicalsOf(random, sort, pool, size);
    const model = (await bankModel(ids, kind)).of(ids.map((_, i) => i));
    const work = makeFlashWork(model);
    // Several states of one mixture: building the model costs more than the flash.
    for (let k = 0; k < 4 && tried < count; k++) {
      const z = fractionsOf(random, sort, ids.length);
      const at = conditionOf(random, sort, model, z, work);
      tried++;
      const tally = bySort[sort] ?? [0, 0];
      bySort[sort] = tally;
      tally[0]++;
      const outcome: Outcome<FlashAnswer> = flash(model, z, at, work);
      let why: string | undefined;
      if (outcome.state === 'solved') {
        if (outcome.value.hiddenLiquid !== undefined) hidden++;
        if (outcome.value.liquidsTogether) together++;
        why = faultOf(model, z, outcome.value);
        const miss = missOf(at, outcome.value);
        if (why === undefined && !(miss <= 1)) why = `misses what was asked by ${miss} times the allowed`;
        if (why === undefined) {
          answered++;
          tally[1]++;
        } else wrong++;
      } else {
        why = outcome.findings[0].code;
        reasons[why] = (reasons[why] ?? 0) + 1;
      }
      if (why !== undefined && cases.length < 200) cases.push({ kind, sort, ids, z: [...z], at, why });
    }
  }
  return {
    tried,
    answered,
    reasons,
    wrong,
    share: answered / tried,
    wanted: 0.999,
    cases,
    more: { withSecondLiquid: hidden, liquidsTogether: together, bySort },
  };
}
