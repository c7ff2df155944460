/** Names of the published correlation forms; formulas stand in thermo/pure/. `c` is c1, c2, ... in the form's order. */
export type CorrForm =
  | 'cp_nasa9'
  | 'dippr101'
  | 'wagner25'
  | 'wagner36'
  | 'dippr106'
  | 'hvap_tau5'
  | 'dippr105'
  | 'rho_tau4'
  | 'poly5'
  | 'dippr114'
  | 'dippr102'
  | 'visc_exp2'
  | 'visc_log3'
  | 'sigma_sum3'
  | 'sigma_som'
  | 'powers'
  | 'antoine'
  | 'monatomic';

/** One correlation over one temperature range, SI in and out. */
export interface Corr {
  readonly form: CorrForm;
  /** Stated range [K]; absent: used as given at every temperature. */
  readonly Tmin?: number;
  readonly Tmax?: number;
  readonly c: readonly number[];
  /** powers: what the sum gives. */
  readonly of?: 'Cp' | 'Cp/R';
  /** antoine: base of the logarithm, unit of the pressure, unit of the temperature. */
  readonly log?: '10' | 'e';
  readonly P?: 'Pa' | 'kPa' | 'bar' | 'mmHg';
  readonly T?: 'K' | 'degC';
  /** Where the coefficients come from; short tag, expanded in data/sources.json. */
  readonly source?: string;
  readonly note?: string;
}

export type CorrProperty =
  | 'ideal_gas_cp'
  | 'vapor_pressure'
  | 'enthalpy_of_vaporization'
  | 'liquid_density'
  | 'liquid_cp'
  | 'liquid_viscosity'
  | 'gas_viscosity'
  | 'liquid_conductivity'
  | 'gas_conductivity'
  | 'surface_tension';

/** What the engine must know of one chemical: constants with their sources, correlations, elements. Structured-clonable. */
export interface ChemicalData {
  readonly id: string;
  readonly name: string;
  readonly formula?: string;
  readonly cas?: string;
  readonly family?: string;
  /** g/mol */
  readonly MW_g_mol: number;
  readonly Tb_K?: number;
  readonly Tm_K?: number;
  readonly Tc_K?: number;
  readonly Pc_Pa?: number;
  readonly Vc_m3_mol?: number;
  readonly omega?: number;
  /** Enthalpy of formation, ideal gas, 298.15 K [J/mol]. */
  readonly Hf_J_mol?: number;
  /** Entropy, ideal gas, 298.15 K, 1 bar [J/(mol K)]. */
  readonly S0_J_molK?: number;
  readonly flashPoint_K?: number;
  readonly autoignition_K?: number;
  /** Flammability limits, volume fraction in air at 25 degC, 1 atm. */
  readonly LFL?: number;
  readonly UFL?: number;
  /** Atoms by element symbol; absent: element closure is not claimed. */
  readonly elements?: Readonly<Record<string, number>>;
  readonly corr: Readonly<Partial<Record<CorrProperty, readonly Corr[]>>>;
  /**
   * Constant of the liquid-volume method (modified Rackett, Z_RA), fitted once from the saturated-liquid density
   * correlation near the normal boiling point or 298.15 K; absent: from omega (Yamada & Gunn).
   */
  readonly zRA?: number;
  readonly zRASource?: string;
  /** Groups of the predicted Peng-Robinson pairs: group name -> count. */
  readonly ppr78?: Readonly<Record<string, number>>;
  /** Source tag per constant, by field name. */
  readonly sources: Readonly<Record<string, string>>;
  /** True when the sketch did not list it and a unit brought it in. */
  readonly assumed?: boolean;
  readonly own?: boolean;
}
