import type { KindCatalogue } from '../types';
import { DIVIDE_FINDINGS } from './findings';

/** A stream parts into streams of the same composition and state; exactly one outlet takes the rest. */
export const divide: KindCatalogue = {
  kind: 'divide',
  group: 'lines',
  tag: { letters: 'D', drawn: false },
  ports: [
    { name: 'in', dir: 'in' },
    { name: 'out', dir: 'out', numbered: { min: 1, max: 12 } },
  ],
  settings: {
    shares: { is: 'map', keys: 'port', of: { is: 'flow', share: true } },
  },
  results: {
    shares: { dim: 'fraction', hidden: true },
  },
  findings: DIVIDE_FINDINGS,
};
