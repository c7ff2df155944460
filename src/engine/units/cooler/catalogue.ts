import { outletCondition, pressure } from '../groups';
import type { KindCatalogue } from '../types';
import { COOLER_FINDINGS } from './findings';

/** Takes heat from a stream; its duty counts into the unit and is therefore negative. */
export const cooler: KindCatalogue = {
  kind: 'cooler',
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
  findings: COOLER_FINDINGS,
};
