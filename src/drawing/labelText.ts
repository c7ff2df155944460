import type { StreamResult, UnitResult } from '../engine/network/types';
import { CATALOGUE } from '../engine/units/catalogue';
import type { KindCatalogue } from '../engine/units/types';
import { type Dimension, displayUnit, formatNumber, type Measures, show } from '../quantity';
import type { LabelKey, SketchUnit } from '../sketch/types';
import type { LabelRow, LinkTexts, Omitted } from './types';

export type SolvedStream = Extract<StreamResult, { state: 'solved' }>;

interface LabelSpec {
  readonly dim: Dimension;
  readonly word: string;
  readonly of: (stream: SolvedStream) => number;
  /** Shown behind a pure number. */
  readonly unit?: string;
}

/** What a label may show: which result, what it measures, its word in the title strip. */
export const LABEL_SPECS: Readonly<Record<LabelKey, LabelSpec>> = {
  molarFlow: { dim: 'molarFlow', word: 'flow', of: (s) => s.n_mol_s },
  massFlow: { dim: 'massFlow', word: 'mass flow', of: (s) => s.m_kg_s },
  temperature: { dim: 'temperature', word: 'temperature', of: (s) => s.T_K },
  pressure: { dim: 'pressure', word: 'pressure', of: (s) => s.P_Pa },
  vapourFraction: { dim: 'fraction', word: 'vapour fraction', of: (s) => s.vapourFraction, unit: 'mol/mol' },
  enthalpyFlow: { dim: 'power', word: 'enthalpy flow', of: (s) => s.H_W },
  volumeFlow: { dim: 'volumeFlow', word: 'volume flow', of: (s) => s.volume_m3_s },
};

/** A stream's label: one row for each chosen quantity, four significant figures. */
export function labelRows(
  stream: SolvedStream,
  keys: readonly LabelKey[],
  measures: Measures,
): readonly LabelRow[] {
  return keys.map((key) => {
    const spec = LABEL_SPECS[key];
    const shown = show(spec.of(stream), spec.dim, measures);
    return { number: shown.number, unit: shown.unit || (spec.unit ?? '') };
  });
}

/** "Q 1 307 kW" beside a heat link: heat by its size, its direction is drawn. */
export const dutyText = (heat_W: number, measures: Measures): string => {
  const { number, unit } = show(Math.abs(heat_W), 'power', measures);
  return `Q ${number} ${unit}`;
};

/** "W 0.693 kW" beside a shaft link. */
export const powerText = (power_W: number, measures: Measures): string => {
  const { number, unit } = show(Math.abs(power_W), 'power', measures);
  return `W ${number} ${unit}`;
};

const numberIn = (results: UnitResult['results'], key: string): number | undefined => {
  const value = results?.[key];
  return typeof value === 'number' ? value : undefined;
};

/**
 * What stands beside the links of a solved unit, by their names: a column's condenser and reboiler each have their own duty,
 * what turns has its shaft power, all else its duty.
 */
export function linkTexts(
  kind: string,
  result: Pick<UnitResult, 'heat_W' | 'power_W' | 'results'>,
  measures: Measures,
  kinds: Readonly<Record<string, Pick<KindCatalogue, 'group'>>> = CATALOGUE,
): LinkTexts {
  if (kinds[kind]?.group === 'rotating') {
    return result.power_W === undefined ? {} : { shaft: powerText(result.power_W, measures) };
  }
  const texts: Record<string, string> = {};
  for (const [name, key] of [
    ['condenser', 'condenserDuty_W'],
    ['reboiler', 'reboilerDuty_W'],
  ] as const) {
    const duty_W = numberIn(result.results, key);
    if (duty_W !== undefined) texts[name] = dutyText(duty_W, measures);
  }
  if (result.heat_W !== undefined) texts.heat = dutyText(result.heat_W, measures);
  return texts;
}

/** Lines under the tag of a unit with stages: how many, and the reflux ratio of a solved one with a condenser. */
export function remarksOf(
  unit: Pick<SketchUnit, 'kind' | 'settings'>,
  result: Pick<UnitResult, 'results'> | undefined,
): readonly string[] {
  if (unit.kind !== 'column') return [];
  const { stages } = unit.settings;
  const rows: string[] = [];
  if (typeof stages === 'number') rows.push(`${stages} ${stages === 1 ? 'stage' : 'stages'}`);
  const ratio = numberIn(result?.results, 'refluxRatio');
  if (ratio !== undefined) rows.push(`reflux ${formatNumber(ratio)}`);
  return rows;
}

/** "Labels: flow kmol/h, temperature °C, pressure bar(a)" */
export function labelsSentence(keys: readonly LabelKey[], measures: Measures): string {
  if (keys.length === 0) return 'Labels: none';
  const words = keys.map((key) => {
    const spec = LABEL_SPECS[key];
    return `${spec.word} ${displayUnit(spec.dim, measures).label || (spec.unit ?? '')}`.trim();
  });
  return `Labels: ${words.join(', ')}`;
}

const OMITTED_WORDS = { label: 'label', tag: 'tag', remark: 'note', duty: 'duty' } as const;
const PLURALS = { label: 'labels', tag: 'tags', remark: 'notes', duty: 'duties' } as const;

/** "2 labels and 1 duty have no room here", what the sheet leaves off; empty when all of it has room. */
export function omittedSentence(omitted: readonly Omitted[]): string {
  if (omitted.length === 0) return '';
  const words = (['label', 'tag', 'remark', 'duty'] as const).flatMap((what) => {
    const count = omitted.filter((one) => one.what === what).length;
    return count === 0 ? [] : [`${count} ${count === 1 ? OMITTED_WORDS[what] : PLURALS[what]}`];
  });
  const last = words.pop();
  const list = words.length === 0 ? last : `${words.join(', ')} and ${last}`;
  return `${list} ${omitted.length === 1 ? 'has' : 'have'} no room here`;
}
