import type { Phase } from '../equilibrium/types';
import type { Model, PhaseProps } from '../thermo/types';
import { presentOf } from './present';

/** Relative step of the central differences: their error is near 1e-8 of the volume's slopes. */
const STEP = 1e-4;

/**
 * Cp / Cv of a gas: Cv = Cp + T (dV/dT)^2 / (dV/dP), slopes of the model's own volume by central differences.
 * Undefined for liquids, and where the slopes have no physical sign.
 */
export function heatCapacityRatio(phase: Phase, T_K: number, P_Pa: number, model: Model): number | undefined {
  if (phase.kind !== 'vapour') return undefined;
  const { thermo, x } = presentOf(phase.x, model);
  const out: PhaseProps = thermo.makeProps();
  const volume = (T: number, P: number): number => {
    thermo.evaluate('vapour', T, P, x, 0, out);
    return out.v_m3_mol;
  };
  const [dT, dP] = [STEP * T_K, STEP * P_Pa];
  const vT = (volume(T_K + dT, P_Pa) - volume(T_K - dT, P_Pa)) / (2 * dT);
  const vP = (volume(T_K, P_Pa + dP) - volume(T_K, P_Pa - dP)) / (2 * dP);
  const cv = phase.cp_J_molK + (T_K * vT * vT) / vP;
  return vP < 0 && cv > 0 && Number.isFinite(cv) ? phase.cp_J_molK / cv : undefined;
}
