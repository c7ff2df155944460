import type { PhaseProps, ThermoModel } from '../thermo/types';
import type { ColumnTask } from './types';

/** What a parameter outside the stages moves; all are > 0. */
export type Mover =
  /** Reflux ratio L/V of a condenser whose distillate is its vapour. */
  | { readonly moves: 'refluxRatio' }
  /** Distillate / reflux of a condenser whose distillate is liquid. */
  | { readonly moves: 'distillateShare' }
  /** Bottoms flow [mol/s] of a column with a reboiler. */
  | { readonly moves: 'bottoms' }
  /** Drawn / left in the column, of the liquid or vapour of a place. */
  | { readonly moves: 'drawL' | 'drawV'; readonly place: number };

/** What must agree for one system to serve several tasks; the model is compared by identity besides. */
export const shapeOf = (task: ColumnTask): string =>
  [task.P_Pa.length, task.top, task.reboiler, ...task.draws.map((d) => `${d.phase}${d.place}`)].join(' ');

/** Energy of a mole that scales energy balances [J/mol]. */
export const ENERGY_J_MOL = 20e3;
/** Scale of temperature unknowns [K]. */
export const T_SCALE_K = 50;
/** A chemical's flow counts as nothing below this share of the feed. */
export const NOTHING = 1e-60;
/** The vapour over such a liquid may be far less still, but not zero [mol/s]. */
export const LEAST_VAPOUR = 1e-280;
/** Balances are measured against no less than this share of the feed. */
const LEAST_FLOW = 1e-20;

/**
 * A column's unknowns, properties and residuals.
 *
 * Unknowns by place: liquid and vapour flows of each chemical that go on to the next place (draws not included), and the
 * temperature. The vapour of a total condenser is a shadow: the bubble-point vapour over its liquid, as much as the liquid,
 * in no balance.
 */
export class StageSystem {
  readonly model: ThermoModel;
  readonly n: number;
  readonly places: number;
  /** First and last place that are stages. */
  readonly first: number;
  readonly last: number;
  readonly totalCondenser: boolean;
  readonly movers: readonly Mover[];

  readonly l: Float64Array;
  readonly v: Float64Array;
  readonly T: Float64Array;
  readonly p: Float64Array;

  /** Sums of l and v by place. */
  readonly L: Float64Array;
  readonly V: Float64Array;
  /** 1 + drawn share by place; 1 + distillate share for a total condenser. */
  readonly rL: Float64Array;
  readonly rV: Float64Array;
  readonly liq: readonly PhaseProps[];
  readonly vap: readonly PhaseProps[];
  /** The reflux as it is cooled, where it is; else liq[0]. */
  reflux: PhaseProps;
  private readonly cooled: PhaseProps;
  /** Feed by place and chemical, total and enthalpy by place. */
  readonly f: Float64Array;
  readonly F: Float64Array;
  readonly HF: Float64Array;
  /** Vapour that the feeds bring, by place [mol/s]. */
  private readonly fedV: Float64Array;
  feedTotal = 0;
  energyScale = 0;
  /**
   * Share of the model's enthalpies in the energy balances; the rest counts ENERGY_J_MOL for every vapour and nothing for
   * liquids, which is constant molar overflow. 1 except on the way to an answer.
   */
  realHeat = 1;

  /** Residuals: mole balances [mol/s], equilibrium [-], energy or what stands in its place [-]. */
  readonly M: Float64Array;
  readonly Q: Float64Array;
  readonly H: Float64Array;
  /** Share of the equilibrium vapour in what Murphree's relation gives, by place and chemical; 1 without. */
  readonly theta: Float64Array;
  readonly scratch: Float64Array;

  /** What is solved; see load. */
  task: ColumnTask;

