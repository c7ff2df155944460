/** Codes a drum may emit. */
export const DRUM_FINDINGS = [
  'drum/pressure-not-positive',
  'drum/no-state',
  'drum/enters-below-pressure',
  'drum/has-duty',
  'drum/one-phase',
  'drum/dense',
] as const;
