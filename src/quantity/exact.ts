/**
 * Exact fractions of whole numbers, so that one rounding stands between what was typed and the SI number.
 *
 * Decimal text times a decimal factor is rational; carrying it exactly means that 4.35 bar, 435 kPa and 0.435 MPa
 * end on the same bits, and that a number shown in another unit can be typed back without drift.
 */
export interface Ratio {
  readonly n: bigint;
  /** Always > 0. */
  readonly d: bigint;
}

const DECIMAL = /^([+-]?)(\d*)(?:\.(\d*))?(?:[eE]([+-]?\d+))?$/;

export const ONE: Ratio = { n: 1n, d: 1n };

/** Decimal text ("-12.5e3") as a fraction. Throws on anything else: callers scan first. */
export function fromText(text: string): Ratio {
  const m = DECIMAL.exec(text);
  const whole = m?.[2] ?? '';
  const part = m?.[3] ?? '';
  if (!m || whole + part === '') throw new Error(`not a decimal number: "${text}"`);
  const digits = BigInt(whole + part) * (m[1] === '-' ? -1n : 1n);
  const power = Number(m[4] ?? '0') - part.length;
  return power >= 0 ? { n: digits * 10n ** BigInt(power), d: 1n } : { n: digits, d: 10n ** BigInt(-power) };
}

/** A finite double as the fraction it stands for. Throws when not finite. */
export function fromDouble(x: number): Ratio {
  if (!Number.isFinite(x)) throw new Error('no fraction for a number that is not finite');
  let whole = x;
  let halvings = 0;
  while (!Number.isInteger(whole)) {
    whole *= 2;
    halvings += 1;
  }
  return { n: BigInt(whole), d: 1n << BigInt(halvings) };
}

/** a b; not reduced. */
export const times = (a: Ratio, b: Ratio): Ratio => ({ n: a.n * b.n, d: a.d * b.d });

/** a + b; not reduced. */
export const plus = (a: Ratio, b: Ratio): Ratio => ({ n: a.n * b.d + b.n * a.d, d: a.d * b.d });

/** a - b; not reduced. */
export const minus = (a: Ratio, b: Ratio): Ratio => ({ n: a.n * b.d - b.n * a.d, d: a.d * b.d });

/** a / b. Throws when b is zero. */
export function over(a: Ratio, b: Ratio): Ratio {
  if (b.n === 0n) throw new Error('division by zero');
  return b.n < 0n ? { n: -a.n * b.d, d: a.d * -b.n } : { n: a.n * b.d, d: a.d * b.n };
}

/** a to a whole power, which may be negative when a is not zero (else it throws). */
export function power(a: Ratio, exponent: number): Ratio {
  const up = BigInt(Math.abs(exponent));
  const raised = { n: a.n ** up, d: a.d ** up };
  return exponent < 0 ? over(ONE, raised) : raised;
}

/** Without common factors; keeps the stored unit factors small. */
export function reduced(a: Ratio): Ratio {
  let [x, y] = [a.n < 0n ? -a.n : a.n, a.d];
  while (y !== 0n) [x, y] = [y, x % y];
  return x === 0n ? { n: 0n, d: 1n } : { n: a.n / x, d: a.d / x };
}

const bits = (x: bigint): number => x.toString(2).length;

/**
 * The nearest double, ties to even. Infinity beyond the largest double, 0 below the smallest.
 *
 * A quotient of at least 64 bits with a sticky last bit is rounded once by Number(); scaling by powers of two is exact
 * for normal numbers.
 */
export function toDouble(a: Ratio): number {
  if (a.n === 0n) return 0;
  const negative = a.n < 0n;
  const n = negative ? -a.n : a.n;
  const shift = 66 + bits(a.d) - bits(n);
  const top = shift > 0 ? n << BigInt(shift) : n;
  const bottom = shift < 0 ? a.d << BigInt(-shift) : a.d;
  let q = top / bottom;
  if (q * bottom !== top) q |= 1n;
  const half = Math.trunc(-shift / 2);
  const size = Number(q) * 2 ** half * 2 ** (-shift - half);
  return negative ? -size : size;
}

/**
 * Plain decimal text rounded half away from zero to a number of decimals, which may be negative (-2: hundreds).
 * "-0" does not occur.
 */
export function toText(a: Ratio, decimals: number): string {
  const scale = 10n ** BigInt(Math.abs(decimals));
  const top = decimals >= 0 ? a.n * scale : a.n;
  const bottom = decimals >= 0 ? a.d : a.d * scale;
  const size = top < 0n ? -top : top;
  const rounded = (2n * size + bottom) / (2n * bottom);
  const sign = a.n < 0n && rounded !== 0n ? '-' : '';
  if (decimals <= 0) return sign + (rounded * (decimals < 0 ? scale : 1n)).toString();
  const digits = rounded.toString().padStart(decimals + 1, '0');
  return `${sign}${digits.slice(0, -decimals)}.${digits.slice(-decimals)}`;
}

/** Place of the first figure: 3 for 1234, -2 for 0.012; 0 for zero and beyond the doubles. */
export function magnitude(a: Ratio): number {
  const size = toDouble(a);
  return size !== 0 && Number.isFinite(size) ? Number(size.toExponential().split('e')[1]) : 0;
}
