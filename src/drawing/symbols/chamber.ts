import type { Json } from '../../sketch/types';
import type { LinkData, PortPlace, SymbolData } from '../types';
import { directionOf, isAdiabatic } from './heatDirection';
import { type DrawnUnit, detail, inner, numberOf, outline, port, type SymbolKind } from './shapes';

const BODY = outline('M-32 -28H32V28H-32Z');
const CONE = outline('M-48 -10L-32 -18V18L-48 10Z');
const FLAME = inner('M-32 -6C-22 -16 -6 -12 12 0C-6 12 -22 16 -32 6');
const HEART = detail('M-32 -2C-24 -6 -16 -5 -8 0C-16 5 -24 6 -32 2');
const AIR = outline('M-16 28V32', 'none');

/** Fuels: at the mouth of the cone, then on the wall below and above it. */
const FUEL: readonly (readonly [number, number])[] = [
  [-48, 0],
  [-48, 8],
  [-48, -8],
  [-32, 24],
  [-32, -24],
];

function ports(name: string): PortPlace | undefined {
  if (name === 'out') return port(32, 0, 'right');
  if (name === 'air') return port(-16, 32, 'bottom');
  if (name === 'heat') return port(24, 32, 'bottom');
  const k = numberOf(name, 'fuel');
  return k === undefined ? undefined : port(...FUEL[(k - 1) % FUEL.length]!, 'left');
}

const plain: SymbolData = {
  box: { x: -48, y: -28, w: 80, h: 60 },
  paths: [BODY, CONE, FLAME, HEART, AIR],
  ports,
};
const heated = (flow: LinkData['flow']): SymbolData => ({
  ...plain,
  links: [{ name: 'heat', from: [24, 28], to: [24, 56], flow }],
});
const HEATED = { in: heated('in'), out: heated('out'), none: heated('none') };

const losesHeat = (heat: Json): boolean =>
  heat !== null && typeof heat === 'object' && 'lossOfLHV' in heat && heat.lossOfLHV !== null;

/** A box with a burner cone at the left and a flame lying in it; a heat link when it is not adiabatic. */
export const chamber: SymbolKind = {
  draw(unit: DrawnUnit) {
    const { heat } = unit.settings;
    if (heat === undefined || heat === null || isAdiabatic(heat)) return plain;
    return HEATED[losesHeat(heat) ? 'out' : directionOf(heat)];
  },
};
