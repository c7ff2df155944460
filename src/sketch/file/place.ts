import type { SketchStream, SketchUnit } from '../types';

const LEFT = 96;
const TOP = 128;
const ACROSS = 160;
const DOWN = 160;

type Unplaced = Omit<SketchUnit, 'at'> & { readonly at?: SketchUnit['at'] };

/**
 * Gives units without a place one on the 8 px grid: a column for each step along the streams, left to right, rows in
 * the file's order. Units that have a place keep it.
 */
export function placeUnits(
  units: readonly Unplaced[],
  streams: readonly Pick<SketchStream, 'from' | 'to'>[],
): readonly SketchUnit[] {
  const step = new Map<string, number>(units.map((u) => [u.id, 0]));
  // Longest way from a start; a circle is cut off after as many rounds as there are units.
  for (let round = 0; round < units.length; round += 1) {
    let moved = false;
    for (const { from, to } of streams) {
      if (!from || !to) continue;
      const wanted = (step.get(from[0]) ?? 0) + 1;
      if (wanted > (step.get(to[0]) ?? 0) && wanted < units.length) {
        step.set(to[0], wanted);
        moved = true;
      }
    }
    if (!moved) break;
  }
  const rows = new Map<number, number>();
  return units.map((unit): SketchUnit => {
    if (unit.at) return { ...unit, at: unit.at };
    const column = step.get(unit.id) ?? 0;
    const row = rows.get(column) ?? 0;
    rows.set(column, row + 1);
    return { ...unit, at: [LEFT + column * ACROSS, TOP + row * DOWN] };
  });
}
