import type { KindWords } from '../types';

export const drum: KindWords = {
  name: 'flash drum',
  about: 'Vapour and liquid in equilibrium leave apart.',
  ports: { in: 'inlet', vapour: 'vapour outlet', liquid: 'liquid outlet' },
  settings: {
    p: 'pressure',
    h: 'heat',
    'h.T': 'temperature',
    'h.duty': 'duty (into the drum)',
    'h.vapourFraction': 'vapour fraction',
  },
  results: { T_K: 'temperature', P_Pa: 'pressure', vapourFraction: 'vapour fraction', duty_W: 'duty' },
  sentences: {
    'drum/has-duty': {
      title: 'The drum has a duty',
      says: 'The drum needs {duty} to hold what is set; it is drawn with a coil and listed among the duties.',
      next: 'Clear the heat setting if the drum should be adiabatic.',
    },
    'drum/one-phase': {
      title: 'One outlet is dry',
      says: 'Only one phase is there: nothing leaves by the {outlet} outlet.',
      next: 'Check pressure and temperature against bubble and dew point.',
    },
    'drum/dense': {
      title: 'Dense phase in the drum',
      says: 'At {pressure} the stream is a dense phase, which no drum parts into vapour and liquid.',
      next: 'Lower the pressure.',
    },
  },
};
