import { luFactor, luSolve } from '../numerics/lu';
import { bubbleStage } from './bubble';
import { type Change, Elimination, makeChange } from './elimination';
import { LEAST_VAPOUR, NOTHING, type StageSystem } from './system';
import type { Target } from './targets';

/** What is sought besides the stages' own equations: parameters that are free, and as many targets. */
export interface Wanted {
  /** Places in p that are free. */
  readonly free: readonly number[];
  readonly targets: readonly Target[];
  /** Wanted measures, in the targets' order; they may be moved step by step. */
  readonly values: Float64Array;
}

/**
 * How a search ended; `residual` is the largest scaled one [-]. 'stuck': steps are cut to almost nothing; 'iterations': too
 * many.
 */
export type NewtonEnd =
  | { readonly end: 'solved'; readonly residual: number; readonly iterations: number }
  | {
      readonly end: 'not-finite' | 'singular' | 'stuck' | 'iterations';
      readonly residual: number;
      readonly iterations: number;
    };

/** Most steps, and what may be done on the way. */
export interface NewtonOptions {
  readonly iterations: number;
  /** Bubble-point resets while temperatures jump. */
  readonly resets: boolean;
}

const SOLVED = 1e-9;
/** Below this a further step only stirs the last digits. */
const ROUNDING = 1e-12;
/** From here on the last factors are tried again, as long as a step takes the residual down by this factor. */
const NEAR = 1e-2;
const CONTRACTS = 0.1;
/** No flow falls below this share of its value in one step. */
const LEAST_SHARE = 0.2;
/** No total flow of a stage grows by more than this factor in one step. */
const MOST_GROWTH = 3;
/** Largest change of a stage's temperature in a step [K]. */
const T_STEP_K = 30;
const RESET_K = 10;
const LEAST_T_K = 30;
const MOST_T_K = 2500;

/** Scratch of a Newton search on one system. */
export class Newton {
  private readonly elimination: Elimination;
  private readonly step: Change;
  private readonly borders: Change[] = [];
  private readonly side: { M: Float64Array; Q: Float64Array; H: Float64Array };
  private readonly dp: Float64Array;
  private readonly unit: Float64Array;
  private readonly kept: { l: Float64Array; v: Float64Array; T: Float64Array; p: Float64Array };
  /** Change of every target's measure with the logarithm of every free parameter, the stages' equations held; factored. */
  private readonly schur: Float64Array;
  private readonly pivot: Int32Array;
  private readonly g: Float64Array;
  /** Free parameters as they were when the factors were made. */
  private readonly factored: Float64Array;

  constructor(private readonly s: StageSystem) {
    const size = s.l.length;
    this.elimination = new Elimination(s);
    this.step = makeChange(s);
    this.side = {
      M: new Float64Array(size),
      Q: new Float64Array(size),
      H: new Float64Array(s.places),
    };
    const k = s.p.length;
    this.dp = new Float64Array(k);
    this.unit = new Float64Array(k);
    this.kept = {
      l: new Float64Array(size),
      v: new Float64Array(size),
      T: new Float64Array(s.places),
      p: new Float64Array(k),
    };
    this.schur = new Float64Array(k * k);
    this.pivot = new Int32Array(k);
    this.g = new Float64Array(k);
    this.factored = new Float64Array(k);
  }

  /**
   * Newton on all equations from the system's present state. What it leaves in the system is the answer, or the last
   * state reached.
   */
  run(wanted: Wanted, options: NewtonOptions): NewtonEnd {
    const { s } = this;
    if (!s.evaluate()) return { end: 'not-finite', residual: Number.POSITIVE_INFINITY, iterations: 0 };
    let merit = this.merit(wanted);
    let residual = this.worst(wanted);
    let resets = 0;
    // Whether the derivatives are those of the state, and whether the last factors are worth another step.
    let fresh = true;
    let reuse = false;
    for (let pass = 1; pass <= options.iterations; pass++) {
      const end = (why: Exclude<NewtonEnd['end'], 'solved'>): NewtonEnd => ({
        end: why,
        residual,
        iterations: pass,
      });
      const converged = residual < SOLVED;
      if (!(reuse || (converged && pass > 1))) {
        if (!fresh) s.evaluate();
        if (!this.factor(wanted)) return end('singular');
      }
      if (residual < ROUNDING) return { end: 'solved', residual, iterations: pass };
      if (!this.direction(wanted)) return end('singular');
      this.keep();
      if (converged) return this.finish(wanted, residual, pass);
      const before = residual;
      const allowed = pass <= 10 ? 1e4 : 1;
      // Near the answer the factors serve again: the step is not as good, and costs a third.
      const near = residual < NEAR;
      const level = near ? 1 : 2;
      let share = 1;
      for (let halving = 0; ; halving++) {
        const jump = this.move(wanted, share);
        const reset = options.resets && pass <= 15 && resets < 15 && jump > RESET_K && share === 1;
        if (reset) {
          resets++;
          this.resetStages();
        }
        const fine = s.evaluate(level);
        const next = fine ? this.merit(wanted) : Number.NaN;
        if (next <= allowed * merit || (reset && fine)) {
          merit = next;
          break;
        }
        if (halving === (fine ? 5 : 12)) {
          if (!fine) return end('not-finite');
          if (pass > 10 && share < 0.05) return end('stuck');
          merit = next;
          break;
        }
        share *= 0.5;
        this.restore();
      }
      residual = this.worst(wanted);
      fresh = level === 2;
      reuse = near && share === 1 && residual < CONTRACTS * before;
    }
    // The last step of all may have been the one that got there.
    return { end: residual < SOLVED ? 'solved' : 'iterations', residual, iterations: options.iterations };
  }

