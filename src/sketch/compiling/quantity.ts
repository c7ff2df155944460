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
  range: { readonly min?: number; readonly max?: number } = {},
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
  if (range.min !== undefined && si < range.min)
    return gap(
      scope,
      'sketch/below-minimum',
      path,
      evidence('value', si, dim),
      evidence('minimum', range.min, dim),
    );
  if (range.max !== undefined && si > range.max)
    return gap(
      scope,
      'sketch/above-maximum',
      path,
      evidence('value', si, dim),
      evidence('maximum', range.max, dim),
    );
  return parsed;
}

/** Null and empty text count as not given. */
export const isGiven = (value: Json | undefined): value is Json =>
  value !== undefined && value !== null && !(typeof value === 'string' && value.trim() === '');
