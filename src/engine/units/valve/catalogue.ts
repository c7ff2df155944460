import { pressureGiven } from '../groups';
import type { KindCatalogue } from '../types';
import { VALVE_FINDINGS } from './findings';

/** Lets the pressure down without heat or work: enthalpy stays. */
export const valve: KindCatalogue = {
  kind: 'valve',
  group: 'lines',
  tag: { letters: 'PV', drawn: true },
  ports: [
    { name: 'in', dir: 'in' },
    { name: 'out', dir: 'out' },
  ],
  settings: { p: pressureGiven },
  results: {
    drop_Pa: { dim: 'pressureDifference' },
    T_K: { dim: 'temperature' },
    dT_K: { dim: 'temperatureDifference' },
    vapourFraction: { dim: 'fraction' },
  },
  findings: VALVE_FINDINGS,
};
