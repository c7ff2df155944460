import type { Dimension } from '../../quantity/dimension';
import { type Evidence, type Finding, noSolution, type Outcome, type Place, solved } from '../outcome';
import type { ThermoModel } from '../thermo/types';
import { answerOf } from './answer';
import type { EquilibriumCode } from './findings';
import { flashPair } from './pairs';
import { flashCaloric } from './ph';
import { pureCaloric, saturateAtP, saturateAtT, share } from './pure';
import { comesAgain } from './several';
import { flashTP } from './tp';
import type { Condition, FlashAnswer, FlashWarm } from './types';
import { flashFraction } from './vf';
import { type Caloric, LEAST_T_K, MOST_T_K } from './whole';
import type { FlashWork } from './work';

export { type FlashWork, makeFlashWork } from './work';

/** How a search ended; everything but 'solved' is a reason. */
export type FlashEnd =
  | 'solved'
  | 'no-convergence'
  | 'out-of-range'
  | 'no-such-state'
  | 'between-states'
  | 'no-entropy'
  | 'not-a-state';

const LEAST_P_Pa = 1e-9;
const MOST_P_Pa = 1e11;

/**
 * The phases of a composition at two given conditions.
 *
 * @param model  the model of the chemicals present
 * @param z      mole fractions, length model.n, each > 0, sum 1
 * @param at     two conditions; a vapour fraction of 0 or 1 is the bubble or dew point, the incipient phase then has
 *               fraction 0
 * @param work   from makeFlashWork(model); contents undefined before and after
 * @param warm   where to start; never changes the answer beyond tolerance
 * @returns      phases with |difference of ln fugacity| <= 1e-11 (2e-10 where rounding allows no better), enthalpy or
 *               entropy as asked to some rounding errors; or the reason why not (findings.ts)
 * Throws on a wrong length, a workspace of another model, or a fraction that is not positive: our own mistakes.
 */
export function flash(
  model: ThermoModel,
  z: Float64Array,
  at: Condition,
  work: FlashWork,
  warm?: FlashWarm,
  where: Place = {},
): Outcome<FlashAnswer> {
  if (work.model !== model) throw new Error('workspace of another model');
  if (z.length !== model.n) throw new Error(`${z.length} fractions for ${model.n} chemicals`);
  for (let i = 0; i < z.length; i++) {
    if (!(z[i]! > 0))
      throw new Error(`fraction of ${model.chemicals[i]!.id} is ${z[i]}: only chemicals present`);
  }
  const end = search(work, z, at, warm);
  if (end !== 'solved') return noSolution(reason(end, at, work, where));
  const answer = answerOf(work);
  const findings = answer.hiddenLiquid ? [secondLiquid(model, answer, answer.hiddenLiquid, where)] : [];
  if (work.several || comesAgain(work, z, at, answer)) findings.push(severalStates(at, answer, where));
  return solved(answer, findings);
}

function search(w: FlashWork, z: Float64Array, at: Condition, warm: FlashWarm | undefined): FlashEnd {
  const pure = w.n === 1;
  w.iterations = 0;
  w.residual = 0;
  w.told = undefined;
  w.several = false;
  w.feed.x.set(z);
  w.T_K = 'T_K' in at ? at.T_K : 0;
  w.P_Pa = 'P_Pa' in at ? at.P_Pa : 0;
  if ('T_K' in at && !(at.T_K >= LEAST_T_K && at.T_K <= MOST_T_K)) return 'out-of-range';
  if ('P_Pa' in at && !(at.P_Pa >= LEAST_P_Pa && at.P_Pa <= MOST_P_Pa)) return 'out-of-range';
  if ('vapourFraction' in at && !(at.vapourFraction >= 0 && at.vapourFraction <= 1)) return 'not-a-state';
  if ('h_J_mol' in at && !Number.isFinite(at.h_J_mol)) return 'not-a-state';
  if ('s_J_molK' in at) {
    if (!w.model.hasEntropy) return 'no-entropy';
    if (!Number.isFinite(at.s_J_molK)) return 'not-a-state';
  }

  if ('T_K' in at && 'P_Pa' in at) {
    const from = takeK(w, warm);
    return flashTP(w, z, at.T_K, at.P_Pa, from) ? 'solved' : 'no-convergence';
  }
  if ('P_Pa' in at && 'vapourFraction' in at) {
    if (pure) return saturated(w, saturateAtP(w, at.P_Pa), at.vapourFraction);
    const from = takeK(w, warm);
    const start = from === 'K' ? warm?.T_K : undefined;
    return flashFraction(w, z, at.vapourFraction, 'T', at.P_Pa, start);
  }
  if ('T_K' in at && 'vapourFraction' in at) {
    if (pure) return saturated(w, saturateAtT(w, at.T_K), at.vapourFraction);
    const from = takeK(w, warm);
    const start = from === 'K' ? warm?.P_Pa : undefined;
    return flashFraction(w, z, at.vapourFraction, 'P', at.T_K, start);
  }
  if ('P_Pa' in at) {
    const of: Caloric = 'h_J_mol' in at ? 'h' : 's';
    const target = 'h_J_mol' in at ? at.h_J_mol : at.s_J_molK;
    const T0 = warm?.T_K ?? 300;
    if (pure) return pureCaloric(w, at.P_Pa, target, of, T0);
    return flashCaloric(w, z, at.P_Pa, target, of, T0, takeK(w, warm));
  }
  return flashPair(w, z, at, warm);
}

