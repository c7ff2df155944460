/** Everything temperature-dependent about one pure chemical, prepared once and then only evaluated. */
import type { ChemicalData, CorrProperty } from '../../chemicals/types';
import { type Curve, makeCurve, makeLogCurve, outside_K, statedRange } from './curve';
import { prepareIdealGases } from './ideal';

type Of = (T: number) => number;

/**
 * Pure-component properties of one chemical; T in K, > 0. A property without data is `undefined`, never a guess.
 * Outside a stated range the rules of curve.ts and ideal.ts hold; `outside_K` tells by how much.
 */
export interface PureChemical {
  readonly chemical: ChemicalData;
  /** Ideal-gas heat capacity [J/(mol K)]. */
  readonly cpIdeal: Of | undefined;
  /** Ideal-gas enthalpy [J/mol]: Hf (0 when unknown) at 298.15 K. */
  readonly hIdeal: Of | undefined;
  /** Ideal-gas entropy at 1 bar [J/(mol K)]: S0 (0 when unknown) at 298.15 K. */
  readonly sIdeal: Of | undefined;
  /** Vapour pressure [Pa], its logarithm, and d ln P / dT [1/K]. */
  readonly psat: Of | undefined;
  readonly lnPsat: Of | undefined;
  readonly dlnPsat_dT: Of | undefined;
  /** Enthalpy of vaporisation [J/mol]. */
  readonly hvap: Of | undefined;
  /** d of it by T [J/(mol K)]; 0 outside the range. */
  readonly dHvap_dT: Of | undefined;
  /** Density of the saturated liquid [mol/m3]. */
  readonly rhoL: Of | undefined;
  /** Heat capacity of the liquid [J/(mol K)]. */
  readonly cpL: Of | undefined;
  readonly viscosityL: Of | undefined; // Pa s
  readonly viscosityG: Of | undefined; // Pa s
  readonly conductivityL: Of | undefined; // W/(m K)
  readonly conductivityG: Of | undefined; // W/(m K)
  readonly surfaceTension: Of | undefined; // N/m
  /** Stated range [K] of a property; undefined without data, an absent end where none is stated. */
  range(of: CorrProperty): { readonly Tmin?: number; readonly Tmax?: number } | undefined;
  /** Kelvins by which T lies outside the stated range of a property; 0 inside or without data or range. */
  outside_K(of: CorrProperty, T: number): number;
}

/** Prepares one chemical. Throws when its ideal-gas heat capacity has a form that is none. */
export function preparePure(chemical: ChemicalData): PureChemical {
  const rows = (of: CorrProperty) => chemical.corr[of] ?? [];
  const curve = (of: CorrProperty): Curve | undefined =>
    rows(of).length > 0 ? makeCurve(rows(of)) : undefined;
  const ideal = rows('ideal_gas_cp').length > 0 ? prepareIdealGases([chemical]) : undefined;
  const p = rows('vapor_pressure').length > 0 ? makeLogCurve(rows('vapor_pressure')) : undefined;
  const hvap = curve('enthalpy_of_vaporization');
  return {
    chemical,
    cpIdeal: ideal && ((T) => ideal.cp(0, T)),
    hIdeal: ideal && ((T) => ideal.h(0, T)),
    sIdeal: ideal && ((T) => ideal.s(0, T)),
    psat: p && ((T) => Math.exp(p.ln(T))),
    lnPsat: p?.ln,
    dlnPsat_dT: p?.dln,
    hvap: hvap?.at,
    dHvap_dT: hvap?.slope,
    rhoL: curve('liquid_density')?.at,
    cpL: curve('liquid_cp')?.at,
    viscosityL: curve('liquid_viscosity')?.at,
    viscosityG: curve('gas_viscosity')?.at,
    conductivityL: curve('liquid_conductivity')?.at,
    conductivityG: curve('gas_conductivity')?.at,
    surfaceTension: curve('surface_tension')?.at,
    range: (of) => (rows(of).length > 0 ? statedRange(rows(of)) : undefined),
    outside_K: (of, T) => outside_K(rows(of), T),
  };
}
