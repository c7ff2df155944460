const two = (n: number): string => String(n).padStart(2, '0');

/** The day on the calendar of whoever sits there, "2026-01-15": not that of Greenwich, which may be the next one or the last. */
export const dayOf = (at: Date): string =>
  `${at.getFullYear()}-${two(at.getMonth() + 1)}-${two(at.getDate())}`;
