import { HEATED_RESULTS, HEATED_SETTINGS } from '../heat';
import type { KindWords } from '../types';

export const cooler: KindWords = {
  name: 'cooler',
  about: 'Takes heat from a stream.',
  ports: { in: 'inlet', out: 'outlet' },
  settings: HEATED_SETTINGS,
  results: HEATED_RESULTS,
  sentences: {
    'cooler/heats': {
      title: 'The cooler heats',
      says: 'Heat of {added} is added to reach {temperature}.',
      next: 'Check the outlet condition and the sign of the duty, or use a heater.',
    },
  },
};
