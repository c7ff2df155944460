import type { Evidence, Finding, Place, Weight } from '../engine/outcome';
import type { Dimension } from '../quantity/dimension';

/** Codes that the document and its compile step may emit; the sentences live in wording/. */
export const SKETCH_FINDINGS = [
  // something is missing
  'sketch/needs-value',
  'sketch/needs-one-of',
  'sketch/needs-inlet',
  'sketch/needs-outlet',
  'sketch/needs-source',
  'sketch/needs-site-pressure',
  'sketch/no-chemicals',
  // something does not fit
  'sketch/wrong-type',
  'sketch/not-a-quantity',
  'sketch/below-minimum',
  'sketch/above-maximum',
  'sketch/too-many',
  'sketch/too-few',
  'sketch/not-together',
  'sketch/without-meaning',
  'sketch/unknown-setting',
  'sketch/unknown-option',
  'sketch/unknown-chemical',
  'sketch/unknown-stream',
  'sketch/unknown-port',
  'sketch/negative-part',
  'sketch/parts-sum',
  'sketch/parts-sum-near',
  'sketch/chemical-not-in-bank',
  'sketch/chemical-lacks',
  'sketch/correlation-not-usable',
  'sketch/formula-not-read',
  'sketch/pair-not-read',
  'sketch/gauge-at-site',
  'sketch/unknown-limit',
  // not in this version
  'sketch/kind-not-available',
  'sketch/model-not-available',
  // noted
  'sketch/parts-normalised',
  'sketch/no-standard-entropy',
  'sketch/loose-end',
  'sketch/setting-of-unused-port',
  'sketch/migrated',
  'sketch/stream-added',
  'sketch/stream-without-ends',
  'sketch/label-not-available',
  'sketch/repeated-pair',
  'sketch/pair-unused',
  'sketch/parts-removed',
  'sketch/reference-lost',
  'sketch/chemical-differs',
] as const;

export type SketchCode = (typeof SKETCH_FINDINGS)[number];

/** A number seen [SI], for a sentence's slot. */
export const evidence = (name: string, value: number, dim: Dimension = 'number', text?: string): Evidence =>
  text === undefined ? { name, value, dim } : { name, value, dim, text };

/** Evidence that is a word: a key, an id, what was typed. */
export const word = (name: string, text: string): Evidence => ({ name, value: 0, dim: 'number', text });

/** A finding of the document or its compile step. */
export const finding = (
  code: SketchCode,
  weight: Weight,
  at: Place,
  ...what: readonly Evidence[]
): Finding => ({ code, weight, at, evidence: what });
