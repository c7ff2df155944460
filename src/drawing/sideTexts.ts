import type { BoxIndex } from './boxes';
import { measureText, numberRoom } from './metrics';
import { TEXT } from './tokens';
import type { Box, Ink, Point, TextShape } from './types';

const GAP = 8;
const CLEAR = 2;

export interface TextPlace {
  readonly text: TextShape;
  readonly box: Box;
}

const rooms = new Map<string, number>();

/** Room for any duty: letter, seven figures and unit [px]. The digits have no say in where it stands. */
export function roomOf(duty = '0 kW'): number {
  const unit = duty.slice(duty.lastIndexOf(' ') + 1);
  let room = rooms.get(unit);
  if (room === undefined) {
    room = measureText('W ', TEXT.duty) + numberRoom(TEXT.duty) + measureText(` ${unit}`, TEXT.duty);
    rooms.set(unit, room);
  }
  return room;
}

type Beside = 'right' | 'left' | 'below' | 'above';

/** Sideways steps when the place right beside the point is taken [px]. */
const SLIDES = [0, 10, -10, 20, -20, 32, -32] as const;

/** A text beside a point: right of it, left, below, above; the first that is free, then the same with a slide along. */
function beside(
  [x, y]: Point,
  text: string,
  style: { readonly size: number; readonly ink: Ink; readonly room: number },
  order: readonly Beside[],
  taken: BoxIndex,
  [dx, dy]: Point,
): TextPlace {
  const { size, ink, room } = style;
  const h = size + 2;
  const boxAt = (side: Beside, slide: number): Box => {
    switch (side) {
      case 'right':
        return { x: x + dx, y: y - h / 2 + slide, w: room, h };
      case 'left':
        return { x: x - dx - room, y: y - h / 2 + slide, w: room, h };
      case 'below':
        return { x: x - room / 2 + slide, y: y + dy, w: room, h };
      case 'above':
        return { x: x - room / 2 + slide, y: y - dy - h, w: room, h };
    }
  };
  const anchorOf: Readonly<Record<Beside, TextShape['anchor']>> = {
    right: 'start',
    left: 'end',
    below: 'middle',
    above: 'middle',
  };
  const tries = SLIDES.flatMap((slide) => order.map((side) => ({ side, box: boxAt(side, slide) })));
  const { side, box } = tries.find((t) => !taken.hits(t.box, CLEAR)) ?? tries[0]!;
  const anchor = anchorOf[side];
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
 * The duty at the ring of a heat link; its text is left open.
 *
 * @param room  width that is kept for it [px]
 * @param along direction of the link away from its unit
 */
export const placeDuty = (room: number, ring: Point, along: Point, taken: BoxIndex): TextPlace =>
  beside(
    ring,
    '',
    { size: TEXT.duty, ink: 'ink3', room },
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
