import type { KindWords } from '../types';

export const join: KindWords = {
  name: 'join',
  about: 'Streams come together without heat or work.',
  ports: { in: 'inlet', out: 'outlet' },
  settings: { p: 'outlet pressure' },
  results: { T_K: 'temperature', P_Pa: 'pressure' },
};
