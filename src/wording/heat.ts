/** Labels that heaters and coolers share. */
export const HEATED_SETTINGS: Readonly<Record<string, string>> = {
  p: 'outlet pressure',
  T: 'outlet temperature',
  duty: 'duty (into the unit)',
  dT: 'temperature change (outlet less inlet)',
  vapourFraction: 'outlet vapour fraction',
  subcooling: 'below the bubble point by',
  superheat: 'above the dew point by',
};
export const HEATED_RESULTS: Readonly<Record<string, string>> = {
  duty_W: 'duty',
  T_K: 'outlet temperature',
  P_Pa: 'outlet pressure',
  vapourFraction: 'outlet vapour fraction',
};
