import type { LinkData, SymbolData } from '../types';
import { circle, inner, outline, port } from './shapes';

const R = 16;
const places = { in: port(-R, 0, 'left'), out: port(R, 0, 'right'), heat: port(0, 40, 'bottom') };

/** A circle with a zigzag across and a heat link below. */
export const roundExchanger = (flow: LinkData['flow']): SymbolData => ({
  box: { x: -R, y: -R, w: 2 * R, h: 2 * R },
  paths: [outline(circle(R)), inner('M-16 0H-8L-4 -8 4 8 8 0H16')],
  ports: (name) => (name === 'in' || name === 'out' || name === 'heat' ? places[name] : undefined),
  links: [{ name: 'heat', from: [0, R], to: [0, 40], flow }],
});
