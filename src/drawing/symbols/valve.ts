import { outline, port, type SymbolKind } from './shapes';

const places = { in: port(-16, 0, 'left'), out: port(16, 0, 'right') };

/** Two triangles tip to tip. */
export const valve: SymbolKind = {
  draw: () => ({
    box: { x: -16, y: -8, w: 32, h: 16 },
    paths: [outline('M-16 -8L16 8V-8L-16 8Z')],
    ports: (name) => (name === 'in' || name === 'out' ? places[name] : undefined),
  }),
};
