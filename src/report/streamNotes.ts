import type { StreamId } from '../engine/ids';
import { displayUnit } from '../quantity';
import { absent, printedValue } from './cells';
import { measuresOf, type ReportInput, solvedStream } from './input';
import type { Row, Table } from './types';
import { STANDARD_LIQUID } from './volumeFlows';

/**
 * Largest difference between a printed total and the sum of the printed figures above it, and in which stream it is. No
 * figure is adjusted.
 */
export function roundingDifference(
  rows: readonly Row[],
  stem: 'm' | 'z',
): { readonly value: number; readonly decimals: number; readonly at: number } {
  const parts = rows.filter((row) => row.key.startsWith(`${stem}.`) && row.key !== `${stem}.total`);
  const total = rows.find((row) => row.key === `${stem}.total`);
  let worst = { value: 0, decimals: 2, at: -1 };
  total?.cells.forEach((cell, at) => {
    if (cell.is !== 'number') return;
    const { decimals } = cell;
    const sum = parts.reduce((so, row) => so + printedValue(row.cells[at] ?? absent), 0);
    // Sums of printed decimals carry binary dust: what counts is the last printed place.
    const value = Number(Math.abs(sum - printedValue(cell)).toFixed(decimals));
    worst = value > worst.value ? { value, decimals, at } : { ...worst, decimals };
  });
  return worst;
}

/** What stands under the stream summary: how its figures are meant, and why some are missing. */
export function streamNotes(input: ReportInput, table: Pick<Table, 'columns' | 'rows'>): string[] {
  const has = (key: string): boolean => table.rows.some((row) => row.key === key);
  const site = displayUnit('pressure', measuresOf(input));
  const meanings = [
    'Enthalpy: from the elements at 298.15 K, and from the same components as ideal gas at 25 °C; only differences mean something.',
    `Gauge pressure is above ${site.toDisplay(input.sitePressure_Pa).toPrecision(6)} ${site.label}.`,
    ...(has('normal') ? ['Vapour as ideal gas: the vapour alone (or the dense phase), no liquid.'] : []),
    ...(has('vapour.cpcv') && has('liquid.density')
      ? ['No Cp/Cv of liquids: the model’s own would be some 10 to 40 % off, or it has none.']
      : []),
    '“–” absent, “<0.01” a trace. Decimals are fixed row by row.',
  ];
  return [
    ...sums(input, table),
    meanings.join(' '),
    ...(has('standardLiquid') ? standardLiquidNotes(input, table) : []),
  ];
}

function sums(input: ReportInput, table: Pick<Table, 'columns' | 'rows'>): string[] {
  const said = (stem: 'm' | 'z', unit: string): readonly string[] => {
    if (!table.rows.some((row) => row.key === `${stem}.total`)) return [];
    const { value, decimals, at } = roundingDifference(table.rows, stem);
    return [
      `${value.toFixed(decimals)} ${unit} at most${at >= 0 ? ` (stream ${table.columns[at]?.head})` : ''}`,
    ];
  };
  const found = [...said('z', 'mol %'), ...said('m', displayUnit('massFlow', measuresOf(input)).label)];
  return found.length === 0
    ? []
    : [
        `Sum of printed figures differs by ${found.join(' and by ')}: rounding. Totals come from unrounded values; no figure is adjusted.`,
      ];
}

/** How the standard liquid flow is meant; which chemicals take it from which streams. */
function standardLiquidNotes(input: ReportInput, { columns }: Pick<Table, 'columns'>): string[] {
  const lacking = columns.map(
    ({ key }) => solvedStream(input.streams.get(key as StreamId))?.noStandardLiquid ?? [],
  );
  const byStreams = new Map<string, string[]>();
  input.basis.chemicals.forEach(({ name }, chemical) => {
    const streams = spans(
      columns.map(({ head }) => head),
      lacking.map((list) => list.includes(chemical)),
    );
    if (streams !== '') byStreams.set(streams, [...(byStreams.get(streams) ?? []), name]);
  });
  const reasons = [...byStreams].map(([streams, names]) => `${names.join(', ')} in ${streams}`);
  return [
    `${STANDARD_LIQUID}: ideal mixing of pure liquids; what has no liquid density there is left out below 1e-6 of the mass.${
      reasons.length === 0 ? '' : ` No figure where more of it flows: ${reasons.join('; ')}.`
    }`,
  ];
}

/** "1 to 5, 8, 9": the heads for which it holds, three or more in a row as a span. */
function spans(heads: readonly string[], holds: readonly boolean[]): string {
  const parts: string[] = [];
  for (let k = 0; k < heads.length; k += 1) {
    let end = k;
    while (holds[end]) end += 1;
    const run = heads.slice(k, end);
    if (run.length > 2) parts.push(`${run[0]} to ${run.at(-1)}`);
    else parts.push(...run);
    k = end;
  }
  return parts.join(', ');
}
