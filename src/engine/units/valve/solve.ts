import type { StreamState } from '../../equilibrium/types';
import { noSolution, type Outcome, solved } from '../../outcome';
import { answerOf } from '../answer';
import { placesOf } from '../present';
import { emptyStream, outletPressure, streamAt, totalOf, warmFrom } from '../streams';
import type { Answer, Call, UnitKind } from '../types';
import { valveLimits } from './limits';
import type { ValveResults, ValveSettings } from './types';

/** How far above its bubble point a liquid that flashes is looked for first, by its way from the inlet's temperature [-]. */
const ABOVE = 0.1;

/**
 * Where the search for the outlet's temperature starts [K]. A liquid that flashes cools to near its bubble point at the lower
 * pressure: that is where sum x K is what it is at the inlet, or 1 if that is less, by the model's start values of K, which go
 * nearly as exp(-1/T). Anything else starts at the inlet's temperature.
 */
function startT_K(call: Call<ValveSettings>, inlet: StreamState, P_Pa: number): number {
  const { T_K, n_mol_s } = inlet;
  if (inlet.vapourFraction > 0 || P_Pa >= inlet.P_Pa) return T_K;
  const present = placesOf(n_mol_s);
  const model = call.model.of(present);
  const K = new Float64Array(present.length);
  const total = totalOf(n_mol_s);
  const lnSum = (T: number, P: number): number => {
    model.startK(T, P, K);
    let sum = 0;
    for (let k = 0; k < K.length; k++) sum += (n_mol_s[present[k]!]! / total) * K[k]!;
    return Math.log(sum);
  };
  const wanted = Math.max(0, lnSum(T_K, inlet.P_Pa));
  let [T, miss] = [T_K, lnSum(T_K, P_Pa) - wanted];
  if (!(miss > 0)) return T_K;
  let [before, missBefore] = [T_K * 1.01, lnSum(T_K * 1.01, P_Pa) - wanted];
  for (let pass = 0; pass < 6 && Math.abs(miss) > 1e-3; pass++) {
    const slope = (miss - missBefore) / (1 / T - 1 / before);
    [before, missBefore] = [T, miss];
    T = 1 / (1 / T - miss / slope);
    if (!(T > 0.5 * T_K && T <= T_K)) return T_K;
    miss = lnSum(T, P_Pa) - wanted;
  }
  return T + ABOVE * (T_K - T);
}

function solve(call: Call<ValveSettings>): Outcome<Answer<ValveResults>> {
  const inlet = call.in.in!;
  const P = outletPressure(call, call.settings.p, inlet.P_Pa);
  if (P.state !== 'solved') return noSolution(...P.findings);
  const made =
    inlet.phases.length === 0
      ? solved(emptyStream(call.model.nc, inlet.T_K, P.value))
      : P.value === inlet.P_Pa
        ? solved(inlet)
        : streamAt(
            call,
            inlet.n_mol_s,
            { P_Pa: P.value, H_W: inlet.H_W },
            call.warm === undefined
              ? { T_K: startT_K(call, inlet, P.value) }
              : warmFrom(call.warm, inlet.n_mol_s, inlet.T_K),
          );
  if (made.state !== 'solved') return noSolution(...made.findings);
  const out = made.value;
  const results: ValveResults = {
    drop_Pa: inlet.P_Pa - out.P_Pa,
    T_K: out.T_K,
    dT_K: out.T_K - inlet.T_K,
    vapourFraction: out.vapourFraction,
  };
  return solved(answerOf({ out }, results, out === inlet ? [] : [out]), made.findings);
}

/** Throttling at constant enthalpy. Gives pressure/not-positive, or the flash's reason why there is no such outlet. */
export const valve: UnitKind<ValveSettings, ValveResults> = { solve, limits: valveLimits };
