import { addProduct, factorBlock, solveBlock } from '../numerics/blockTridiagonal';
import { type StageSystem, T_SCALE_K } from './system';

/** A change of the unknowns, or a right-hand side: l and v by place and chemical (place * n + chemical), T by place. */
export interface Change {
  readonly l: Float64Array;
  readonly v: Float64Array;
  readonly T: Float64Array;
}

/** A change of all unknowns of a system, all zero. */
export const makeChange = (s: StageSystem): Change => ({
  l: new Float64Array(s.l.length),
  v: new Float64Array(s.v.length),
  T: new Float64Array(s.T.length),
});

/**
 * The linear system of one Newton step, from the top down.
 *
 * The mole balances are linear in l: in each place l goes by
 *   dl_j = (-M_j + a_{j-1} - G_j y_j + dv_{j+1}) / rL_j,
 * y_j being the n vapour flows in units of their values and the temperature in units of 50 K. What is left is one block of
 * order n + 1 a place, coupled to the place below, which is factored with partial pivoting:
 *   K_j y_j + U_j y_{j+1} = b_j.
 * The factors stay, so that further right-hand sides (borders, a last step) cost little.
 * Source: block elimination after Naphtali & Sandholm, AIChE J. 17 (1971) 148.
 */
export class Elimination {
  private readonly m: number;
  /** Rows [K | U] by place, order m; K becomes its factors, U becomes B = K^-1 U. */
  private readonly block: Float64Array;
  private readonly pivot: Int32Array;
  /** n x m by place: - rL_j d l_j / d y_j. */
  private readonly G: Float64Array;
  /** n x n by place: d Q_j / d l_j. */
  private readonly Ql: Float64Array;
  private readonly a: Float64Array;
  private readonly b: Float64Array;
  /** Of the state that was factored: vapour flows, liquid sums, shares. */
  private readonly v: Float64Array;
  private readonly L: Float64Array;
  private readonly rL: Float64Array;
  private readonly rV: Float64Array;

  constructor(private readonly s: StageSystem) {
    const { n, places } = s;
    const m = n + 1;
    this.m = m;
    this.block = new Float64Array(places * m * 2 * m);
    this.pivot = new Int32Array(places * m);
    this.G = new Float64Array(places * n * m);
    this.Ql = new Float64Array(places * n * n);
    this.a = new Float64Array(places * n);
    this.b = new Float64Array(places * m);
    this.v = new Float64Array(places * n);
    this.L = new Float64Array(places);
    this.rL = new Float64Array(places);
    this.rV = new Float64Array(places);
  }

  /** Factors at the system's present state. False when a block is singular. */
  factor(): boolean {
    const { s, m, block, pivot, G } = this;
    const { n, places } = s;
    this.v.set(s.v);
    this.L.set(s.L);
    this.rL.set(s.rL);
    this.rV.set(s.rV);
    for (let j = 0; j < places; j++) {
      this.eliminated(j);
      this.fill(j);
      if (!factorBlock(block, j * m * 2 * m, m, pivot, j * m)) return false;
      if (j + 1 === places) break;
      // G of the next place, without its own vapour: -A_j = (G_j B_j + [v_{j+1} 0]) / rL_j with the sign of A.
      const next = (j + 1) * n * m;
      G.fill(0, next, next + n * m);
      const scale = -1 / s.rL[j]!;
      addProduct(scale, G, j * n * m, n, m, block, j * m * 2 * m + m, 2 * m, m, G, next, m);
      const v = (j + 1) * n;
      for (let i = 0; i < n; i++) G[next + i * m + i]! += scale * s.v[v + i]!;
    }
    return true;
  }

  /** Adds the place's own vapour to G, which then is the whole of - rL_j dl_j/dy_j. */
  private eliminated(j: number): void {
    const { s, m, G } = this;
    const { n } = s;
    const at = j * n * m;
    if (j === 0) G.fill(0, at, at + n * m);
    const share = s.rV[j]!;
    for (let i = 0; i < n; i++) G[at + i * m + i]! += share * s.v[j * n + i]!;
  }

  private fill(j: number): void {
    const { s, m, block } = this;
    const at = j * m * 2 * m;
    block.fill(0, at, at + 2 * m * m);
    this.equilibriumRows(j, at);
    const last = at + s.n * 2 * m;
    if (s.balancesEnergy(j)) this.energyRow(j, last);
    else this.endRow(j, last);
  }