function saturated(w: FlashWork, found: boolean, beta: number): FlashEnd {
  if (!found) return 'no-such-state';
  share(w, beta);
  return 'solved';
}

function takeK(w: FlashWork, warm: FlashWarm | undefined): 'K' | 'nothing' {
  const K = warm?.K;
  if (K === undefined || K.length !== w.n) return 'nothing';
  for (let i = 0; i < w.n; i++) {
    const lnK = Math.log(K[i]!);
    if (!(Math.abs(lnK) < 600)) return 'nothing';
    w.lnK[i] = lnK;
  }
  return 'K';
}

const CODES: Readonly<Record<Exclude<FlashEnd, 'solved'>, EquilibriumCode>> = {
  'no-convergence': 'equilibrium/no-convergence',
  'out-of-range': 'equilibrium/out-of-range',
  'no-such-state': 'equilibrium/no-such-state',
  'between-states': 'equilibrium/between-states',
  'no-entropy': 'equilibrium/no-entropy',
  'not-a-state': 'equilibrium/not-a-state',
};

const ASKED: readonly (readonly [string, string, Dimension])[] = [
  ['T_K', 'temperature', 'temperature'],
  ['P_Pa', 'pressure', 'pressure'],
  ['h_J_mol', 'enthalpy', 'molarEnergy'],
  ['s_J_molK', 'entropy', 'molarEntropy'],
  ['vapourFraction', 'vapourFraction', 'fraction'],
];

const askedFor = (at: Condition): Evidence[] => {
  const given = at as Readonly<Record<string, number>>;
  return ASKED.flatMap(([key, name, dim]) => {
    const value = given[key];
    return value === undefined ? [] : [{ name, value, dim }];
  });
};

/** "Several states have these conditions; the thinnest is taken." */
const severalStates = (at: Condition, { T_K, P_Pa }: FlashAnswer, where: Place): Finding => ({
  code: 'equilibrium/several-states' satisfies EquilibriumCode,
  weight: 'note',
  at: where,
  evidence: [
    ...askedFor(at),
    ...('T_K' in at ? [] : [{ name: 'foundTemperature', value: T_K, dim: 'temperature' } as const]),
    ...('P_Pa' in at ? [] : [{ name: 'foundPressure', value: P_Pa, dim: 'pressure' } as const]),
  ],
});

function reason(end: Exclude<FlashEnd, 'solved'>, at: Condition, w: FlashWork, where: Place): Finding {
  const evidence = askedFor(at);
  if (!('T_K' in at) && w.T_K > 0)
    evidence.push({ name: 'lastTemperature', value: w.T_K, dim: 'temperature' });
  if (!('P_Pa' in at) && w.P_Pa > 0) evidence.push({ name: 'lastPressure', value: w.P_Pa, dim: 'pressure' });
  evidence.push({ name: 'evaluations', value: w.iterations, dim: 'number' });
  if (end === 'no-entropy') {
    for (const chemical of w.model.chemicals) {
      if (chemical.S0_J_molK === undefined)
        evidence.push({ name: 'chemical', value: 0, dim: 'number', text: chemical.id });
    }
  }
  return { code: CODES[end], weight: 'beyond-limit', at: where, evidence };
}

/**
 * "Another liquid may form here": the numbers are for one liquid or, where the evidence has 'together', the properties are those
 * of both.
 */
export function secondLiquid(
  model: ThermoModel,
  state: Pick<FlashAnswer, 'T_K' | 'P_Pa' | 'liquidsTogether'>,
  x: Float64Array,
  where: Place,
): Finding {
  let most = 0;
  for (let i = 1; i < model.n; i++) if (x[i]! > x[most]!) most = i;
  return {
    code: 'equilibrium/second-liquid' satisfies EquilibriumCode,
    weight: 'caution',
    at: where,
    evidence: [
      { name: 'chemical', value: x[most]!, dim: 'fraction', text: model.chemicals[most]!.id },
      { name: 'temperature', value: state.T_K, dim: 'temperature' },
      { name: 'pressure', value: state.P_Pa, dim: 'pressure' },
      ...(state.liquidsTogether ? [{ name: 'together', value: 2, dim: 'number' } as const] : []),
    ],
  };
}
