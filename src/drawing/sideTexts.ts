import type { BoxIndex } from './boxes';
import { measureText, numberRoom } from './metrics';
import { distanceTo } from './near';
import { TEXT } from './tokens';
import type { Box, Ink, Point, TextShape } from './types';

const GAP = 8;
const CLEAR = 2;
/** A duty is nearer to its own link's end than to another by this [px]. */
const NEARER = 6;

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

/** Room for a remark whose digits may change [px]. */
export const remarkRoom = (rows: readonly string[]): number =>
  Math.ceil(Math.max(0, ...rows.map((row) => measureText(row, TEXT.label))) / 8) * 8;

type Beside = 'right' | 'left' | 'below' | 'above';

/** Sideways steps when the place right beside the point is taken [px]. */
const SLIDES = [0, 10, -10, 20, -20, 32, -32] as const;

interface Style {
  readonly size: number;
  readonly ink: Ink;
  /** Width that is kept for the text [px]. */
  readonly room: number;
  /** Distance from the point, across and down [px]. */
  readonly gap: Point;
}

const ANCHORS: Readonly<Record<Beside, TextShape['anchor']>> = {
  right: 'start',
  left: 'end',
  below: 'middle',
  above: 'middle',
};

/** Texts beside a point: right of it, left, below, above in the order asked for, then the same with a slide along. */
function* besides(
  [x, y]: Point,
  text: string,
  style: Style,
  order: readonly Beside[],
  k: number,
): Generator<TextPlace> {
  const { size, ink } = style;
  const [room, h] = [style.room * k, (size + 2) * k];
  const [dx, dy] = style.gap;
  for (const slide of SLIDES) {
    for (const side of order) {
      const by = slide * k;
      const box: Box =
        side === 'right' || side === 'left'
          ? { x: side === 'right' ? x + dx : x - dx - room, y: y - h / 2 + by, w: room, h }
          : { x: x - room / 2 + by, y: side === 'below' ? y + dy : y - dy - h, w: room, h };
      const anchor = ANCHORS[side];
      const tx = anchor === 'start' ? box.x : anchor === 'end' ? box.x + box.w : box.x + box.w / 2;
      const at: Point = [tx, box.y + size * 0.86 * k];
      yield { text: { at, text, size, weight: 400, anchor, ink, halo: true }, box };
    }
  }
}

/**
 * The duty at the ring of a heat link; its text is left open.
 *
 * @param room  width that is kept for it at 100 % [px]
 * @param along direction of the link away from its unit
 * @param rings the outer ends of all links: a duty is nearer to its own than to another
 * @param own   the owner of its ring
 * @param scale how much larger than at 100 % texts are [-]
 * @returns undefined when there is no room
 */
export function placeDuty(
  room: number,
  ring: Point,
  along: Point,
  taken: BoxIndex,
  rings: BoxIndex,
  own: unknown,
  scale: number,
): TextPlace | undefined {
  const style: Style = {
    size: TEXT.duty,
    ink: 'ink3',
    room,
    gap: [GAP + 2 * (scale - 1), GAP - 2 + 2 * (scale - 1)],
  };
  const order: readonly Beside[] =
    along[0] < 0 ? ['left', 'below', 'above', 'right'] : ['right', 'left', 'below', 'above'];
  for (const place of besides(ring, '', style, order, scale)) {
    if (taken.hits(place.box, CLEAR * scale)) continue;
    if (!rings.hits(place.box, distanceTo(place.box, ring) + NEARER * scale, own)) return place;
  }
  return undefined;
}

/** The name of a flag that stands upright, beside it, or a little further away; undefined when there is no room. */
export function placeName(text: string, box: Box, taken: BoxIndex): TextPlace | undefined {
  const middle: Point = [box.x + box.w / 2, box.y + box.h / 2];
  const room = measureText(text, TEXT.flag);
  for (const far of [6, 16, 28]) {
    const gap: Point = [box.w / 2 + far, box.h / 2 + far];
    const style: Style = { size: TEXT.flag, ink: 'ink', room, gap };
    for (const place of besides(middle, text, style, ['right', 'left', 'below', 'above'], 1)) {
      if (!taken.hits(place.box, CLEAR)) return place;
    }
  }
  return undefined;
}
