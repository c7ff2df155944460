/** Whether correlation rows can be used for a property: asked of what a user brings, and of the bank. */
import type { Corr, CorrForm, CorrProperty } from '../../chemicals/types';
import { makeForm } from './forms';
import { CP_FORMS } from './powers';

/** Fewest coefficients that make sense of a form; those left out at the end count 0. */
export const FEWEST: Readonly<Record<CorrForm, number>> = {
  cp_nasa9: 3,
  dippr101: 2,
  wagner25: 6,
  wagner36: 6,
  dippr106: 6,
  hvap_tau5: 6,
  dippr105: 4,
  rho_tau4: 6,
  poly5: 1,
  dippr114: 5,
  dippr102: 1,
  visc_exp2: 5,
  visc_log3: 3,
  sigma_sum3: 7,
  sigma_som: 4,
  powers: 1,
  antoine: 3,
  monatomic: 0,
};

/** Which coefficient, counted from 1, is a critical temperature or pressure and must be positive. */
const POSITIVE: Readonly<Partial<Record<CorrForm, readonly number[]>>> = {
  wagner25: [5, 6],
  wagner36: [5, 6],
  dippr105: [1, 2, 3],
  dippr106: [6],
  dippr114: [5],
  hvap_tau5: [6],
  rho_tau4: [6],
  sigma_sum3: [7],
  sigma_som: [4],
  visc_exp2: [5],
};

/** The forms that can stand for a property. */
export const FORMS: Readonly<Record<CorrProperty, ReadonlySet<CorrForm>>> = {
  ideal_gas_cp: CP_FORMS,
  vapor_pressure: new Set(['dippr101', 'wagner25', 'wagner36', 'antoine']),
  enthalpy_of_vaporization: new Set(['dippr106', 'hvap_tau5', 'poly5', 'powers']),
  liquid_density: new Set(['dippr105', 'rho_tau4', 'poly5', 'powers']),
  liquid_cp: new Set(['poly5', 'dippr114', 'powers']),
  liquid_viscosity: new Set(['dippr101', 'visc_exp2', 'visc_log3', 'poly5', 'powers']),
  gas_viscosity: new Set(['dippr102', 'poly5', 'powers']),
  liquid_conductivity: new Set(['poly5', 'powers']),
  gas_conductivity: new Set(['dippr102', 'poly5', 'powers']),
  surface_tension: new Set(['dippr106', 'sigma_sum3', 'sigma_som', 'poly5', 'powers']),
};

/** Properties that may be exactly zero where a range ends at the critical point. */
const ZERO_AT_END: ReadonlySet<CorrProperty> = new Set(['enthalpy_of_vaporization', 'surface_tension']);

/** Far beyond what any chemical has [SI]; larger numbers would only turn up as infinities later. */
const MOST: Readonly<Record<CorrProperty, number>> = {
  ideal_gas_cp: 1e6,
  vapor_pressure: 1e11,
  enthalpy_of_vaporization: 1e8,
  liquid_density: 1e6,
  liquid_cp: 1e6,
  liquid_viscosity: 1e6,
  gas_viscosity: 1,
  liquid_conductivity: 1e4,
  gas_conductivity: 1e4,
  surface_tension: 1e3,
};

/** Why rows of a correlation cannot be used. */
export interface CorrFault {
  /**
   * 'form': not one for this property; 'coefficients': too few, not finite, or a critical constant not positive;
   * 'range': Tmin not below Tmax, or negative; 'overlap': two rows claim one temperature;
   * 'value': not positive, or beyond all measure, at T_K; 'falling': a vapour pressure falls with temperature at T_K.
   */
  readonly fault: 'form' | 'coefficients' | 'range' | 'overlap' | 'value' | 'falling';
  /** Which row, counted from 0. */
  readonly row: number;
  readonly T_K?: number;
}

/** The first fault of a property's rows; undefined when they can be used. Never throws on what a user wrote. */
export function corrFault(of: CorrProperty, rows: readonly Corr[]): CorrFault | undefined {
  for (const [k, row] of rows.entries()) {
    const found = rowFault(of, row);
    if (found) return { ...found, row: k };
  }
  const order = [...rows.keys()].sort((a, b) => (rows[a]!.Tmin ?? 0) - (rows[b]!.Tmin ?? 0));
  for (const [at, k] of order.slice(1).entries()) {
    const before = rows[order[at]!]!;
    if ((before.Tmax ?? Number.POSITIVE_INFINITY) > (rows[k]!.Tmin ?? 0)) return { fault: 'overlap', row: k };
  }
  return undefined;
}

function rowFault(of: CorrProperty, row: Corr): Omit<CorrFault, 'row'> | undefined {
  const { form, c, Tmin, Tmax } = row;
  if (!FORMS[of].has(form)) return { fault: 'form' };
  const positive = POSITIVE[form] ?? [];
  if (c.length < FEWEST[form] || !c.every(Number.isFinite) || positive.some((k) => !(c[k - 1]! > 0)))
    return { fault: 'coefficients' };
  const ends = [Tmin, Tmax].filter((T) => T !== undefined);
  if (
    ends.some((T) => !(T >= 0 && Number.isFinite(T))) ||
    !((Tmin ?? 0) < (Tmax ?? Number.POSITIVE_INFINITY))
  )
    return { fault: 'range' };
  const { at, log, slope, from_K, to_K } = makeForm(row);
  // Without a range, what it gives near room temperature must make sense at least.
  const start = Tmin ?? Math.min(298.15, Tmax ?? 298.15);
  const low = Math.max(start, from_K, 1);
  const high = Math.max(low, Math.min(Tmax ?? Math.max(298.15, low), to_K));
  for (let k = 0; k <= 40; k += 1) {
    const T = low + ((high - low) * k) / 40;
    const y = log ? Math.exp(at(T)) : at(T);
    const critical = k === 40 && ZERO_AT_END.has(of);
    if (!(y >= 0 && y <= MOST[of]) || (y === 0 && !critical)) return { fault: 'value', T_K: T };
    if (of === 'vapor_pressure' && !(slope(T) > 0)) return { fault: 'falling', T_K: T };
  }
  return undefined;
}
