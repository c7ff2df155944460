/** Codes a heater may emit. */
export const HEATER_FINDINGS = [
  'heater/pressure-not-positive',
  'heater/temperature-not-positive',
  'heater/no-state',
  'heater/no-bubble-point',
  'heater/no-dew-point',
  'heater/wrong-way',
  'heater/enters-below-pressure',
  'heater/medium-pressure-steam',
  'heater/high-pressure-steam',
  'heater/above-steam',
  'heater/cracking',
  'heater/polymerises',
] as const;
