import { type BoxIndex, grown } from './boxes';
import { measureText, numberRoom } from './metrics';
import { TEXT } from './tokens';
import type { Box, Ink, Point, TextShape } from './types';

const GAP = 8;
const CLEAR = 2;

export interface TextPlace {
  readonly text: TextShape;
  readonly box: Box;
}

/** Room for any duty: letter, seven figures and unit. The digits have no say in where it stands. */
const dutyRoom = (text: string): number => {
  const unit = text.slice(text.lastIndexOf(' ') + 1);
  return measureText('Q ', TEXT.duty) + numberRoom(TEXT.duty) + measureText(` ${unit}`, TEXT.duty);
};

/** A text beside a point: right of it, left, below, above; the first that is free. */
function beside(
  [x, y]: Point,
  text: string,
  style: { readonly size: number; readonly ink: Ink; readonly room: number },
  order: readonly ('right' | 'left' | 'below' | 'above')[],
  taken: BoxIndex,
  away: Point,
): TextPlace {
  const { size, ink, room } = style;
  const h = size + 2;
  const [dx, dy] = away;
  const boxes: Readonly<
    Record<(typeof order)[number], { readonly box: Box; readonly anchor: TextShape['anchor'] }>
  > = {
    right: { box: { x: x + dx, y: y - h / 2, w: room, h }, anchor: 'start' },
    left: { box: { x: x - dx - room, y: y - h / 2, w: room, h }, anchor: 'end' },
    below: { box: { x: x - room / 2, y: y + dy, w: room, h }, anchor: 'middle' },
    above: { box: { x: x - room / 2, y: y - dy - h, w: room, h }, anchor: 'middle' },
  };
  const side = order.find((s) => !taken.hits(grown(boxes[s].box, CLEAR))) ?? order[0]!;
  const { box, anchor } = boxes[side];
  const tx = anchor === 'start' ? box.x : anchor === 'end' ? box.x + box.w : box.x + box.w / 2;
  const shape: TextShape = {
    at: [tx, box.y + size * 0.86],
    text,
    size,
    weight: 400,
    anchor,
    ink,
    halo: true,
  };
  return { text: shape, box };
}

/**
 * The duty at the ring of a heat link.
 *
 * @param along direction of the link away from its unit
 */
export const placeDuty = (text: string, ring: Point, along: Point, taken: BoxIndex): TextPlace =>
  beside(
    ring,
    text,
    { size: TEXT.duty, ink: 'ink3', room: dutyRoom(text) },
    along[0] < 0 ? ['left', 'below', 'above', 'right'] : ['right', 'left', 'below', 'above'],
    taken,
    [GAP, GAP - 2],
  );

/** The name of a flag that stands upright, beside it. */
export const placeName = (text: string, box: Box, taken: BoxIndex): TextPlace =>
  beside(
    [box.x + box.w / 2, box.y + box.h / 2],
    text,
    { size: TEXT.flag, ink: 'ink', room: measureText(text, TEXT.flag) },
    ['right', 'left', 'below', 'above'],
    taken,
    [box.w / 2 + 6, box.h / 2 + 6],
  );
