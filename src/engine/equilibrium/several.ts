import type { ThermoModel } from '../thermo/types';
import { flashTP } from './tp';
import type { Condition, FlashAnswer } from './types';
import type { FlashWork } from './work';

/** Steps from a found state towards denser ones: the pressure times, the temperature divided by. */
const STEP = { P: 1.05, T: 1.01 };
const STEPS = 80;
/** Halvings of the last step, to see where the vapour fraction goes before the phases become one. */
const HALVINGS = 7;
/** Below these shares of the pseudo-critical temperature and pressure nothing is retrograde, and nothing is looked for. */
const HOT = 0.95;
const HIGH = 0.9;
/** A change of the vapour fraction that counts. */
const MOVES = 1e-5;

/** Whether states of a mixture at a temperature or a pressure may be retrograde at all. */
export function mayComeAgain(model: ThermoModel, z: Float64Array, given: 'T' | 'P', value: number): boolean {
  if (model.n === 1 || model.spec.kind === 'raoult') return false;
  const critical = model.pseudoCritical(z);
  return given === 'T' ? value > HOT * critical.T_K : value > HIGH * critical.P_Pa;
}

/**
 * Whether a vapour fraction at a given temperature or pressure is met again on the dense side of the state found
 * (retrograde): the vapour fraction then comes back before the phases have become one. A look by steps, which may pass over a
 * narrow loop, and only where the mixture is near or above its pseudo-critical point.
 *
 * @param answer  the state found; the workspace's contents are undefined afterwards
 */
export function comesAgain(w: FlashWork, z: Float64Array, at: Condition, answer: FlashAnswer): boolean {
  if (!('vapourFraction' in at)) return false;
  const given = 'T_K' in at ? 'T' : 'P_Pa' in at ? 'P' : undefined;
  if (given === undefined) return false;
  if (!mayComeAgain(w.model, z, given, given === 'T' ? answer.T_K : answer.P_Pa)) return false;
  const { T_K, P_Pa } = answer;
  /** Vapour fraction k steps on, undefined for one phase, NaN where nothing settles. */
  const on = (k: number): number | undefined => {
    const ok =
      given === 'T'
        ? flashTP(w, z, T_K, P_Pa * STEP.P ** k, 'nothing')
        : flashTP(w, z, T_K / STEP.T ** k, P_Pa, 'nothing');
    if (!ok) return Number.NaN;
    return w.phases === 1 ? undefined : w.vap.total;
  };
  const asked = at.vapourFraction;
  let least = asked;
  let last = asked;
  let rises = false;
  const isMet = (now: number): boolean => {
    if (now > asked + MOVES && least < asked - MOVES) return true;
    if (now < least) least = now;
    rises = now > last + MOVES;
    last = now;
    return false;
  };
  for (let k = 1; k <= STEPS; k++) {
    const now = on(k);
    if (now !== undefined) {
      if (isMet(now)) return true;
      continue;
    }
    let [two, one] = [k - 1, k];
    for (let half = 0; half < HALVINGS; half++) {
      const middle = (two + one) / 2;
      const fraction = on(middle);
      if (fraction === undefined) one = middle;
      else {
        two = middle;
        if (isMet(fraction)) return true;
      }
    }
    // Still rising where the phases become one: they do so as vapour, past every fraction.
    return rises && least < asked - MOVES;
  }
  return false;
}
