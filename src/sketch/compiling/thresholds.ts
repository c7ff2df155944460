import type { Finding } from '../../engine/outcome';
import { type Dimension, parseQuantity } from '../../quantity';
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

/** Thresholds that the sketch overrides, by finding code [SI], each in its own dimension. An unknown code is told. */
export function readThresholds(limits: Sketch['limits'], known: readonly Threshold[]): ThresholdsRead {
  const out: [string, number][] = [];
  const gaps: Finding[] = [];
  for (const [code, typed] of Object.entries(limits ?? {})) {
    const at = { path: `limits.${code}` };
    const rule = known.find((r) => r.code === code);
    if (!rule) {
      gaps.push(finding('sketch/unknown-limit', 'caution', at, word('code', code)));
      continue;
    }
    const parsed = parseQuantity(typed, rule.dim);
    if (parsed.ok) out.push([code, parsed.si]);
    else
      gaps.push(finding('sketch/not-a-quantity', 'caution', at, ...refusalEvidence(String(typed), parsed)));
  }
  return { limits: Object.fromEntries(out), gaps };
}
