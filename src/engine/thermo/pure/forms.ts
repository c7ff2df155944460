/**
 * The published correlation forms: value and slope at one temperature, without any rule about ranges.
 *
 * T in K; results in SI (Pa, J/mol, mol/m3, J/(mol K), Pa s, W/(m K), N/m). A reduced distance from the critical
 * point, tau = 1 - T/Tc with the row's own Tc, counts 0 above it. Blank coefficients count 0.
 */
import type { Corr } from '../../chemicals/types';
import { R_J_molK } from '../types';
import { powerTerms, powerValue } from './powers';

/** A correlation ready for use. `log` forms give ln y, the others y. */
export interface Form {
  readonly log: boolean;
  /** y, or ln y for a `log` form, at T [K]. */
  readonly at: (T: number) => number;
  /** Its derivative by T [1/K]. */
  readonly slope: (T: number) => number;
  /** Temperatures [K] beyond which the formula has no meaning of its own. */
  readonly from_K: number;
  readonly to_K: number;
}

const MMHG_PA = 101325 / 760;
const PRESSURES = { Pa: 1, kPa: 1e3, bar: 1e5, mmHg: MMHG_PA } as const;

const plain = (at: Form['at'], slope: Form['slope'], to_K = Number.POSITIVE_INFINITY): Form => ({
  log: false,
  at,
  slope,
  from_K: 0,
  to_K,
});

/** Makes the formula of one row. Throws on a form it does not know. */
export function makeForm(corr: Corr): Form {
  const c = (k: number): number => corr.c[k - 1] ?? 0;
  switch (corr.form) {
    case 'dippr101':
      return dippr101(c(1), c(2), c(3), c(4), c(5));
    case 'wagner25':
      return wagner(c(1), c(2), c(3), c(4), c(5), c(6), 2.5, 5);
    case 'wagner36':
      return wagner(c(1), c(2), c(3), c(4), c(5), c(6), 3, 6);
    case 'antoine':
      return antoine(corr);
    case 'dippr105':
      return dippr105(c(1), c(2), c(3), c(4));
    case 'dippr106':
      return dippr106(c(1), c(2), c(3), c(4), c(5), c(6));
    case 'dippr102':
      return dippr102(c(1), c(2), c(3), c(4));
    case 'dippr114':
      return dippr114(c(1), c(2), c(3), c(4), c(5));
    case 'hvap_tau5': {
      const R = R_J_molK * c(6);
      return tauSum(0, [R * c(1), R * c(2), R * c(3), R * c(4), R * c(5)], [1 / 3, 2 / 3, 1, 2, 6], c(6));
    }
    case 'rho_tau4':
      return tauSum(c(1), [c(2), c(3), c(4), c(5)], [0.35, 2 / 3, 1, 4 / 3], c(6));
    case 'sigma_sum3':
      return tauSum(0, [c(1), c(3), c(5)], [c(2), c(4), c(6)], c(7));
    case 'sigma_som':
      return tauSum(0, [c(1), c(2), c(3)], [1.25, 2.25, 3.25], c(4));
    case 'visc_exp2':
      return viscExp2(c(1), c(2), c(3), c(4), c(5));
    case 'visc_log3': {
      const ln10 = Math.LN10;
      const [a, b, t0] = [c(1) * ln10, c(2) * ln10, c(3)];
      return {
        log: true,
        at: (T) => a + b / (t0 - T),
        slope: (T) => b / (t0 - T) ** 2,
        from_K: 0,
        to_K: Number.POSITIVE_INFINITY,
      };
    }
    case 'cp_nasa9':
    case 'poly5':
    case 'powers':
    case 'monatomic': {
      const terms = powerTerms(corr);
      return plain(
        (T) => powerValue(terms, T),
        (T) => {
          let y = 0;
          for (let k = terms.length - 1; k >= 0; k -= 1) y += (k - 2) * terms[k]! * T ** (k - 3);
          return y;
        },
      );
    }
  }
}

/** ln y = c1 + c2/T + c3 ln T + c4 T^c5 (vapour pressure in Pa, or liquid viscosity in Pa s). */
function dippr101(c1: number, c2: number, c3: number, c4: number, c5: number): Form {
  return {
    log: true,
    at: (T) => c1 + c2 / T + c3 * Math.log(T) + (c4 === 0 ? 0 : c4 * T ** c5),
    slope: (T) => -c2 / (T * T) + c3 / T + (c4 === 0 ? 0 : c4 * c5 * T ** (c5 - 1)),
    from_K: 0,
    to_K: Number.POSITIVE_INFINITY,
  };
}

/** ln(P/Pc) = (Tc/T)(a tau + b tau^1.5 + c tau^m + d tau^n). Wagner, Cryogenics 13 (1973) 470. */
function wagner(
  a: number,
  b: number,
  c: number,
  d: number,
  Tc: number,
  Pc: number,
  m: number,
  n: number,
): Form {
  const lnPc = Math.log(Pc);
  const tauOf = (T: number): number => Math.max(0, 1 - T / Tc);
  const sum = (t: number): number => t * (a + b * Math.sqrt(t) + c * t ** (m - 1) + d * t ** (n - 1));
  return {
    log: true,
    at: (T) => lnPc + (Tc / T) * sum(tauOf(T)),
    slope: (T) => {
      const t = tauOf(T);
      const rise = a + 1.5 * b * Math.sqrt(t) + m * c * t ** (m - 1) + n * d * t ** (n - 1);
      return -(Tc / (T * T)) * sum(t) - rise / T;
    },
    from_K: 0,
    to_K: Tc,
  };
}

