import { noSolution, type Outcome, solved } from '../../outcome';
import { answerOf } from '../answer';
import type { PressureSI } from '../groups';
import { emptyStream, outletPressure, streamAt, warmFrom } from '../streams';
import type { Answer, Call, UnitKind } from '../types';
import { valveLimits } from './limits';

export interface ValveSettings {
  readonly p: PressureSI;
}
export interface ValveResults {
  readonly drop_Pa: number;
  readonly T_K: number;
  /** Outlet less inlet. */
  readonly dT_K: number;
  readonly vapourFraction: number;
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
            warmFrom(call.warm, inlet.n_mol_s, inlet.T_K),
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

/** Throttling at constant enthalpy. */
export const valve: UnitKind<ValveSettings, ValveResults> = { solve, limits: valveLimits };
