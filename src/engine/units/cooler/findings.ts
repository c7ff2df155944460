/** Codes a cooler may emit. */
export const COOLER_FINDINGS = [
  'cooler/pressure-not-positive',
  'cooler/temperature-not-positive',
  'cooler/no-state',
  'cooler/no-bubble-point',
  'cooler/no-dew-point',
  'cooler/wrong-way',
  'cooler/enters-below-pressure',
  'cooler/below-air',
  'cooler/below-cooling-water',
  'cooler/below-chilled-water',
  'cooler/second-refrigerant',
] as const;
