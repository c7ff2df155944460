import type { StreamState } from '../../equilibrium/types';
import type { Port } from '../../ids';
import { type Finding, noSolution, type Outcome, saw, solved } from '../../outcome';
import { answerOf } from '../answer';
import { scaledStream, totalOf } from '../streams';
import type { Answer, Call, FlowSI, UnitKind } from '../types';

export interface DivideSettings {
  readonly shares: Readonly<Record<Port, FlowSI>>;
}
export interface DivideResults {
  /** Molar share of the inlet by outlet [-]. */
  readonly shares: Readonly<Record<Port, number>>;
}

type Reason = Pick<Finding, 'code'> & { readonly port?: Port; readonly evidence?: Finding['evidence'] };

/** Mass flow of a stream, or of one of its chemicals [g/s]. */
function mass_g_s(stream: StreamState, call: Call<unknown>, only?: number): number {
  let m = 0;
  for (let i = 0; i < stream.n_mol_s.length; i++)
    if (only === undefined || i === only) m += stream.n_mol_s[i]! * call.model.chemicals[i]!.MW_g_mol;
  return m;
}

/** Share of the inlet that one outlet takes [-]; the outlet has the inlet's composition, so mole and mass shares agree. */
function shareOf(flow: FlowSI, inlet: StreamState, call: Call<unknown>): number {
  if (flow.is === 'molar') return flow.n_mol_s / totalOf(inlet.n_mol_s);
  if (flow.is === 'mass') return (flow.m_kg_s * 1e3) / mass_g_s(inlet, call);
  if (flow.chemical === undefined) return flow.share;
  return flow.basis === 'mole'
    ? (flow.share * inlet.n_mol_s[flow.chemical]!) / totalOf(inlet.n_mol_s)
    : (flow.share * mass_g_s(inlet, call, flow.chemical)) / mass_g_s(inlet, call);
}

function shares(call: Call<DivideSettings>, inlet: StreamState): Record<Port, number> | Reason {
  const named = call.settings.shares;
  const unknown = Object.keys(named).find((port) => !call.outPorts.includes(port));
  if (unknown !== undefined) return { code: 'divide/unknown-outlet', port: unknown };
  const rest = call.outPorts.filter((port) => !(port in named));
  const taker = rest[0];
  if (taker === undefined) return { code: 'divide/no-rest-outlet' };
  if (rest.length > 1) return { code: 'divide/several-rest-outlets' };
  const nothing = inlet.phases.length === 0;
  const found: Record<Port, number> = {};
  let sum = 0;
  for (const [port, flow] of Object.entries(named)) {
    if (nothing && flow.is !== 'share' && (flow.is === 'molar' ? flow.n_mol_s : flow.m_kg_s) > 0)
      return { code: 'divide/flow-from-nothing', port };
    const share = nothing ? 0 : shareOf(flow, inlet, call);
    const evidence = [saw('share', share, 'fraction')] as const;
    if (!(share >= 0)) return { code: 'divide/share-below-zero', port, evidence };
    found[port] = share;
    sum += share;
  }
  if (sum > 1 + 1e-12)
    return { code: 'divide/shares-above-whole', evidence: [saw('share', sum, 'fraction')] };
  found[taker] = Math.max(0, 1 - sum);
  return found;
}

const isReason = (found: Record<Port, number> | Reason): found is Reason => typeof found.code === 'string';

function solve(call: Call<DivideSettings>): Outcome<Answer<DivideResults>> {
  const inlet = call.in.in!;
  const found = shares(call, inlet);
  if (isReason(found)) {
    const { code, port, evidence = [] } = found;
    const at = port === undefined ? { unit: call.unit } : { unit: call.unit, port, path: `shares.${port}` };
    return noSolution({ code, weight: 'beyond-limit', at, evidence });
  }
  const out: Record<Port, StreamState> = {};
  for (const [port, share] of Object.entries(found)) out[port] = scaledStream(inlet, share);
  return solved(answerOf(out, { shares: found }, []));
}

/**
 * Given split of one stream; state and composition stay, so that mole and mass shares agree. The outlet without a share takes
 * the rest.
 *
 * Gives divide/unknown-outlet, divide/no-rest-outlet, divide/several-rest-outlets, divide/share-below-zero,
 * divide/shares-above-whole or divide/flow-from-nothing.
 */
export const divide: UnitKind<DivideSettings, DivideResults> = { solve, limits: () => [] };
