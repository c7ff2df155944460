import type { KindWords } from '../types';

export const reactor: KindWords = {
  name: 'reactor',
  about: 'Reactions with given conversions, one after another.',
  ports: { in: 'inlet', out: 'outlet' },
  settings: {
    reactions: 'reactions',
    'reactions.stoichiometry': 'made (negative: consumed)',
    'reactions.of': 'conversion of',
    'reactions.conversion': 'conversion',
    p: 'pressure',
    h: 'heat',
    'h.T': 'temperature',
    'h.duty': 'duty (into the reactor)',
    'h.vapourFraction': 'vapour fraction',
  },
  results: {
    T_K: 'temperature',
    P_Pa: 'pressure',
    vapourFraction: 'vapour fraction',
    duty_W: 'duty',
    heatOfReaction_W: 'heat of reaction at 25 °C as ideal gas',
    extents_mol_s: 'turns of each reaction',
  },
  sentences: {
    'reactor/unbalanced': {
      title: 'The reaction does not balance',
      says: 'Reaction {reaction} does not balance: of the element {element}, {atoms} a turn are {sense}.',
      next: 'Correct the numbers of the reaction; whole numbers balance exactly.',
    },
    'reactor/key-not-consumed': {
      title: 'Conversion of nothing',
      says: 'Reaction {reaction} does not consume {chemical}, so it has no conversion of it.',
      next: 'Give the conversion of a chemical that the reaction consumes.',
    },
    'reactor/reactant-short': {
      title: 'A reactant runs out',
      says: 'Reaction {reaction} needs {needed} of {chemical}, and {there} is there; {most%} is the highest conversion.',
      next: 'Lower the conversion to {most%}, or bring in more {chemical}.',
    },
  },
};
