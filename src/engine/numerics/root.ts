/** Where a search for a zero ended. */
export interface Root {
  /** The best argument known; a zero when `found`. */
  readonly x: number;
  readonly f: number;
  readonly evaluations: number;
  readonly found: boolean;
  /** The last interval with a change of sign: a jump of f when it is tight and f is not small. */
  readonly low: number;
  readonly high: number;
  /** Why not found: f has the same sign at both ends, a value is not finite, or the evaluations ran out. */
  readonly why?: 'no-bracket' | 'not-finite' | 'evaluations';
}

export interface RootLimits {
  /** Absolute tolerance on x. */
  readonly xTol: number;
  /** |f| at which x counts as a zero whatever the interval; default 0. */
  readonly fTol?: number;
  /** Default 100. */
  readonly evaluations?: number;
}

/**
 * Zero of a continuous function between two arguments of opposite sign, without derivatives; never takes more than one
 * evaluation beyond bisection.
 *
 * @param from, to  ends of the interval, in either order; both are evaluated
 * @returns         a value in every case; see Root.why. `found` also when the interval closes on a jump of f: |f| tells.
 * Source: Oliveira & Takahashi, ACM Trans. Math. Softw. 47 (2020) 5 (interpolate, truncate, project), with kappa1 = 0.2/(b -
 * a), kappa2 = 2, n0 = 1.
 */
export function bracketedRoot(f: (x: number) => number, from: number, to: number, limits: RootLimits): Root {
  const { xTol, fTol = 0, evaluations = 100 } = limits;
  let a = Math.min(from, to);
  let b = Math.max(from, to);
  let fa = f(a);
  let fb = f(b);
  let used = 2;
  const end = (x: number, value: number, why?: Root['why']): Root => ({
    x,
    f: value,
    evaluations: used,
    found: why === undefined,
    low: a,
    high: b,
    ...(why ? { why } : {}),
  });
  if (!Number.isFinite(fa)) return end(a, fa, 'not-finite');
  if (!Number.isFinite(fb)) return end(b, fb, 'not-finite');
  if (Math.abs(fa) <= fTol) return end(a, fa);
  if (Math.abs(fb) <= fTol) return end(b, fb);
  if (fa > 0 === fb > 0)
    return end(Math.abs(fa) < Math.abs(fb) ? a : b, Math.abs(fa) < Math.abs(fb) ? fa : fb, 'no-bracket');
  const rising = fb > 0 ? 1 : -1;
  const kappa = 0.2 / (b - a);
  const most = Math.max(0, Math.ceil(Math.log2((b - a) / (2 * xTol)))) + 1;
  for (let j = 0; b - a > 2 * xTol; j++) {
    if (used >= evaluations)
      return end(Math.abs(fa) < Math.abs(fb) ? a : b, Math.abs(fa) < Math.abs(fb) ? fa : fb, 'evaluations');
    const half = (a + b) / 2;
    const radius = Math.max(0, xTol * 2 ** (most - j) - (b - a) / 2);
    const falsi = (fb * a - fa * b) / (fb - fa);
    const side = Math.sign(half - falsi);
    const nudge = kappa * (b - a) ** 2;
    const cut = nudge <= Math.abs(half - falsi) ? falsi + side * nudge : half;
    const x = Math.abs(cut - half) <= radius ? cut : half - side * radius;
    // Neighbouring numbers: the interval cannot shrink any more.
    if (!(x > a && x < b)) break;
    const fx = f(x);
    used++;
    if (!Number.isFinite(fx)) return end(x, fx, 'not-finite');
    if (Math.abs(fx) <= fTol) return end(x, fx);
    if (rising * fx > 0) {
      b = x;
      fb = fx;
    } else {
      a = x;
      fa = fx;
    }
  }
  return Math.abs(fa) < Math.abs(fb) ? end(a, fa) : end(b, fb);
}
