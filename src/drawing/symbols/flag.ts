import { cutText, measureText } from '../metrics';
import { GRID, TEXT } from '../tokens';
import type { DrawnUnit } from './shapes';

/** A longer name is cut, its end marked by an ellipsis [px]. */
export const LONGEST_NAME = 160;

/** The name a feed or product is known by on the sheet. */
export const flagName = (unit: Pick<DrawnUnit, 'name' | 'tag'>): string =>
  cutText(unit.name?.trim() || unit.tag, LONGEST_NAME, TEXT.flag);

/** A flag that stands upright has its name beside it, for text is never turned. */
export const standsUpright = (unit: Pick<DrawnUnit, 'turn'>): boolean =>
  unit.turn === 90 || unit.turn === 270;

/**
 * How much longer than 64 px the flag must be for its name, in steps of the grid [px]. It grows away from its port, so
 * that naming a feed or product never moves a line: a feed's tail grows, its point stays; a product's point grows, its
 * notch stays.
 *
 * @param room what the plain flag offers [px]
 */
export const extraLength = (unit: DrawnUnit, room: number): number => {
  if (standsUpright(unit)) return 0;
  return Math.max(0, Math.ceil((measureText(flagName(unit), TEXT.flag) - room) / GRID) * GRID);
};
