/** Codes of units in which chemicals react. */
export const REACTION_FINDINGS = [
  'reaction/no-formula',
  'reaction/no-formation-enthalpy',
  'reaction/molar-mass',
] as const;
