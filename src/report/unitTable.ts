import type { UnitResult } from '../engine/network/types';
import { inPercent, type Measures, show } from '../quantity';
import type { SketchUnit } from '../sketch/types';
import { fixedByText, kindWord, stagesText, stateWord } from '../wording';
import { left, text } from './cells';
import { measuresOf, type ReportInput } from './input';
import type { Row, Table } from './types';
import { resultWord } from './words';

/** Every drawn unit: state, and in words what its kind reports; a column with its stages and what fixed it. */
export function unitTable(input: ReportInput): Table {
  return {
    key: 'units',
    title: 'Units',
    columns: [
      left('kind', 'Kind'),
      left('name', 'Service'),
      left('state', 'State'),
      left('results', 'Settings in words and results'),
    ],
    rows: input.sketch.units
      .filter((unit) => unit.kind !== 'feed' && unit.kind !== 'product')
      .map((unit): Row => {
        const result = input.units.get(unit.id);
        return {
          key: unit.id,
          label: unit.tag,
          ...(unit.kind === 'column' ? { link: `column.${unit.id}` } : {}),
          cells: [
            text(kindWord(unit.kind, unit.settings.service)),
            text(unit.name ?? ''),
            text(stateWord(result?.state ?? 'waiting')),
            text(
              [columnText(input, unit), heatText(input, result), resultText(input, unit, result?.results)]
                .filter(Boolean)
                .join('; '),
            ),
          ],
        };
      }),
    notes: ['No design margin included.'],
  };
}

function columnText(input: ReportInput, unit: SketchUnit): string {
  if (unit.kind !== 'column') return '';
  const { sketch, basis } = input;
  const fixed = fixedByText(unit.settings, {
    number: (id) => sketch.streams.find((stream) => stream.id === id)?.number,
    chemical: (id) => basis.chemicals.find((chemical) => chemical.id === id)?.name ?? id,
  });
  return `${stagesText(unit.settings)}; fixed by ${fixed || 'feeds, stages and pressures alone'}`;
}

const isDuty = (key: string): boolean => /duty_W$/i.test(key);

/** The heat of a unit whose kind reports no duty of its own. */
function heatText(input: ReportInput, result: UnitResult | undefined): string {
  if (result?.state !== 'solved' || !result.heat_W || Object.keys(result.results ?? {}).some(isDuty))
    return '';
  return heatWords('duty', result.heat_W, measuresOf(input));
}

function heatWords(label: string, heat_W: number, measures: Measures): string {
  const { number: figure, unit } = show(Math.abs(heat_W), 'power', measures);
  return `${label}${heat_W === 0 ? '' : `, ${heat_W < 0 ? 'removed' : 'added'}`} ${figure} ${unit}`;
}

/** "condenser duty, removed 540.6 kW": heat by its size, its direction in a word. */
function resultText(
  input: ReportInput,
  unit: SketchUnit,
  results: Readonly<Record<string, unknown>> | undefined,
): string {
  if (!results) return '';
  const measures = measuresOf(input);
  return Object.entries(results)
    .flatMap(([key, value]) => {
      const word = resultWord(unit.kind, key, input.kinds);
      if (!word || typeof value !== 'number') return [];
      if (isDuty(key)) return [heatWords(word.label, value, measures)];
      const { number: figure, unit: label } = show(
        value,
        word.dim,
        word.percent ? inPercent(measures) : measures,
      );
      return [`${word.label} ${figure}${label ? ` ${label}` : ''}`];
    })
    .join('; ');
}
