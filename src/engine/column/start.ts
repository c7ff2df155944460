import type { Guess } from './guess';
import type { SimpleK } from './simpleK';
import { LEAST_VAPOUR, NOTHING, type StageSystem } from './system';

/** How start values are swept: passes with start K-values, then with the model's. */
export interface Sweeps {
  readonly simple: number;
  readonly model: number;
  /** Share of a new temperature and K taken by a model sweep; 1 is all. */
  readonly share: number;
  /** Sweeps of either sort end when no temperature changes more: Newton then gets on faster than they do [K]. */
  readonly simple_K: number;
  readonly model_K: number;
}

/** Largest change of temperature in one sweep, with simple K-values and with the model's [K]. */
const SIMPLE_STEP_K = 20;
const MODEL_STEP_K = 10;
/** Share of a new temperature that a sweep with simple K-values takes: all of it swings where K changes steeply with T. */
const SIMPLE_SHARE = 0.4;

/** Molar flows by constant overflow from the ends' flows and the feeds' vapour fractions, into L and V. */
function constantOverflow(s: StageSystem, guess: Guess): void {
  const { places, L, V, task } = s;
  const least = 0.02 * s.feedTotal;
  const total = guess.top;
  let net = total;
  let liquid = s.first === 1 ? guess.refluxRatio * guess.top : 0;
  for (let j = 0; j < places; j++) {
    if (j > 0 || s.first === 0) {
      for (const f of task.feeds)
        if (f.place === j) {
          const F = f.n_mol_s.reduce((sum, x) => sum + x, 0);
          net -= F;
          liquid += F * (1 - f.vapourFraction);
        }
      task.draws.forEach((d, k) => {
        if (d.place !== j) return;
        net += guess.draws[k]!;
        if (d.phase === 'liquid') liquid -= guess.draws[k]!;
      });
    } else for (const f of task.feeds) if (f.place === 0) net -= f.n_mol_s.reduce((sum, x) => sum + x, 0);
    if (j === places - 1 && task.reboiler) liquid = guess.bottoms;
    L[j] = Math.max(liquid, least);
    // What rises to place j balances what goes down and out above it.
    if (j + 1 < places) V[j + 1] = Math.max(liquid + net, least);
  }
  V[0] = s.totalCondenser ? L[0]! : Math.max(total, least);
  if (s.first === 1 && !s.totalCondenser) L[0] = Math.max(guess.refluxRatio * total, least);
}

/**
 * Component flows for given K, L and V: one tridiagonal system a chemical (Thomas algorithm), in l.
 *
 * @param K  by place and chemical
 */
export function componentFlows(s: StageSystem, K: Float64Array, diag: Float64Array): void {
  const { n, places, L, V, f, l, v, rL, rV } = s;
  for (let i = 0; i < n; i++) {
    // v_j = S_j l_j. Forward: eliminate l_{j-1}.
    let carry = 0;
    for (let j = 0; j < places; j++) {
      const at = j * n + i;
      const S = (K[at]! * V[j]!) / L[j]!;
      v[at] = S;
      let d = rL[j]! + rV[j]! * S;
      if (j > 0) d -= v[at]! / diag[j - 1]!;
      // In exact arithmetic d > 0; it can round to less where nearly everything rises.
      diag[j] = Math.max(d, 1e-12 * (rL[j]! + rV[j]! * S));
      carry = f[at]! + (j > 0 ? carry / diag[j - 1]! : 0);
      l[at] = carry;
    }
    for (let j = places - 1; j >= 0; j--) {
      const at = j * n + i;
      const above = j + 1 < places ? v[at + n]! : 0;
      l[at] = Math.max((l[at]! + above) / diag[j]!, NOTHING * s.feedTotal);
      v[at] = Math.max(v[at]! * l[at]!, LEAST_VAPOUR);
    }
  }
}

