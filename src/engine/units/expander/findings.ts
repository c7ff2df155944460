/** Codes an expander may emit. */
export const EXPANDER_FINDINGS = [
  'pressure/not-positive',
  'compression/path-breaks-off',
  'compression/temperature-out-of-reach',
  'expander/temperature-above-inlet',
  'expander/takes-power',
] as const;
