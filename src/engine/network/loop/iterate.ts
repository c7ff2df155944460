import type { StreamState } from '../../equilibrium/types';
import type { StreamId, UnitId } from '../../ids';
import { type Anderson, makeAnderson } from '../../numerics/anderson';
import { worstOf } from '../closure';
import { CLOSES } from '../solveUnit';
import type { SolveStep } from '../step';
import type { LoopProgress, LoopResult, UnitClosure } from '../types';
import { type Change, changeOf, hold, weigh } from './advance';
import { envelopeOf, gathered, gathering, isStale, loopBalance, stayingOf, worstTaker } from './balance';
import { type Passed, runPass } from './pass';
import { unsettled } from './reasons';
import type { Ending, Going, Loop, Torn } from './types';
import { layoutOf, pack, unpack } from './vector';

/** Differences the acceleration holds: for one tear, and for each further one. */
const DEPTH = 5;
const FURTHER = 3;
const DEEPEST = 12;
/** Plain passes before the first accelerated one. */
const DIRECT = 2;
/** Passes in which a unit may have no answer yet, because not everything flows that will. */
const LENIENT = 16;
/** Times in a row a point without an answer is approached again from half as far. */
const RETREATS = 6;
/** Such points in all, after which that is how it is. */
const FAILURES = 15;
/** A residual so many times the least one so far is none to go on from. */
const WORSE = 30;
/** Each plain pass from such a point has to bring it to this share [-]. */
const CALMS = 0.7;
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

export interface Start {
  readonly torn: Torn;
  /** What units start from. */
  readonly warm: ReadonlyMap<UnitId, unknown>;
  /** Slopes found before: the start is near an answer, and no plain passes are due. */
  readonly slopes?: Anderson;
  readonly passes: number;
}

interface Point {
  readonly x: Float64Array;
  readonly g: Float64Array;
  readonly back: Torn;
  readonly change: Change;
}

/** Passes around a loop from a start until it is solved, or there is a reason to stop. */
export function* iterate(loop: Loop, start: Start): Generator<SolveStep, Ending, void> {
  const layout = layoutOf(loop);
  const envelope = envelopeOf(loop);
  const scratch = new Float64Array(layout.length);
  const going: Going = { said: new Map(), states: new Map(), warm: new Map(start.warm) };
  const anderson = start.slopes ?? makeAnderson(layout.length, depthOf(layout.tears));
  let assumed = start.torn;
  let x = new Float64Array(layout.length);
  pack(assumed, layout, loop, x);
  let best: Point | undefined;
  let closest = { closure: Number.POSITIVE_INFINITY, pass: 0 };
  /** Streams of the first passes, before anything gathered: there a purge shows where it would take most. */
  let early: ReadonlyMap<StreamId, StreamState> = new Map();
  let retreats = 0;
  let failures = 0;
  let damping = 1;
  /** Residual of the last point away from the best one. */
  let excursion = Number.POSITIVE_INFINITY;
  let shown: Change | undefined;
  let last: { balance: UnitClosure; back: Torn } | undefined;
  let plain = start.slopes ? 0 : DIRECT;

  for (let pass = 1; pass <= start.passes; pass++) {
    const lenient = best === undefined && pass <= LENIENT;
    const { back, failed }: Passed = yield* runPass(
      loop,
      assumed,
      going,
      progressOf(loop, pass, shown),
      lenient,
    );
    const g = new Float64Array(layout.length);
    pack(back, layout, loop, g);
    if (failed !== undefined) {
      if (lenient) {
        [x, assumed] = [g, back];
        continue;
      }
      retreats++;
      failures++;
      if (!best || retreats > RETREATS || failures > FAILURES)
        return { is: 'unit-fails', unit: failed, said: going.said.get(failed)! };
      const near = retreat(x, best, loop);
      if (!near) return { is: 'unit-fails', unit: failed, said: going.said.get(failed)! };
      [x, assumed] = near;
      anderson.forget();
      plain = 1;
      continue;
    }
    const balance = loopBalance(loop, going, envelope);
    const entering = (i: number): number => balance.chemicals[i]!.in + balance.chemicals[i]!.made;
    const change = changeOf(x, g, entering, layout, scratch);
    shown = change;
    last = { balance, back };
    if (pass <= DIRECT + 1 || early.size === 0) early = new Map(going.states);
    if (start.slopes && isStale(balance, back)) return { is: 'stale' };
    const closure = Math.max(worstOf(balance), worstTaker(loop, going, back));
    if (closure < closest.closure) closest = { closure, pass };
    const stalled = pass - closest.pass >= STALLED && closure <= CLOSES / 2;
    if (change.most <= SETTLED && (closure <= CLOSED || stalled)) {
      const tear = [...loop.plan.tears, ...loop.plan.scalars.map((r) => r.stream)];
      const result: LoopResult = { passes: pass, residual: change.most, tear };
      return { is: 'solved', torn: back, going, result, slopes: anderson };
    }
    if (gathered(balance, back, TOO_MUCH).length > 0) return gathering(loop, early, balance, back, MUCH)!;
    if (best && change.mean > WORSE * best.change.mean && pass > DIRECT + 1) {
      // Plain passes often lead on from there: a gas that was overloaded condenses what is too much. While they do, they go on.
      if (change.mean < CALMS * excursion) {
        excursion = change.mean;
        anderson.forget();
        [x, assumed] = [g, back];
        continue;
      }
      excursion = Number.POSITIVE_INFINITY;
      // Back to the best point, and on from there with a plain step, shorter each time.
      const next = best.x.map((v, i) => v + damping * (best!.g[i]! - v));
      damping /= 2;
      anderson.forget();
      const near = unpack(next, best.back, layout, loop);
      if (near.state !== 'solved') return unsettled(loop, pass, change);
      [x, assumed] = [next, near.value];
      continue;
    }
    if (!best || change.mean <= best.change.mean) {
      best = { x, g, back, change };
      damping = 1;
    }
    retreats = 0;
    excursion = Number.POSITIVE_INFINITY;
    anderson.push(x, g);
    if (plain > 0) {
      plain--;
      [x, assumed] = [g, back];
      continue;
    }
    weigh(x, g, layout, scratch);
    const y = new Float64Array(layout.length);
    anderson.propose(scratch, y);
    hold(y, x, g, layout);
    if (fill(y, g, balance, back, layout)) anderson.forget();
    const near = unpack(y, back, layout, loop);
    [x, assumed] = near.state === 'solved' ? [y, near.value] : [g, back];
  }
  const stuck = last && gathering(loop, early, last.balance, last.back, SOME);
  if (stuck) return stuck;
  return unsettled(loop, start.passes, shown);
}

