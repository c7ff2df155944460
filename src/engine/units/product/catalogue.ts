import type { KindCatalogue } from '../types';
import { PRODUCT_FINDINGS } from './findings';

/** Where material leaves the sketch. */
export const product: KindCatalogue = {
  kind: 'product',
  group: 'boundary',
  tag: { letters: 'PROD', drawn: false },
  ports: [{ name: 'in', dir: 'in' }],
  settings: {
    to: { is: 'option', values: ['process', 'atmosphere', 'storage'], optional: true },
  },
  results: {},
  findings: PRODUCT_FINDINGS,
};
