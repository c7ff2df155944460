import type { KindWords } from '../types';

export const divide: KindWords = {
  name: 'divide',
  about: 'A stream parts by a given split; the state stays.',
  ports: { in: 'inlet', out: 'outlet' },
  settings: { shares: 'given split' },
  results: { shares: 'split' },
  sentences: {
    'divide/no-rest-outlet': {
      title: 'Nothing takes the rest',
      says: 'Every outlet has a share of its own, so no outlet takes what is left.',
      next: 'Clear the share of one outlet: it takes the rest.',
    },
    'divide/several-rest-outlets': {
      title: 'The rest is not settled',
      says: 'More than one outlet has no share, so it is open which of them takes the rest.',
      next: 'Give a share or a flow to all outlets but one.',
    },
    'divide/unknown-outlet': {
      title: 'A share without a stream',
      says: 'A share is given for {port}, where no stream leaves.',
      next: 'Draw a stream from {port}, or clear its share.',
    },
    'divide/share-below-zero': {
      title: 'Share below zero',
      says: 'The share of {port} is {share%}.',
      next: 'Give a share or a flow of zero or above.',
    },
    'divide/shares-above-whole': {
      title: 'More than there is',
      says: 'The outlets together take {share%} of the inlet.',
      next: 'Lower one of the shares or flows.',
    },
    'divide/flow-from-nothing': {
      title: 'Nothing comes in',
      says: 'A flow is asked for at {port}, and nothing flows in.',
      next: 'Give a share instead of a flow, or look upstream.',
    },
  },
};