/** log P = A - B/(T + C), in the units the row names. */
function antoine(corr: Corr): Form {
  const base = corr.log === 'e' ? 1 : Math.LN10;
  const shift = corr.T === 'degC' ? -273.15 : 0;
  const A = (corr.c[0] ?? 0) * base + Math.log(PRESSURES[corr.P ?? 'Pa']);
  const B = (corr.c[1] ?? 0) * base;
  const C = (corr.c[2] ?? 0) + shift;
  return {
    log: true,
    at: (T) => A - B / (T + C),
    slope: (T) => B / (T + C) ** 2,
    // The pole lies at T = -C; nearer to it than a tenth of T the curve says nothing.
    from_K: C < 0 ? -C / 0.9 : 0,
    to_K: Number.POSITIVE_INFINITY,
  };
}

/** rho = c1 / c2^(1 + (1 - T/c3)^c4), mol/m3: Rackett's form. */
function dippr105(c1: number, c2: number, c3: number, c4: number): Form {
  const lnB = Math.log(c2);
  const at = (T: number): number => c1 / Math.exp(lnB * (1 + Math.max(0, 1 - T / c3) ** c4));
  return plain(
    at,
    (T) => {
      const t = Math.max(0, 1 - T / c3);
      return t === 0 ? 0 : (at(T) * lnB * c4 * t ** (c4 - 1)) / c3;
    },
    c3,
  );
}

/** y = c1 (1 - Tr)^(c2 + c3 Tr + c4 Tr^2 + c5 Tr^3), Tr = T/c6. */
function dippr106(c1: number, c2: number, c3: number, c4: number, c5: number, Tc: number): Form {
  const power = (r: number): number => c2 + r * (c3 + r * (c4 + r * c5));
  const at = (T: number): number => (T >= Tc ? 0 : c1 * (1 - T / Tc) ** power(T / Tc));
  return plain(
    at,
    (T) => {
      if (T >= Tc) return 0;
      const r = T / Tc;
      const rise = c3 + r * (2 * c4 + r * 3 * c5);
      return (at(T) * (rise * Math.log(1 - r) - power(r) / (1 - r))) / Tc;
    },
    Tc,
  );
}

/** y = c1 T^c2 / (1 + c3/T + c4/T^2). */
function dippr102(c1: number, c2: number, c3: number, c4: number): Form {
  const below = (T: number): number => 1 + (c3 + c4 / T) / T;
  const at = (T: number): number => (c1 * T ** c2) / below(T);
  return plain(at, (T) => at(T) * (c2 / T + (c3 + (2 * c4) / T) / (T * T) / below(T)));
}

/** Liquid heat capacity, J/(mol K): c1^2/tau + c2 - 2 c1 c3 tau - c1 c4 tau^2 - c3^2 tau^3/3 - c3 c4 tau^4/2 - c4^2 tau^5/5. */
function dippr114(c1: number, c2: number, c3: number, c4: number, Tc: number): Form {
  const tauOf = (T: number): number => Math.max(1e-6, 1 - T / Tc);
  return plain(
    (T) => {
      const t = tauOf(T);
      return (
        (c1 * c1) / t +
        c2 -
        t * (2 * c1 * c3 + t * (c1 * c4 + t * ((c3 * c3) / 3 + t * ((c3 * c4) / 2 + (t * c4 * c4) / 5))))
      );
    },
    (T) => {
      const t = tauOf(T);
      const rise =
        -(c1 * c1) / (t * t) -
        (2 * c1 * c3 + t * (2 * c1 * c4 + t * (c3 * c3 + t * (2 * c3 * c4 + t * c4 * c4))));
      return -rise / Tc;
    },
    Tc,
  );
}

/** y = y0 + sum a_k tau^p_k. At the critical point the slope of a power below one is unbounded and counts 0. */
function tauSum(y0: number, a: readonly number[], p: readonly number[], Tc: number): Form {
  return plain(
    (T) => {
      const t = Math.max(0, 1 - T / Tc);
      let y = y0;
      for (let k = 0; k < a.length; k += 1) if (a[k] !== 0) y += a[k]! * t ** p[k]!;
      return y;
    },
    (T) => {
      const t = 1 - T / Tc;
      if (t <= 0) return 0;
      let y = 0;
      for (let k = 0; k < a.length; k += 1) if (a[k] !== 0) y += a[k]! * p[k]! * t ** (p[k]! - 1);
      return -y / Tc;
    },
    Tc,
  );
}

/** mu = E exp(A X^(1/3) + B X^(4/3)), X = (C - T)/(T - D), real cube root. */
function viscExp2(A: number, B: number, C: number, D: number, E: number): Form {
  const lnE = Math.log(E);
  return {
    log: true,
    at: (T) => {
      const X = (C - T) / (T - D);
      return lnE + Math.cbrt(X) * (A + B * X);
    },
    slope: (T) => {
      const X = (C - T) / (T - D);
      const dX = (D - C) / (T - D) ** 2;
      const root = Math.cbrt(X);
      return X === 0 ? 0 : (A / (3 * root * root) + (4 / 3) * B * root) * dX;
    },
    from_K: D > 0 ? D / 0.9 : 0,
    to_K: Number.POSITIVE_INFINITY,
  };
}
