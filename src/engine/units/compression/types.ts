/** What compressors and expanders share. */
export interface MachineSettings {
  readonly p: { readonly P: number } | { readonly ratio: number } | { readonly T: number };
  readonly efficiency: { readonly isentropic: number } | { readonly polytropic: number };
  /** Efficiency of motor and drive, or of drive and generator [-]. */
  readonly drive?: number;
  /** Words and symbol only. */
  readonly service?: 'compressor' | 'fan';
}

export interface MachineResults {
  /** Shaft power into the fluid [W]. */
  readonly power_W: number;
  /** Only with a drive efficiency [W]. */
  readonly electric_W?: number;
  readonly P_Pa: number;
  readonly ratio: number;
  readonly T_K: number;
  /** At the same pressure without losses; absent when a chemical has no standard entropy. */
  readonly isentropicT_K?: number;
  readonly isentropicEfficiency?: number;
  /** Absent where the path crosses two phases and the efficiency was given as isentropic. */
  readonly polytropicEfficiency?: number;
  /** Change of enthalpy per mass without losses [J/kg]. */
  readonly isentropicHead_J_kg?: number;
  /** Integral of v dP along the path, per mass [J/kg]. */
  readonly polytropicHead_J_kg?: number;
  /** What enters [m3/s]. */
  readonly suctionVolume_m3_s: number;
  /** Inlet temperature less dew point at the inlet's pressure [K]; only for a vapour with a dew point. */
  readonly dewMargin_K?: number;
}
