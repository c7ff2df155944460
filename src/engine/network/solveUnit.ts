import type { StreamState } from '../equilibrium/types';
import type { Port } from '../ids';
import { type Finding, noSolution, type Outcome, saw } from '../outcome';
import type { AnyKind } from '../units/solvers';
import { atUnit } from '../units/streams';
import type { Answer, Call } from '../units/types';
import { closureOf, worstOf } from './closure';
import { describe } from './describe';
import type { Memory } from './memory';
import { sameData, sameState } from './same';
import type { LoopResult, Problem, ProblemUnit, StreamResult, UnitClosure, UnitResult } from './types';
import type { UnitMemory } from './unitMemory';

/** A solved unit closes at least this well [-]. */
export const CLOSES = 1e-9;

const sameIn = (a: UnitMemory['in'], b: UnitMemory['in']): boolean => {
  const ports = Object.keys(a);
  return (
    ports.length === Object.keys(b).length &&
    ports.every((port) => b[port] !== undefined && sameState(a[port]!, b[port]!))
  );
};

/** Whether what is remembered of a unit answers this call: same kind, settings, site and entering states, bit for bit. */
export const answers = (memory: UnitMemory, unit: ProblemUnit, call: Call<unknown>): boolean =>
  memory.kind === unit.kind &&
  sameIn(memory.in, call.in) &&
  sameData(memory.settings, call.settings) &&
  sameData(memory.outPorts, call.outPorts) &&
  sameData(memory.site, call.site);

/** Around a unit that stands inside the sketch. */
export const unitClosure = (
  inlets: Readonly<Record<Port, StreamState>>,
  answer: Answer,
  memory: Memory,
): UnitClosure =>
  closureOf(
    [...Object.values(inlets), ...Object.values(answer.drawn ?? {})],
    Object.values(answer.out),
    answer.heat_W,
    answer.power_W,
    answer.made_mol_s,
    memory.data,
  );

/** Whether amounts, enthalpy, temperature and pressure are numbers. */
export const isFiniteState = (s: StreamState): boolean =>
  Number.isFinite(s.T_K) &&
  Number.isFinite(s.P_Pa) &&
  Number.isFinite(s.H_W) &&
  s.n_mol_s.every(Number.isFinite);

function refuseUnclosed(unit: ProblemUnit, relative: number): Finding {
  return {
    code: 'network/does-not-close',
    weight: 'beyond-limit',
    at: { unit: unit.id },
    evidence: [saw('relative', Number.isNaN(relative) ? -1 : relative, 'number')],
  };
}

function resultOf(unit: ProblemUnit, outcome: Outcome<Answer>, memory: Memory): UnitResult {
  if (outcome.state !== 'solved') return { kind: unit.kind, state: 'no-solution', reasons: outcome.findings };
  const { heat_W, power_W, effort, made_mol_s, drawn, results } = outcome.value;
  const air: Record<Port, StreamResult> = {};
  for (const [port, state] of Object.entries(drawn ?? {}))
    air[port] = describe(state, memory.model, memory.data);
  return {
    kind: unit.kind,
    state: 'solved',
    heat_W,
    power_W,
    iterations: effort.iterations,
    residual: effort.residual,
    ...(made_mol_s ? { made_mol_s } : {}),
    ...(drawn ? { drawn: air } : {}),
    results,
  };
}

/** One attempt at a unit, from the start values given or from nothing. */
export const attempt = (solver: AnyKind, call: Call<unknown>, warm: unknown): Outcome<Answer> =>
  solver.solve({ ...call, ...(warm === undefined ? {} : { warm }) } as Call<never>) as Outcome<Answer>;

/** Warm if there are start values, and once more from nothing if that fails. */
export function attempts(solver: AnyKind, call: Call<unknown>, warm: unknown): Outcome<Answer> {
  const outcome = attempt(solver, call, warm);
  return outcome.state === 'solved' || warm === undefined ? outcome : attempt(solver, call, undefined);
}

/** Start values that are remembered of a unit. */
export function warmIn(memory: Memory, unit: ProblemUnit): unknown {
  const last = memory.units.get(unit.id);
  return last?.kind === unit.kind ? last.warm : undefined;
}

/**
 * Solves one unit: warm if an earlier answer was solved, and once more from nothing if that fails.
 *
 * @param boundary  feed or product: no balance is drawn around it
 */
export function solveUnit(
  unit: ProblemUnit,
  solver: AnyKind,
  call: Call<unknown>,
  boundary: boolean,
  memory: Memory,
  problem: Problem,
): UnitMemory {
  const warm = warmIn(memory, unit);
  return remember({ unit, solver, call, boundary }, attempts(solver, call, warm), warm, memory, problem);
}

/** A unit that was asked something. */
export interface Asked {
  readonly unit: ProblemUnit;
  readonly solver: AnyKind;
  readonly call: Call<unknown>;
  readonly boundary: boolean;
}

/**
 * What is kept and shown of a unit's outcome. An answer that does not close, or holds something that is not a number, is none.
 *
 * @param warm  start values to keep when there is no answer
 * @param loop  how the loop was solved that the unit stands in
 */
export function remember(
  { unit, solver, call, boundary }: Asked,
  outcome: Outcome<Answer>,
  warm: unknown,
  memory: Memory,
  problem: Problem,
  loop?: LoopResult,
): UnitMemory {
  const [kept, closure] = closing(unit, call, outcome, boundary, memory);
  const result = resultOf(unit, kept, memory);
  return {
    kind: unit.kind,
    settings: call.settings,
    in: call.in,
    outPorts: call.outPorts,
    site: call.site,
    outcome: kept,
    warm: kept.state === 'solved' ? kept.value.warm : warm,
    result: loop && kept.state === 'solved' ? { ...result, loop } : result,
    ...(closure ? { closure } : {}),
    limits: problem.limits,
    limitFindings: limitsOf(unit, solver, call, kept),
  };
}

function closing(
  unit: ProblemUnit,
  call: Call<unknown>,
  outcome: Outcome<Answer>,
  boundary: boolean,
  memory: Memory,
): [Outcome<Answer>, UnitClosure?] {
  if (outcome.state === 'solved') {
    const finite = Object.values(outcome.value.out).every(isFiniteState);
    const closure = boundary ? undefined : unitClosure(call.in, outcome.value, memory);
    const worst = closure ? worstOf(closure) : 0;
    if (finite && worst <= CLOSES) return closure ? [outcome, closure] : [outcome];
    return [noSolution(refuseUnclosed(unit, finite ? worst : Number.NaN))];
  }
  const [first, ...rest] = outcome.findings.map((f) => atUnit(call, f));
  return [noSolution(first!, ...rest)];
}

/** The limits pass of a solved unit. */
export function limitsOf(
  unit: ProblemUnit,
  solver: AnyKind,
  call: Call<unknown>,
  outcome: Outcome<Answer>,
): readonly Finding[] {
  if (outcome.state !== 'solved') return [];
  const found = solver.limits(call as Call<never>, outcome.value as Answer<never>, call.site);
  return found.map((f) => atUnit({ unit: unit.id }, f));
}
