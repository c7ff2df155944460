import type { LinkData, PathShape, SymbolData } from '../types';
import { circle, inner, outline, port } from './shapes';

const R = 16;
const places = { in: port(-R, 0, 'left'), out: port(R, 0, 'right'), shaft: port(0, R, 'bottom') };

/**
 * A circle with lines inside and a shaft link below: pumps, compressors, expanders.
 *
 * @param lines  path data of the lines inside
 */
export const roundMachine = (
  lines: string,
  flow: LinkData['flow'],
  more: readonly PathShape[] = [],
): SymbolData => ({
  box: { x: -R, y: -R, w: 2 * R, h: 2 * R },
  paths: [outline(circle(R)), inner(lines), ...more],
  ports: (name) => (name === 'in' || name === 'out' || name === 'shaft' ? places[name] : undefined),
  links: [{ name: 'shaft', carries: 'shaft', from: [0, R], to: [0, 40], flow }],
});
