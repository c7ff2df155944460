/** Codes a pump may emit. */
export const PUMP_FINDINGS = [
  'pressure/not-positive',
  'pump/vapour-enters',
  'pump/low-suction-head',
  'pump/static-head-only',
  'pump/gives-power',
] as const;
