import type { PhaseResult } from '../engine/network/types';
import { gasVolumes, type Measures } from '../quantity';
import type { SolvedStream } from './input';

/** A dense phase stands in the vapour's place; its own name is told beside it. */
export const isGas = (phase: PhaseResult): boolean => phase.kind === 'vapour' || phase.kind === 'dense';

/** What of a stream is vapour, or a dense phase [mol/s]: all that is told as volume of gas; undefined where there is none. */
export function vapour_mol_s({ phases, n_mol_s }: SolvedStream): number | undefined {
  const gas = phases.find((phase) => phase.fraction > 0 && isGas(phase));
  return gas && gas.fraction * n_mol_s;
}

/** Volume of an ideal gas at 0 degC and 101325 Pa [m3/mol]: R T / P with the CODATA gas constant. */
const NORMAL_m3_mol = (8.314462618 * 273.15) / 101325;

/** The vapour alone as ideal gas at 0 degC and 101325 Pa [m3/s]; undefined without vapour. */
export function normalVapour_m3_s(stream: SolvedStream): number | undefined {
  const n = vapour_mol_s(stream);
  return n === undefined ? undefined : n * NORMAL_m3_mol;
}

/** The row of the vapour as ideal gas: its name, which says the reference state, and the measures that it is shown in. */
export function vapourAsGas(measures: Measures): { readonly label: string; readonly measures: Measures } {
  const gas = gasVolumes(measures);
  return { label: `Vapour as ideal gas, ${gas.state}`, measures: gas.measures };
}

export const STANDARD_LIQUID = 'Standard liquid, 15 °C';

/** "methane and nitrogen have no liquid density at 15 °C": why a stream has no standard liquid flow; undefined where it has. */
export function noStandardLiquid(
  { noStandardLiquid: lacking }: SolvedStream,
  nameOf: (chemical: number) => string,
): string | undefined {
  if (!lacking || lacking.length === 0) return undefined;
  const names = lacking.map(nameOf);
  const last = names.at(-1);
  return names.length === 1
    ? `${last} has no liquid density at 15 °C`
    : `${names.slice(0, -1).join(', ')} and ${last} have no liquid density at 15 °C`;
}
