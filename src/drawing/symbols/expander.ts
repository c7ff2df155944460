import { roundMachine } from './roundMachine';
import type { SymbolKind } from './shapes';

const data = roundMachine('M-14.7 -6.4L9 -13.2M-14.7 6.4L9 13.2', 'out');

/** A circle with two lines opening along the flow. */
export const expander: SymbolKind = { draw: () => data };
