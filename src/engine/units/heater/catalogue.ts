import { outletCondition, pressure } from '../groups';
import type { KindCatalogue } from '../types';
import { HEATER_FINDINGS } from './findings';

/** Brings a stream to a condition; duty is the heat into it. */
export const heater: KindCatalogue = {
  kind: 'heater',
  group: 'heat',
  tag: { letters: 'E', drawn: true },
  ports: [
    { name: 'in', dir: 'in' },
    { name: 'out', dir: 'out' },
  ],
  settings: { p: pressure, ...outletCondition },
  choose: [{ keys: Object.keys(outletCondition), count: 1, pairs: [['T', 'vapourFraction']] }],
  moot: [{ when: ['T', 'vapourFraction'], key: 'p' }],
  results: {
    duty_W: { dim: 'power' },
    T_K: { dim: 'temperature' },
    P_Pa: { dim: 'pressure' },
    vapourFraction: { dim: 'fraction' },
  },
  findings: HEATER_FINDINGS,
};
