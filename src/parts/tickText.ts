import { THIN_SPACE } from '../quantity';

/** d3's tick labels in our digits: thin spaces for thousands (its minus is already a true one). */
export const inOurDigits =
  (format: (x: number) => string) =>
  (x: number): string =>
    format(x).replaceAll(',', THIN_SPACE);
