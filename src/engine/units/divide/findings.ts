/** Codes a divide may emit. */
export const DIVIDE_FINDINGS = [
  'divide/no-rest-outlet',
  'divide/several-rest-outlets',
  'divide/unknown-outlet',
  'divide/share-below-zero',
  'divide/shares-above-whole',
  'divide/flow-from-nothing',
] as const;
