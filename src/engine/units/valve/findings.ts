/** Codes a valve may emit. */
export const VALVE_FINDINGS = [
  'pressure/not-positive',
  'valve/outlet-above-inlet',
  'valve/flashes',
  'valve/cools',
] as const;
