import { nameOf } from './naming';
import type { FlashAnswer, FlashPhase, PhaseKind } from './types';
import type { FlashWork, Slot } from './work';

function phaseOf(slot: Slot, kind: PhaseKind, fraction: number, byConvention: boolean): FlashPhase {
  const { props } = slot;
  return {
    kind,
    fraction,
    x: slot.x.slice(),
    h_J_mol: props.h_J_mol,
    s_J_molK: props.s_J_molK,
    v_m3_mol: props.v_m3_mol,
    Z: props.Z,
    cp_J_molK: props.cp_J_molK,
    ...(byConvention ? { byConvention: true as const } : {}),
  };
}

/** Two liquids that the model cannot take as one, told as one: amounts and properties are those of both together. */
function lumpedOf(w: FlashWork): FlashPhase {
  const { vap, liq } = w;
  const both = (of: (slot: Slot) => number): number => vap.total * of(vap) + liq.total * of(liq);
  return {
    kind: 'liquid',
    fraction: 1,
    x: w.feed.x.slice(),
    h_J_mol: both((slot) => slot.props.h_J_mol),
    s_J_molK: both((slot) => slot.props.s_J_molK),
    v_m3_mol: both((slot) => slot.props.v_m3_mol),
    Z: both((slot) => slot.props.Z),
    cp_J_molK: both((slot) => slot.props.cp_J_molK),
  };
}

/** The answer that stands in the workspace, in its own arrays. */
export function answerOf(w: FlashWork): FlashAnswer {
  if (w.told !== undefined) return w.told;
  const { T_K, P_Pa, model } = w;
  const phases: FlashPhase[] = [];
  let vapourFraction = 0;
  if (w.phases === 2) {
    phases.push(phaseOf(w.vap, 'vapour', w.vap.total, false), phaseOf(w.liq, 'liquid', w.liq.total, false));
    vapourFraction = w.vap.total;
  } else if (w.lumped) phases.push(lumpedOf(w));
  else {
    const name = nameOf(model, T_K, P_Pa, w.feed.x, w.feed.props);
    phases.push(phaseOf(w.feed, name.kind, 1, name.byConvention));
    vapourFraction = name.vapour ? 1 : 0;
  }
  let h_J_mol = 0;
  let s_J_molK = 0;
  for (const phase of phases) {
    h_J_mol += phase.fraction * phase.h_J_mol;
    s_J_molK += phase.fraction * phase.s_J_molK;
  }
  return {
    T_K,
    P_Pa,
    h_J_mol,
    s_J_molK,
    vapourFraction,
    phases,
    iterations: w.iterations,
    residual: w.residual,
    ...(w.hidden ? { hiddenLiquid: w.hiddenX.slice() } : {}),
    ...(w.lumped ? { liquidsTogether: true as const } : {}),
  };
}
