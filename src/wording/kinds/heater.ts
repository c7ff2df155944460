import { HEATED_RESULTS, HEATED_SETTINGS } from '../heat';
import type { KindWords } from '../types';

export const heater: KindWords = {
  name: 'heater',
  about: 'Brings a stream to a condition by heat.',
  ports: { in: 'inlet', out: 'outlet' },
  settings: HEATED_SETTINGS,
  results: HEATED_RESULTS,
  sentences: {
    'heater/cools': {
      title: 'The heater cools',
      says: 'Heat of {removed} is removed to reach {temperature}.',
      next: 'Check the outlet condition, or use a cooler.',
    },
  },
};