  private equilibriumRows(j: number, at: number): void {
    const { s, m, block, Ql, G } = this;
    const { n, theta } = s;
    const w = 2 * m;
    const flows = j * n;
    const perL = 1 / s.L[j]!;
    const perV = 1 / s.V[j]!;
    const nL = s.liq[j]!.dN;
    const nV = s.vap[j]!.dN;
    const tL = s.liq[j]!.dT;
    const tV = s.vap[j]!.dT;
    const ql = j * n * n;
    const below = j + 1 < s.places ? (j + 1) * n : -1;
    for (let i = 0; i < n; i++) {
      const row = at + i * w;
      const share = theta[flows + i]!;
      const qi = ql + i * n;
      const dn = i * n;
      const shareL = share * perL;
      const shareV = share * perV;
      for (let k = 0; k < n; k++) {
        Ql[qi + k] = shareL * (1 - nL[dn + k]!);
        block[row + k] = s.v[flows + k]! * (shareV * nV[dn + k]! - perV);
      }
      Ql[qi + i]! -= share / s.l[flows + i]!;
      block[row + i]! += 1;
      block[row + n] = T_SCALE_K * share * (tV[i]! - tL[i]!);
    }
    addProduct(-1 / s.rL[j]!, Ql, ql, n, n, G, j * n * m, m, m, block, at, w);
    if (below < 0) return;
    const scale = 1 / s.rL[j]!;
    for (let i = 0; i < n; i++) {
      const row = at + i * w + m;
      const qi = ql + i * n;
      for (let k = 0; k < n; k++) block[row + k] = scale * Ql[qi + k]! * s.v[below + k]!;
    }
    if (s.task.efficiency[j] !== 1) this.fromBelow(j, at);
  }

  /** Murphree: the vapour leaving depends on the one that rises. */
  private fromBelow(j: number, at: number): void {
    const { s, m, block } = this;
    const { n, theta } = s;
    const below = (j + 1) * n;
    const perV = 1 / s.V[j + 1]!;
    for (let i = 0; i < n; i++) {
      const row = at + i * 2 * m + m;
      const rest = 1 - theta[j * n + i]!;
      for (let k = 0; k < n; k++) block[row + k]! += rest * s.v[below + k]! * perV;
      block[row + i]! -= rest;
    }
  }

  private energyRow(j: number, row: number): void {
    const { s, m, block, G } = this;
    const { n } = s;
    const per = 1 / s.energyScale;
    const liq = s.liq[j]!;
    const vap = s.vap[j]!;
    const g = j * n * m;
    const flows = j * n;
    const up = j > 0 ? s.leaving(j - 1) : undefined;
    const shareV = s.rV[j]! * per;
    for (let i = 0; i < n; i++) {
      const h = ((up ? up.hPartial[i]! : 0) - liq.hPartial[i]!) * per;
      for (let c = 0; c < m; c++) block[row + c]! += h * G[g + i * m + c]!;
    }
    for (let k = 0; k < n; k++) {
      const hUp = up ? up.hPartial[k]! : 0;
      block[row + k]! += shareV * s.v[flows + k]! * (vap.hPartial[k]! - hUp);
    }
    block[row + n]! +=
      T_SCALE_K * per * (s.rL[j]! * s.L[j]! * liq.cp_J_molK + s.rV[j]! * s.V[j]! * vap.cp_J_molK);
    if (up) {
      const cp = T_SCALE_K * per * s.L[j - 1]! * up.cp_J_molK;
      // B of the place above: its last row says how that temperature follows this place.
      const above = (j - 1) * m * 2 * m + n * 2 * m + m;
      for (let c = 0; c < m; c++) block[row + c]! += cp * block[above + c]!;
    }
    if (j + 1 >= s.places) return;
    const next = s.vap[j + 1]!;
    const below = (j + 1) * n;
    for (let k = 0; k < n; k++)
      block[row + m + k] = per * s.v[below + k]! * (liq.hPartial[k]! - next.hPartial[k]!);
    block[row + m + n] = -T_SCALE_K * per * s.V[j + 1]! * next.cp_J_molK;
  }

