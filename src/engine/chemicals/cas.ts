/**
 * Whether a text is a CAS Registry Number with a right check digit: the digits before the last, counted from the
 * right, times 1, 2, 3, ... sum up to the check digit modulo 10.
 * Source: CAS, "Check Digit Verification of CAS Registry Numbers".
 */
export function isCas(text: string): boolean {
  const m = /^(\d{2,7})-(\d{2})-(\d)$/.exec(text);
  if (!m) return false;
  const digits = [...`${m[1]}${m[2]}`].reverse();
  return digits.reduce((sum, d, k) => sum + Number(d) * (k + 1), 0) % 10 === Number(m[3]);
}
