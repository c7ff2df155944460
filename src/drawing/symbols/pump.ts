import { roundMachine } from './roundMachine';
import type { SymbolKind } from './shapes';

const data = roundMachine('M0 -16L16 0 0 16', 'in');

/** A circle with lines from top and bottom to the outlet. */
export const pump: SymbolKind = { draw: () => data };
