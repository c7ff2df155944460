import type { StreamState } from '../equilibrium/types';
import type { Port, StreamId } from '../ids';
import { streamLimits } from '../units/streamLimits';
import type { Call } from '../units/types';
import { describe } from './describe';
import type { Kinds } from './kinds';
import type { Found, Memory, StreamMemory } from './memory';
import type { Plan } from './plan';
import { seenBy, withRead } from './reads';
import type { Known } from './ready';
import { sameData, sameState } from './same';
import type { Problem, ProblemUnit, Read, StreamResult, UnitResult } from './types';

/** One solve on its way: what is asked, what is known so far. */
export interface Run {
  readonly problem: Problem;
  readonly plan: Plan;
  readonly kinds: Kinds;
  readonly memory: Memory;
  readonly found: Found;
  readonly known: Map<StreamId, Known>;
}

const UNSOLVED: Readonly<Record<'waiting' | 'no-solution', StreamResult>> = {
  waiting: { state: 'waiting' },
  'no-solution': { state: 'no-solution' },
};

/** Puts down a unit that has no answer; the record of the last hand-out is kept when it says the same. Mutates: run.found. */
export function note(unit: ProblemUnit, result: UnitResult, { found, memory }: Run): void {
  const posted = memory.posted.units.get(unit.id);
  found.units.set(unit.id, posted && sameData(posted, result) ? posted : result);
}

/** Puts down that the outlets of a unit without an answer have none. Mutates: run.known, run.found, run.memory. */
export function spread(
  unit: ProblemUnit,
  state: 'waiting' | 'no-solution',
  { known, found, memory }: Run,
): void {
  for (const stream of Object.values(unit.out)) {
    known.set(stream, state);
    found.streams.set(stream, UNSOLVED[state]);
    memory.streams.delete(stream);
  }
}

/**
 * Puts down the outlets of a solved unit: states for what follows, results for the reader, limits. Mutates: run.known,
 * run.found, run.memory.
 */
export function settle(
  unit: ProblemUnit,
  out: Readonly<Record<Port, StreamState>>,
  { known, found, memory, problem }: Run,
): void {
  for (const [port, stream] of Object.entries(unit.out)) {
    const remembered = streamMemory(stream, unit, outletOf(unit, port, out), memory, problem);
    memory.streams.set(stream, remembered);
    known.set(stream, remembered.state);
    found.streams.set(stream, remembered.result);
  }
}

/** The state at a port. Throws when the kind's solver gives none there: a mistake of ours. */
export function outletOf(
  unit: ProblemUnit,
  port: Port,
  out: Readonly<Record<Port, StreamState>>,
): StreamState {
  const state = out[port];
  if (!state) throw new Error(`${unit.kind} gives no stream at ${port}`);
  return state;
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

/** The state of a stream that is solved by now. Throws when it is not: a mistake of ours. */
export function stateIn(known: ReadonlyMap<StreamId, Known>, stream: StreamId): StreamState {
  const state = known.get(stream);
  if (state === undefined || typeof state === 'string')
    throw new Error('a stream is asked for before it is solved');
  return state;
}

/**
 * What a unit is asked.
 *
 * @param stateOf  states of streams
 * @param seen     what a read sees [mol/s or kg/s], where that is assumed and not taken from the stream
 */
export function callOf(
  unit: ProblemUnit,
  { plan, memory, problem }: Run,
  stateOf: (stream: StreamId) => StreamState,
  seen?: (read: Read) => number | undefined,
): Call<unknown> {
  const inlets: Record<Port, StreamState> = {};
  for (const [port, stream] of Object.entries(unit.in)) inlets[port] = stateOf(stream);
  let settings = unit.settings;
  for (const read of plan.reads.get(unit.id) ?? [])
    settings = withRead(
      settings,
      read,
      seen?.(read) ?? seenBy(read, stateOf(read.stream), memory.data.MW_kg_mol),
    );
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
