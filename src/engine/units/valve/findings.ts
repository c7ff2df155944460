/** Codes a valve may emit. */
export const VALVE_FINDINGS = [
  'valve/pressure-not-positive',
  'valve/no-state',
  'valve/outlet-above-inlet',
  'valve/flashes',
  'valve/cools',
] as const;
