import type { StreamState } from '../../equilibrium/types';
import { noSolution, type Outcome, solved } from '../../outcome';
import { answerOf } from '../answer';
import { emptyStream, type Mixed, mixed, outletPressure, streamAt, warmFrom } from '../streams';
import type { Answer, Call, UnitKind } from '../types';
import { reactorLimits } from './limits';
import { heatOfReaction_W, react } from './react';
import type { ReactorResults, ReactorSettings } from './types';

function outlet(call: Call<ReactorSettings>, all: Mixed, n_mol_s: Float64Array): Outcome<StreamState> {
  const { p, h = {} } = call.settings;
  const warm = warmFrom(call.warm, n_mol_s, all.T_K);
  if (h.T !== undefined && h.vapourFraction !== undefined && all.total_mol_s > 0)
    return streamAt(call, n_mol_s, { T_K: h.T, vapourFraction: h.vapourFraction }, warm);
  const P = outletPressure(call, p ?? { drop: 0 }, all.P_Pa);
  if (P.state !== 'solved') return noSolution(...P.findings);
  const P_Pa = P.value;
  if (all.total_mol_s === 0) return solved(emptyStream(call.model.nc, h.T ?? all.T_K, P_Pa));
  if (h.T !== undefined) return streamAt(call, n_mol_s, { T_K: h.T, P_Pa }, warm);
  if (h.vapourFraction !== undefined)
    return streamAt(call, n_mol_s, { P_Pa, vapourFraction: h.vapourFraction }, warm);
  return streamAt(call, n_mol_s, { P_Pa, H_W: all.H_W + (h.duty ?? 0) }, warm);
}

function solve(call: Call<ReactorSettings>): Outcome<Answer<ReactorResults>> {
  const { reactions, h } = call.settings;
  const all = mixed(call.in, call.model.nc);
  const reacted = react(call, reactions, all.n_mol_s);
  if (reacted.state !== 'solved') return noSolution(...reacted.findings);
  const { n_mol_s, extents_mol_s } = reacted.value;
  const made = outlet(call, all, n_mol_s);
  if (made.state !== 'solved') return noSolution(...made.findings);
  const out = made.value;
  const flows = all.total_mol_s > 0;
  const heat_W = h === undefined || !flows ? 0 : (h.duty ?? out.H_W - all.H_W);
  const results: ReactorResults = {
    T_K: out.T_K,
    P_Pa: out.P_Pa,
    vapourFraction: out.vapourFraction,
    ...(h === undefined ? {} : { duty_W: heat_W }),
    heatOfReaction_W: heatOfReaction_W(reactions, extents_mol_s, call.model.chemicals),
    extents_mol_s,
  };
  const answer = answerOf({ out }, results, flows ? [out] : [], heat_W);
  return solved({ ...answer, made_mol_s: n_mol_s.map((n, i) => n - all.n_mol_s[i]!) }, made.findings);
}

/** Given conversions, one reaction after another, then the outlet by pressure and heat. */
export const reactor: UnitKind<ReactorSettings, ReactorResults> = { solve, limits: reactorLimits };
