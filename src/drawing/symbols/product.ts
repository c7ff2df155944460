import { extraLength, standsUpright } from './flag';
import { outline, port, type SymbolKind } from './shapes';

/** A flag with a notch that takes the line: 64 x 24, its point further out for a long name. */
export const product: SymbolKind = {
  draw(unit) {
    const right = 32 + extraLength(unit, 41);
    const into = port(-24, 0, 'left');
    return {
      box: { x: -32, y: -12, w: right + 32, h: 24 },
      paths: [outline(`M-32 -12H${right - 12}L${right} 0 ${right - 12} 12H-32L-24 0Z`)],
      ports: (name) => (name === 'in' ? into : undefined),
      nameInside: !standsUpright(unit),
      nameAt: [(right - 29) / 2, 0],
      tagless: true,
    };
  },
};
