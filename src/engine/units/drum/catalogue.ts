import { heat, pressure } from '../groups';
import type { KindCatalogue } from '../types';
import { DRUM_FINDINGS } from './findings';

/** One equilibrium flash; vapour and liquid leave apart. Adiabatic unless heat is set. */
export const drum: KindCatalogue = {
  kind: 'drum',
  group: 'vessels',
  tag: { letters: 'V', drawn: true },
  ports: [
    { name: 'in', dir: 'in', numbered: { min: 1, max: 12 } },
    { name: 'vapour', dir: 'out' },
    { name: 'liquid', dir: 'out' },
  ],
  settings: { p: pressure, h: heat },
  moot: [{ when: ['h.T', 'h.vapourFraction'], key: 'p' }],
  results: {
    T_K: { dim: 'temperature' },
    P_Pa: { dim: 'pressure' },
    vapourFraction: { dim: 'fraction' },
    duty_W: { dim: 'power' },
  },
  findings: DRUM_FINDINGS,
};