/** Brings the flows of every place to the given totals, compositions kept. */
function scaleTo(s: StageSystem, keptL: Float64Array, keptV: Float64Array): void {
  const { n, places, l, v } = s;
  s.sums();
  for (let j = 0; j < places; j++) {
    const a = keptL[j]! / s.L[j]!;
    const b = keptV[j]! / s.V[j]!;
    for (let i = j * n; i < (j + 1) * n; i++) {
      l[i] = Math.max(l[i]! * a, NOTHING * s.feedTotal);
      v[i] = Math.max(v[i]! * b, LEAST_VAPOUR);
    }
  }
  s.L.set(keptL);
  s.V.set(keptV);
}

/**
 * Scales every chemical's flows so that the top product's total is met: component balances alone do not see it.
 * Source: the theta method, Lyster et al., Pet. Refiner 38(6) (1959) 221.
 */
function meetTop(s: StageSystem, top: number, fed: Float64Array): void {
  const { n, places, l, v, scratch: d } = s;
  const share = s.totalCondenser ? s.rL[0]! - 1 : 1;
  for (let i = 0; i < n; i++) d[i] = Math.min(share * (s.totalCondenser ? l : v)[i]!, fed[i]!);
  const scale = (i: number, theta: number): number =>
    fed[i]! / (d[i]! + theta * Math.max(fed[i]! - d[i]!, 1e-12 * fed[i]!));
  // Newton in ln theta, within what is known: the total falls as theta grows.
  let low = -40;
  let high = 40;
  let t = 0;
  for (let pass = 0; pass < 30; pass++) {
    const theta = Math.exp(t);
    let sum = 0;
    let slope = 0;
    for (let i = 0; i < n; i++) {
      const part = d[i]! * scale(i, theta);
      sum += part;
      slope -= part * (1 - part / fed[i]!);
    }
    if (Math.abs(sum - top) < 1e-6 * top) break;
    if (sum > top) low = t;
    else high = t;
    const next = t - (sum - top) / slope;
    t = next > low && next < high ? next : (low + high) / 2;
  }
  const theta = Math.exp(t);
  for (let i = 0; i < n; i++) {
    const r = scale(i, theta);
    for (let at = i; at < places * n; at += n) {
      l[at]! *= r;
      v[at]! *= r;
    }
  }
}

/** Share r of what leaves that is drawn, from constant overflow and wanted draws; sets the parameters. */
function setParameters(s: StageSystem, guess: Guess): void {
  const { movers, p } = s;
  const first = movers.length - s.task.draws.length;
  movers.forEach((m, k) => {
    if (m.moves === 'refluxRatio') p[k] = guess.refluxRatio;
    else if (m.moves === 'distillateShare') p[k] = 1 / guess.refluxRatio;
    else if (m.moves === 'bottoms') p[k] = guess.bottoms;
    else {
      const passing = m.moves === 'drawL' ? s.L[m.place]! : s.V[m.place]!;
      p[k] = guess.draws[k - first]! / passing;
    }
  });
}

/**
 * Start values for a column with at least one end: constant molar overflow, then sweeps over component flows and bubble
 * points, first with simple K-values, then with the model's. After every sweep temperatures are put in order, coolest at the
 * top: sweeps swing, and waves in the profile would grow.
 * Mutates: l, v, T, p of the system.
 * Source: bubble-point sweeps after Wang & Henke, Hydrocarbon Process. 45 (1966) 155.
 */
export function startBySweeps(s: StageSystem, guess: Guess, sweeps: Sweeps): void {
  const { n, places, T } = s;
  constantOverflow(s, guess);
  setParameters(s, guess);
  s.readMovers();
  const keptL = s.L.slice();
  const keptV = s.V.slice();
  for (let j = 0; j < places; j++)
    T[j] = guess.topT_K + ((guess.bottomT_K - guess.topT_K) * j) / Math.max(places - 1, 1);
  const K = new Float64Array(places * n);
  const diag = new Float64Array(places);
  const fed = new Float64Array(n);
  for (let at = 0; at < s.f.length; at++) fed[at % n]! += s.f[at]!;
  const settle = (): void => {
    componentFlows(s, K, diag);
    meetTop(s, guess.top, fed);
    scaleTo(s, keptL, keptV);
  };
  const before = new Float64Array(places);
  for (let pass = 0, moved = Number.POSITIVE_INFINITY; ; pass++) {
    simpleKs(s, guess.simple, K);
    settle();
    if (pass >= sweeps.simple || moved < sweeps.simple_K) break;
    before.set(T);
    simpleSweep(s, guess.simple, K, keptL);
    moved = largestChange(before, T);
  }
  if (sweeps.model === 0) return;
  const lnK = K.map((k) => Math.log(Math.max(k, 1e-300)));
  for (let pass = 0; pass < sweeps.model; pass++) {
    before.set(T);
    for (let j = 0; j < places; j++) modelSweep(s, j, guess.simple, lnK, sweeps.share);
    T.sort();
    for (let j = 0; j < places; j++) {
      const turn = 1 / before[j]! - 1 / T[j]!;
      for (let at = j * n, i = 0; i < n; at++, i++) {
        lnK[at]! += guess.simple.b[i]! * turn;
        K[at] = Math.exp(lnK[at]!);
      }
    }
    settle();
    if (largestChange(before, T) < sweeps.model_K) break;
  }
}

