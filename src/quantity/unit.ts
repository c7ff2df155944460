import { ONE, power, type Ratio, times } from './exact';
import type { UnitFault } from './refusal';
import { addShape, type Shape } from './shapes';
import { nearestSymbol, SYMBOLS, type UnitSymbol } from './symbols';

/** A unit of measure taken apart: SI value = (number + zero) * factor, gauge pressures plus the site's. */
export interface UnitOfMeasure {
  readonly ok: true;
  /** As typed, in one spelling: "degC", "m3/h", "J/(mol K)". */
  readonly text: string;
  readonly factor: Ratio;
  readonly shape: Shape;
  /** Only for a temperature unit standing alone. */
  readonly zero?: Ratio;
  readonly reference?: 'absolute' | 'gauge';
}

interface Factor {
  readonly name: string;
  readonly symbol: UnitSymbol;
  readonly exponent: number;
  readonly at: number;
}

const SPACE = '[ \\u00a0\\u2009\\u202f]';
const LETTERS = /[A-Za-z%°]+/y;
const MARK = /\((?:a|g|IT|th)\)/y;
const CUBE = /\^?3|³/y;
const PLAIN_EXPONENT = /\^?([-−]?\d+)/y;
const RAISED_EXPONENT = /[⁻⁰¹²³⁴⁵⁶⁷⁸⁹]+/y;
const JOINER = new RegExp(`(?:${SPACE}*[·⋅]${SPACE}*|${SPACE}+)`, 'y');
const SLASH = new RegExp(`${SPACE}*/${SPACE}*`, 'y');
const APART = new RegExp(`${SPACE}*(\\((?:a|g)\\))`, 'y');
const RAISED = '⁰¹²³⁴⁵⁶⁷⁸⁹';
const SPELT: Readonly<Record<string, string>> = { '°C': 'degC', '°F': 'degF' };

const match = (pattern: RegExp, text: string, at: number): RegExpExecArray | null => {
  pattern.lastIndex = at;
  return pattern.exec(text);
};

const unraised = (text: string): string =>
  Array.from(text, (c) => (c === '⁻' ? '-' : String(RAISED.indexOf(c)))).join('');

const written = (f: Factor): string => (f.exponent === 1 ? f.name : `${f.name}${f.exponent}`);
const product = (fs: readonly Factor[]): string => fs.map(written).join(' ');

/** Reads one factor such as "kmol", "m3", "s^-1", "bar(a)". */
function readFactor(text: string, start: number): { factor: Factor; next: number } | UnitFault {
  const letters = match(LETTERS, text, start)?.[0];
  if (letters === undefined) {
    return { ok: false, code: 'quantity/unit-syntax', at: start, found: text.slice(start, start + 1) };
  }
  let name = letters;
  let next = start + letters.length;
  const mark = match(MARK, text, next)?.[0];
  if (mark !== undefined && SYMBOLS.has(letters + mark)) {
    name = letters + mark;
    next += mark.length;
  }
  const cube = match(CUBE, text, next)?.[0];
  if (cube !== undefined && SYMBOLS.has(`${letters}3`)) {
    name = `${letters}3`;
    next += cube.length;
  }
  const symbol = SYMBOLS.get(name);
  if (!symbol) {
    const near = nearestSymbol(name) ?? (mark === undefined ? undefined : nearestSymbol(name + mark));
    const fault: UnitFault = { ok: false, code: 'quantity/unknown-unit', at: start, found: name };
    return near === undefined ? fault : { ...fault, near };
  }
  let exponent = 1;
  const plain = match(PLAIN_EXPONENT, text, next);
  const raised = plain ? null : match(RAISED_EXPONENT, text, next);
  if (plain || raised) {
    const found = plain?.[0] ?? raised?.[0] ?? '';
    exponent = Number(plain ? plain[1]?.replace('−', '-') : unraised(found));
    if (!Number.isInteger(exponent) || exponent === 0 || Math.abs(exponent) > 9) {
      return { ok: false, code: 'quantity/unit-syntax', at: next, found };
    }
    next += found.length;
  }
  return { factor: { name: SPELT[name] ?? name, symbol, exponent, at: start }, next };
}

