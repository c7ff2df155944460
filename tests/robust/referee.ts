import type { FlashAnswer } from '../../src/engine/equilibrium/types';
import type { Side, ThermoModel } from '../../src/engine/thermo/types';

/** What is wrong with an answer, recomputed from its phases alone; undefined when nothing is. */
export function faultOf(model: ThermoModel, z: Float64Array, answer: FlashAnswer): string | undefined {
  const { phases, T_K, P_Pa } = answer;
  let fractions = 0;
  for (const phase of phases) {
    fractions += phase.fraction;
    let sum = 0;
    for (const x of phase.x) {
      if (!(x >= 0)) return `a fraction is ${x}`;
      sum += x;
    }
    if (Math.abs(sum - 1) > 1e-12) return `fractions of a phase sum to ${sum}`;
  }
  if (Math.abs(fractions - 1) > 1e-12) return `phases sum to ${fractions}`;
  for (let i = 0; i < z.length; i++) {
    let sum = 0;
    for (const phase of phases) sum += phase.fraction * phase.x[i]!;
    if (Math.abs(sum - z[i]!) > 1e-11 * z[i]!) return `material balance of ${i}: ${sum} for ${z[i]}`;
  }
  if (phases.length === 2 && !answer.liquidsTogether) {
    const worst = worstDifference(model, answer);
    if (!(worst <= 1e-9)) return `fugacities differ by ${worst}`;
    const [vapour, liquid] = phases.map((p) => p.v_m3_mol / model.pseudoCritical(p.x).v_m3_mol);
    if (!(vapour! > liquid!) && model.spec.kind !== 'raoult')
      return 'the vapour is expanded less than the liquid';
  }
  if (answer.liquidsTogether && phases.length === 2 && phases[0]!.fraction === 0) {
    return faultOfBoiling(model, z, answer);
  }
  if (answer.hiddenLiquid === undefined) {
    const below = lowestTrial(model, T_K, P_Pa, phases[phases.length - 1]!, phases[0]!);
    if (below < -1e-9) return `a trial phase lies ${below} below the plane`;
  }
  return undefined;
}

/**
 * Two liquids that are about to boil, told as one: the plane through the vapour carries them if nothing lies below it and
 * the told Gibbs energy h - T s lies on it. Needs neither liquid.
 */
function faultOfBoiling(model: ThermoModel, z: Float64Array, answer: FlashAnswer): string | undefined {
  const { phases, T_K, P_Pa } = answer;
  const [vapour] = phases;
  const below = lowestTrial(model, T_K, P_Pa, vapour!, vapour!);
  if (below < -1e-8) return `a trial phase lies ${below} below the plane of the boiling liquids`;
  if (!model.hasEntropy) return undefined;
  const gas = model.makeProps();
  const whole = model.makeProps();
  model.evaluate('vapour', T_K, P_Pa, vapour!.x, 0, gas);
  model.evaluate('liquid', T_K, P_Pa, z, 1, whole);
  const RT = 8.314462618 * T_K;
  let off = (whole.h_J_mol - answer.h_J_mol) / RT - (whole.s_J_molK - answer.s_J_molK) / 8.314462618;
  for (let i = 0; i < z.length; i++) {
    const apart = Math.log(vapour!.x[i]!) + gas.lnPhi[i]! - Math.log(z[i]!) - whole.lnPhi[i]!;
    off += z[i]! * apart;
  }
  return Math.abs(off) < 1e-8 ? undefined : `boiling liquids lie ${off} off their plane`;
}

function sideOf(answer: FlashAnswer, k: number): Side {
  return answer.phases.length === 2 ? (k === 0 ? 'vapour' : 'liquid') : 'stable';
}

/** Largest |difference of ln fugacity| between the two phases. */
export function worstDifference(model: ThermoModel, answer: FlashAnswer): number {
  const props = answer.phases.map((phase, k) => {
    const out = model.makeProps();
    model.evaluate(sideOf(answer, k), answer.T_K, answer.P_Pa, phase.x, 0, out);
    return out;
  });
  let worst = 0;
  for (let i = 0; i < model.n; i++) {
    const f = answer.phases.map((phase, k) => Math.log(phase.x[i]!) + props[k]!.lnPhi[i]!);
    worst = Math.max(worst, Math.abs(f[0]! - f[1]!));
  }
  return worst;
}

/**
 * Lowest tangent-plane distance met from many starts: every pure on both sides, the other phase's and Wilson's vapour
 * and liquid, mixtures of halves; plain substitution of up to 60 steps. Slow and simple on purpose.
 */
export function lowestTrial(
  model: ThermoModel,
  T: number,
  P: number,
  phase: { readonly x: Float64Array },
  other: { readonly x: Float64Array },
): number {
  const { n } = model;
  const props = model.makeProps();
  const d = new Float64Array(n);
  const plane = model.makeProps();
  const side: Side = other === phase ? 'stable' : 'liquid';
  model.evaluate(side, T, P, phase.x, 0, plane);
  for (let i = 0; i < n; i++) d[i] = Math.log(phase.x[i]!) + plane.lnPhi[i]!;
  const K = new Float64Array(n);
  model.startK(T, P, K);
  const starts: Float64Array[] = [];
  for (let i = 0; i < n; i++) {
    const pure = new Float64Array(n).fill(1e-6 / n);
    pure[i] = 1;
    starts.push(pure);
    starts.push(phase.x.map((x, k) => 0.5 * x + (k === i ? 0.5 : 0)));
  }
  starts.push(phase.x.map((x, k) => x * K[k]!));
  starts.push(phase.x.map((x, k) => x / K[k]!));
  starts.push(phase.x.map((x, k) => x * Math.cbrt(K[k]!)));
  starts.push(phase.x.map((x, k) => x / Math.cbrt(K[k]!)));
  let lowest = 0;
  const w = new Float64Array(n);
  for (const start of starts) {
    for (const trialSide of ['vapour', 'liquid'] as const) {
      let total = start.reduce((a, b) => a + b, 0);
      for (let i = 0; i < n; i++) w[i] = start[i]! / total;
      for (let pass = 0; pass < 60; pass++) {
        model.evaluate(trialSide, T, P, w, 0, props);
        let tpd = 0;
        for (let i = 0; i < n; i++) if (w[i]! > 0) tpd += w[i]! * (Math.log(w[i]!) + props.lnPhi[i]! - d[i]!);
        if (tpd < lowest) lowest = tpd;
        total = 0;
        let moved = 0;
        const next = new Float64Array(n);
        for (let i = 0; i < n; i++) {
          next[i] = Math.exp(d[i]! - props.lnPhi[i]!);
          total += next[i]!;
        }
        for (let i = 0; i < n; i++) {
          moved = Math.max(moved, Math.abs(next[i]! / total - w[i]!));
          w[i] = next[i]! / total;
        }
        if (moved < 1e-8) break;
      }
    }
  }
  return lowest;
}
