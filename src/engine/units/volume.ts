import type { Phase, StreamState } from '../equilibrium/types';
import type { Model } from '../thermo/types';
import { presentOf } from './present';
import { totalOf } from './total';

/** Standard acceleration of gravity [m/s2], exact by definition. */
export const GRAVITY_m_s2 = 9.80665;

/** Volume of one phase [m3/mol]: a liquid's by the liquid-volume method unless the model's own was chosen; else the model's own. */
export function phaseVolume_m3_mol(phase: Phase, stream: StreamState, model: Model): number {
  if (phase.kind !== 'liquid' && phase.kind !== 'liquid2') return phase.v_m3_mol;
  if (model.spec.liquidVolume === 'cubic') return phase.v_m3_mol;
  const { thermo, x } = presentOf(phase.x, model);
  return thermo.liquidVolume_m3_mol(stream.T_K, stream.P_Pa, x);
}

/** Actual volume flow of a stream, all phases that carry flow [m3/s]; 0 without flow. */
export function volumeFlow_m3_s(stream: StreamState, model: Model): number {
  let volume = 0;
  for (const phase of stream.phases)
    if (phase.fraction > 0) volume += totalOf(phase.n_mol_s) * phaseVolume_m3_mol(phase, stream, model);
  return volume;
}

/** Mass flow of amounts over the full list [kg/s]. */
export function massFlow_kg_s(n_mol_s: Float64Array, model: Model): number {
  let m = 0;
  for (let i = 0; i < n_mol_s.length; i++) m += n_mol_s[i]! * model.chemicals[i]!.MW_g_mol;
  return m * 1e-3;
}
