import type { StageSystem } from '../../column/system';
import { productFlow } from '../../column/targets';
import type { ColumnProduct } from '../../column/types';
import type { StreamState } from '../../equilibrium/types';
import type { Port } from '../../ids';
import type { PhaseProps } from '../../thermo/types';
import { emptyStream } from '../streams';
import type { Call } from '../types';
import { topPort } from './free';
import type { ColumnSettings } from './settings';
import type { ColumnJob } from './task';

export interface Outlets {
  readonly out: Readonly<Record<Port, StreamState>>;
  readonly condenser?: number;
  readonly reboiler?: number;
  readonly heat_W: number;
}

interface Leaving {
  readonly port: Port;
  readonly n: Float64Array;
  readonly place: number;
  readonly props: PhaseProps;
  readonly kind: 'vapour' | 'liquid';
  readonly T_K: number;
  readonly P_Pa: number;
}

/** What leaves where, flows over the present chemicals. */
function leavingOf(call: Call<ColumnSettings>, job: ColumnJob, s: StageSystem): Leaving[] {
  const foot = s.places - 1;
  const { P_Pa, draws, subcooling_K } = s.task;
  const flows = (product: ColumnProduct): Float64Array => {
    const flow = productFlow(s, product);
    return Float64Array.from({ length: s.n }, (_, i) => flow.at(i));
  };
  const liquidTop = s.totalCondenser;
  const leaving: Leaving[] = [
    {
      port: topPort(call.settings),
      n: flows('top'),
      place: 0,
      props: liquidTop ? s.reflux : s.vap[0]!,
      kind: liquidTop ? 'liquid' : 'vapour',
      T_K: s.T[0]! - (liquidTop ? subcooling_K : 0),
      P_Pa: P_Pa[0]!,
    },
    {
      port: 'bottoms',
      n: flows('bottoms'),
      place: foot,
      props: s.liq[foot]!,
      kind: 'liquid',
      T_K: s.T[foot]!,
      P_Pa: P_Pa[foot]!,
    },
    ...draws.map((d, k) => ({
      port: job.drawPorts[k]!,
      n: flows(k),
      place: d.place,
      props: (d.phase === 'liquid' ? s.liq : s.vap)[d.place]!,
      kind: d.phase,
      T_K: s.T[d.place]!,
      P_Pa: P_Pa[d.place]!,
    })),
  ];
  for (const l of leaving) withHeatCapacity(s, l);
  return leaving;
}

/** The last step of a solve takes no derivatives: heat capacities in the system are those of a state before its answer. */
function withHeatCapacity(s: StageSystem, { place, kind, props, T_K, P_Pa }: Leaving): void {
  const [flows, total] = kind === 'liquid' ? [s.l, s.L[place]!] : [s.v, s.V[place]!];
  const x = s.scratch;
  for (let i = 0; i < s.n; i++) x[i] = flows[place * s.n + i]! / total;
  s.model.evaluate(kind, T_K, P_Pa, x, 2, props);
}

/**
 * Per chemical the largest product flow becomes what the others leave of the feed: the balance then holds to rounding, and
 * no trace loses its digits.
 */
function closeChemicals(leaving: readonly Leaving[], fed: Float64Array): void {
  for (let i = 0; i < fed.length; i++) {
    let most = leaving[0]!;
    for (const l of leaving) if (l.n[i]! > most.n[i]!) most = l;
    let rest = fed[i]!;
    for (const l of leaving) if (l !== most) rest -= l.n[i]!;
    most.n[i] = rest;
  }
}

function streamOf(
  l: Leaving,
  H_W: number | undefined,
  present: readonly number[],
  nc: number,
  hasS: boolean,
): StreamState {
  const n_mol_s = new Float64Array(nc);
  const x = new Float64Array(nc);
  let total = 0;
  for (const n of l.n) total += n;
  present.forEach((full, i) => {
    n_mol_s[full] = l.n[i]!;
    x[full] = l.n[i]! / total;
  });
  const { h_J_mol, s_J_molK, v_m3_mol, Z, cp_J_molK } = l.props;
  return {
    n_mol_s,
    P_Pa: l.P_Pa,
    T_K: l.T_K,
    H_W: H_W ?? total * h_J_mol,
    ...(hasS ? { S_W_K: total * s_J_molK } : {}),
    phases: [{ kind: l.kind, n_mol_s, fraction: 1, x, h_J_mol, s_J_molK, v_m3_mol, Z, cp_J_molK }],
    vapourFraction: l.kind === 'vapour' ? 1 : 0,
    residual: 0,
    iterations: 0,
  };
}

/**
 * Products of a solved column as streams, saturated (but for a subcooled distillate), and the heat of its ends. Chemicals and
 * energy close to rounding: the reboiler's duty, else the condenser's, is what the whole balance leaves; without either the
 * bottoms carry the rest of the enthalpy. Outlets that the column has no product for are without flow.
 *
 * @param condenserDuty_W  asked only where both ends are there [W]
 */
export function outletsOf(
  call: Call<ColumnSettings>,
  job: ColumnJob,
  s: StageSystem,
  condenserDuty_W: () => number,
): Outlets {
  const { model } = call;
  const leaving = leavingOf(call, job, s);
  const fed = new Float64Array(s.n);
  let H = 0;
  for (const port of job.feedPorts) {
    const stream = call.in[port]!;
    H += stream.H_W;
    job.present.forEach((full, i) => {
      fed[i]! += stream.n_mol_s[full]!;
    });
  }
  closeChemicals(leaving, fed);
  const { hasEntropy } = s.model;
  const out: Record<Port, StreamState> = {};
  const reboiler = call.settings.bottom.reboiler;
  const condenser = call.settings.top.distillate !== 'none';
  let others = 0;
  for (const l of leaving) {
    const stream = streamOf(l, undefined, job.present, model.nc, hasEntropy);
    out[l.port] = stream;
    if (l.port !== 'bottoms') others += stream.H_W;
  }
  if (!reboiler && !condenser) out.bottoms = { ...out.bottoms!, H_W: H - others };
  const needed = others + out.bottoms!.H_W - H;
  for (const port of call.outPorts)
    if (!(port in out)) out[port] = emptyStream(model.nc, s.T[0]!, s.task.P_Pa[0]!);
  if (reboiler && condenser) {
    const atTop = condenserDuty_W();
    return { out, condenser: atTop, reboiler: needed - atTop, heat_W: needed };
  }
  if (reboiler) return { out, reboiler: needed, heat_W: needed };
  return condenser ? { out, condenser: needed, heat_W: needed } : { out, heat_W: 0 };
}
