import type { StreamState } from '../equilibrium/types';
import type { Port, StreamId, UnitId } from '../ids';
import type { Finding } from '../outcome';
import { streamLimits } from '../units/streamLimits';
import type { Call } from '../units/types';
import { batchOf } from './batch';
import { describe } from './describe';
import { catalogueOf, isBoundary, type Kinds, KNOWN_KINDS, solverOf } from './kinds';
import type { Found, Memory, StreamMemory, UnitMemory } from './memory';
import { overallClosure } from './overall';
import { pairLimits } from './pairLimits';
import { type Plan, planOf } from './plan';
import { withRead } from './reads';
import { type Known, whyNot } from './ready';
import { sameData, sameState } from './same';
import { severalAnswers } from './several';
import { answers, limitsOf, solveUnit } from './solveUnit';
import type { Problem, ProblemUnit, SolveBatch, StreamResult, UnitResult } from './types';

/** Where a solve stands: the unit it is about to solve, and what changed since something was last collected. */
export interface SolveStep {
  readonly unit: UnitId;
  collect(): SolveBatch;
}

export interface SolveOptions {
  /** 'nothing': no earlier answer is used, neither as an answer nor as a start. */
  readonly from: 'warm' | 'nothing';
  readonly kinds?: Kinds;
}

const UNSOLVED: Readonly<Record<'waiting' | 'no-solution', StreamResult>> = {
  waiting: { state: 'waiting' },
  'no-solution': { state: 'no-solution' },
};

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
  const known = new Map<StreamId, Known>();
  const live =
    memory.complete === problem.edit && options.from === 'nothing' ? new Map(memory.streams) : undefined;
  if (options.from === 'nothing') {
    memory.units.clear();
    memory.streams.clear();
  }
  memory.complete = undefined;

  for (const { members, loop } of plan.order) {
    const inLoop = loop ? members.map((m) => plan.units[m]!) : undefined;
    for (const member of members) {
      const unit = plan.units[member]!;
      const solver = solverOf(kinds, unit.kind);
      const catalogue = solver ? catalogueOf(kinds, unit.kind) : undefined;
      const unready = whyNot(unit, catalogue, plan, known, inLoop);
      if (unready || !solver) {
        const state = unready?.state ?? 'no-solution';
        note(unit, { kind: unit.kind, state, reasons: unready?.reasons ?? [] }, found, memory);
        spread(unit, state === 'no-solution' ? 'no-solution' : 'waiting', known, found, memory);
        continue;
      }
      const call = callOf(unit, plan, known, memory, problem);
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
      if (answer.outcome.state !== 'solved') spread(unit, 'no-solution', known, found, memory);
      else settle(unit, answer.outcome.value.out, known, found, memory, problem);
    }
  }

  forget(memory.units, found.units);
  forget(memory.streams, found.streams);
  const findings = collectFindings(problem, found, memory);
  if (live) findings.push(...severalAnswers(live, memory.streams));
  const closure = overallClosure(plan, found.units, memory, kinds);
  memory.complete = problem.edit;
  return { ...batchOf(found, memory, true), closure, findings };
}

/** A unit that has no answer; the record of the last hand-out is kept when it says the same. */
function note(unit: ProblemUnit, result: UnitResult, found: Found, memory: Memory): void {
  const posted = memory.posted.units.get(unit.id);
  found.units.set(unit.id, posted && sameData(posted, result) ? posted : result);
}

/** The outlets of a unit without an answer. */
function spread(
  unit: ProblemUnit,
  state: 'waiting' | 'no-solution',
  known: Map<StreamId, Known>,
  found: Found,
  memory: Memory,
): void {
  for (const stream of Object.values(unit.out)) {
    known.set(stream, state);
    found.streams.set(stream, UNSOLVED[state]);
    memory.streams.delete(stream);
  }
}

/** The outlets of a solved unit: states for what follows, results for the reader, limits. */
function settle(
  unit: ProblemUnit,
  out: Readonly<Record<Port, StreamState>>,
  known: Map<StreamId, Known>,
  found: Found,
  memory: Memory,
  problem: Problem,
): void {
  for (const [port, stream] of Object.entries(unit.out)) {
    const state = out[port];
    if (!state) throw new Error(`${unit.kind} gives no stream at ${port}`);
    const remembered = streamMemory(stream, unit, state, memory, problem);
    memory.streams.set(stream, remembered);
    known.set(stream, remembered.state);
    found.streams.set(stream, remembered.result);
  }
}

function streamMemory(
  stream: StreamId,
  unit: ProblemUnit,
  state: StreamState,
  memory: Memory,
  { limits }: Problem,
): StreamMemory {
  const last = memory.streams.get(stream);
  const materialNoted = unit.materialNoted === true;
  const same = last !== undefined && sameState(last.state, state);
  if (same && last.materialNoted === materialNoted && sameData(last.limits, limits)) return last;
  const context = {
    stream: state,
    at: { unit: unit.id, stream },
    model: memory.model,
    overrides: limits,
    materialNoted,
  };
  return {
    state: same ? last.state : state,
    result: same ? last.result : describe(state, memory.model, memory.data),
    limits,
    materialNoted,
    findings: streamLimits(context),
  };
}

function callOf(
  unit: ProblemUnit,
  plan: Plan,
  known: ReadonlyMap<StreamId, Known>,
  memory: Memory,
  problem: Problem,
): Call<unknown> {
  const stateOf = (stream: StreamId): StreamState => {
    const state = known.get(stream);
    if (state === undefined || typeof state === 'string')
      throw new Error('a stream is asked for before it is solved');
    return state;
  };
  const inlets: Record<Port, StreamState> = {};
  for (const [port, stream] of Object.entries(unit.in)) inlets[port] = stateOf(stream);
  let settings = unit.settings;
  for (const read of plan.reads.get(unit.id) ?? [])
    settings = withRead(settings, read, stateOf(read.stream), memory.data.MW_kg_mol);
  return {
    unit: unit.id,
    in: inlets,
    outPorts: Object.keys(unit.out).sort(),
    settings,
    model: memory.model,
    site: problem.site,
    limits: problem.limits,
    work: memory.work,
  };
}

function forget<K>(kept: Map<K, unknown>, wanted: ReadonlyMap<K, unknown>): void {
  for (const id of kept.keys()) if (!wanted.has(id)) kept.delete(id);
}

/** All findings of a solve, in the order of the sketch's units; waiting units are told by their state alone. */
function collectFindings(problem: Problem, found: Found, memory: Memory): Finding[] {
  const all: Finding[] = [];
  const loops = new Set<string>();
  for (const unit of problem.units) {
    const result = found.units.get(unit.id)!;
    if (result.state === 'no-solution') {
      for (const reason of result.reasons ?? []) {
        // One loop is one finding, at the first of its units.
        const names =
          reason.code === 'network/loop' ? reason.evidence.map((e) => e.text).join(' ') : undefined;
        if (names !== undefined && loops.has(names)) continue;
        if (names !== undefined) loops.add(names);
        all.push(reason);
      }
    } else if (result.state === 'solved') {
      const remembered = memory.units.get(unit.id)!;
      all.push(...remembered.outcome.findings, ...remembered.limitFindings);
    }
    for (const stream of Object.values(unit.out)) all.push(...(memory.streams.get(stream)?.findings ?? []));
  }
  const states = [...memory.streams].map(([id, s]) => [id, s.state] as const);
  all.push(...pairLimits(memory.model, states, problem.limits));
  return all;
}
