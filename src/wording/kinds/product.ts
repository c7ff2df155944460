import type { KindWords } from '../types';

export const product: KindWords = {
  name: 'product',
  about: 'Material leaves the sketch here.',
  ports: { in: 'inlet' },
  settings: { to: 'goes to' },
  options: { process: 'further process', atmosphere: 'atmosphere', storage: 'storage' },
  sentences: {
    'product/flammable-to-atmosphere': {
      title: 'Fuel to atmosphere',
      says: 'The gas that leaves to atmosphere holds fuel, mostly {chemical}, at {shareOfLimit%} of its lower flammability limit; from {limit%} on this is said.',
      next: 'Take it to a hazard review, or send the stream to a flare or to storage.',
    },
  },
};
