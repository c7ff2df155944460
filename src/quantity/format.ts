/** Numbers as text for people: thin space for thousands, true minus, powers of ten raised. CSV takes plainNumber. */

export const THIN_SPACE = '\u2009';
export const MINUS = '\u2212';

/** What stands for a number that is not there: an en dash. */
export const ABSENT = '\u2013';

export type NumberStyle = { readonly significant: number } | { readonly decimals: number };

/** Four significant figures: what screens show when nothing else is asked. */
export const SCREEN: NumberStyle = { significant: 4 };

type Shown = number | null | undefined;

const RAISED = '⁰¹²³⁴⁵⁶⁷⁸⁹';
const raised = (n: number): string =>
  (n < 0 ? '⁻' : '') + Array.from(String(Math.abs(n)), (c) => RAISED[Number(c)]).join('');

const isNumber = (x: Shown): x is number => typeof x === 'number' && Number.isFinite(x);
const signed = (negative: boolean, text: string): string => (negative ? MINUS + text : text);

/** "12345.60" -> "12 345.60"; decimals are not grouped. */
function grouped(plain: string): string {
  const [whole = '', part] = plain.split('.');
  const split = whole.replace(/\B(?=(?:\d{3})+$)/g, THIN_SPACE);
  return part === undefined ? split : `${split}.${part}`;
}

/** A hair up, so that what is half way in decimals (288.15, stored as 288.149...) rounds up as on paper. */
const halfUp = (size: number): number => (size < 1e15 ? size * (1 + Number.EPSILON) : size);

/** A size >= 0 in "2.5 × 10⁻¹⁰" with so many figures. */
function inPowers(size: number, figures: number): string {
  const [digits = '', exponent = '0'] = size.toExponential(figures - 1).split('e');
  return `${digits} × 10${raised(Number(exponent))}`;
}

/**
 * A number with so many significant figures; trailing zeros stay, so that columns are equally wide.
 *
 * Zero is "0". From 10 000 000 up and below 0.0001 in powers of ten. Absent and not finite: "–".
 */
export function formatSignificant(value: Shown, figures = 4): string {
  if (!isNumber(value)) return ABSENT;
  if (value === 0) return '0';
  const size = halfUp(Math.abs(value));
  const exponent = Number(size.toExponential(figures - 1).split('e')[1]);
  if (exponent >= 7 || exponent < -4) return signed(value < 0, inPowers(size, figures));
  const decimals = figures - 1 - exponent;
  const plain = decimals >= 0 ? size.toFixed(decimals) : Number(size.toPrecision(figures)).toFixed(0);
  return signed(value < 0, grouped(plain));
}

/**
 * A number with fixed decimals, for printed rows.
 *
 * Zero is "0"; what would print as zero but is not is "<0.01" (">−0.01" when negative), never "0.00". Absent and not
 * finite: "–". From 1e15 up in powers of ten, because no decimals are left to show.
 */
export function formatDecimals(value: Shown, decimals: number): string {
  if (!isNumber(value)) return ABSENT;
  if (value === 0) return '0';
  const size = Math.abs(value);
  if (size >= 1e15) return signed(value < 0, inPowers(size, 4));
  const plain = halfUp(size).toFixed(decimals);
  if (Number(plain) === 0) return traceBelow(decimals, value < 0);
  return signed(value < 0, grouped(plain));
}

/** "<0.01" for two decimals: what stands for a trace in a row with fixed decimals. */
export function traceBelow(decimals: number, negative = false): string {
  const last = (10 ** -decimals).toFixed(decimals);
  return negative ? `>${MINUS}${last}` : `<${last}`;
}

/** A number in one of the two styles; see formatSignificant and formatDecimals. */
export function formatNumber(value: Shown, style: NumberStyle = SCREEN): string {
  return 'significant' in style
    ? formatSignificant(value, style.significant)
    : formatDecimals(value, style.decimals);
}

/** A change with its sign: "+0.20", "−3.0"; "=" for none, "–" for absent. */
export function formatChange(value: Shown, style: NumberStyle = { significant: 2 }): string {
  if (!isNumber(value)) return ABSENT;
  if (value === 0) return '=';
  const size = formatNumber(Math.abs(value), style);
  const sign = value > 0 ? '+' : MINUS;
  return size.startsWith('<') ? `<${sign}${size.slice(1)}` : sign + size;
}

/** How far in and out miss each other: one figure in powers of ten, "2 × 10⁻¹⁰"; "0" when nothing is missing. */
export function formatDifference(value: Shown): string {
  if (!isNumber(value)) return ABSENT;
  if (value === 0) return '0';
  return signed(value < 0, inPowers(Math.abs(value), 1));
}

/** ASCII for CSV and scripts: the shortest text that reads back as the same double; empty when absent or not finite. */
export function plainNumber(value: Shown): string {
  return isNumber(value) ? String(value === 0 ? 0 : value) : '';
}

/** A shown number cut at the decimal sign, so that a column can align on it: ["12 345", ".60"], ["<0", ".01"], ["–", ""]. */
export function splitAtDecimal(text: string): readonly [whole: string, rest: string] {
  const power = text.indexOf(' × ');
  const point = text.indexOf('.');
  const cut = point >= 0 ? point : power;
  return cut < 0 ? [text, ''] : [text.slice(0, cut), text.slice(cut)];
}
