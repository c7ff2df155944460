import { TEXT } from './tokens';
import type { Box, PathShape, Point, TextShape } from './types';

/** Width of the border that holds the zone marks [px]. */
export const BORDER = 16;
export const ZONES_ACROSS = 8;
export const ZONES_DOWN = 6;
const LETTERS = 'ABCDEF';

export interface Frame {
  /** Outer edge. */
  readonly page: Box;
  /** Where the drawing goes. */
  readonly inner: Box;
  readonly paths: readonly PathShape[];
  readonly texts: readonly TextShape[];
}

/** Border of a page with zones 1 to 8 across and A to F down, named at both edges. */
export function frameOf(page: Box): Frame {
  const inner: Box = {
    x: page.x + BORDER,
    y: page.y + BORDER,
    w: page.w - 2 * BORDER,
    h: page.h - 2 * BORDER,
  };
  const right = page.x + page.w;
  const bottom = page.y + page.h;
  const texts: TextShape[] = [];
  const zone = (x: number, y: number, text: string): void => {
    texts.push({ at: [x, y], text, size: TEXT.zone, weight: 400, anchor: 'middle', ink: 'ink3' });
  };
  let ticks = '';
  for (let k = 0; k < ZONES_ACROSS; k++) {
    const middle = inner.x + (inner.w * (k + 0.5)) / ZONES_ACROSS;
    zone(middle, page.y + BORDER / 2 + 3.5, `${k + 1}`);
    zone(middle, bottom - BORDER / 2 + 3.5, `${k + 1}`);
    const edge = inner.x + (inner.w * k) / ZONES_ACROSS;
    if (k > 0) ticks += `M${edge} ${page.y}V${inner.y}M${edge} ${bottom - BORDER}V${bottom}`;
  }
  for (let k = 0; k < ZONES_DOWN; k++) {
    const middle = inner.y + (inner.h * (k + 0.5)) / ZONES_DOWN + 3.5;
    zone(page.x + BORDER / 2, middle, LETTERS[k]!);
    zone(right - BORDER / 2, middle, LETTERS[k]!);
    const edge = inner.y + (inner.h * k) / ZONES_DOWN;
    if (k > 0) ticks += `M${page.x} ${edge}H${inner.x}M${right - BORDER} ${edge}H${right}`;
  }
  const rectangle = (b: Box): string => `M${b.x} ${b.y}H${b.x + b.w}V${b.y + b.h}H${b.x}Z`;
  const border = (d: string, stroke: PathShape['stroke']): PathShape => ({
    d,
    width: 1,
    stroke,
    fill: 'none',
  });
  return {
    page,
    inner,
    paths: [border(rectangle(page), 'rule'), border(ticks, 'rule'), border(rectangle(inner), 'hair')],
    texts,
  };
}

/**
 * The page a sheet is printed on, in sheet px: the smallest one of a given shape that holds the drawing with a margin,
 * the drawing in its middle. Zones belong to this page, so a zone named on the screen is the zone on paper.
 *
 * @param ratio width to height; A3 landscape when absent
 */
export function pageOf(drawing: Box, ratio: number = Math.SQRT2, margin = 40): Box {
  const least = 2 * (margin + BORDER);
  const h = Math.max(drawing.h + least, (drawing.w + least) / ratio, 480);
  const w = h * ratio;
  const x = Math.round(drawing.x + drawing.w / 2 - w / 2);
  const y = Math.round(drawing.y + drawing.h / 2 - h / 2);
  return { x, y, w: Math.round(w), h: Math.round(h) };
}

/** Zone of a point, "C4"; a point beyond the border belongs to the nearest zone. */
export function zoneOf([x, y]: Point, page: Box): string {
  const { inner } = frameOf(page);
  const index = (value: number, from: number, length: number, count: number): number =>
    Math.min(count - 1, Math.max(0, Math.floor(((value - from) / length) * count)));
  const column = index(x, inner.x, inner.w, ZONES_ACROSS);
  return `${LETTERS[index(y, inner.y, inner.h, ZONES_DOWN)]}${column + 1}`;
}
