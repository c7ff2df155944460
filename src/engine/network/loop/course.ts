import type { UnitId } from '../../ids';
import { type Anderson, makeAnderson } from '../../numerics/anderson';
import type { UnitClosure } from '../types';
import { type Change, hold, weigh } from './advance';
import { stayingOf } from './balance';
import type { Torn } from './memory';
import type { Going, Loop } from './types';
import { type Layout, layoutOf, pack, unpack } from './vector';

/** Differences the acceleration holds: for one tear, and for each further one. */
const DEPTH = 5;
const FURTHER = 3;
const DEEPEST = 12;
/** Plain passes before the first accelerated one. */
export const DIRECT = 2;
/** Times in a row a point without an answer is approached again from half as far. */
const RETREATS = 6;
/** Such points in all, after which that is how it is. */
const FAILURES = 15;
/** A residual so many times the least one so far is none to go on from. */
const WORSE = 30;
/** Each plain pass from such a point has to bring it to this share [-]. */
const CALMS = 0.7;

export interface Start {
  readonly torn: Torn;
  /** What units start from. */
  readonly warm: ReadonlyMap<UnitId, unknown>;
  /** Slopes found before: the start is near an answer, and no plain passes are due. */
  readonly slopes?: Anderson;
  readonly passes: number;
}

/** What a pass in which every unit has an answer came to. */
export interface Point {
  readonly x: Float64Array;
  readonly g: Float64Array;
  readonly back: Torn;
  readonly change: Change;
}

/** Where an attempt stands between two passes. The steps below move it on. */
export interface Course {
  readonly loop: Loop;
  readonly layout: Layout;
  readonly going: Going;
  readonly anderson: Anderson;
  readonly scratch: Float64Array;
  /** What the next pass assumes, as numbers and as streams. */
  x: Float64Array;
  assumed: Torn;
  best: Point | undefined;
  /** Plain passes that are due. */
  plain: number;
  retreats: number;
  failures: number;
  damping: number;
  /** Residual of the last point away from the best one. */
  excursion: number;
}

/** An attempt before its first pass. */
export function courseFrom(loop: Loop, start: Start): Course {
  const layout = layoutOf(loop);
  const depth = Math.min(DEEPEST, DEPTH + FURTHER * Math.max(0, layout.tears - 1));
  return {
    loop,
    layout,
    going: { said: new Map(), states: new Map(), warm: new Map(start.warm) },
    anderson: start.slopes ?? makeAnderson(layout.length, depth),
    scratch: new Float64Array(layout.length),
    x: packed(start.torn, layout, loop),
    assumed: start.torn,
    best: undefined,
    plain: start.slopes ? 0 : DIRECT,
    retreats: 0,
    failures: 0,
    damping: 1,
    excursion: Number.POSITIVE_INFINITY,
  };
}

/** What is torn as numbers, in a new array; see pack. */
export function packed(torn: Torn, layout: Layout, loop: Loop): Float64Array {
  const out = new Float64Array(layout.length);
  pack(torn, layout, loop, out);
  return out;
}

/** The next pass assumes this. */
export function goTo(c: Course, x: Float64Array, assumed: Torn): void {
  c.x = x;
  c.assumed = assumed;
}

/** After a pass in which a unit had no answer: half way back to the best point, and a plain pass there. False: no more of that. */
export function retreat(c: Course): boolean {
  const { best, loop, layout } = c;
  c.retreats++;
  c.failures++;
  if (!best || c.retreats > RETREATS || c.failures > FAILURES) return false;
  const next = c.x.map((v, i) => (v + best.x[i]!) / 2);
  const near = unpack(next, best.back, layout, loop);
  if (near.state !== 'solved') return false;
  goTo(c, next, near.value);
  c.anderson.forget();
  c.plain = 1;
  return true;
}

/** Whether a pass led so far away from the best point that the next one is not taken from there as usual. */
export const strayed = ({ best }: Course, change: Change, pass: number): boolean =>
  best !== undefined && change.mean > WORSE * best.change.mean && pass > DIRECT + 1;

/**
 * After a pass that led far away. Plain passes often lead on from there: a gas that was overloaded condenses what is too much.
 * While they do, they go on; else back to the best point, and on from there with a plain step, shorter each time. False: there is
 * no such point.
 */
export function comeBack(c: Course, { g, back, change }: Point): boolean {
  c.anderson.forget();
  if (change.mean < CALMS * c.excursion) {
    c.excursion = change.mean;
    goTo(c, g, back);
    return true;
  }
  c.excursion = Number.POSITIVE_INFINITY;
  const best = c.best!;
  const next = best.x.map((v, i) => v + c.damping * (best.g[i]! - v));
  c.damping /= 2;
  const near = unpack(next, best.back, c.layout, c.loop);
  if (near.state !== 'solved') return false;
  goTo(c, next, near.value);
  return true;
}

/** The usual step: plain while plain ones are due, then accelerated. */
export function step(c: Course, point: Point, balance: UnitClosure): void {
  const { loop, layout, anderson, scratch } = c;
  const { x, g, back, change } = point;
  if (!c.best || change.mean <= c.best.change.mean) {
    c.best = point;
    c.damping = 1;
  }
  c.retreats = 0;
  c.excursion = Number.POSITIVE_INFINITY;
  anderson.push(x, g);
  if (c.plain > 0) {
    c.plain--;
    goTo(c, g, back);
    return;
  }
  weigh(x, g, layout, scratch);
  const y = new Float64Array(layout.length);
  anderson.propose(scratch, y);
  hold(y, x, g, layout);
  if (fill(y, g, balance, back, layout)) anderson.forget();
  const near = unpack(y, back, layout, loop);
  if (near.state === 'solved') goTo(c, y, near.value);
  else goTo(c, g, back);
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
  { nc, tears, width }: Layout,
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
