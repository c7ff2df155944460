import { UTILITY_FINDINGS } from '../limits/utilities';
import { REACTION_FINDINGS } from '../reaction/findings';

/** Codes a reactor may emit. */
export const REACTOR_FINDINGS = [
  'pressure/not-positive',
  'pressure/enters-below',
  ...REACTION_FINDINGS,
  'reactor/unbalanced',
  'reactor/key-not-consumed',
  'reactor/reactant-short',
  ...UTILITY_FINDINGS,
] as const;
