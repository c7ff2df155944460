import type { Dimension } from '../../../quantity/dimension';
import {
  type Evidence,
  type Finding,
  type FindingCode,
  named,
  type Place,
  saw,
  type Weight,
} from '../../outcome';

/**
 * What a threshold rests on; the words stand in wording/. Figures of named documents that nobody has looked up count as common
 * practice.
 */
export type BasisKey =
  | 'common-practice'
  | 'balance'
  | 'phase-stability'
  | 'melting-points'
  | 'table-range'
  | 'own-rule';

/** One limit as data: its default threshold may be overridden by a sketch, and is printed with its basis. */
export interface Rule {
  readonly code: FindingCode;
  readonly weight: Weight;
  /** Default threshold [SI]. */
  readonly threshold: number;
  readonly dim: Dimension;
  readonly basis: BasisKey;
}

/** Thresholds the sketch overrides, by finding code [SI]. */
export type Overrides = Readonly<Record<string, number>> | undefined;

/** A limit as data: code, weight, default threshold [SI] of a dimension, and what that rests on. */
export const rule = (
  code: FindingCode,
  weight: Weight,
  threshold: number,
  dim: Dimension,
  basis: BasisKey = 'common-practice',
): Rule => ({ code, weight, threshold, dim, basis });

/** The threshold in force [SI]. */
export const thresholdOf = (r: Rule, overrides: Overrides): number => overrides?.[r.code] ?? r.threshold;

/** The finding of a broken rule: what was seen, then the threshold in force ('limit') and the key of its basis ('basis'). */
export const finding = (
  r: Rule,
  at: Place,
  evidence: readonly Evidence[],
  overrides: Overrides,
): Finding => ({
  code: r.code,
  weight: r.weight,
  at,
  evidence: [...evidence, saw('limit', thresholdOf(r, overrides), r.dim), named('basis', r.basis)],
});