const depthOf = (tears: number): number => Math.min(DEEPEST, DEPTH + FURTHER * Math.max(0, tears - 1));

function progressOf(loop: Loop, pass: number, last: Change | undefined): LoopProgress {
  const { tears, scalars } = loop.plan;
  const stream = tears[last?.tear ?? 0] ?? tears[0] ?? scalars[0]!.stream;
  const units = loop.members.map((m) => m.unit.id);
  return { units, stream, pass, ...(last ? { residual: last.most } : {}) };
}

/** Half way back to the best point. */
function retreat(x: Float64Array, best: Point, loop: Loop): [Float64Array<ArrayBuffer>, Torn] | undefined {
  const next = x.map((v, i) => (v + best.x[i]!) / 2);
  const near = unpack(next, best.back, layoutOf(loop), loop);
  return near.state === 'solved' ? [Float64Array.from(next), near.value] : undefined;
}

/** Shares that leave of what enters: less than this is nothing, more than this is on its way [-]. */
const NOTHING = 1e-9;
const HALF = 0.5;

/**
 * Doubles what goes round of a chemical of which nothing leaves yet, or so little that the step would take some away: either it
 * finds a way out when there is more of it (a gas that has to fill the space, water that has to reach its dew point), or it has
 * none. Mutates: y.
 */
function fill(
  y: Float64Array,
  g: Float64Array,
  balance: UnitClosure,
  back: Torn,
  { nc, tears, width }: ReturnType<typeof layoutOf>,
): boolean {
  let filled = false;
  for (let i = 0; i < nc; i++) {
    const { entering, leaving, round } = stayingOf(balance, back, i);
    if (!(entering > 0) || leaving > HALF * entering || round === 0) continue;
    let proposed = 0;
    for (let t = 0; t < tears; t++) proposed += y[t * width + i]!;
    if (leaving > NOTHING * entering && proposed >= round) continue;
    filled = true;
    for (let t = 0; t < tears; t++) y[t * width + i] = 2 * g[t * width + i]!;
  }
  return filled;
}
