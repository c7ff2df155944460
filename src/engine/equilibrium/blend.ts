import type { FlashAnswer, FlashPhase, PhaseKind } from './types';

/**
 * A state between two equilibrium states of the same T and P, of which at least one hides a second liquid: where three
 * phases meet, enthalpy jumps from two liquids to vapour and liquid, and what lies between is part of each. At the
 * three-phase line of a binary this is the exact state; the liquids are told as one.
 *
 * @param share  of b [-]
 */
export function between(a: FlashAnswer, b: FlashAnswer, share: number): FlashAnswer {
  const parts: [FlashPhase, number][] = [
    ...a.phases.map((phase): [FlashPhase, number] => [phase, phase.fraction * (1 - share)]),
    ...b.phases.map((phase): [FlashPhase, number] => [phase, phase.fraction * share]),
  ];
  const isVapour = ([phase]: [FlashPhase, number]): boolean => phase.kind === 'vapour';
  const phases: FlashPhase[] = [];
  const vapour = together('vapour', parts.filter(isVapour));
  const liquid = together(
    'liquid',
    parts.filter((part) => !isVapour(part)),
  );
  if (vapour !== undefined) phases.push(vapour);
  if (liquid !== undefined) phases.push(liquid);
  const mean = (of: (answer: FlashAnswer) => number): number => (1 - share) * of(a) + share * of(b);
  const hiddenLiquid = a.hiddenLiquid ?? b.hiddenLiquid;
  return {
    T_K: b.T_K,
    P_Pa: b.P_Pa,
    h_J_mol: mean((answer) => answer.h_J_mol),
    s_J_molK: mean((answer) => answer.s_J_molK),
    vapourFraction: vapour?.fraction ?? 0,
    phases,
    iterations: a.iterations + b.iterations,
    residual: Math.max(a.residual, b.residual),
    ...(hiddenLiquid ? { hiddenLiquid, liquidsTogether: true as const } : {}),
  };
}

function together(kind: PhaseKind, parts: readonly [FlashPhase, number][]): FlashPhase | undefined {
  const first = parts[0];
  if (first === undefined) return undefined;
  let fraction = 0;
  for (const [, amount] of parts) fraction += amount;
  // A phase that is about to form or to vanish: nothing of it, but a state of its own.
  if (fraction === 0) return { ...first[0], fraction };
  const mean = (of: (phase: FlashPhase) => number): number => {
    let sum = 0;
    for (const [phase, amount] of parts) sum += amount * of(phase);
    return sum / fraction;
  };
  return {
    kind,
    fraction,
    x: first[0].x.map((_, i) => mean((phase) => phase.x[i]!)),
    h_J_mol: mean((phase) => phase.h_J_mol),
    s_J_molK: mean((phase) => phase.s_J_molK),
    v_m3_mol: mean((phase) => phase.v_m3_mol),
    Z: mean((phase) => phase.Z),
    cp_J_molK: mean((phase) => phase.cp_J_molK),
  };
}