  /** Partial condenser L - R V, total condenser V - L, reboiler L - B; all by the feed. */
  private endRow(j: number, row: number): void {
    const { s, m, block, G } = this;
    const { n } = s;
    const per = 1 / s.feedTotal;
    const sign = j === 0 && s.totalCondenser ? -1 : 1;
    const scale = (sign * per) / s.rL[j]!;
    const g = j * n * m;
    for (let i = 0; i < n; i++) for (let c = 0; c < m; c++) block[row + c]! -= scale * G[g + i * m + c]!;
    if (j > 0) return;
    const onV = s.totalCondenser ? per : -s.p[0]! * per;
    for (let k = 0; k < n; k++) {
      block[row + k]! += onV * s.v[k]!;
      block[row + m + k] = scale * s.v[n + k]!;
    }
  }

  /**
   * Solves for right-hand sides -M, -Q, -H given as M, Q, H (scaled as the system's own residuals).
   *
   * @param from  first place with an entry other than zero
   */
  solve(M: Float64Array, Q: Float64Array, H: Float64Array, out: Change, from = 0): void {
    const { s, m, block, pivot, G, Ql, a, b } = this;
    const { n, places } = s;
    const per = 1 / s.energyScale;
    a.fill(0, 0, from * n);
    b.fill(0, 0, from * m);
    for (let j = from; j < places; j++) {
      const x = j * n;
      const y = j * m;
      const scale = 1 / this.rL[j]!;
      for (let i = 0; i < n; i++) a[x + i] = (j > 0 ? a[x - n + i]! : 0) - M[x + i]!;
      for (let i = 0; i < n; i++) {
        let sum = 0;
        const q = j * n * n + i * n;
        for (let k = 0; k < n; k++) sum += Ql[q + k]! * a[x + k]!;
        b[y + i] = -Q[x + i]! - scale * sum;
      }
      b[y + n] = -H[j]! - this.carried(j, per);
      solveBlock(block, j * m * 2 * m, m, pivot, y, b, y);
      for (let i = 0; i < n; i++) {
        let sum = a[x + i]!;
        const g = j * n * m + i * m;
        for (let c = 0; c < m; c++) sum -= G[g + c]! * b[y + c]!;
        a[x + i] = scale * sum;
      }
    }
    this.back(out);
  }

  /** What the last row of place j has of a_j (as it stands: before its own block) and of the place above. */
  private carried(j: number, per: number): number {
    const { s, m, a, b } = this;
    const { n } = s;
    const x = j * n;
    let sum = 0;
    if (!s.balancesEnergy(j)) {
      for (let i = 0; i < n; i++) sum += a[x + i]!;
      return (j === 0 && s.totalCondenser ? -sum : sum) / this.rL[j]! / s.feedTotal;
    }
    const h = s.liq[j]!.hPartial;
    for (let i = 0; i < n; i++) sum += h[i]! * a[x + i]!;
    if (j > 0) {
      const up = s.leaving(j - 1);
      for (let i = 0; i < n; i++) sum -= up.hPartial[i]! * a[x - n + i]!;
      sum -= T_SCALE_K * this.L[j - 1]! * up.cp_J_molK * b[j * m - 1]!;
    }
    return sum * per;
  }

  private back(out: Change): void {
    const { s, m, block, G, a, b } = this;
    const { n, places } = s;
    for (let j = places - 1; j >= 0; j--) {
      const x = j * n;
      const y = j * m;
      if (j + 1 < places) {
        const below = y + m;
        const rows = j * m * 2 * m + m;
        for (let i = 0; i < m; i++) {
          let sum = b[y + i]!;
          const row = rows + i * 2 * m;
          for (let c = 0; c < m; c++) sum -= block[row + c]! * b[below + c]!;
          b[y + i] = sum;
        }
        const share = this.rV[j + 1]!;
        for (let i = 0; i < n; i++) {
          let sum = a[x + i]! + share * this.v[x + n + i]! * b[below + i]!;
          const g = (j + 1) * n * m + i * m;
          for (let c = 0; c < m; c++) sum -= G[g + c]! * b[below + c]!;
          out.l[x + i] = sum;
        }
      } else for (let i = 0; i < n; i++) out.l[x + i] = a[x + i]!;
      for (let i = 0; i < n; i++) out.v[x + i] = this.v[x + i]! * b[y + i]!;
      out.T[j] = T_SCALE_K * b[y + n]!;
    }
  }
}
