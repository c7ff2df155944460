import { startBySums } from './absorber';
import { explain, type Failure, isTrivial, standing } from './failure';
import { type Guess, guessOf } from './guess';
import type { Newton, Wanted } from './newton';
import { directParameters, drawTargets, type Placed } from './parameters';
import { type Sweeps, startBySweeps } from './start';
import { put, restore, stateOf } from './state';
import type { StageSystem } from './system';
import { naturalOf, targetOf } from './targets';
import type { Attempt, ColumnState, ColumnTask, Effort } from './types';
import { startUniform } from './uniform';
import { type ColumnWork, workFor } from './work';

/** The system at its answer, or why none was found. */
export type ColumnEnd =
  | {
      readonly state: 'solved';
      readonly system: StageSystem;
      readonly effort: Effort;
      /** Where one fixing beside parameters is asked: how its measure changes with the bottoms or whatever is free. */
      readonly slope?: number;
    }
  | { readonly state: 'no-solution'; readonly failure: Failure; readonly effort: Effort };

const PLAIN: Sweeps = { simple: 8, model: 6, share: 0.5, simple_K: 2, model_K: 0.5 };
const STARTS: readonly (readonly [Attempt, Sweeps])[] = [
  ['plain-start', PLAIN],
  ['more-sweeps', { simple: 12, model: 60, share: 0.3, simple_K: 0, model_K: 0 }],
];
const ITERATIONS = 40;
const WARM_ITERATIONS = 14;
/**
 * What is asked settles the parameters only if it changes with them by more than this: residuals of 1e-12 then leave them
 * certain to four digits.
 */
const SETTLES = 1e-8;
/** Reflux ratios to come from, by the one that is asked. */
const OTHER_RATIOS = [3, 0.3, 10, 0.1];
/** Steps of a scan: how long in the logarithm of a parameter, how many each way. */
const SCAN_STEP = 0.25;
const SCAN_STEPS = 20;

/** A solve of one column: its system, its scratch, and the order in which starts are tried. */
class Search {
  readonly system: StageSystem;
  readonly effort: Effort = { iterations: 0, residual: Number.POSITIVE_INFINITY, tried: [] };
  private readonly newton: Newton;
  private readonly wanted: Wanted;
  private readonly direct: ReadonlyMap<number, number>;
  /** Fixings that are targets, with their place in the task's list. */
  private readonly moved: readonly Placed[];
  private failure: Failure | undefined;
  /** The failure that came furthest towards what is asked. */
  private reach: Failure | undefined;
  /** How far the last way was followed, 0 to 1. */
  private way = 0;

  constructor(
    private readonly task: ColumnTask,
    { system, newton }: ColumnWork,
    private readonly alive: () => void,
  ) {
    this.system = system;
    this.newton = newton;
    system.load(task);
    const { direct, left } = directParameters(system, task.fixed);
    this.direct = direct;
    this.moved = left;
    const targets = [...left.map((x) => targetOf(system, x.fixed)), ...drawTargets(system)];
    this.wanted = {
      free: system.movers.map((_, k) => k).filter((k) => !direct.has(k)),
      targets,
      values: Float64Array.from(targets, (t) => t.wanted),
    };
  }

  solve(warm: ColumnState | undefined): ColumnEnd {
    if (warm && this.fromWarm(warm)) return this.solved();
    if (this.fromStarts() || this.fromPlain() || this.fromOtherRatio()) return this.solved();
    return { state: 'no-solution', failure: this.failure!, effort: this.effort };
  }

  private solved(): ColumnEnd {
    if (this.newton.leastPivot(this.wanted) < SETTLES)
      return {
        state: 'no-solution',
        failure: { ...standing(this.system), why: 'open' },
        effort: this.effort,
      };
    const slope = this.newton.slope(this.wanted);
    return {
      state: 'solved',
      system: this.system,
      effort: this.effort,
      ...(slope === undefined ? {} : { slope }),
    };
  }

  private fromWarm(warm: ColumnState): boolean {
    const { system: s } = this;
    if (warm.l.length !== s.l.length || warm.p.length !== s.p.length) return false;
    s.l.set(warm.l);
    s.v.set(warm.v);
    s.T.set(warm.T_K);
    s.p.set(warm.p);
    this.setDirect();
    return this.attempt('warm', this.wanted, WARM_ITERATIONS);
  }

  private fromStarts(): boolean {
    const { system: s } = this;
    if (s.first === 0 && !this.task.reboiler) return this.fromSums();
    const guess = guessOf(s);
    for (const [name, sweeps] of STARTS) {
      this.start(guess, sweeps);
      if (this.attempt(name, this.wanted, ITERATIONS)) return true;
    }
    return this.fromOverflow(guess, this.wanted);
  }

