/** Codes a compressor may emit. */
export const COMPRESSOR_FINDINGS = [
  'pressure/not-positive',
  'compression/path-breaks-off',
  'compression/temperature-out-of-reach',
  'compressor/temperature-below-inlet',
  'compressor/liquid-enters',
  'compressor/near-dew-point',
  'compressor/high-ratio',
  'compressor/hot',
  'compressor/hot-light-gas',
  'compressor/hot-olefins',
  'compressor/gives-power',
] as const;
