import type { LinkData, PortPlace, SymbolData } from '../types';
import { directionOf, isAdiabatic } from './heatDirection';
import { type DrawnUnit, detail, inner, numberOf, outline, port, type SymbolKind } from './shapes';

const SHELL = outline('M-24 -44A24 12 0 0 1 24 -44V44A24 12 0 0 1 -24 44Z');
const GRIDS = inner('M-24 -24H24M-24 24H24');
const BED = detail('M-24 -8L-8 -24M-24 8L8 -24M-24 24L24 -24M-8 24L24 -8M8 24L24 8');

/** Further inlets on the left, from the upper head down. */
const LEFT_Y: readonly number[] = [-40, -32, -24, -16, -8, 0, 8, 16, 24, 32, 40];

function ports(name: string): PortPlace | undefined {
  if (name === 'out') return port(0, 56, 'bottom');
  if (name === 'heat') return port(24, 0, 'right');
  const k = numberOf(name, 'in');
  if (k === undefined) return undefined;
  return k === 1 ? port(0, -56, 'top') : port(-24, LEFT_Y[(k - 2) % LEFT_Y.length]!, 'left');
}

const plain: SymbolData = {
  box: { x: -24, y: -56, w: 48, h: 112 },
  paths: [SHELL, GRIDS, BED],
  ports,
};
const heated = (flow: LinkData['flow']): SymbolData => ({
  ...plain,
  links: [{ name: 'heat', from: [24, 0], to: [48, 0], flow }],
});
const HEATED = { in: heated('in'), out: heated('out'), none: heated('none') };

/** Upright vessel with a hatched bed; a heat link when its heat is set. */
export const reactor: SymbolKind = {
  draw({ settings: { h } }: DrawnUnit) {
    return h === undefined || h === null || isAdiabatic(h) ? plain : HEATED[directionOf(h)];
  },
};
