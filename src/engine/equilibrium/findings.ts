/** What a flash may say; the sentences live in wording/. */
export const EQUILIBRIUM_FINDINGS = [
  'equilibrium/no-convergence',
  'equilibrium/out-of-range',
  'equilibrium/no-such-state',
  'equilibrium/between-states',
  'equilibrium/second-liquid',
  'equilibrium/several-states',
  'equilibrium/no-entropy',
  'equilibrium/not-a-state',
] as const;

export type EquilibriumCode = (typeof EQUILIBRIUM_FINDINGS)[number];
