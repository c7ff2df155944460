import type { PhaseProps, ThermoModel } from '../thermo/types';
import type { PhaseKind } from './types';

/** What a phase is called, and as what it counts. */
export interface PhaseName {
  readonly kind: PhaseKind;
  /** The name follows the rule only: the model itself does not tell vapour from liquid here. */
  readonly byConvention: boolean;
  /** Counts as vapour in a vapour fraction. */
  readonly vapour: boolean;
}

/**
 * Name of a phase that stands alone: 'dense' above the pseudo-critical pressure and 0.9 of the pseudo-critical
 * temperature; else vapour when the molar volume exceeds the pseudo-critical volume, else liquid. Where the model has
 * two roots (or two sides) at this state its own word stands, and the name is not a matter of convention.
 */
export function nameOf(
  model: ThermoModel,
  T_K: number,
  P_Pa: number,
  x: Float64Array,
  props: PhaseProps,
): PhaseName {
  const critical = model.pseudoCritical(x);
  const vapour = props.single ? props.v_m3_mol > critical.v_m3_mol : props.side === 'vapour';
  const dense = P_Pa > critical.P_Pa && T_K > 0.9 * critical.T_K;
  return {
    kind: dense ? 'dense' : vapour ? 'vapour' : 'liquid',
    byConvention: props.single || dense,
    vapour,
  };
}

/**
 * How far a phase is expanded: molar volume over pseudo-critical volume. Of two phases the vapour is the one that is
 * expanded further; the bare molar volumes would call a heavy oil under compressed hydrogen a vapour.
 */
export function expansionOf(model: ThermoModel, x: Float64Array, props: PhaseProps): number {
  return props.v_m3_mol / model.pseudoCritical(x).v_m3_mol;
}