  constructor(task: ColumnTask) {
    const { model, P_Pa } = task;
    this.task = task;
    this.model = model;
    const n = model.n;
    const places = P_Pa.length;
    this.n = n;
    this.places = places;
    this.totalCondenser = task.top === 'liquid';
    this.first = task.top === 'none' ? 0 : 1;
    this.last = task.reboiler ? places - 2 : places - 1;
    const movers: Mover[] = [];
    if (task.top === 'vapour') movers.push({ moves: 'refluxRatio' });
    if (task.top === 'liquid') movers.push({ moves: 'distillateShare' });
    if (task.reboiler) movers.push({ moves: 'bottoms' });
    for (const draw of task.draws)
      movers.push({ moves: draw.phase === 'liquid' ? 'drawL' : 'drawV', place: draw.place });
    this.movers = movers;
    const vector = (size: number): Float64Array => new Float64Array(size);
    this.l = vector(places * n);
    this.v = vector(places * n);
    this.T = vector(places);
    this.p = vector(movers.length);
    this.L = vector(places);
    this.V = vector(places);
    this.rL = vector(places);
    this.rV = vector(places);
    this.liq = Array.from({ length: places }, () => model.makeProps());
    this.vap = Array.from({ length: places }, () => model.makeProps());
    this.cooled = this.totalCondenser ? model.makeProps() : this.liq[0]!;
    this.reflux = this.liq[0]!;
    this.f = vector(places * n);
    this.F = vector(places);
    this.HF = vector(places);
    this.fedV = vector(places);
    this.M = vector(places * n);
    this.Q = vector(places * n);
    this.H = vector(places);
    this.theta = vector(places * n).fill(1);
    this.scratch = vector(n);
    this.load(task);
  }

  /** Another task of the same shape (shapeOf): feeds, pressures and what is asked may differ. */
  load(task: ColumnTask): void {
    const { n, f, F, HF } = this;
    this.task = task;
    this.reflux = task.subcooling_K > 0 ? this.cooled : this.liq[0]!;
    f.fill(0);
    F.fill(0);
    HF.fill(0);
    this.fedV.fill(0);
    this.realHeat = 1;
    this.theta.fill(1);
    let total = 0;
    for (const feed of task.feeds) {
      let sum = 0;
      for (let i = 0; i < n; i++) {
        f[feed.place * n + i]! += feed.n_mol_s[i]!;
        sum += feed.n_mol_s[i]!;
      }
      F[feed.place]! += sum;
      HF[feed.place]! += feed.H_W;
      this.fedV[feed.place]! += sum * feed.vapourFraction;
      total += sum;
    }
    this.feedTotal = total;
    this.energyScale = total * ENERGY_J_MOL;
  }

  /** Liquid properties with which place j's liquid leaves it. */
  leaving(j: number): PhaseProps {
    return j === 0 ? this.reflux : this.liq[j]!;
  }

  /** Whether place j has an energy balance of its own; else it has what fixes an end. */
  balancesEnergy(j: number): boolean {
    return j >= this.first && j <= this.last;
  }

  /**
   * Sums, properties and residuals at l, v, T, p. False when a property is not finite.
   *
   * @param level  2: with all derivatives; 1: they stay those of the last evaluation at level 2
   */
  evaluate(level: 1 | 2 = 2): boolean {
    const { n, places, l, v, T, L, V, model, task } = this;
    const x = this.scratch;
    this.readMovers();
    this.sums();
    for (let j = 0; j < places; j++) {
      const at = j * n;
      const P = task.P_Pa[j]!;
      const sumL = L[j]!;
      const sumV = V[j]!;
      for (let i = 0; i < n; i++) x[i] = l[at + i]! / sumL;
      const liq = this.liq[j]!;
      model.evaluate('liquid', T[j]!, P, x, level, liq);
      if (j === 0 && this.reflux !== liq)
        model.evaluate('liquid', T[0]! - task.subcooling_K, P, x, level, this.reflux);
      for (let i = 0; i < n; i++) x[i] = v[at + i]! / sumV;
      const vap = this.vap[j]!;
      model.evaluate('vapour', T[j]!, P, x, level, vap);
      if (this.realHeat !== 1) this.mixHeats(j, level);
      if (!Number.isFinite(liq.h_J_mol + vap.h_J_mol + liq.lnPhi[0]! + vap.lnPhi[0]!)) return false;
    }
    this.balances();
    this.equilibria();
    this.energies();
    this.summarise();
    return true;
  }

