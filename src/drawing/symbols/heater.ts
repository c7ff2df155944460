import { roundExchanger } from './roundExchanger';
import type { SymbolKind } from './shapes';

const data = roundExchanger('in');

/** Heat comes in from below. */
export const heater: SymbolKind = { draw: () => data };
