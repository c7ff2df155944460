import { pressure } from '../groups';
import type { KindCatalogue } from '../types';
import { JOIN_FINDINGS } from './findings';

/** Streams come together without heat or work, at the lowest inlet pressure unless said otherwise. */
export const join: KindCatalogue = {
  kind: 'join',
  group: 'lines',
  tag: { letters: 'J', drawn: false },
  ports: [
    { name: 'in', dir: 'in', numbered: { min: 1, max: 12 } },
    { name: 'out', dir: 'out' },
  ],
  settings: { p: pressure },
  results: {
    T_K: { dim: 'temperature' },
    P_Pa: { dim: 'pressure' },
  },
  findings: JOIN_FINDINGS,
};
