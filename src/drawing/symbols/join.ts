import { dot, dotIcon } from './dot';
import type { SymbolKind } from './shapes';

const data = dot('out', 3, 'in', [0, 1, 2]);

/** Inlets from the left, from below, from above; the outlet at the right. */
export const join: SymbolKind = {
  draw: () => data,
  icon: dotIcon('M-28 0H22M0 22V12', 'M28 0 19 -3.5V3.5ZM0 4 -3.5 13H3.5Z'),
};
