import type { StreamState } from '../../equilibrium/types';
import type { StreamId, UnitId } from '../../ids';
import { emptyStream, mixed, scaledStream } from '../../units/streams';
import type { Answer, Call } from '../../units/types';
import { batchOf } from '../batch';
import { seenBy } from '../reads';
import { callOf, outletOf, stateIn } from '../run';
import { sameData, sameState } from '../same';
import { attempts, isFiniteState } from '../solveUnit';
import type { SolveStep } from '../step';
import type { LoopProgress, ProblemUnit } from '../types';
import type { Torn } from './memory';
import type { Going, Loop, Member } from './types';

export interface Passed {
  /** What came back of what was assumed; with a unit failed, as far as it can be told. */
  readonly back: Torn;
  /** The first unit that has no answer at what was assumed. */
  readonly failed?: UnitId;
}

/**
 * Solves every unit of a loop once, in order, from what is assumed at its tears.
 *
 * @param lenient  a unit without an answer is passed over with what it gave before, or with nothing; else the pass ends there
 */
export function* runPass(
  loop: Loop,
  assumed: Torn,
  going: Going,
  progress: LoopProgress,
  lenient: boolean,
): Generator<SolveStep, Passed, void> {
  const { run, plan, members } = loop;
  const { found, memory, known } = run;
  const torn = new Map(plan.tears.map((stream, t) => [stream, assumed.streams[t]!] as const));
  const stateOf = (stream: StreamId): StreamState =>
    torn.get(stream) ?? going.states.get(stream) ?? stateIn(known, stream);
  let failed: UnitId | undefined;
  for (const member of members) {
    const { unit, solver } = member;
    const call = callOf(unit, run, stateOf, (read) => assumed.seen[plan.scalars.indexOf(read)]);
    const last = going.said.get(unit.id);
    if (last && last.outcome.state === 'solved' && sameCall(last.call, call)) continue;
    yield { unit: unit.id, loop: progress, collect: () => batchOf(found, memory) };
    const outcome = attempts(solver, call, going.warm.get(unit.id));
    going.said.set(unit.id, { call, outcome });
    if (outcome.state === 'solved' && Object.values(outcome.value.out).every(isFiniteState)) {
      going.warm.set(unit.id, outcome.value.warm);
      put(unit, outcome.value.out, going);
      continue;
    }
    failed ??= unit.id;
    if (!lenient) break;
    passOver(member, call, going, loop);
  }
  const of = (stream: StreamId): StreamState => going.states.get(stream) ?? stateOf(stream);
  const { MW_kg_mol } = memory.data;
  const back = {
    streams: plan.tears.map(of),
    seen: plan.scalars.map((read) => seenBy(read, of(read.stream), MW_kg_mol)),
  };
  return failed === undefined ? { back } : { back, failed };
}

const sameCall = (a: Call<unknown>, b: Call<unknown>): boolean =>
  Object.keys(b.in).every((port) => sameState(a.in[port]!, b.in[port]!)) && sameData(a.settings, b.settings);

function put(unit: ProblemUnit, out: Answer['out'], going: Going): void {
  for (const [port, stream] of Object.entries(unit.out)) going.states.set(stream, outletOf(unit, port, out));
}

/** How much of its inlet a unit without an answer keeps in the loop [-]. */
const GATHERS = 2;

/**
 * Outlets of a unit that has no answer yet. A unit of one inlet keeps all of it in the loop, and more: where a given flow is to
 * go round it has to gather first; at no less than the pressure of what enters, so that none is lost from pass to pass. Others
 * give what they gave before, or nothing.
 */
function passOver(
  { unit }: Member,
  call: Call<unknown>,
  { states }: Going,
  { entering, plan, run }: Loop,
): void {
  const { model, site } = call;
  const inlets = Object.values(call.in);
  const all = mixed(call.in, model.nc);
  const T_K = all.T_K > 0 ? all.T_K : site.ambient_K;
  const P_Pa = Math.max(...inlets.map((s) => s.P_Pa), ...entering.map(([, s]) => s.P_Pa));
  const nothing = emptyStream(model.nc, T_K, P_Pa > 0 ? P_Pa : site.pressure_Pa);
  const inner = new Set(plan.order);
  const outlets = Object.values(unit.out);
  const back = outlets.filter((stream) => inner.has(run.plan.target.get(stream)?.unit ?? -1));
  const [only, ...more] = inlets;
  for (const stream of outlets) {
    if (more.length === 0 && only && only.phases.length > 0) {
      const state = back.includes(stream) ? { ...scaledStream(only, GATHERS / back.length), P_Pa } : nothing;
      states.set(stream, state);
    } else if (!states.has(stream)) states.set(stream, nothing);
  }
}
