import type { Json, SketchUnit } from '../../sketch/types';
import { WEIGHT } from '../tokens';
import type { LinkData, PathShape, Point, PortPlace, Side, SymbolData } from '../types';

/** What a symbol may depend on: the unit's name, how it is turned, and its settings; never its results. */
export type DrawnUnit = Pick<SketchUnit, 'tag' | 'name' | 'turn' | 'kind'> & {
  readonly settings: { readonly [key: string]: Json };
};
export interface SymbolKind {
  readonly draw: (unit: DrawnUnit) => SymbolData;
  /** Drawn on the shelf instead of the plain symbol. */
  readonly icon?: readonly PathShape[];
}

export const outline = (d: string, fill: 'paper' | 'ink' | 'none' = 'paper'): PathShape => ({
  d,
  width: WEIGHT.outline,
  stroke: 'ink',
  fill,
});

export const detail = (d: string, dash?: string): PathShape => ({
  d,
  width: WEIGHT.detail,
  stroke: 'ink2',
  fill: 'none',
  ...(dash ? { dash } : {}),
});

/** Inner lines that carry the meaning of the symbol: outline weight, no fill. */
export const inner = (d: string): PathShape => ({
  d,
  width: WEIGHT.detail + 0.3,
  stroke: 'ink',
  fill: 'none',
});

export const solid = (d: string): PathShape => ({ d, width: 0, stroke: 'none', fill: 'ink' });

export const circle = (r: number, cx = 0, cy = 0): string =>
  `M${cx - r} ${cy}a${r} ${r} 0 1 1 ${2 * r} 0a${r} ${r} 0 1 1 ${-2 * r} 0Z`;

export const port = (x: number, y: number, side: Side, reach?: number): PortPlace =>
  reach === undefined ? { at: [x, y], side } : { at: [x, y], side, reach };

/** Number behind a stem: 'in3' of stem 'in' is 3; undefined for another name. */
export function numberOf(name: string, stem: string): number | undefined {
  if (!name.startsWith(stem)) return undefined;
  const digits = name.slice(stem.length);
  return /^[1-9]\d*$/.test(digits) ? Number(digits) : undefined;
}

/** Arrowhead with its tip at a point: 9 x 7 for material, smaller for links. */
export function arrowhead([x, y]: Point, [ux, uy]: Point, long: number, half: number): string {
  const [bx, by] = [x - ux * long, y - uy * long];
  return `M${x} ${y}L${bx - uy * half} ${by + ux * half} ${bx + uy * half} ${by - ux * half}Z`;
}

export const RING = 2.6;
/** Half length and distance of the two bars of a shaft link [px]. */
const BAR = 4;
const BARS_APART = 2.6;

/** Two short bars across the outer end of a shaft link. */
function doubleBar([x, y]: Point, [ux, uy]: Point): PathShape {
  const bar = (back: number): string => {
    const [cx, cy] = [x - ux * back, y - uy * back];
    return `M${cx - uy * BAR} ${cy + ux * BAR}L${cx + uy * BAR} ${cy - ux * BAR}`;
  };
  return { d: bar(0) + bar(BARS_APART), width: WEIGHT.link, stroke: 'ink', fill: 'none' };
}

/** Line, end mark (ring or double bar) and arrowhead of a heat or shaft link. */
export function linkShapes(link: Omit<LinkData, 'name'>): {
  readonly line: PathShape;
  readonly marks: readonly PathShape[];
} {
  const [x1, y1] = link.from;
  const [x2, y2] = link.to;
  const length = Math.hypot(x2 - x1, y2 - y1);
  const [ux, uy]: Point = [(x2 - x1) / length, (y2 - y1) / length];
  const shaft = link.carries === 'shaft';
  const marks: PathShape[] = [
    shaft
      ? doubleBar(link.to, [ux, uy])
      : { d: circle(RING, x2, y2), width: WEIGHT.link, stroke: 'ink', fill: 'paper' },
  ];
  const mark = shaft ? BARS_APART : RING;
  let start = 0;
  let end = length - mark;
  if (link.flow === 'in') {
    marks.push(solid(arrowhead(link.from, [-ux, -uy], 7, 3.5)));
    start = 6;
  } else if (link.flow === 'out') {
    const tip = length - mark - 0.5;
    marks.push(solid(arrowhead([x1 + ux * tip, y1 + uy * tip], [ux, uy], 7, 3.5)));
    end = tip - 6;
  }
  const line: PathShape = {
    d: `M${x1 + ux * start} ${y1 + uy * start}L${x1 + ux * end} ${y1 + uy * end}`,
    width: WEIGHT.link,
    stroke: 'ink',
    fill: 'none',
    dash: shaft ? '7 2 1.5 2' : '5 2.5',
  };
  return { line, marks };
}
