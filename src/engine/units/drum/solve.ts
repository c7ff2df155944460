import { streamOfPhase } from '../../equilibrium/stream';
import type { Phase, StreamState } from '../../equilibrium/types';
import { noSolution, type Outcome, solved } from '../../outcome';
import { answerOf } from '../answer';
import { emptyStream, type Mixed, mixed, outletPressure, streamAt, warmFrom } from '../streams';
import type { Answer, Call, UnitKind } from '../types';
import { drumLimits } from './limits';
import type { DrumResults, DrumSettings } from './types';

function flash(call: Call<DrumSettings>, all: Mixed): Outcome<StreamState> {
  const { p, h = {} } = call.settings;
  const warm = warmFrom(call.warm, all.n_mol_s, all.T_K);
  if (h.T !== undefined && h.vapourFraction !== undefined && all.total_mol_s > 0)
    return streamAt(call, all.n_mol_s, { T_K: h.T, vapourFraction: h.vapourFraction }, warm);
  const P = outletPressure(call, p ?? { drop: 0 }, all.P_Pa);
  if (P.state !== 'solved') return noSolution(...P.findings);
  const P_Pa = P.value;
  if (all.total_mol_s === 0) return solved(emptyStream(call.model.nc, h.T ?? all.T_K, P_Pa));
  if (h.T !== undefined) return streamAt(call, all.n_mol_s, { T_K: h.T, P_Pa }, warm);
  if (h.vapourFraction !== undefined)
    return streamAt(call, all.n_mol_s, { P_Pa, vapourFraction: h.vapourFraction }, warm);
  const flowing = Object.values(call.in).filter((s) => s.phases.length > 0);
  const only = flowing[0];
  // One stream at the drum's own pressure and no heat: it already is what the drum holds.
  if (!h.duty && flowing.length === 1 && only && only.P_Pa === P_Pa) return solved(only);
  return streamAt(call, all.n_mol_s, { P_Pa: P_Pa, H_W: all.H_W + (h.duty ?? 0) }, warm);
}

const isGas = (phase: Phase, whole: StreamState): boolean =>
  phase.kind === 'vapour' || (phase.kind === 'dense' && whole.vapourFraction >= 0.5);

/**
 * The two outlets, from the phases of the flash: nobody flashes them again. An outlet without a phase is a stream without flow
 * at the drum's conditions. With one phase the outlet is the whole, bit for bit; with two, what the vapour does not carry of the
 * enthalpy leaves with the liquid, so that the drum closes to rounding.
 */
function outlets(whole: StreamState): { vapour: StreamState; liquid: StreamState } {
  const none = emptyStream(whole.n_mol_s.length, whole.T_K, whole.P_Pa);
  const flowing = whole.phases.filter((p) => p.fraction > 0);
  const gas = flowing.filter((p) => isGas(p, whole));
  const liquid = flowing.filter((p) => !isGas(p, whole));
  if (gas.length === 0) return { vapour: none, liquid: whole };
  if (liquid.length === 0) return { vapour: whole, liquid: none };
  const vapour = streamOfPhase(whole, gas[0]!);
  return { vapour, liquid: { ...streamOfPhase(whole, liquid[0]!), H_W: whole.H_W - vapour.H_W } };
}

function solve(call: Call<DrumSettings>): Outcome<Answer<DrumResults>> {
  const all = mixed(call.in, call.model.nc);
  const made = flash(call, all);
  if (made.state !== 'solved') return noSolution(...made.findings);
  const whole = made.value;
  const { h } = call.settings;
  const heat_W = h === undefined ? 0 : (h.duty ?? whole.H_W - all.H_W);
  const results: DrumResults = {
    T_K: whole.T_K,
    P_Pa: whole.P_Pa,
    vapourFraction: whole.vapourFraction,
    ...(h === undefined ? {} : { duty_W: heat_W }),
  };
  const flashed = Object.values(call.in).includes(whole) || whole.phases.length === 0 ? [] : [whole];
  return solved(answerOf({ ...outlets(whole) }, results, flashed, heat_W), made.findings);
}

/**
 * One equilibrium stage between a vapour and a liquid outlet. Gives pressure/not-positive, or the flash's reason why there is
 * no such state.
 */
export const drum: UnitKind<DrumSettings, DrumResults> = { solve, limits: drumLimits };
