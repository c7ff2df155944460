import { noSolution, type Outcome, solved } from '../../outcome';
import { answerOf } from '../answer';
import { emptyStream, mixed, outletPressure, streamAt, warmFrom } from '../streams';
import type { Answer, Call, UnitKind } from '../types';
import { joinLimits } from './limits';
import type { JoinResults, JoinSettings } from './types';

function solve(call: Call<JoinSettings>): Outcome<Answer<JoinResults>> {
  const all = mixed(call.in, call.model.nc);
  const P = outletPressure(call, call.settings.p, all.P_Pa);
  if (P.state !== 'solved') return noSolution(...P.findings);
  if (all.total_mol_s === 0) {
    const out = emptyStream(call.model.nc, all.T_K, P.value);
    return solved(answerOf({ out }, { T_K: out.T_K, P_Pa: out.P_Pa }, []));
  }
  const flowing = Object.values(call.in).filter((s) => s.phases.length > 0);
  const only = flowing[0];
  // One stream that keeps its pressure keeps its state too, bit for bit.
  if (flowing.length === 1 && only && only.P_Pa === P.value)
    return solved(answerOf({ out: only }, { T_K: only.T_K, P_Pa: only.P_Pa }, []));
  const made = streamAt(
    call,
    all.n_mol_s,
    { P_Pa: P.value, H_W: all.H_W },
    warmFrom(call.warm, all.n_mol_s, all.T_K),
  );
  if (made.state !== 'solved') return noSolution(...made.findings);
  const out = made.value;
  return solved(answerOf({ out }, { T_K: out.T_K, P_Pa: out.P_Pa }, [out]), made.findings);
}

/** Adiabatic mixing. Gives pressure/not-positive, or the flash's reason why there is no such state. */
export const join: UnitKind<JoinSettings, JoinResults> = { solve, limits: joinLimits };