  /** Enthalpies of place j as realHeat says. At level 1 the derivatives are those of before, mixed already. */
  private mixHeats(j: number, level: 1 | 2): void {
    const mix = (props: PhaseProps, h: number): void => {
      const rest = (1 - this.realHeat) * h;
      props.h_J_mol = this.realHeat * props.h_J_mol + rest;
      if (level === 1) return;
      props.cp_J_molK *= this.realHeat;
      for (let i = 0; i < this.n; i++) props.hPartial[i] = this.realHeat * props.hPartial[i]! + rest;
    };
    mix(this.liq[j]!, 0);
    mix(this.vap[j]!, ENERGY_J_MOL);
    if (j === 0 && this.reflux !== this.liq[0]) mix(this.reflux, 0);
  }

  /** Enthalpy that the feeds of place j bring, as realHeat says [W]. */
  private fedHeat(j: number): number {
    const { realHeat, HF, fedV } = this;
    return realHeat === 1 ? HF[j]! : realHeat * HF[j]! + (1 - realHeat) * fedV[j]! * ENERGY_J_MOL;
  }

  /** L and V from l and v. */
  sums(): void {
    const { n, places, l, v, L, V } = this;
    for (let j = 0; j < places; j++) {
      const at = j * n;
      let sumL = 0;
      let sumV = 0;
      for (let i = 0; i < n; i++) {
        sumL += l[at + i]!;
        sumV += v[at + i]!;
      }
      L[j] = sumL;
      V[j] = sumV;
    }
  }

  readMovers(): void {
    const { rL, rV, movers, p } = this;
    rL.fill(1);
    rV.fill(1);
    for (let k = 0; k < movers.length; k++) {
      const mover = movers[k]!;
      if (mover.moves === 'distillateShare') rL[0] = 1 + p[k]!;
      else if (mover.moves === 'drawL') rL[mover.place]! += p[k]!;
      else if (mover.moves === 'drawV') rV[mover.place]! += p[k]!;
    }
    // A shadow vapour leaves nothing.
    if (this.totalCondenser) rV[0] = 0;
  }

  private balances(): void {
    const { n, places, l, v, f, M, rL, rV } = this;
    for (let j = 0; j < places; j++) {
      const at = j * n;
      const a = rL[j]!;
      const b = rV[j]!;
      for (let i = 0; i < n; i++) {
        let m = a * l[at + i]! + b * v[at + i]! - f[at + i]!;
        if (j > 0) m -= l[at - n + i]!;
        if (j + 1 < places) m -= v[at + n + i]!;
        M[at + i] = m;
      }
    }
  }

  private equilibria(): void {
    const { n, places, l, v, L, V, Q, theta, task } = this;
    for (let j = 0; j < places; j++) {
      const at = j * n;
      const lnPhiL = this.liq[j]!.lnPhi;
      const lnPhiV = this.vap[j]!.lnPhi;
      const ratio = L[j]! / V[j]!;
      const E = task.efficiency[j]!;
      const below = E === 1 ? undefined : this.vapourBelow(j);
      if (below === undefined) {
        for (let i = 0; i < n; i++)
          Q[at + i] = Math.log((v[at + i]! / l[at + i]!) * ratio) + lnPhiV[i]! - lnPhiL[i]!;
        continue;
      }
      for (let i = 0; i < n; i++) {
        const e = (E * Math.exp(lnPhiL[i]! - lnPhiV[i]!) * l[at + i]!) / L[j]!;
        const s = e + (1 - E) * below.flows[below.at + i]! * below.scale;
        theta[at + i] = e / s;
        Q[at + i] = Math.log(v[at + i]! / V[j]! / s);
      }
    }
  }

