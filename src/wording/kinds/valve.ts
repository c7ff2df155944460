import type { KindWords } from '../types';

export const valve: KindWords = {
  name: 'valve',
  about: 'Lets the pressure down; enthalpy stays.',
  ports: { in: 'inlet', out: 'outlet' },
  settings: {
    p: 'outlet pressure',
    'p.P': 'outlet pressure',
    'p.drop': 'pressure drop',
    'p.ratio': 'outlet to inlet',
  },
  results: {
    drop_Pa: 'pressure drop',
    T_K: 'outlet temperature',
    dT_K: 'temperature change',
    vapourFraction: 'vapour fraction behind it',
  },
  sentences: {
    'valve/outlet-above-inlet': {
      title: 'Pressure rises over the valve',
      says: 'The outlet pressure of {outletPressure} is above the inlet pressure of {inletPressure}.',
      next: 'Lower the outlet pressure, or use a pump or a compressor.',
    },
    'valve/flashes': {
      title: 'Liquid flashes in the valve',
      says: 'Liquid comes in; behind the valve {vapourFraction%} of it, by mole, is vapour.',
      next: 'Size the valve and the line behind it for two phases.',
    },
    'valve/cools': {
      title: 'The valve cools',
      says: 'The stream cools by {cooling} to {temperature}; from {limit} on this is said.',
      next: 'Check the material and whether something freezes or forms hydrates.',
    },
  },
};
