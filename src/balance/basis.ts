import type { Basis as ChemicalBasis, StreamResult } from '../engine/network/types';
import { displayUnit, type Measures } from '../quantity';

export type SolvedStream = Extract<StreamResult, { state: 'solved' }>;

/** What the two bars add up: 'mass', 'moles', 'energy', one chemical by index, or one element. */
export type BalanceBasis =
  | { readonly is: 'mass' | 'moles' | 'energy' }
  | { readonly is: 'chemical'; readonly index: number }
  | { readonly is: 'element'; readonly symbol: string };

export const basisKey = (basis: BalanceBasis): string =>
  basis.is === 'chemical'
    ? `chemical ${basis.index}`
    : basis.is === 'element'
      ? `element ${basis.symbol}`
      : basis.is;

export interface BasisChoice {
  readonly basis: BalanceBasis;
  readonly text: string;
}

/** Every basis that these chemicals allow. Elements only when each chemical has a formula. */
export function basisChoices(data: ChemicalBasis | null): readonly BasisChoice[] {
  const chemicals = data?.chemicals ?? [];
  const hasFormulas = chemicals.length > 0 && chemicals.every((chemical) => chemical.elements);
  const symbols = hasFormulas ? [...new Set(chemicals.flatMap((c) => Object.keys(c.elements ?? {})))] : [];
  return [
    { basis: { is: 'mass' }, text: 'mass' },
    { basis: { is: 'moles' }, text: 'moles' },
    { basis: { is: 'energy' }, text: 'energy' },
    ...chemicals.map(({ name }, index): BasisChoice => ({ basis: { is: 'chemical', index }, text: name })),
    ...symbols.map(
      (symbol): BasisChoice => ({ basis: { is: 'element', symbol }, text: `element ${symbol}` }),
    ),
  ];
}

export const dimOf = (basis: BalanceBasis): 'massFlow' | 'power' | 'molarFlow' =>
  basis.is === 'mass' ? 'massFlow' : basis.is === 'energy' ? 'power' : 'molarFlow';

export const unitOf = (basis: BalanceBasis, measures: Measures): string =>
  displayUnit(dimOf(basis), measures).label;

/** Sum of atoms of an element in amounts of every chemical. */
export function atoms(n: ArrayLike<number>, symbol: string, data: ChemicalBasis): number {
  let sum = 0;
  for (let k = 0; k < n.length; k += 1) sum += (n[k] ?? 0) * (data.chemicals[k]?.elements?.[symbol] ?? 0);
  return sum;
}

/**
 * What a stream carries on a basis [SI].
 *
 * @param fromIdeal  energy counted from the same components as ideal gas, not from the elements
 */
export function carried(
  stream: SolvedStream,
  basis: BalanceBasis,
  data: ChemicalBasis | null,
  fromIdeal: boolean,
): number {
  switch (basis.is) {
    case 'mass':
      return stream.m_kg_s;
    case 'moles':
      return stream.n_mol_s;
    case 'energy':
      return fromIdeal ? stream.HfromIdeal_W : stream.H_W;
    case 'chemical':
      return stream.n_mol_s * (stream.z[basis.index] ?? 0);
    case 'element':
      return data ? stream.n_mol_s * atoms(stream.z, basis.symbol, data) : 0;
  }
}