  /** Without ends: sum rates; then from a column of like stages, its feeds moved to what they are. */
  private fromSums(): boolean {
    const { system: s } = this;
    for (const [name, passes, withModel] of SUM_STARTS) {
      startBySums(s, passes, withModel);
      if (this.attempt(name, this.wanted, ITERATIONS)) return true;
    }
    const told = this.failure;
    const set = startUniform(s);
    if (!set) return false;
    set(0);
    const done = this.attempt('like-stages', this.wanted, ITERATIONS) && this.follow(this.wanted, set);
    set(1);
    if (!done) this.failure = told;
    return done;
  }

  /** Constant molar overflow first, then step by step to the model's enthalpies. */
  private fromOverflow(guess: Guess, wanted: Wanted): boolean {
    const { system: s } = this;
    this.start(guess, PLAIN);
    s.realHeat = 0;
    const done =
      this.attempt('heats', wanted, ITERATIONS) &&
      this.follow(
        wanted,
        (way) => {
          s.realHeat = way;
        },
        1,
      );
    s.realHeat = 1;
    return done;
  }

  /** A plain column first: reflux ratio and flow as guessed; then step by step to what is asked. */
  private fromPlain(): boolean {
    const { system: s, wanted, task } = this;
    const moved = wanted.targets.length - task.draws.length;
    const first = s.movers.length - task.draws.length;
    const plain: Wanted = {
      free: task.draws.map((_, k) => first + k),
      targets: wanted.targets.slice(moved),
      values: wanted.values.slice(moved),
    };
    // With nothing to move the plain column is the one that was tried.
    if (moved === 0) return false;
    const guess = guessOf(s);
    for (const other of [guess, this.calmer(guess)])
      if (this.plainColumn(plain, other) && (this.moveFrom(moved) || (moved === 1 && this.scan(plain))))
        return true;
    // The furthest that was reached says more than where the last try ended.
    if (this.reach) this.failure = this.reach;
    return false;
  }

  private plainColumn(plain: Wanted, guess: Guess): boolean {
    for (const [, sweeps] of STARTS) {
      this.start(guess, sweeps);
      if (this.attempt('plain-then-move', plain, ITERATIONS)) return true;
    }
    return this.fromOverflow(guess, plain);
  }

  /** Another plain column, far from dry: more reflux where that is open, else a distillate between what is possible. */
  private calmer(guess: Guess): Guess {
    const all = guess.top + guess.bottoms;
    if (!this.task.fixed.some((x) => x.fix === 'refluxRatio'))
      return { ...guess, refluxRatio: Math.max(3, (1.5 * guess.vapour) / guess.top) };
    const least = Math.min((1.1 * guess.vapour) / (1 + guess.refluxRatio), 0.9 * all);
    const top = (least + all) / 2;
    return { ...guess, top, bottoms: all - top };
  }

  /**
   * With a reflux ratio and nothing to be moved to: a column with much more of it, or much less, and from there to what is asked. Without a
   * reboiler the products follow from the heat alone, and start values miss them where both are sharp.
   */
  private fromOtherRatio(): boolean {
    const { system: s } = this;
    const wanted = this.direct.get(0);
    if (s.first === 0 || wanted === undefined || this.moved.length > 0) return false;
    const told = this.failure;
    const guess = guessOf(s);
    for (const times of OTHER_RATIOS) {
      const refluxRatio = guess.refluxRatio * times;
      const top = this.task.reboiler ? guess.top : (guess.top * (1 + guess.refluxRatio)) / (1 + refluxRatio);
      this.start({ ...guess, refluxRatio, top, bottoms: guess.top + guess.bottoms - top }, PLAIN);
      const from = s.totalCondenser ? wanted / times : wanted * times;
      s.p[0] = from;
      const set = (way: number): void => {
        s.p[0] = from ** (1 - way) * wanted ** way;
      };
      if (this.attempt('other-ratio', this.wanted, ITERATIONS) && this.follow(this.wanted, set)) return true;
    }
    this.failure = told;
    return false;
  }

  private start(guess: Guess, sweeps: Sweeps): void {
    startBySweeps(this.system, guess, sweeps);
    this.setDirect();
  }

  /** From a solved system at 0 of the way to 1 in steps that adapt, the first as given; false when it gets stuck. */
  private follow(wanted: Wanted, set: (way: number) => void, first = 0.25): boolean {
    const { system: s } = this;
    const kept = stateOf(s);
    let done = 0;
    let step = first;
    for (let k = 0; k < 60; k++) {
      const next = Math.min(1, done + step);
      set(next);
      this.alive();
      const end = this.newton.run(wanted, { iterations: 18, resets: false });
      this.effort.iterations += end.iterations;
      this.way = done;
      if (end.end === 'solved' && !isTrivial(this.system)) {
        done = next;
        this.effort.residual = end.residual;
        if (done === 1) return true;
        put(s, kept);
        step *= 2;
        continue;
      }
      this.failure = explain(this.system, end);
      restore(s, kept);
      step /= 2;
      if (step < 1 / 256) break;
    }
    return false;
  }

