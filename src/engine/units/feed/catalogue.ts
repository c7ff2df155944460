import type { KindCatalogue } from '../types';
import { FEED_FINDINGS } from './findings';

/** Where material enters the sketch: two conditions, a flow and a composition. */
export const feed: KindCatalogue = {
  kind: 'feed',
  group: 'boundary',
  tag: { letters: 'FEED', drawn: false },
  ports: [{ name: 'out', dir: 'out' }],
  settings: {
    state: {
      is: 'some',
      count: 2,
      of: {
        T: { is: 'quantity', dim: 'temperature', min: 0 },
        P: { is: 'quantity', dim: 'pressure', min: 0 },
        vapourFraction: { is: 'quantity', dim: 'fraction', min: 0, max: 1 },
        enthalpy: { is: 'quantity', dim: 'molarEnergy' },
        entropy: { is: 'quantity', dim: 'molarEntropy' },
      },
    },
    flow: { is: 'flow' },
    composition: { is: 'composition' },
  },
  moot: [{ when: ['composition.flows'], key: 'flow' }],
  results: {},
  findings: FEED_FINDINGS,
};
