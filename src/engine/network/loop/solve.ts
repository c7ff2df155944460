import type { UnitId } from '../../ids';
import { isBoundary, solverOf } from '../kinds';
import { note, outletOf, type Run, settle, spread, stateIn } from '../run';
import { sameData, sameState } from '../same';
import { limitsOf, remember } from '../solveUnit';
import type { SolveStep } from '../step';
import type { ProblemUnit, UnitResult } from '../types';
import type { UnitMemory } from '../unitMemory';
import { attemptAll } from './attempts';
import type { LoopMemory, LoopWarm } from './memory';
import { blocked, refusal } from './refuse';
import { loopPlanOf } from './tears';
import type { Ending, Loop, Member } from './types';

/**
 * Solves the units of a loop together and settles them all. A loop whose units, settings and entering states are bit for bit
 * those of its last answer keeps it.
 *
 * @param members  a strongly connected component, by place in the plan's list
 */
export function* solveLoop(members: readonly number[], run: Run): Generator<SolveStep, void, void> {
  const units = members.map((m) => run.plan.units[m]!);
  const stopped = blocked(units, run);
  if (stopped) {
    tell(units, stopped, run);
    return;
  }
  const key = units.map((u) => u.id).join(' ');
  const asked = askedOf(units, run);
  const last = run.memory.loops.get(key);
  if (last && sameLoop(last, asked)) {
    run.memory.loops.set(key, keep(last, units, run));
    return;
  }
  const plan = loopPlanOf(run.plan, members);
  const loop: Loop = {
    run,
    plan,
    members: plan.order.map((m) => memberOf(run.plan.units[m]!, run)),
    entering: asked.entering,
  };
  const ending = yield* attemptAll(loop, last?.warm);
  const settled = ending.is === 'solved' ? settleAll(loop, ending) : ending;
  if (settled.is === 'solved') {
    const { torn, slopes } = settled;
    const warm: LoopWarm = { tears: plan.tears, scalars: plan.scalars, torn, slopes };
    const answers = units.map((u) => run.memory.units.get(u.id)!);
    run.memory.loops.set(key, { ...asked, answers, warm });
    return;
  }
  const unsolved = refusal(loop, settled);
  tell(units, unsolved, run);
  run.memory.loops.set(key, { ...asked, unsolved, ...(last?.warm ? { warm: last.warm } : {}) });
}

const memberOf = (unit: ProblemUnit, { kinds }: Run): Member => ({
  unit,
  solver: solverOf(kinds, unit.kind)!,
  boundary: isBoundary(kinds, unit.kind),
});

type AskedLoop = Pick<LoopMemory, 'units' | 'reads' | 'site' | 'entering'>;

function askedOf(units: readonly ProblemUnit[], { plan, known, problem }: Run): AskedLoop {
  const inside = new Set(units.map((u) => u.id));
  const reads = units.flatMap((u) => plan.reads.get(u.id) ?? []);
  const needed = [...units.flatMap((u) => Object.values(u.in)), ...reads.map((r) => r.stream)];
  const outside = needed.filter((s) => !inside.has(plan.units[plan.source.get(s)!.unit]!.id));
  const entering = [...new Set(outside)].map((s) => [s, stateIn(known, s)] as const);
  return { units, reads, site: problem.site, entering };
}

const sameLoop = (a: AskedLoop, b: AskedLoop): boolean =>
  sameData(a.site, b.site) &&
  a.entering.length === b.entering.length &&
  a.entering.every(([id, state], k) => id === b.entering[k]![0] && sameState(state, b.entering[k]![1])) &&
  sameData(a.reads, b.reads) &&
  sameData(a.units, b.units);

type Told = readonly (readonly [UnitId, UnitResult])[];

/** Hands out what is said of units without an answer. */
function tell(units: readonly ProblemUnit[], results: Told, run: Run): void {
  const byUnit = new Map(results);
  for (const unit of units) {
    const result = byUnit.get(unit.id)!;
    note(unit, result, run);
    spread(unit, result.state === 'no-solution' ? 'no-solution' : 'waiting', run);
  }
}

/** The last answer stands; only thresholds may have changed. */
function keep(last: LoopMemory, units: readonly ProblemUnit[], run: Run): LoopMemory {
  if (!last.answers) {
    tell(units, last.unsolved ?? [], run);
    return last;
  }
  const { memory, found } = run;
  const answers = last.answers.map((answer, k) => withLimits(answer, units[k]!, run));
  answers.forEach((answer, k) => {
    if (answer.outcome.state !== 'solved') throw new Error('a loop is kept with all its answers');
    memory.units.set(units[k]!.id, answer);
    found.units.set(units[k]!.id, answer.result);
    settle(units[k]!, answer.outcome.value.out, run);
  });
  return { ...last, answers };
}

/** The same answer under the thresholds of now. */
function withLimits(answer: UnitMemory, unit: ProblemUnit, { memory, problem, kinds }: Run): UnitMemory {
  const { limits } = problem;
  if (sameData(answer.limits, limits)) return answer;
  const { in: inlets, outPorts, settings, site, outcome } = answer;
  const { model, work } = memory;
  const call = { unit: unit.id, in: inlets, outPorts, settings, site, limits, model, work };
  const limitFindings = limitsOf(unit, solverOf(kinds, unit.kind)!, call, outcome);
  return { ...answer, limits, limitFindings };
}

/** Takes the last pass for the answer, when every unit closes with the streams as they are now. */
function settleAll(loop: Loop, ending: Extract<Ending, { is: 'solved' }>): Ending {
  const { memory, problem, found, known } = loop.run;
  const { said, states } = ending.going;
  const kept: [ProblemUnit, UnitMemory][] = [];
  for (const { unit, solver, boundary } of loop.members) {
    const { call: asked, outcome } = said.get(unit.id)!;
    const inlets = Object.fromEntries(
      Object.entries(unit.in).map(([port, s]) => [port, states.get(s) ?? stateIn(known, s)]),
    );
    const call = { ...asked, in: inlets };
    const result = remember(
      { unit, solver, call, boundary },
      outcome,
      undefined,
      memory,
      problem,
      ending.result,
    );
    if (result.outcome.state !== 'solved')
      return { is: 'unit-fails', unit: unit.id, said: { call, outcome: result.outcome } };
    kept.push([unit, result]);
  }
  for (const [unit, result] of kept) {
    memory.units.set(unit.id, result);
    found.units.set(unit.id, result.result);
    const out = Object.fromEntries(
      Object.entries(unit.out).map(([port, s]) => [port, states.get(s) ?? outletOf(unit, port, {})]),
    );
    settle(unit, out, loop.run);
  }
  return ending;
}
