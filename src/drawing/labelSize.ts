import { measureText } from './metrics';
import { TEXT } from './tokens';
import type { LabelRow } from './types';

const UNIT_GAP = 4;
/** A typical number: what a label is centred by, though its room is wider. */
const TYPICAL = '00.00';
/** Room is kept for numbers this wide; a wider one takes the next. Four significant figures nearly always fit the first. */
const ROOMS = ['0.0000', '0.000000', '0.000000000', '0.0000000000000'] as const;
/** First baseline below the upper edge of the box [px]. */
const ASCENT = 10;

export interface LabelSize {
  readonly w: number;
  readonly h: number;
  /** Room for the number, before the gap and the unit. */
  readonly number: number;
  /** From the left edge to the middle of what is usually seen. */
  readonly middle: number;
}

/** The least of the rooms that holds a number, as an index. */
export function roomFor(number: string): number {
  const width = measureText(number, TEXT.label);
  const k = ROOMS.findIndex((room) => width <= measureText(room, TEXT.label) + 0.01);
  return k < 0 ? ROOMS.length - 1 : k;
}

/** Size of a label at 100 %: from its units and the count of its rows; digits count only when a number is unusually wide. */
export function labelSize(rows: readonly LabelRow[]): LabelSize {
  const unit = Math.max(0, ...rows.map((row) => measureText(row.unit, TEXT.labelUnit)));
  const room = Math.max(0, ...rows.map((row) => roomFor(row.number)));
  const widest = Math.max(0, ...rows.map((row) => measureText(row.number, TEXT.label)));
  const number = Math.max(measureText(ROOMS[room]!, TEXT.label), room === ROOMS.length - 1 ? widest : 0);
  const seen = measureText(TYPICAL, TEXT.label);
  return {
    w: number + UNIT_GAP + unit,
    h: rows.length * TEXT.labelLine,
    number,
    middle: number - seen + (seen + UNIT_GAP + unit) / 2,
  };
}

export const scaledSize = ({ w, h, number, middle }: LabelSize, k: number): LabelSize =>
  k === 1 ? { w, h, number, middle } : { w: w * k, h: h * k, number: number * k, middle: middle * k };

/** Where the rows of a label stand in its box. */
export const rowsIn = (
  box: { readonly x: number; readonly y: number },
  size: LabelSize,
): { readonly numberRight: number; readonly unitLeft: number; readonly baseline: number } => ({
  numberRight: box.x + size.number,
  unitLeft: box.x + size.number + UNIT_GAP,
  baseline: box.y + ASCENT,
});
