import type { Finding } from '../../engine/outcome';
import { DIMENSIONS, type Dimension, parseQuantity } from '../../quantity';
import { finding, word } from '../findings';
import type { Sketch } from '../types';
import { refusalEvidence } from './quantity';

/** A threshold that a sketch may override: the code of its finding and what it measures. */
export interface Threshold {
  readonly code: string;
  readonly dim: Dimension;
}

export interface ThresholdsRead {
  readonly limits: Readonly<Record<string, number>>;
  readonly gaps: readonly Finding[];
}

/**
 * Thresholds that the sketch overrides, by finding code [SI]. With the list of thresholds each is read in its own
 * dimension and an unknown code is told; without it a temperature counts as absolute (state a difference in K).
 */
export function readThresholds(
  limits: Sketch['limits'],
  known: readonly Threshold[] | undefined,
): ThresholdsRead {
  const out: [string, number][] = [];
  const gaps: Finding[] = [];
  for (const [code, typed] of Object.entries(limits ?? {})) {
    const at = { path: `limits.${code}` };
    const rule = known?.find((r) => r.code === code);
    if (known && !rule) {
      gaps.push(finding('sketch/unknown-limit', 'caution', at, word('code', code)));
      continue;
    }
    const parsed = parseQuantity(typed, rule ? rule.dim : DIMENSIONS);
    if (parsed.ok) out.push([code, parsed.si]);
    else
      gaps.push(finding('sketch/not-a-quantity', 'caution', at, ...refusalEvidence(String(typed), parsed)));
  }
  return { limits: Object.fromEntries(out), gaps };
}
