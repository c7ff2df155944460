import type { Weight } from '../engine/outcome';
import { circle, solid } from './symbols/shapes';
import { WEIGHT } from './tokens';
import type { DrawnState, PathShape } from './types';

/** Room that any state mark takes below the baseline of a tag [px]. */
export const STATE_ROOM = 9;
/** Side of a limit mark [px]. */
export const LIMIT_SIDE = 16;

const rule = (d: string, width: number = WEIGHT.tagRule, dash?: string): PathShape => ({
  d,
  width,
  stroke: 'ink',
  fill: 'none',
  ...(dash ? { dash } : {}),
});

/**
 * The mark under a tag that says how its unit stands: a double rule when solved, a blank when a value is missing, three
 * dots while it waits, a broken rule without a solution, one dashed rule when out of date.
 *
 * @param left     where the tag's text begins
 * @param width    the tag's width [px]
 * @param baseline of the tag's text
 */
export function stateMark(
  state: DrawnState,
  left: number,
  width: number,
  baseline: number,
): readonly PathShape[] {
  const right = left + width;
  switch (state) {
    case 'solved':
      return [rule(`M${left} ${baseline + 3.5}H${right}M${left} ${baseline + 6}H${right}`)];
    case 'needs-value':
      return [rule(`M${left} ${baseline + 3}H${right}V${baseline + 9}H${left}Z`, 1)];
    case 'waiting': {
      const middle = left + width / 2;
      return [solid([-6, 0, 6].map((dx) => circle(1.3, middle + dx, baseline + 6)).join(''))];
    }
    case 'no-solution': {
      const breakAt = left + width * 0.4;
      return [rule(`M${left} ${baseline + 5}H${breakAt}l3 -4 3 8 3 -4H${right}`, 1.4)];
    }
    case 'out-of-date':
      return [rule(`M${left} ${baseline + 4}H${right}`, WEIGHT.tagRule, '3 2.5')];
  }
}

const FRAME =
  'M-4.25 -7.25H4.25a3 3 0 0 1 3 3V4.25a3 3 0 0 1 -3 3H-4.25a3 3 0 0 1 -3 -3V-4.25a3 3 0 0 1 3 -3Z';
const LINE = 'M-5 0H5';

/** A limit line and a dot below it (note), on it (caution) or beyond it (beyond limit); 16 px, origin in the middle. */
export function limitMark(weight: Weight): readonly PathShape[] {
  const dot = (y: number, fill: PathShape['fill']): PathShape => ({ ...solid(circle(2.5, 0, y)), fill });
  switch (weight) {
    case 'note':
      return [
        { d: FRAME, width: 1, stroke: 'ink2', fill: 'paper' },
        { d: LINE, width: 1.4, stroke: 'ink2', fill: 'none' },
        dot(3.4, 'ink2'),
      ];
    case 'caution':
      return [
        { d: FRAME, width: 1.5, stroke: 'caution', fill: 'caution-wash' },
        { d: LINE, width: 1.4, stroke: 'caution', fill: 'none' },
        dot(0, 'caution'),
      ];
    case 'beyond-limit':
      return [
        { d: FRAME, width: 1.5, stroke: 'beyond', fill: 'beyond' },
        { d: LINE, width: 1.4, stroke: 'on-beyond', fill: 'none' },
        dot(-3.6, 'on-beyond'),
      ];
  }
}