  /** One full step more; kept when it is no worse. */
  private finish(wanted: Wanted, before: number, pass: number): NewtonEnd {
    const { s } = this;
    this.move(wanted, 1);
    // Derivatives have done their work.
    if (s.evaluate(1)) {
      const residual = this.worst(wanted);
      if (residual <= before) return { end: 'solved', residual, iterations: pass };
    }
    this.restore();
    s.evaluate(1);
    return { end: 'solved', residual: before, iterations: pass };
  }

  /**
   * The least that a direction of the free parameters moves the targets' measures, by the pivots of their sensitivities: a
   * relative change of the parameters by one changes measures by about this. Infinity with nothing free.
   */
  leastPivot(wanted: Wanted): number {
    const k = wanted.free.length;
    let least = Number.POSITIVE_INFINITY;
    for (let c = 0; c < k; c++) least = Math.min(least, Math.abs(this.schur[c * k + c]!));
    return least;
  }

  /**
   * Change of the only target's measure with the logarithm of the only free parameter, at the factors used last; undefined
   * with another number of them.
   */
  slope(wanted: Wanted): number | undefined {
    return wanted.free.length === 1 ? this.schur[0] : undefined;
  }

  private factor(wanted: Wanted): boolean {
    const { s, elimination, borders, side, schur, unit } = this;
    if (!elimination.factor()) return false;
    const k = wanted.free.length;
    for (let c = 0; c < k; c++) {
      borders[c] ??= makeChange(s);
      const from = this.border(wanted.free[c]!, side);
      elimination.solve(side.M, side.Q, side.H, borders[c]!, from);
    }
    for (const target of wanted.targets) target.measure();
    for (let c = 0; c < k; c++) {
      unit.fill(0);
      unit[wanted.free[c]!] = 1;
      const p = s.p[wanted.free[c]!]!;
      this.factored[c] = p;
      for (let r = 0; r < k; r++) schur[r * k + c] = p * wanted.targets[r]!.slope(borders[c]!, unit);
    }
    return k === 0 || luFactor(schur, k, this.pivot);
  }

  /** Residuals' change with a parameter; the first place that has any. */
  private border(k: number, { M, Q, H }: { M: Float64Array; Q: Float64Array; H: Float64Array }): number {
    const { s } = this;
    const { n } = s;
    M.fill(0);
    Q.fill(0);
    H.fill(0);
    const mover = s.movers[k]!;
    switch (mover.moves) {
      case 'refluxRatio':
        H[0] = -s.V[0]! / s.feedTotal;
        return 0;
      case 'distillateShare':
        for (let i = 0; i < n; i++) M[i] = s.l[i]!;
        return 0;
      case 'bottoms':
        H[s.places - 1] = -1 / s.feedTotal;
        return s.places - 1;
      case 'drawL':
      case 'drawV': {
        const j = mover.place;
        const liquid = mover.moves === 'drawL';
        for (let i = 0; i < n; i++) M[j * n + i] = (liquid ? s.l : s.v)[j * n + i]!;
        H[j] = (liquid ? s.L[j]! * s.liq[j]!.h_J_mol : s.V[j]! * s.vap[j]!.h_J_mol) / s.energyScale;
        return j;
      }
    }
  }

