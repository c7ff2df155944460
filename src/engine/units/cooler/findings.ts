import { UTILITY_FINDINGS } from '../limits/utilities';

/** Codes a cooler may emit. */
export const COOLER_FINDINGS = [
  'pressure/not-positive',
  'pressure/enters-below',
  'temperature/not-positive',
  'cooler/heats',
  ...UTILITY_FINDINGS,
] as const;
