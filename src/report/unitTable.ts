import { show } from '../quantity';
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
              [columnText(input, unit), resultText(input, unit, result?.results)].filter(Boolean).join('; '),
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
      const isHeat = /duty_W$/i.test(key);
      const { number: figure, unit: label } = show(isHeat ? Math.abs(value) : value, word.dim, measures);
      const way = isHeat && value !== 0 ? `, ${value < 0 ? 'removed' : 'added'}` : '';
      return [`${word.label}${way} ${figure}${label ? ` ${label}` : ''}`];
    })
    .join('; ');
}
