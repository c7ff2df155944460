import type { StreamCondition } from '../../equilibrium/stream';
import type { StreamState } from '../../equilibrium/types';
import { noSolution, type Outcome, saw, solved } from '../../outcome';
import { answerOf } from '../answer';
import { emptyStream, outletPressure, streamAt, warmFrom } from '../streams';
import type { Answer, Call } from '../types';
import type { HeatedResults, HeatedSettings } from './types';

/** A stated distance from the bubble point (below) or the dew point (above) at the outlet's pressure. */
function fromSaturation(
  call: Call<HeatedSettings>,
  inlet: StreamState,
  P_Pa: number,
  side: 'subcooling' | 'superheat',
  distance_K: number,
): Outcome<StreamCondition> {
  const edge = { P_Pa, vapourFraction: side === 'subcooling' ? 0 : 1 };
  if (distance_K === 0) return solved(edge);
  const point = streamAt(call, inlet.n_mol_s, edge);
  if (point.state !== 'solved') return noSolution(...point.findings);
  const T_K = side === 'subcooling' ? point.value.T_K - distance_K : point.value.T_K + distance_K;
  return wantTemperature(call, P_Pa, T_K, side);
}

function wantTemperature(
  call: Call<HeatedSettings>,
  P_Pa: number,
  T_K: number,
  path: string,
): Outcome<StreamCondition> {
  if (T_K > 0) return solved({ T_K, P_Pa });
  return noSolution({
    code: 'temperature/not-positive',
    weight: 'beyond-limit',
    at: { unit: call.unit, path },
    evidence: [saw('temperature', T_K, 'temperature')],
  });
}

function wanted(call: Call<HeatedSettings>, inlet: StreamState): Outcome<StreamCondition> {
  const s = call.settings;
  if (s.T !== undefined && s.vapourFraction !== undefined)
    return solved({ T_K: s.T, vapourFraction: s.vapourFraction });
  const outlet = outletPressure(call, s.p ?? { drop: 0 }, inlet.P_Pa);
  if (outlet.state !== 'solved') return noSolution(...outlet.findings);
  const P_Pa = outlet.value;
  if (s.T !== undefined) return wantTemperature(call, P_Pa, s.T, 'T');
  if (s.dT !== undefined) return wantTemperature(call, P_Pa, inlet.T_K + s.dT, 'dT');
  if (s.vapourFraction !== undefined) return solved({ P_Pa, vapourFraction: s.vapourFraction });
  if (s.subcooling !== undefined) return fromSaturation(call, inlet, P_Pa, 'subcooling', s.subcooling);
  if (s.superheat !== undefined) return fromSaturation(call, inlet, P_Pa, 'superheat', s.superheat);
  if (s.duty !== undefined) return solved({ P_Pa, H_W: inlet.H_W + s.duty });
  throw new Error('heater or cooler without a condition: compile lets none through');
}

/** Nothing flows: the outlet keeps the temperature, and no heat is asked for. */
function nothing(call: Call<HeatedSettings>, inlet: StreamState): Outcome<Answer<HeatedResults>> {
  const P = outletPressure(call, call.settings.p ?? { drop: 0 }, inlet.P_Pa);
  if (P.state !== 'solved') return noSolution(...P.findings);
  const out = emptyStream(call.model.nc, call.settings.T ?? inlet.T_K, P.value);
  return solved(answerOf({ out }, { duty_W: 0, T_K: out.T_K, P_Pa: out.P_Pa, vapourFraction: 0 }, []));
}

/**
 * A stream brought to a condition by heat alone; heaters and coolers are the same sum with another sign. The duty is the
 * difference of the enthalpy flows; where the duty is given, the outlet's enthalpy follows from it exactly.
 *
 * @returns  pressure/not-positive, temperature/not-positive, or the flash's reason why there is no such outlet; without flow an
 *           outlet without flow and no duty, whatever is set
 */
export function solveHeated(call: Call<HeatedSettings>): Outcome<Answer<HeatedResults>> {
  const inlet = call.in.in!;
  if (inlet.phases.length === 0) return nothing(call, inlet);
  const want = wanted(call, inlet);
  if (want.state !== 'solved') return noSolution(...want.findings);
  const warm = warmFrom(call.warm, inlet.n_mol_s, inlet.T_K);
  const made = streamAt(call, inlet.n_mol_s, want.value, warm);
  if (made.state !== 'solved') return noSolution(...made.findings);
  const out = made.value;
  // A given duty is kept as given: the difference of two large enthalpy flows would only repeat it with rounding.
  const duty_W = call.settings.duty ?? out.H_W - inlet.H_W;
  const results = { duty_W, T_K: out.T_K, P_Pa: out.P_Pa, vapourFraction: out.vapourFraction };
  return solved(answerOf({ out }, results, [out], duty_W), made.findings);
}
