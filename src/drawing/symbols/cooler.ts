import { roundExchanger } from './roundExchanger';
import type { SymbolKind } from './shapes';

const data = roundExchanger('out');

/** Heat leaves below. */
export const cooler: SymbolKind = { draw: () => data };
