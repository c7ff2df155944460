import type { Evidence } from '../../engine/outcome';
import { type Dimension, type ParsedQuantity, parseQuantity, type Refusal } from '../../quantity';
import { evidence, word } from '../findings';
import type { Json } from '../types';
import { type GAP, gap, type Scope } from './scope';

/** What a refused text was, why, and what would fit. */
export function refusalEvidence(typed: string, refusal: Refusal): readonly Evidence[] {
  const near = refusal.near === undefined ? [] : [word('near', refusal.near)];
  return [
    word('typed', typed),
    word('why', refusal.code),
    word('found', refusal.found),
    word('fits', refusal.fits.join(', ')),
    ...near,
  ];
}

/**
 * Reads a quantity in one of the wanted dimensions.
 * @returns the parsed quantity in SI, or GAP with the reason among the scope's gaps
 */
export function readQuantity(
  value: Json,
  dims: readonly Dimension[],
  path: string,
  scope: Scope,
  range: Range = {},
): ParsedQuantity | typeof GAP {
  if (typeof value !== 'string' && typeof value !== 'number')
    return gap(scope, 'sketch/wrong-type', path, word('wanted', 'quantity'));
  const site = scope.sitePressure_Pa === undefined ? {} : { site: { P_Pa: scope.sitePressure_Pa } };
  const parsed = parseQuantity(value, dims, site.site);
  if (!parsed.ok) return gap(scope, 'sketch/not-a-quantity', path, ...refusalEvidence(String(value), parsed));
  if (parsed.gauge) {
    scope.usesSitePressure = true;
    if (scope.sitePressure_Pa === undefined) return gap(scope, 'sketch/needs-site-pressure', path);
  }
  const { si, dim } = parsed;
  return outside(si, dim, range, path, scope) ?? parsed;
}

/** What a number may be [SI], its ends included. */
export interface Range {
  readonly min?: number;
  readonly max?: number;
}

/** The gap that a number outside its range leaves; undefined for one inside. */
export function outside(
  si: number,
  dim: Dimension,
  { min, max }: Range,
  path: string,
  scope: Scope,
): typeof GAP | undefined {
  const value = evidence('value', si, dim);
  if (min !== undefined && si < min)
    return gap(scope, 'sketch/below-minimum', path, value, evidence('minimum', min, dim));
  if (max !== undefined && si > max)
    return gap(scope, 'sketch/above-maximum', path, value, evidence('maximum', max, dim));
  return undefined;
}

/** What the fractions of an amount count. */
export const readBasis = (
  basis: Json | undefined,
  path: string,
  scope: Scope,
): 'mole' | 'mass' | typeof GAP =>
  basis === 'mole' || basis === 'mass'
    ? basis
    : gap(scope, 'sketch/unknown-option', path, word('typed', String(basis)), word('known', 'mole, mass'));

/** Null and empty text count as not given. */
export const isGiven = (value: Json | undefined): value is Json =>
  value !== undefined && value !== null && !(typeof value === 'string' && value.trim() === '');
