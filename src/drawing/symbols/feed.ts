import { extraLength, standsUpright } from './flag';
import { outline, port, type SymbolKind } from './shapes';

/** A flag that points into the sheet: 64 x 24, its tail longer for a long name. */
export const feed: SymbolKind = {
  draw(unit) {
    const left = -32 - extraLength(unit, 48);
    const out = port(32, 0, 'right');
    return {
      box: { x: left, y: -12, w: 32 - left, h: 24 },
      paths: [outline(`M${left} -12H20L32 0 20 12H${left}Z`)],
      ports: (name) => (name === 'out' ? out : undefined),
      nameInside: !standsUpright(unit),
      nameAt: [(left + 26) / 2, 0],
      tagless: true,
    };
  },
};
