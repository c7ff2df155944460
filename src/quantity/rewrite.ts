import type { Dimension } from './dimension';
import { fromDouble, fromText, magnitude, minus, over, plus, type Ratio, toDouble, toText } from './exact';
import { exactSi, measuredBy, type Site, STANDARD_SITE, takeApart } from './parse';
import { readUnit, type UnitOfMeasure } from './unit';

/** How a number is written back: every digit needed (default), or rounded to figures or decimals for a hand on a ruler. */
export interface Rounding {
  readonly figures?: number;
  readonly decimals?: number;
}

const MOST_DECIMALS = 340;

/** The SI value in the unit's own numbers, exactly. */
function exactNumber(si: number, unit: UnitOfMeasure, dim: Dimension, site: Site): Ratio {
  const exact = fromDouble(si);
  const absolute = unit.reference === 'gauge' ? minus(exact, fromText(String(site.P_Pa))) : exact;
  const number = over(absolute, unit.factor);
  return dim === 'temperature' && unit.zero ? minus(number, unit.zero) : number;
}

/** Long plain decimals in powers of ten: "0.0000000001" -> "1e-10". */
function compact(text: string): string {
  const [, sign = '', whole = '', part = ''] = /^(-?)(\d+)(?:\.(\d+))?$/.exec(text) ?? [];
  const lead = /^0*/.exec(part)?.[0].length ?? 0;
  if (whole === '0' && lead >= 6 && lead < part.length) {
    const figures = part.slice(lead);
    return `${sign}${figures[0]}${figures.length > 1 ? `.${figures.slice(1)}` : ''}e-${lead + 1}`;
  }
  if (whole.length <= 21 || part !== '') return text;
  const figures = whole.replace(/0+$/, '');
  return `${sign}${figures[0]}${figures.length > 1 ? `.${figures.slice(1)}` : ''}e${whole.length - 1}`;
}

const trimmed = (text: string): string => (text.includes('.') ? text.replace(/\.?0+$/, '') : text);

/** The shortest decimal text that reads back as the same SI bits. */
function shortest(number: Ratio, back: (text: string) => number, si: number): string | undefined {
  for (let decimals = -Math.max(0, magnitude(number) + 1); decimals <= MOST_DECIMALS; decimals += 1) {
    const text = toText(number, decimals);
    if (back(text) === si) return compact(trimmed(text));
  }
  return undefined;
}

function numberIn(
  si: number,
  unit: UnitOfMeasure,
  dim: Dimension,
  site: Site,
  rounding: Rounding,
): string | undefined {
  const number = exactNumber(si, unit, dim, site);
  const { figures, decimals } = rounding;
  if (decimals !== undefined) return compact(toText(number, decimals));
  if (figures !== undefined) return compact(trimmed(toText(number, figures - 1 - magnitude(number))));
  return shortest(number, (text) => toDouble(exactSi(fromText(text), unit, dim, site)), si);
}

/**
 * Quantity text for an SI value in a given unit: quantityText(350000, 'pressure', 'bar(a)') is "3.5 bar(a)".
 *
 * Without rounding the text is the shortest that parses to the same bits.
 * @returns undefined when the value is not finite or the unit does not measure `dim`
 */
export function quantityText(
  si: number,
  dim: Dimension,
  unitText: string,
  site: Site = STANDARD_SITE,
  rounding: Rounding = {},
): string | undefined {
  if (!Number.isFinite(si)) return undefined;
  if (unitText === '') return dim === 'number' || dim === 'fraction' ? roundedText(si, rounding) : undefined;
  const unit = readUnit(unitText);
  if (!unit.ok || measuredBy(unit, [dim]) !== dim) return undefined;
  const number = numberIn(si, unit, dim, site, rounding);
  return number === undefined ? undefined : `${number} ${unitText}`;
}

const roundedText = (x: number, { figures, decimals }: Rounding): string => {
  const exact = fromDouble(x);
  if (decimals !== undefined) return compact(toText(exact, decimals));
  return figures === undefined
    ? String(x === 0 ? 0 : x)
    : compact(trimmed(toText(exact, figures - 1 - magnitude(exact))));
};

/**
 * The same text with another number inside: unit, its spelling and the space before it stay as typed.
 *
 * withNumber("10 barg", 601325, 'pressure') is "5 barg". Without rounding the new text parses to the same bits as `si`.
 * @returns undefined when the text is no quantity of `dims` or `si` is not finite
 */
export function withNumber(
  text: string | number,
  si: number,
  dims: Dimension | readonly Dimension[],
  site: Site = STANDARD_SITE,
  rounding: Rounding = {},
): string | undefined {
  const typed = String(text);
  const parts = takeApart(typed);
  if (!parts.ok || !Number.isFinite(si)) return undefined;
  const wanted = typeof dims === 'string' ? [dims] : dims;
  const dim = measuredBy(parts.unit, wanted);
  if (dim.startsWith('quantity/')) return undefined;
  const number = numberIn(si, parts.unit, dim as Dimension, site, rounding);
  return number === undefined ? undefined : replaced(typed, parts, number);
}

const replaced = (typed: string, parts: { numberAt: number; typed: string }, number: string): string =>
  typed.slice(0, parts.numberAt) + number + typed.slice(parts.numberAt + parts.typed.length);

/** One step of a slide: a power of ten between 1/1000 and 1/100 of the number, in the typed unit; the last decimal of a zero. */
export function stepSize(text: string | number): number | undefined {
  const parts = takeApart(String(text));
  return parts.ok ? 10 ** -stepDecimals(parts.plain) : undefined;
}

const decimalsTyped = (plain: string): number => {
  const [, part = '', exponent = '0'] = /^-?\d*(?:\.(\d*))?(?:[eE]([+-]?\d+))?$/.exec(plain) ?? [];
  return Math.max(0, part.length - Number(exponent));
};

const stepDecimals = (plain: string): number => {
  const number = fromText(plain);
  return number.n === 0n ? decimalsTyped(plain) : 2 - magnitude(number);
};

/**
 * The text after a number of slide steps, counted from the text at the start of the gesture so that going back ends where
 * it began: stepNumber("40 degC", 3) is "40.3 degC", stepNumber("7.0 bar", -5) is "6.95 bar".
 *
 * Exact in decimals: no 0.30000000000000004. Limits are the caller's.
 * @param steps  whole steps, either way
 * @param times  10 for coarse, 0.1 for fine
 * @returns undefined when the text is no quantity
 */
export function stepNumber(
  text: string | number,
  steps: number,
  times: 0.1 | 1 | 10 = 1,
): string | undefined {
  const typed = String(text);
  const parts = takeApart(typed);
  if (!parts.ok) return undefined;
  const decimals = stepDecimals(parts.plain) + (times === 10 ? -1 : times === 0.1 ? 1 : 0);
  const step = fromText(`${Math.round(steps)}e${-decimals}`);
  const moved = plus(fromText(parts.plain), step);
  const exact = toText(moved, Math.max(decimals, decimalsTyped(parts.plain)));
  const kept = decimalsTyped(parts.plain);
  return replaced(typed, parts, compact(kept > 0 ? padded(trimmed(exact), kept) : trimmed(exact)));
}

const padded = (text: string, decimals: number): string => {
  const [whole = '', part = ''] = text.split('.');
  return part.length >= decimals ? text : `${whole}.${part.padEnd(decimals, '0')}`;
};
