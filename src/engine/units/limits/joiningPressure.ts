import type { StreamState } from '../../equilibrium/types';
import type { Port, UnitId } from '../../ids';
import { type Finding, saw } from '../../outcome';
import { finding, type Overrides, rule, thresholdOf } from './rule';

/** How far below a unit's pressure a stream may enter it [Pa]. */
export const ENTERS_BELOW = rule(
  'pressure/enters-below',
  'beyond-limit',
  1e3,
  'pressureDifference',
  'balance',
);

/**
 * Streams that would have to flow uphill into a unit, each at its port.
 *
 * @param inlets  entering streams by port; those without flow are passed over
 * @param P_Pa    pressure inside the unit [Pa]
 */
export function joiningPressure(
  unit: UnitId,
  inlets: Readonly<Record<Port, StreamState>>,
  P_Pa: number,
  overrides: Overrides,
): Finding[] {
  const found: Finding[] = [];
  for (const [port, stream] of Object.entries(inlets)) {
    if (stream.phases.length === 0) continue;
    if (P_Pa - stream.P_Pa <= thresholdOf(ENTERS_BELOW, overrides)) continue;
    const seen = [saw('streamPressure', stream.P_Pa, 'pressure'), saw('unitPressure', P_Pa, 'pressure')];
    found.push(finding(ENTERS_BELOW, { unit, port }, seen, overrides));
  }
  return found;
}
