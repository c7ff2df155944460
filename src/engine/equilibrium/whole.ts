import type { FlashWork } from './work';

/** What fixes a state besides temperature or pressure: molar enthalpy or molar entropy. */
export type Caloric = 'h' | 's';

/** Temperatures that are searched [K]. */
export const LEAST_T_K = 20;
export const MOST_T_K = 4000;

/** Molar enthalpy [J/mol] or entropy [J/(mol K)] of the whole, as the workspace's answer has it. */
export function wholeOf(w: FlashWork, of: Caloric): number {
  const { vap, liq, feed } = w;
  if (w.phases === 1 && !w.lumped) return of === 'h' ? feed.props.h_J_mol : feed.props.s_J_molK;
  return of === 'h'
    ? vap.total * vap.props.h_J_mol + liq.total * liq.props.h_J_mol
    : vap.total * vap.props.s_J_molK + liq.total * liq.props.s_J_molK;
}

/** How close an enthalpy or entropy must come to what was asked [J/mol, J/(mol K)]: some rounding errors. */
export function closeEnough(of: Caloric, T: number, target: number): number {
  const size = of === 'h' ? 8.314 * T : 8.314;
  return 4e-13 * size + 1e-15 * Math.abs(target);
}

/** What the rounding of a liquid root may leave in enthalpy or entropy, however fine the temperature is tuned. */
export function rounding(of: Caloric, T: number): number {
  return 4e-11 * (of === 'h' ? 8.314 * T : 8.314);
}