/** Reads factors multiplied by a space or a raised dot, up to something else. */
function readProduct(text: string, start: number): { factors: Factor[]; next: number } | UnitFault {
  const factors: Factor[] = [];
  let next = start;
  for (;;) {
    const one = readFactor(text, next);
    if ('ok' in one) return one;
    factors.push(one.factor);
    const joiner = match(JOINER, text, one.next)?.[0];
    const after = one.next + (joiner?.length ?? 0);
    const dotted = joiner !== undefined && /[·⋅]/.test(joiner);
    if (joiner === undefined || (!dotted && !match(LETTERS, text, after))) return { factors, next: one.next };
    next = after;
  }
}

/** Reads what stands below the slash: one factor, or several in brackets. */
function readBelow(
  text: string,
  at: number,
  above: readonly Factor[],
): { factors: Factor[]; next: number } | UnitFault {
  if (text[at] !== '(') {
    const one = readFactor(text, at);
    if ('ok' in one) return one;
    const joiner = match(JOINER, text, one.next)?.[0] ?? '';
    const further = joiner === '' ? null : match(LETTERS, text, one.next + joiner.length);
    if (further) {
      const rest = readProduct(text, at);
      const near = 'ok' in rest ? undefined : `${product(above)}/(${product(rest.factors)})`;
      const fault: UnitFault = {
        ok: false,
        code: 'quantity/unbracketed',
        at: one.next + joiner.length,
        found: further[0],
      };
      return near === undefined ? fault : { ...fault, near };
    }
    return { factors: [one.factor], next: one.next };
  }
  const inside = readProduct(text, at + 1);
  if ('ok' in inside) return inside;
  if (text[inside.next] !== ')') {
    return {
      ok: false,
      code: 'quantity/unit-syntax',
      at: inside.next,
      found: text.slice(inside.next, inside.next + 1),
    };
  }
  return { factors: inside.factors, next: inside.next + 1 };
}

/** What several factors make together; a marked pressure may only stand alone. */
function combine(above: readonly Factor[], below: readonly Factor[]): UnitOfMeasure | UnitFault {
  const under = below.length > 1 ? `/(${product(below)})` : below.length === 1 ? `/${product(below)}` : '';
  const text = product(above) + under;
  const only = above.length === 1 && below.length === 0 && above[0]?.exponent === 1 ? above[0] : undefined;
  if (only) return { ok: true, text, ...only.symbol };
  let factor = ONE;
  let shape: Shape = [0, 0, 0, 0, 0];
  for (const f of [...above, ...below.map((b) => ({ ...b, exponent: -b.exponent }))]) {
    if (f.symbol.reference)
      return { ok: false, code: 'quantity/reference-in-compound', at: f.at, found: f.name };
    factor = times(factor, power(f.symbol.factor, f.exponent));
    shape = addShape(shape, f.symbol.shape, f.exponent);
  }
  return { ok: true, text, factor, shape };
}

/** What stands behind a complete unit: a second slash, a pressure mark set apart, or something that does not belong. */
function leftOver(text: string, start: number, at: number): UnitFault {
  const found = text.slice(at, at + 1);
  const parts = text.slice(start).split('/');
  if (match(SLASH, text, at)) {
    const near = `${parts[0]?.trim()}/(${parts.slice(1).join(' ')})`;
    const fault: UnitFault = { ok: false, code: 'quantity/second-slash', at, found };
    return parts.length < 5 && !/[()]/.test(parts.join('')) && readUnit(near).ok ? { ...fault, near } : fault;
  }
  const mark = match(APART, text, at)?.[1];
  const near = mark === undefined ? undefined : text.slice(start, at) + mark;
  const fault: UnitFault = { ok: false, code: 'quantity/unit-syntax', at, found };
  return near !== undefined && SYMBOLS.has(near) ? { ...fault, near } : fault;
}

/**
 * Reads a unit of measure from `start` to the end of the text.
 *
 * A space or raised dot multiplies, one slash (spaces around it or not) divides, brackets hold several factors below it, `^` may stand before an
 * exponent. Inside a compound unit a degree counts as a difference.
 *
 * @returns the unit, or the place and kind of the first fault
 */
export function readUnit(text: string, start = 0): UnitOfMeasure | UnitFault {
  const above = readProduct(text, start);
  if ('ok' in above) return above;
  let below: Factor[] = [];
  let next = above.next;
  const slash = match(SLASH, text, next)?.[0];
  if (slash !== undefined) {
    const read = readBelow(text, next + slash.length, above.factors);
    if ('ok' in read) return read;
    below = read.factors;
    next = read.next;
  }
  if (next < text.length) return leftOver(text, start, next);
  return combine(above.factors, below);
}