function largestChange(before: Float64Array, after: Float64Array): number {
  let most = 0;
  for (let j = 0; j < after.length; j++) most = Math.max(most, Math.abs(after[j]! - before[j]!));
  return most;
}

function simpleKs({ n, places, T, task }: StageSystem, { a, b, P_Pa }: SimpleK, K: Float64Array): void {
  for (let j = 0; j < places; j++) {
    const u = 1 / T[j]!;
    const lnP = Math.log(P_Pa / task.P_Pa[j]!);
    for (let i = 0; i < n; i++) K[j * n + i] = Math.exp(a[i]! - b[i]! * u + lnP);
  }
}

/** Temperatures towards the bubble points that simple K-values give. */
function simpleSweep(s: StageSystem, { b }: SimpleK, K: Float64Array, L: Float64Array): void {
  const { n, places, T, l } = s;
  for (let j = 0; j < places; j++) {
    let sum = 0;
    let slope = 0;
    const at = j * n;
    for (let i = 0; i < n; i++) {
      const y = (K[at + i]! * l[at + i]!) / L[j]!;
      sum += y;
      slope += y * b[i]!;
    }
    // ln(sum K x) is close to linear in 1/T, with this slope.
    const u = 1 / T[j]! + (Math.log(sum) * sum) / slope;
    const next = u > 0 ? 1 / u : T[j]! + SIMPLE_STEP_K;
    T[j] = T[j]! + SIMPLE_SHARE * Math.min(Math.max(next - T[j]!, -SIMPLE_STEP_K), SIMPLE_STEP_K);
  }
  T.sort();
}

/**
 * One step of a place towards its bubble point with the model's K, whose change with temperature is taken from the simple
 * K-values: it needs no derivatives. ln K stay those of the temperature before.
 */
function modelSweep(s: StageSystem, j: number, simple: SimpleK, lnK: Float64Array, share: number): void {
  const { n, l, v, T, model, task, scratch: x } = s;
  const at = j * n;
  const P = task.P_Pa[j]!;
  const liq = s.liq[j]!;
  const vap = s.vap[j]!;
  const before = T[j]!;
  let L = 0;
  let V = 0;
  for (let i = 0; i < n; i++) {
    L += l[at + i]!;
    V += v[at + i]!;
  }
  for (let i = 0; i < n; i++) x[i] = v[at + i]! / V;
  model.evaluate('vapour', before, P, x, 0, vap);
  for (let i = 0; i < n; i++) x[i] = l[at + i]! / L;
  model.evaluate('liquid', before, P, x, 0, liq);
  let sum = 0;
  let slope = 0;
  for (let i = 0; i < n; i++) {
    const k = liq.lnPhi[i]! - vap.lnPhi[i]!;
    const y = x[i]! * Math.exp(k);
    lnK[at + i] = share * k + (1 - share) * lnK[at + i]!;
    sum += y;
    slope += y * simple.b[i]!;
  }
  const u = 1 / before + (Math.log(sum) * sum) / slope;
  const next = u > 0 ? 1 / u : before + MODEL_STEP_K;
  T[j] = before + share * Math.min(Math.max(next - before, -MODEL_STEP_K), MODEL_STEP_K);
}
