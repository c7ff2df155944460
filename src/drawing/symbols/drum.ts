import type { LinkData, PortPlace, SymbolData } from '../types';
import { directionOf } from './heatDirection';
import { type DrawnUnit, detail, inner, numberOf, outline, port, type SymbolKind } from './shapes';

const SHELL = outline('M-24 -44A24 12 0 0 1 24 -44V44A24 12 0 0 1 -24 44Z');
const MIST = detail('M-24 -32H24', '3 2');
const LEVEL = detail('M-24 12H24M-6 16H6M-3 20H3');
const COIL = inner('M24 24H15L10 40 4 28 -2 40 -8 28 -14 40');

/** Inlets on the left: the middle first, then 8 px steps down to the lower head, then up from the middle. */
const IN_Y: readonly number[] = [0, 8, 16, 24, 32, 40, -8, -16, -24, -32, -40];

function ports(name: string): PortPlace | undefined {
  if (name === 'vapour') return port(0, -56, 'top');
  if (name === 'liquid') return port(0, 56, 'bottom');
  if (name === 'heat') return port(24, 24, 'right');
  const k = numberOf(name, 'in');
  return k === undefined ? undefined : port(-24, IN_Y[(k - 1) % IN_Y.length]!, 'left');
}

const box = { x: -24, y: -56, w: 48, h: 112 };
const plain: SymbolData = { box, paths: [SHELL, MIST, LEVEL], ports };
const heated = (flow: LinkData['flow']): SymbolData => ({
  box,
  paths: [SHELL, MIST, LEVEL, COIL],
  ports,
  links: [{ name: 'heat', from: [24, 24], to: [48, 24], flow }],
});
const HEATED = { in: heated('in'), out: heated('out'), none: heated('none') };

/** Upright vessel with round heads; a coil when it has a duty. */
export const drum: SymbolKind = {
  draw(unit: DrawnUnit) {
    const h = unit.settings.h;
    return h === undefined || h === null ? plain : HEATED[directionOf(h)];
  },
};
