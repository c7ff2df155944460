import type { Dimension } from './dimension';
import { fromText, ONE, plus, type Ratio, times, toDouble } from './exact';
import { readNumber } from './number';
import type { Refusal, UnitFault } from './refusal';
import { SHAPES, sameShape } from './shapes';
import { suggestedUnits } from './suggest';
import { STANDARD_ATMOSPHERE_Pa } from './symbols';
import { readUnit, type UnitOfMeasure } from './unit';

/** Where the sketch stands: gauge pressures count from the site's. */
export interface Site {
  readonly P_Pa: number;
}

/** A quantity as read: SI value and dimension, and what was typed. */
export interface ParsedQuantity {
  readonly ok: true;
  /** In the SI unit of `dim`. */
  readonly si: number;
  readonly dim: Dimension;
  /** As typed, in one spelling ("degC", "J/(mol K)"); empty for a bare number. */
  readonly unit: string;
  /** The digits as typed. */
  readonly number: string;
  /** True when the site pressure was added. */
  readonly gauge?: boolean;
}

/** The site when nothing is said of it: standard atmosphere. */
export const STANDARD_SITE: Site = { P_Pa: STANDARD_ATMOSPHERE_Pa };

const NO_UNIT: UnitOfMeasure = { ok: true, text: '', factor: ONE, shape: SHAPES.number };
const BLANK = /[\s\u00a0\u2009\u202f]/;

/** The text taken apart before any conversion. `unitAt` is where the unit begins (end of the text when there is none). */
export interface TakenApart {
  readonly ok: true;
  readonly typed: string;
  readonly plain: string;
  readonly numberAt: number;
  readonly unitAt: number;
  readonly unit: UnitOfMeasure;
}

/** Splits a text in number and unit, whatever they measure. */
export function takeApart(text: string): TakenApart | UnitFault {
  let numberAt = 0;
  while (numberAt < text.length && BLANK.test(text.charAt(numberAt))) numberAt += 1;
  const whole = text.trimEnd();
  if (whole.length <= numberAt) return { ok: false, code: 'quantity/empty', at: 0, found: '' };
  const number = readNumber(whole, numberAt);
  if (!number.ok) return number;
  let unitAt = number.next;
  while (unitAt < whole.length && BLANK.test(whole.charAt(unitAt))) unitAt += 1;
  if (/\d/.test(whole.charAt(unitAt))) {
    return {
      ok: false,
      code: 'quantity/digit-grouping',
      at: numberAt,
      found: whole.slice(numberAt, unitAt + 1),
    };
  }
  const unit = unitAt < whole.length ? readUnit(whole, unitAt) : NO_UNIT;
  if (!unit.ok) return unit;
  return { ok: true, typed: number.typed, plain: number.plain, numberAt, unitAt, unit };
}

/** Which of the wanted dimensions this unit measures, or why none. */
export function measuredBy(unit: UnitOfMeasure, dims: readonly Dimension[]): Dimension | Refusal['code'] {
  const fitting = dims.filter((d) => sameShape(SHAPES[d], unit.shape));
  const dim = fitting.find((d) => unit.reference === undefined || d === 'pressure');
  if (dim !== undefined) return dim;
  if (fitting.length > 0) return 'quantity/drop-has-no-reference';
  if (unit.text === '') return 'quantity/no-unit';
  const flow = dims.includes('molarFlow') || dims.includes('massFlow');
  return flow && sameShape(SHAPES.volumeFlow, unit.shape)
    ? 'quantity/volume-flow'
    : 'quantity/wrong-dimension';
}

/** The number in SI, exactly: offset for an absolute temperature, site pressure for a gauge pressure. */
export function exactSi(number: Ratio, unit: UnitOfMeasure, dim: Dimension, site: Site): Ratio {
  const shifted = dim === 'temperature' && unit.zero ? plus(number, unit.zero) : number;
  const si = times(shifted, unit.factor);
  return unit.reference === 'gauge' ? plus(si, fromText(String(site.P_Pa))) : si;
}

/**
 * Reads "number unit" as one of the wanted dimensions.
 *
 * The conversion is exact and rounded once, so equal text, and equal quantities in different units, give equal bits.
 * Where several dimensions share a unit (bar, K) the first wanted one counts. Nothing is cached.
 *
 * @param text  what was typed; a bare number only where a dimensionless one is wanted
 * @param dims  the dimension, or those that are acceptable
 * @param site  site pressure [Pa, absolute] for gauge units; 101325 Pa when absent
 * @returns the quantity, or a refusal with code, place and units that fit; never NaN, never a throw for user's text
 */
export function parseQuantity(
  text: string | number,
  dims: Dimension | readonly Dimension[],
  site: Site = STANDARD_SITE,
): ParsedQuantity | Refusal {
  const wanted = typeof dims === 'string' ? [dims] : dims;
  const typed = typeof text === 'number' ? String(text) : text;
  const refuse = (fault: Omit<UnitFault, 'ok'>, fits = suggestedUnits(wanted)): Refusal => ({
    ...fault,
    ok: false,
    fits,
  });
  const parts = takeApart(typed);
  if (!parts.ok) return refuse(parts);
  const { unit, unitAt } = parts;
  const found = typed.slice(unitAt).trimEnd();
  const dim = measuredBy(unit, wanted);
  if (dim === 'quantity/volume-flow')
    return refuse({ code: dim, at: unitAt, found }, waysToSayFlow(unit.text));
  if (dim === 'quantity/drop-has-no-reference') {
    return refuse({ code: dim, at: unitAt, found, near: unit.text.replace(/\([ag]\)$|[ag]$/, '') });
  }
  if (isCode(dim)) return refuse({ code: dim, at: unitAt, found });
  const exact = exactSi(fromText(parts.plain), unit, dim, site);
  const si = toDouble(exact);
  const lost = si === 0 && exact.n !== 0n;
  if (!Number.isFinite(si) || lost)
    return refuse({ code: 'quantity/out-of-range', at: parts.numberAt, found: parts.typed });
  if (dim === 'temperature' && si < 0)
    return refuse({ code: 'quantity/below-absolute-zero', at: parts.numberAt, found: parts.typed });
  if (dim === 'pressure' && si < 0)
    return refuse({ code: 'quantity/below-vacuum', at: parts.numberAt, found: parts.typed });
  const quantity: ParsedQuantity = { ok: true, si, dim, unit: unit.text, number: parts.typed };
  return unit.reference === 'gauge' ? { ...quantity, gauge: true } : quantity;
}

const isCode = (x: Dimension | Refusal['code']): x is Refusal['code'] => x.startsWith('quantity/');

/** A volume per time says a flow only with conditions: amount, mass, or gas volume at a reference state instead. */
function waysToSayFlow(unit: string): readonly string[] {
  const per = unit.split('/')[1] ?? 'h';
  return unit.startsWith('ft')
    ? [`lbmol/${per}`, `lb/${per}`, `scf/${per}`]
    : [`kmol/${per}`, `kg/${per}`, `Nm3/${per}`];
}

/** Whether a unit text, without a number, can be used for a dimension: undefined when it can, else why not. */
export function unitRefusal(unit: string, dim: Dimension): Refusal | undefined {
  const fits = suggestedUnits(dim);
  const read = unit === '' ? NO_UNIT : readUnit(unit);
  if (!read.ok) return { ...read, fits };
  const measured = measuredBy(read, [dim]);
  return isCode(measured) ? { ok: false, code: measured, at: 0, found: unit, fits } : undefined;
}
