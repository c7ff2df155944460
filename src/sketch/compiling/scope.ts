import type { Port, UnitId } from '../../engine/ids';
import type { Read } from '../../engine/network/types';
import type { Evidence, Finding } from '../../engine/outcome';
import type { KindCatalogue } from '../../engine/units/types';
import { finding, type SketchCode } from '../findings';
import type { JsonObject } from '../json';
import type { Assumption } from '../types';
import type { AirPlaces } from './air';

export type AssumptionDraft = Omit<Assumption, 'no'>;

/** A value that is absent on purpose: the key is left out. */
export const ABSENT = Symbol('absent');
/** A value that is missing or does not fit: the reason is among the gaps. */
export const GAP = Symbol('gap');

/** What a unit's settings are read in, and where reading puts what it noticed. */
export interface Scope {
  readonly unit: UnitId;
  readonly kind: KindCatalogue;
  /** The unit's settings as typed. */
  readonly typed: JsonObject;
  /** Ports that have a stream. */
  readonly ports: readonly Port[];
  /** Index in the full list by chemical id. */
  readonly indexOf: ReadonlyMap<string, number>;
  /** Molar masses over the full list; undefined for a chemical without data [g/mol]. */
  readonly MW_g_mol: readonly (number | undefined)[];
  readonly air: AirPlaces;
  /** Site pressure for gauge units [Pa]; undefined when the sketch's own cannot be read. */
  readonly sitePressure_Pa: number | undefined;
  readonly gaps: Finding[];
  readonly notes: Finding[];
  readonly assumptions: AssumptionDraft[];
  readonly reads: Read[];
  usesSitePressure: boolean;
}

/** Puts a reason on the list and says that there is no value. */
export function gap(
  scope: Scope,
  code: SketchCode,
  path: string,
  ...evidence: readonly Evidence[]
): typeof GAP {
  scope.gaps.push(finding(code, 'caution', { unit: scope.unit, path }, ...evidence));
  return GAP;
}

/** A path one step further inside; the top is the empty path. */
export const under = (path: string, key: string | number): string =>
  path === '' ? String(key) : `${path}.${key}`;
