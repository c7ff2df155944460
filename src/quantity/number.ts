import type { UnitFault } from './refusal';

/** A number at the start of a text, and where the rest begins. `plain` is the same number in ASCII. */
export interface ScannedNumber {
  readonly ok: true;
  readonly typed: string;
  readonly plain: string;
  readonly next: number;
}

const NUMBER = /[+\-−]?(?:\d+\.?\d*|\.\d+)(?:[eE][+\-−]?\d+)?/y;
const COMMA_GROUPS = /[+\-−]?\d{1,3}(?:,\d{3})+(?:\.\d+)?(?![\d,])/y;
const OTHER_GROUPS = /[+\-−]?\d+(?:[ \u00a0\u2009\u202f'’_]+\d+)+(?:\.\d+)?/y;
const COMMA = /[+\-−]?(?:\d+,\d*|,\d+)/y;

/** Powers of ten beyond this are refused unread: no quantity needs them and the digits would fill the memory. */
const LARGEST_POWER = 300;
const MOST_FIGURES = 400;

const at = (pattern: RegExp, text: string, start: number): string | undefined => {
  pattern.lastIndex = start;
  return pattern.exec(text)?.[0];
};

/**
 * Reads the number that a quantity begins with. `.` is the decimal sign, digits are not grouped, a true minus is as good
 * as a hyphen. Commas and grouped digits are told apart from other faults, because people type them out of habit.
 */
export function readNumber(text: string, start: number): ScannedNumber | UnitFault {
  const grouped = at(COMMA_GROUPS, text, start) ?? at(OTHER_GROUPS, text, start);
  if (grouped !== undefined) {
    const near = grouped.replace(/[^\d.+\-−]/g, '');
    return { ok: false, code: 'quantity/digit-grouping', at: start, found: grouped, near };
  }
  const comma = at(COMMA, text, start);
  if (comma !== undefined) {
    return {
      ok: false,
      code: 'quantity/decimal-comma',
      at: start,
      found: comma,
      near: comma.replace(',', '.'),
    };
  }
  const typed = at(NUMBER, text, start);
  if (typed === undefined) {
    return { ok: false, code: 'quantity/not-a-number', at: start, found: text.slice(start).trimEnd() };
  }
  const next = start + typed.length;
  if (text[next] === '.' || text[next] === ',') {
    return { ok: false, code: 'quantity/not-a-number', at: next, found: text.slice(next, next + 1) };
  }
  const plain = typed.replaceAll('−', '-').replace(/^\+/, '');
  const power = Number(plain.split(/[eE]/)[1] ?? '0');
  if (Math.abs(power) > LARGEST_POWER || typed.length > MOST_FIGURES) {
    return { ok: false, code: 'quantity/out-of-range', at: start, found: typed };
  }
  return { ok: true, typed, plain, next };
}

/** A quantity's outline as a regular expression for a schema: a number, then perhaps a unit. parseQuantity decides. */
export const QUANTITY_PATTERN =
  '^\\s*[+\\-−]?(?:\\d+\\.?\\d*|\\.\\d+)(?:[eE][+\\-−]?\\d+)?(?:\\s*[A-Za-z%°][\\s\\S]*)?\\s*$';
