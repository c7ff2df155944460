/** Codes a join may emit. */
export const JOIN_FINDINGS = ['pressure/not-positive', 'pressure/enters-below'] as const;