  /** Mole fractions of the vapour that rises to place j, as flows times a scale; undefined when none does. */
  vapourBelow(
    j: number,
  ): { readonly flows: Float64Array; readonly at: number; readonly scale: number } | undefined {
    if (j + 1 < this.places) return { flows: this.v, at: (j + 1) * this.n, scale: 1 / this.V[j + 1]! };
    const feed = this.task.feeds.find((f) => f.place === j && f.y !== undefined);
    return feed?.y && { flows: feed.y, at: 0, scale: 1 };
  }

  private energies(): void {
    const { places, L, V, H, rL, rV, energyScale, feedTotal, totalCondenser, p, task } = this;
    for (let j = 0; j < places; j++) {
      if (this.balancesEnergy(j)) {
        let h =
          rL[j]! * L[j]! * this.liq[j]!.h_J_mol + rV[j]! * V[j]! * this.vap[j]!.h_J_mol - this.fedHeat(j);
        if (j > 0) h -= L[j - 1]! * this.leaving(j - 1).h_J_mol;
        if (j + 1 < places) h -= V[j + 1]! * this.vap[j + 1]!.h_J_mol;
        H[j] = h / energyScale;
      } else if (j === 0) H[j] = (totalCondenser ? V[0]! - L[0]! : L[0]! - p[0]! * V[0]!) / feedTotal;
      else H[j] = (L[j]! - p[task.top === 'none' ? 0 : 1]!) / feedTotal;
    }
  }

  /** Largest scaled residual of the stages, and the square sum of all, after evaluate. */
  residual = 0;
  squares = 0;

  private summarise(): void {
    const { n, places, l, v, f, M, Q, H } = this;
    const least = LEAST_FLOW * this.feedTotal;
    let most = 0;
    let sum = 0;
    for (let j = 0; j < places; j++) {
      const above = j > 0;
      const below = j + 1 < places;
      for (let at = j * n, end = at + n; at < end; at++) {
        let inflow = f[at]!;
        if (above) inflow += l[at - n]!;
        if (below) inflow += v[at + n]!;
        const m = Math.abs(M[at]!) / Math.max(inflow, least);
        const q = Math.abs(Q[at]!);
        if (m > most) most = m;
        if (q > most) most = q;
        sum += m * m + q * q;
      }
      const h = Math.abs(H[j]!);
      if (h > most) most = h;
      sum += h * h;
    }
    // A comparison with something that is not a number fails: then the sum tells.
    this.residual = Number.isFinite(sum) ? most : Number.POSITIVE_INFINITY;
    this.squares = sum;
  }

  /** The largest scaled residual of the stages: where it is and of what. */
  worst(): Worst {
    let worst: Worst = { value: 0, place: 0, of: 'balance' };
    const { n, places, l, v, f } = this;
    for (let j = 0; j < places; j++) {
      let m = 0;
      let q = 0;
      for (let at = j * n; at < (j + 1) * n; at++) {
        const inflow = f[at]! + (j > 0 ? l[at - n]! : 0) + (j + 1 < places ? v[at + n]! : 0);
        m = Math.max(m, Math.abs(this.M[at]!) / Math.max(inflow, LEAST_FLOW * this.feedTotal));
        q = Math.max(q, Math.abs(this.Q[at]!));
      }
      const h = Math.abs(this.H[j]!);
      if (m > worst.value) worst = { value: m, place: j, of: 'balance' };
      if (q > worst.value) worst = { value: q, place: j, of: 'equilibrium' };
      if (h > worst.value) worst = { value: h, place: j, of: 'energy' };
    }
    return worst;
  }
}

/** The largest scaled residual [-], the place that has it, and which of the place's equations it belongs to. */
export interface Worst {
  readonly value: number;
  readonly place: number;
  readonly of: 'balance' | 'equilibrium' | 'energy';
}
