import { batchOf } from './batch';
import { collectFindings } from './collect';
import { catalogueOf, isBoundary, type Kinds, KNOWN_KINDS, solverOf } from './kinds';
import { solveLoop } from './loop/solve';
import type { Found, Memory } from './memory';
import { overallClosure } from './overall';
import { planOf } from './plan';
import { whyNot } from './ready';
import { callOf, note, type Run, settle, spread, stateIn } from './run';
import { sameData } from './same';
import { severalAnswers } from './several';
import { answers, limitsOf, solveUnit } from './solveUnit';
import type { SolveStep } from './step';
import type { Problem, ProblemUnit, SolveBatch } from './types';
import type { UnitMemory } from './unitMemory';

export type { SolveStep } from './step';

export interface SolveOptions {
  /** 'nothing': no earlier answer is used, neither as an answer nor as a start. */
  readonly from: 'warm' | 'nothing';
  readonly kinds?: Kinds;
}

/** Loops that are remembered, so that undoing a cut finds the answer again. */
const KEPT_LOOPS = 1000;

/**
 * Solves a sketch unit by unit, upstream first, and yields before every unit that has to be solved anew; the caller may stop
 * there for ever. Units whose settings and entering states are bit for bit those of their last answer keep it, and with it the
 * identity of their results.
 *
 * @param memory  of the problem's basis; what was solved stays in it even when the solve is broken off
 * @returns the last batch: what changed since the last collect, closure, all findings
 */
export function* solveNetwork(
  problem: Problem,
  memory: Memory,
  options: SolveOptions = { from: 'warm' },
): Generator<SolveStep, SolveBatch, void> {
  if (problem.basis !== memory.basis.id)
    throw new Error('a problem is solved with the memory of its own basis');
  const kinds = options.kinds ?? KNOWN_KINDS;
  const plan = planOf(problem);
  const found: Found = { streams: new Map(), units: new Map() };
  const run: Run = { problem, plan, kinds, memory, found, known: new Map() };
  const live =
    memory.complete === problem.edit && options.from === 'nothing' ? new Map(memory.streams) : undefined;
  if (options.from === 'nothing') {
    memory.units.clear();
    memory.streams.clear();
    memory.loops.clear();
  }
  memory.complete = undefined;

  for (const { members, loop } of plan.order)
    if (loop) yield* solveLoop(members, run);
    else yield* solveAlone(plan.units[members[0]!]!, run);

  forget(memory.units, found.units);
  forget(memory.streams, found.streams);
  for (const [key, { units }] of memory.loops)
    if (!units.every((u) => found.units.has(u.id))) memory.loops.delete(key);
  for (const key of [...memory.loops.keys()].slice(0, -KEPT_LOOPS)) memory.loops.delete(key);
  const findings = collectFindings(run);
  if (live) findings.push(...severalAnswers(live, memory.streams));
  const closure = overallClosure(plan, found.units, memory, kinds);
  memory.complete = problem.edit;
  return { ...batchOf(found, memory, true), closure, findings };
}

/** A unit that stands in no loop. */
function* solveAlone(unit: ProblemUnit, run: Run): Generator<SolveStep, void, void> {
  const { problem, plan, kinds, memory, found, known } = run;
  const solver = solverOf(kinds, unit.kind);
  const catalogue = solver ? catalogueOf(kinds, unit.kind) : undefined;
  const unready = whyNot(unit, catalogue, plan, known);
  if (unready || !solver) {
    const state = unready?.state ?? 'no-solution';
    note(unit, { kind: unit.kind, state, reasons: unready?.reasons ?? [] }, run);
    spread(unit, state === 'no-solution' ? 'no-solution' : 'waiting', run);
    return;
  }
  const call = callOf(unit, run, (stream) => stateIn(known, stream));
  const last = memory.units.get(unit.id);
  let answer: UnitMemory;
  if (last && answers(last, unit, call)) {
    answer = sameData(last.limits, problem.limits)
      ? last
      : { ...last, limits: problem.limits, limitFindings: limitsOf(unit, solver, call, last.outcome) };
  } else {
    yield { unit: unit.id, collect: () => batchOf(found, memory) };
    answer = solveUnit(unit, solver, call, isBoundary(kinds, unit.kind), memory, problem);
  }
  memory.units.set(unit.id, answer);
  found.units.set(unit.id, answer.result);
  if (answer.outcome.state !== 'solved') spread(unit, 'no-solution', run);
  else settle(unit, answer.outcome.value.out, run);
}

function forget<K>(kept: Map<K, unknown>, wanted: ReadonlyMap<K, unknown>): void {
  for (const id of kept.keys()) if (!wanted.has(id)) kept.delete(id);
}
