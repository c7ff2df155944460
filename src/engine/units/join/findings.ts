/** Codes a join may emit. */
export const JOIN_FINDINGS = [
  'join/pressure-not-positive',
  'join/no-state',
  'join/enters-below-pressure',
] as const;
