/** Labels that compressors and expanders share. */
export const MACHINE_SETTINGS: Readonly<Record<string, string>> = {
  p: 'outlet',
  'p.P': 'outlet pressure',
  'p.ratio': 'outlet to inlet pressure',
  'p.T': 'discharge temperature',
  efficiency: 'efficiency',
  'efficiency.isentropic': 'isentropic efficiency',
  'efficiency.polytropic': 'polytropic efficiency',
  service: 'service',
};
export const MACHINE_RESULTS: Readonly<Record<string, string>> = {
  power_W: 'shaft power',
  electric_W: 'electric power',
  P_Pa: 'outlet pressure',
  ratio: 'outlet to inlet pressure',
  T_K: 'outlet temperature',
  isentropicT_K: 'outlet temperature without losses',
  isentropicEfficiency: 'isentropic efficiency',
  polytropicEfficiency: 'polytropic efficiency',
  isentropicHead_J_kg: 'isentropic head',
  polytropicHead_J_kg: 'polytropic head',
  suctionVolume_m3_s: 'volume flow at the inlet',
  dewMargin_K: 'inlet above its dew point by',
};
