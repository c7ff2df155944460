import type { Json } from '../../sketch/types';
import type { LinkData } from '../types';

/** Nothing but zeros before the unit of measure. */
const ZERO = /^\s*[-+−]?(0+\.?0*|\.0+)(?![\d.])/;

const dutyIn = (h: Json): string | undefined => {
  const duty = h !== null && typeof h === 'object' && 'duty' in h ? h.duty : undefined;
  return typeof duty === 'string' || typeof duty === 'number' ? String(duty) : undefined;
};

/** The sign of a duty as it was typed; without one the direction is a result and no arrowhead is drawn. */
export function directionOf(h: Json): LinkData['flow'] {
  const duty = dutyIn(h);
  if (duty === undefined) return 'none';
  return /^\s*[-−]/.test(duty) ? 'out' : 'in';
}

/** That the duty is given, and given as zero. */
export const isAdiabatic = (h: Json): boolean => ZERO.test(dutyIn(h) ?? '');