  private moveFrom(moved: number): boolean {
    const { system: s, wanted } = this;
    const from = Float64Array.from(wanted.targets, (t) => t.measure());
    const values = wanted.values.slice();
    const stage: Wanted = { ...wanted, values };
    const goal = wanted.values;
    const done = this.follow(stage, (way) => {
      for (let r = 0; r < moved; r++) values[r] = from[r]! + way * (goal[r]! - from[r]!);
    });
    if (done) return true;
    s.evaluate();
    this.noteReach(this.way, from, moved);
    return false;
  }

  /**
   * With one thing asked: a plain column after the other along the one free parameter, both ways, until the measure passes
   * what is wanted; from there to it. Finds answers beyond a fold, where the measure first runs away from its value.
   */
  private scan(plain: Wanted): boolean {
    const { system: s, wanted } = this;
    if (!this.effort.tried.includes('scan')) this.effort.tried.push('scan');
    const told = this.failure;
    const k = wanted.free[0]!;
    const target = wanted.targets[0]!;
    const gapOf = (): number => target.measure() - wanted.values[0]!;
    const from = stateOf(s);
    const before = stateOf(s);
    for (const direction of [SCAN_STEP, -SCAN_STEP]) {
      restore(s, from);
      s.evaluate();
      let gap = gapOf();
      for (let step = 0; step < SCAN_STEPS; step++) {
        put(s, before);
        s.p[k] = this.shifted(k, direction);
        if (!this.run(plain)) break;
        const next = gapOf();
        if (gap > 0 !== next > 0) {
          if (this.run(wanted)) return true;
          restore(s, before);
          if (this.run(wanted)) return true;
          break;
        }
        gap = next;
      }
    }
    restore(s, from);
    s.evaluate();
    this.failure = told;
    return false;
  }

  private run(wanted: Wanted): boolean {
    this.alive();
    const end = this.newton.run(wanted, { iterations: 18, resets: false });
    this.effort.iterations += end.iterations;
    this.effort.residual = end.residual;
    return end.end === 'solved' && !isTrivial(this.system);
  }

  /** A parameter further on; of the bottoms the share of the whole, so that neither product vanishes. */
  private shifted(k: number, by: number): number {
    const { system: s } = this;
    const p = s.p[k]!;
    if (s.movers[k]!.moves !== 'bottoms') return p * Math.exp(by);
    const odds = (p / (s.feedTotal - p)) * Math.exp(by);
    return (s.feedTotal * odds) / (1 + odds);
  }

  private noteReach(way: number, from: Float64Array, moved: number): void {
    let fixing = 0;
    let furthest = 0;
    for (let r = 0; r < moved; r++) {
      const gap = Math.abs(this.wanted.values[r]! - from[r]!);
      if (gap > furthest) {
        furthest = gap;
        fixing = r;
      }
    }
    const target = this.wanted.targets[fixing]!;
    const { index, fixed } = this.moved[fixing]!;
    const reached = naturalOf(this.system, fixed, target.measure());
    this.failure = { ...standing(this.system), why: 'out-of-reach', way, fixing: index, reached };
    if (way > (this.reach?.way ?? -1)) this.reach = this.failure;
  }

  private attempt(name: Attempt, wanted: Wanted, iterations: number): boolean {
    const { effort } = this;
    if (effort.tried.at(-1) !== name) effort.tried.push(name);
    this.alive();
    const ends = this.system.first === 1 || this.task.reboiler;
    const end = this.newton.run(wanted, { iterations, resets: ends && name !== 'warm' });
    effort.iterations += end.iterations;
    effort.residual = end.residual;
    if (end.end === 'solved' && !isTrivial(this.system)) return true;
    this.failure = explain(this.system, end);
    return false;
  }

  private setDirect(): void {
    for (const [k, value] of this.direct) this.system.p[k] = value;
  }
}

const SUM_STARTS: readonly (readonly [Attempt, number, number])[] = [
  ['plain-start', 6, 2],
  ['more-sweeps', 30, 20],
  ['no-model-sweeps', 12, 0],
];

/**
 * Solves a column: from an earlier state when there is one, then from start values of its own, then from a plain column
 * moved step by step.
 *
 * @param task  feasible as far as balances tell (see feasible.ts)
 * @param warm  an earlier solved state; only changes the way
 * @param work  scratch from workFor; the answer's system lives in it until the next solve
 * @param alive called before every attempt and every step of a way
 * @returns     the system at its answer, every scaled residual below 1e-9, with all properties in it; or why not
 */
export const solveColumn = (
  task: ColumnTask,
  warm?: ColumnState,
  work = workFor(task),
  alive: () => void = () => {},
): ColumnEnd => new Search(task, work, alive).solve(warm);
