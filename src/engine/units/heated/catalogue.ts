import { outletCondition, pressure } from '../groups';
import type { KindCatalogue } from '../types';

/** What heaters and coolers are alike: one stream brought to a condition. The duty counts into the unit in both. */
export const heatedCatalogue = (kind: 'heater' | 'cooler', findings: readonly string[]): KindCatalogue => ({
  kind,
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
  findings,
});