  /** Newton direction at the present residuals with the last factors. */
  private direction(wanted: Wanted): boolean {
    const { s, elimination, step, dp, g, schur, borders } = this;
    elimination.solve(s.M, s.Q, s.H, step);
    dp.fill(0);
    const k = wanted.free.length;
    for (let r = 0; r < k; r++) {
      const target = wanted.targets[r]!;
      g[r] = wanted.values[r]! - target.measure();
      g[r] = g[r]! - target.slope(step, dp);
    }
    if (k > 0) luSolve(schur, k, this.pivot, g);
    for (let c = 0; c < k; c++) {
      const share = this.factored[c]! * g[c]!;
      if (!Number.isFinite(share)) return false;
      dp[wanted.free[c]!] = share;
      const border = borders[c]!;
      for (let x = 0; x < step.l.length; x++) {
        step.l[x]! += share * border.l[x]!;
        step.v[x]! += share * border.v[x]!;
      }
      for (let j = 0; j < s.places; j++) step.T[j]! += share * border.T[j]!;
    }
    return Number.isFinite(step.T[0]! + step.l[0]!);
  }

  /** Moves along the direction; returns the largest change of temperature asked for [K]. */
  private move(wanted: Wanted, share: number): number {
    const { s, step, dp } = this;
    const { n, places, l, v, T, L, V } = s;
    const least = NOTHING * s.feedTotal;
    let jump = 0;
    for (let j = 0; j < places; j++) {
      const ratio = V[j]! / L[j]!;
      const lnPhiL = s.liq[j]!.lnPhi;
      const lnPhiV = s.vap[j]!.lnPhi;
      for (let i = 0; i < n; i++) {
        const at = j * n + i;
        const nextL = l[at]! + share * step.l[at]!;
        const nextV = v[at]! + share * step.v[at]!;
        const floorL = Math.max(LEAST_SHARE * l[at]!, least);
        if (nextL < floorL) {
          l[at] = floorL;
          // What l is floored to carries its own vapour: with both floored a trace would stick where K is 1.
          v[at] = Math.max(floorL * ratio * Math.exp(lnPhiL[i]! - lnPhiV[i]!), LEAST_VAPOUR);
        } else {
          l[at] = nextL;
          v[at] = nextV < LEAST_SHARE * v[at]! ? Math.max(LEAST_SHARE * v[at]!, LEAST_VAPOUR) : nextV;
        }
      }
      this.boundGrowth(j);
      const dT = share * step.T[j]!;
      jump = Math.max(jump, Math.abs(dT));
      const bounded = Math.abs(dT) > T_STEP_K ? Math.sign(dT) * T_STEP_K : dT;
      T[j] = Math.min(Math.max(T[j]! + bounded, LEAST_T_K), MOST_T_K);
    }
    for (const k of wanted.free) this.moveParameter(k, share * dp[k]!);
    return jump;
  }

  /** No total grows beyond a multiple of itself or of the feed in one step; compositions stay. */
  private boundGrowth(j: number): void {
    const { s } = this;
    const { n, l, v } = s;
    let L = 0;
    let V = 0;
    for (let i = j * n; i < (j + 1) * n; i++) {
      L += l[i]!;
      V += v[i]!;
    }
    const a = (MOST_GROWTH * Math.max(s.L[j]!, LEAST_SHARE * s.feedTotal)) / L;
    const b = (MOST_GROWTH * Math.max(s.V[j]!, LEAST_SHARE * s.feedTotal)) / V;
    if (a >= 1 && b >= 1) return;
    for (let i = j * n; i < (j + 1) * n; i++) {
      if (a < 1) l[i] = l[i]! * a;
      if (b < 1) v[i] = v[i]! * b;
    }
  }

  private moveParameter(k: number, change: number): void {
    const { s } = this;
    const old = s.p[k]!;
    let next = Math.min(Math.max(old + change, LEAST_SHARE * old), old / LEAST_SHARE);
    // The bottoms leave something for the top.
    if (s.movers[k]!.moves === 'bottoms' && old < s.feedTotal)
      next = Math.min(next, s.feedTotal - LEAST_SHARE * (s.feedTotal - old));
    s.p[k] = next;
  }

  private resetStages(): void {
    for (let j = 0; j < this.s.places; j++) if (Math.abs(this.step.T[j]!) > RESET_K) bubbleStage(this.s, j);
  }

  private merit(wanted: Wanted): number {
    let sum = this.s.squares;
    wanted.targets.forEach((t, r) => {
      sum += (t.measure() - wanted.values[r]!) ** 2;
    });
    return sum;
  }

  private worst(wanted: Wanted): number {
    let value = this.s.residual;
    wanted.targets.forEach((t, r) => {
      value = Math.max(value, Math.abs(t.measure() - wanted.values[r]!));
    });
    return value;
  }

  private keep(): void {
    const { s, kept } = this;
    kept.l.set(s.l);
    kept.v.set(s.v);
    kept.T.set(s.T);
    kept.p.set(s.p);
  }

  private restore(): void {
    const { s, kept } = this;
    s.l.set(kept.l);
    s.v.set(kept.v);
    s.T.set(kept.T);
    s.p.set(kept.p);
    // The step's limits look at sums and at K, which belong to the state.
    s.sums();
  }
}
