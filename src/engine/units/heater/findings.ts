import { UTILITY_FINDINGS } from '../limits/utilities';

/** Codes a heater may emit. */
export const HEATER_FINDINGS = [
  'pressure/not-positive',
  'pressure/enters-below',
  'temperature/not-positive',
  'heater/cools',
  ...UTILITY_FINDINGS,
] as const;
