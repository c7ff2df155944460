import { formatDecimals, formatDifference, MINUS, plainNumber, THIN_SPACE } from '../quantity';
import type { Cell } from './types';

export const text = (value: string, style: { bold?: boolean; muted?: boolean } = {}): Cell => ({
  is: 'text',
  text: value,
  ...style,
});
export const absent: Cell = { is: 'absent' };
export const number = (value: number | undefined, decimals: number, bold = false): Cell =>
  value === undefined || !Number.isFinite(value)
    ? absent
    : { is: 'number', value, decimals, ...(bold ? { bold } : {}) };

/** A difference that should be nothing: what counts is its size. */
export const difference = (value: number): Cell => ({ is: 'number', value, decimals: 0, power: true });

/** As printed: fixed decimals, '–' for absent, '<0.01' for a trace. */
export function printed(cell: Cell): string {
  if (cell.is === 'absent') return '–';
  if (cell.is === 'text') return cell.text;
  return cell.power ? formatDifference(cell.value) : formatDecimals(cell.value, cell.decimals);
}

/** The number a reader of the printed page would take from it; a trace counts as nothing. */
export function printedValue(cell: Cell): number {
  if (cell.is !== 'number') return 0;
  const figures = printed(cell).replaceAll(THIN_SPACE, '').replace(MINUS, '-');
  return Number(figures) || 0;
}

/** Heads of a column of words and of a column of figures. */
export const left = (key: string, head: string) => ({ key, head, align: 'left' as const });
export const right = (key: string, head: string) => ({ key, head, align: 'right' as const });

/** For CSV: every digit. */
export function full(cell: Cell): string {
  if (cell.is === 'absent') return '';
  return cell.is === 'text' ? cell.text : plainNumber(cell.value);
}

/**
 * Decimals for a printed row: enough for `figures` significant figures of the largest value, within bounds.
 * Fixed for the whole row, so that a column of figures can be compared.
 */
export function decimalsFor(
  values: readonly (number | undefined)[],
  figures: number,
  least: number,
  most: number,
): number {
  let largest = 0;
  for (const value of values)
    if (value !== undefined && Number.isFinite(value)) largest = Math.max(largest, Math.abs(value));
  if (largest === 0) return least;
  const wanted = figures - 1 - Math.floor(Math.log10(largest));
  return Math.min(most, Math.max(least, wanted));
}
