import { ABSENT, displayUnit, formatSignificant, type MeasureSet, traceBelow } from '../../quantity';

export const BASES = ['mole', 'mass', 'moles', 'masses'] as const;
/** Shares by mole or mass [%], or flows of moles or mass in the measures' unit. */
export type Basis = (typeof BASES)[number];

export const isShare = (basis: Basis): boolean => basis === 'mole' || basis === 'mass';
export const byMass = (basis: Basis): boolean => basis === 'mass' || basis === 'masses';

export function basisLabel(basis: Basis, set: MeasureSet): string {
  if (basis === 'mole') return 'mol %';
  if (basis === 'mass') return 'mass %';
  return displayUnit(basis === 'moles' ? 'molarFlow' : 'massFlow', set).label;
}

/**
 * Every component's amount in a basis.
 *
 * @param z  mole fractions [-]
 * @param MW  molar masses [g/mol], same order; undefined where not known
 * @param n_mol_s  total flow
 * @returns per cent, or flows in the set's unit; undefined where a molar mass is missing
 */
export function amounts(
  z: ArrayLike<number>,
  MW: readonly (number | undefined)[],
  n_mol_s: number,
  basis: Basis,
  set: MeasureSet,
): readonly (number | undefined)[] {
  const parts = Array.from(z);
  if (basis === 'mole') return parts.map((x) => x * 100);
  if (basis === 'moles') {
    const { toDisplay } = displayUnit('molarFlow', set);
    return parts.map((x) => toDisplay(x * n_mol_s));
  }
  const mass = parts.map((x, k) => (x === 0 ? 0 : MW[k] === undefined ? undefined : x * (MW[k] as number)));
  if (basis === 'masses') {
    const { toDisplay } = displayUnit('massFlow', set);
    return mass.map((m) => (m === undefined ? undefined : toDisplay((m * n_mol_s) / 1000)));
  }
  const total = mass.reduce<number>((sum, m) => sum + (m ?? 0), 0);
  const whole = mass.every((m) => m !== undefined) && total > 0;
  return mass.map((m) => (whole && m !== undefined ? (m / total) * 100 : undefined));
}

/** "55.66", "–" where exactly absent, "<0.01" for a trace (per cent; a flow's last place is a hundred times smaller). */
export function amountText(value: number | undefined, basis: Basis): string {
  if (value === undefined || value === 0) return ABSENT;
  const decimals = isShare(basis) ? 2 : 4;
  if (value < 10 ** -decimals) return traceBelow(decimals);
  return formatSignificant(value, 4);
}
