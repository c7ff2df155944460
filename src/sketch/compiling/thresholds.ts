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

/** `limits`: overridden thresholds by finding code, in SI of the threshold's dimension. */
export interface ThresholdsRead {
  readonly limits: Readonly<Record<string, number>>;
  readonly gaps: readonly Finding[];
  readonly usesSitePressure: boolean;
}

/**
 * Thresholds that the sketch overrides, by finding code [SI], each in its own dimension. An unknown code is told.
 *
 * @param sitePressure_Pa  gauge thresholds count from it; undefined when the sketch's own cannot be read
 */
export function readThresholds(
  limits: Sketch['limits'],
  known: readonly Threshold[],
  sitePressure_Pa: number | undefined,
): ThresholdsRead {
  const out: [string, number][] = [];
  const gaps: Finding[] = [];
  let usesSitePressure = false;
  const site = sitePressure_Pa === undefined ? undefined : { P_Pa: sitePressure_Pa };
  for (const [code, typed] of Object.entries(limits ?? {})) {
    const at = { path: `limits.${code}` };
    const rule = known.find((r) => r.code === code);
    if (!rule) {
      gaps.push(finding('sketch/unknown-limit', 'caution', at, word('code', code)));
      continue;
    }
    const parsed = parseQuantity(typed, rule.dim, site);
    if (!parsed.ok) {
      gaps.push(finding('sketch/not-a-quantity', 'caution', at, ...refusalEvidence(String(typed), parsed)));
      continue;
    }
    if (parsed.gauge) usesSitePressure = true;
    if (parsed.gauge && !site) gaps.push(finding('sketch/needs-site-pressure', 'caution', at));
    else out.push([code, parsed.si]);
  }
  return { limits: Object.fromEntries(out), gaps, usesSitePressure };
}
