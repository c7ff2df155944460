import type { PathShape, PortPlace, SymbolData } from '../types';
import { circle, numberOf, port, solid } from './shapes';

const R = 4;
const SIDES: readonly PortPlace[] = [
  port(-8, 0, 'left', R),
  port(0, 8, 'bottom', R),
  port(0, -8, 'top', R),
  port(8, 0, 'right', R),
];

/**
 * A filled dot on the line with four sides: one for the single end, three for the numbered ones in the order given,
 * unless the lines choose better ones (dotSides.ts).
 * A fourth number shares a side with the first: its line runs into the other one before the dot.
 */
export function dot(single: string, at: number, stem: string, order: readonly number[]): SymbolData {
  return {
    box: { x: -R, y: -R, w: 2 * R, h: 2 * R },
    paths: [solid(circle(R))],
    ports(name) {
      if (name === single) return SIDES[at];
      const k = numberOf(name, stem);
      return k === undefined ? undefined : SIDES[order[(k - 1) % order.length]!];
    },
    sides: SIDES,
    tagless: true,
  };
}

/** Lines of a dot as it stands on the shelf. */
export const dotIcon = (lines: string, heads: string): readonly PathShape[] => [
  { d: lines, width: 1.9, stroke: 'ink', fill: 'none' },
  solid(heads),
  solid(circle(R)),
];
