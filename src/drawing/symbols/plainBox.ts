import type { PortSpec } from '../../engine/units/types';
import type { PortPlace, SymbolData } from '../types';
import { detail, numberOf, outline, port } from './shapes';

/** Half sizes of the box. */
const [A, B] = [32, 28];

/** Heights of `count` ports on a side, on the grid and around the middle: 16 px apart while they fit, else 8 px. */
function heights(count: number): readonly number[] {
  const step = (count - 1) * 16 <= 48 ? 16 : 8;
  const first = -Math.round(((count - 1) * step) / 16) * 8;
  return Array.from({ length: count }, (_, k) => first + k * step);
}

/** A place beside the box stays beside it: what would run over the lower edge starts again at the upper one. */
const within = (y: number): number => ((((y + 24) % 56) + 56) % 56) - 24;

/**
 * The symbol of a kind that has none of its own: a box 64 x 56, inlets spread on the left, outlets on the right.
 * Numbered ports follow below the first in steps of 8 px.
 */
export function plainBox(ports: readonly PortSpec[]): SymbolData {
  const places = new Map<string, PortPlace>();
  const stems: {
    readonly stem: string;
    readonly x: number;
    readonly y: number;
    readonly side: 'left' | 'right';
  }[] = [];
  for (const dir of ['in', 'out'] as const) {
    const own = ports.filter((p) => p.dir === dir);
    const fixedFirst = [...own.filter((p) => !p.numbered), ...own.filter((p) => p.numbered)];
    const at = heights(own.length);
    const [x, side] = dir === 'in' ? ([-A, 'left'] as const) : ([A, 'right'] as const);
    fixedFirst.forEach((p, k) => {
      const y = within(at[k]!);
      if (p.numbered) stems.push({ stem: p.name, x, y, side });
      else places.set(p.name, port(x, y, side));
    });
  }
  return {
    box: { x: -A, y: -B, w: 2 * A, h: 2 * B },
    paths: [outline(`M${-A} ${-B}H${A}V${B}H${-A}Z`), detail(`M${-A} ${-B + 8}H${A}`)],
    ports(name) {
      const fixed = places.get(name);
      if (fixed) return fixed;
      for (const { stem, x, y, side } of stems) {
        const k = numberOf(name, stem);
        if (k !== undefined) return port(x, within(y + 8 * (k - 1)), side);
      }
      return undefined;
    },
  };
}
