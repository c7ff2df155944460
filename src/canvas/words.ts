import type { UnitId } from '../engine/ids';
import type { Sketch } from '../sketch/types';
import { portWord } from '../wording';
import type { PortRef } from './sheetStore';

export const tagOf = (sketch: Pick<Sketch, 'units'>, id: UnitId): string =>
  sketch.units.find((unit) => unit.id === id)?.tag ?? '';

/** "V-101 inlet 2" for a port. */
export function portName(sketch: Pick<Sketch, 'units'>, { unit, port }: PortRef): string {
  const kind = sketch.units.find((known) => known.id === unit)?.kind ?? '';
  return `${tagOf(sketch, unit)} ${portWord(kind, port)}`;
}
