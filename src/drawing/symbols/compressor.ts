import { roundMachine } from './roundMachine';
import { detail, type SymbolKind } from './shapes';

const CLOSING = 'M-9 -13.2L14.7 -6.4M-9 13.2L14.7 6.4';
const plain = roundMachine(CLOSING, 'in');
/** Three blades round the hub. */
const fan = roundMachine(CLOSING, 'in', [
  detail(
    'M0 0C-4 -3 -3 -7 0 -8C3 -7 4 -3 0 0ZM0 0C-5 0 -8 4 -7 7C-4 8 -1 5 0 0ZM0 0C5 0 8 4 7 7C4 8 1 5 0 0Z',
  ),
]);

/** A circle with two lines closing along the flow; a fan shows its blades. */
export const compressor: SymbolKind = {
  draw: (unit) => (unit.settings.service === 'fan' ? fan : plain),
};
