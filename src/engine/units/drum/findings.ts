import { UTILITY_FINDINGS } from '../limits/utilities';

/** Codes a drum may emit. */
export const DRUM_FINDINGS = [
  'pressure/not-positive',
  'pressure/enters-below',
  'drum/has-duty',
  'drum/one-phase',
  'drum/dense',
  ...UTILITY_FINDINGS,
] as const;
