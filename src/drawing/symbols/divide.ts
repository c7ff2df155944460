import { dot, dotIcon } from './dot';
import type { SymbolKind } from './shapes';

const data = dot('in', 0, 'out', [3, 1, 2]);

/** The inlet from the left; outlets at the right, below, above. */
export const divide: SymbolKind = {
  draw: () => data,
  icon: dotIcon('M-28 0H22M0 0V16', 'M28 0 19 -3.5V3.5ZM0 25 -3.5 16H3.5Z'),
};
