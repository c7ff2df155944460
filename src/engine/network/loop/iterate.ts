import type { StreamState } from '../../equilibrium/types';
import type { StreamId, UnitId } from '../../ids';
import { worstOf } from '../closure';
import { CLOSES } from '../solveUnit';
import type { SolveStep } from '../step';
import type { LoopProgress, UnitClosure } from '../types';
import { type Change, changeOf } from './advance';
import { type Envelope, envelopeOf, gathered, gathering, isStale, loopBalance, worstTaker } from './balance';
import {
  type Course,
  comeBack,
  courseFrom,
  DIRECT,
  goTo,
  type Point,
  packed,
  retreat,
  type Start,
  step,
  strayed,
} from './course';
import type { Torn } from './memory';
import { runPass } from './pass';
import { type Fall, pressureFalls, unsettled } from './reasons';
import type { Ending, Loop } from './types';

/** Passes in which a unit may have no answer yet, because not everything flows that will. */
const LENIENT = 16;
/** Solved: change of the tear, and closure of the loop and of the units at its tears [-]. */
const SETTLED = 1e-9;
const CLOSED = 2e-10;
/**
 * Times what enters of a chemical that go round while less than half of it leaves [-]: with the first it has no way out, and so
 * have others with the second; after the last pass the third will do.
 */
const TOO_MUCH = 1e5;
const MUCH = 1e2;
const SOME = 1e3;
/** Passes without a better closure after which what is closed well enough is taken. */
const STALLED = 6;

/** What is noticed from pass to pass. */
interface Watch {
  readonly envelope: Envelope;
  /** Streams of the first passes, before anything gathered: there a purge shows where it would take most. */
  early: ReadonlyMap<StreamId, StreamState>;
  closest: { readonly closure: number; readonly pass: number };
  last?: { readonly balance: UnitClosure; readonly point: Point };
  falls: Falls;
}

/** Passes in a row from which a tear came back at a lower pressure than it was assumed to have, and another than before. */
interface Falls extends Fall {
  readonly times: number;
  /** What came back last, by tear [Pa]. */
  readonly last: readonly number[];
}
/** From so many on, the pressure falls on every way round. */
const MANY_FALLS = 4;
const FALL = 1e-6;

/**
 * Passes around a loop from a start until it is solved, or there is a reason to stop. Solved: every tear came back within 1e-9
 * of its size, and the loop and the units at its tears close to 2e-10 (5e-10 where it gets no better).
 */
export function* iterate(loop: Loop, start: Start): Generator<SolveStep, Ending, void> {
  const c = courseFrom(loop, start);
  const watch: Watch = {
    envelope: envelopeOf(loop),
    early: new Map(),
    closest: { closure: Number.POSITIVE_INFINITY, pass: 0 },
    falls: { times: 0, tear: -1, from_Pa: 0, by_Pa: 0, last: [] },
  };
  for (let pass = 1; pass <= start.passes; pass++) {
    const lenient = c.best === undefined && pass <= LENIENT;
    const progress = progressOf(loop, pass, watch.last?.point.change);
    const { back, failed } = yield* runPass(loop, c.assumed, c.going, progress, lenient);
    const g = packed(back, c.layout, loop);
    if (failed !== undefined) {
      if (lenient) goTo(c, g, back);
      else if (!retreat(c)) return failing(c, watch, failed);
      continue;
    }
    const balance = loopBalance(loop, c.going, watch.envelope);
    const entering = (i: number): number => balance.chemicals[i]!.in + balance.chemicals[i]!.made;
    const point: Point = { x: c.x, g, back, change: changeOf(c.x, g, entering, c.layout, c.scratch) };
    watch.last = { balance, point };
    watch.falls = fallsAfter(watch.falls, c.assumed, back);
    if (pass <= DIRECT + 1 || watch.early.size === 0) watch.early = new Map(c.going.states);
    const ending = endAt(c, watch, pass, start);
    if (ending) return ending;
    if (!strayed(c, point.change, pass)) step(c, point, balance);
    else if (!comeBack(c, point)) return fallen(c, watch) ?? unsettled(loop, pass, point.change);
  }
  const { last } = watch;
  const stuck = last && gathering(loop, watch.early, last.balance, last.point.back, SOME);
  return stuck ?? fallen(c, watch) ?? unsettled(loop, start.passes, last?.point.change);
}

/** Solved, stale, or something gathers without end; undefined while passes go on. */
function endAt(c: Course, watch: Watch, pass: number, start: Start): Ending | undefined {
  const { loop, going } = c;
  const { balance, point } = watch.last!;
  const { back, change } = point;
  if (start.slopes && isStale(balance, back)) return { is: 'stale' };
  const closure = Math.max(worstOf(balance), worstTaker(loop, going, back));
  if (closure < watch.closest.closure) watch.closest = { closure, pass };
  const stalled = pass - watch.closest.pass >= STALLED && closure <= CLOSES / 2;
  if (change.most <= SETTLED && (closure <= CLOSED || stalled)) {
    const tear = [...loop.plan.tears, ...loop.plan.scalars.map((r) => r.stream)];
    const result = { passes: pass, residual: change.most, tear };
    return { is: 'solved', torn: back, going, result, slopes: c.anderson };
  }
  return gathered(balance, back, TOO_MUCH).length > 0
    ? gathering(loop, watch.early, balance, back, MUCH)
    : undefined;
}

function fallsAfter(before: Falls, assumed: Torn, back: Torn): Falls {
  let [tear, from_Pa, by_Pa] = [-1, 0, 0];
  back.streams.forEach((s, t) => {
    const from = assumed.streams[t]!.P_Pa;
    // A pressure that a unit holds comes back the same whatever was assumed.
    const held = Math.abs(s.P_Pa - (before.last[t] ?? 0)) < FALL * s.P_Pa;
    if (!held && from - s.P_Pa > Math.max(FALL * from, by_Pa))
      [tear, from_Pa, by_Pa] = [t, from, from - s.P_Pa];
  });
  const last = back.streams.map((s) => s.P_Pa);
  return { times: tear < 0 ? 0 : before.times + 1, tear, from_Pa, by_Pa, last };
}

/** The end of an attempt in which the pressure fell on every way round, if it did. */
const fallen = (c: Course, { falls }: Watch): Ending | undefined =>
  falls.times >= MANY_FALLS ? pressureFalls(c.loop, falls) : undefined;

const failing = (c: Course, watch: Watch, unit: UnitId): Ending =>
  fallen(c, watch) ?? { is: 'unit-fails', unit, said: c.going.said.get(unit)! };

function progressOf(loop: Loop, pass: number, last: Change | undefined): LoopProgress {
  const { tears, scalars } = loop.plan;
  const stream = tears[last?.tear ?? 0] ?? tears[0] ?? scalars[0]!.stream;
  const units = loop.members.map((m) => m.unit.id);
  return { units, stream, pass, ...(last ? { residual: last.most } : {}) };
}
