import type { AmountOf, ColumnDraw, ColumnFeed, ColumnProduct, ColumnTask, Fixing } from '../../column/types';
import type { StreamState } from '../../equilibrium/types';
import type { Port } from '../../ids';
import { type Finding, named, noSolution, type Outcome, saw, solved } from '../../outcome';
import { mixed } from '../streams';
import type { Call, FlowSI } from '../types';
import { topPort } from './free';
import type { ColumnSettings, FixedBy, PlaceSI } from './settings';

/** A column ready for the engine, and how its places and chemicals are called outside. */
export interface ColumnJob {
  readonly task: ColumnTask;
  /** Places of the model's chemicals in the full list. */
  readonly present: readonly number[];
  /** Feeds that flow, in the task's order, with their ports. */
  readonly feedPorts: readonly Port[];
  /** Side draws in the task's order. */
  readonly drawPorts: readonly Port[];
}

/** A finding of this unit that goes beyond limits: a reason why there is no answer. */
export const refuse = (
  call: Pick<Call<unknown>, 'unit'>,
  code: Finding['code'],
  at: Omit<Finding['at'], 'unit'>,
  evidence: Finding['evidence'] = [],
): Finding => ({ code, weight: 'beyond-limit', at: { unit: call.unit, ...at }, evidence });

/** Index of a place, counted from the top; undefined where the column has none such. */
export function placeOf(s: ColumnSettings, place: PlaceSI): number | undefined {
  const first = s.top.distillate === 'none' ? 0 : 1;
  if (place === 'condenser') return first === 1 ? 0 : undefined;
  if (place === 'reboiler') return s.bottom.reboiler ? first + s.stages : undefined;
  return place >= 1 && place <= s.stages ? first + place - 1 : undefined;
}

/** Name of a place by its index: the stage's number, or the end. */
export function nameOfPlace(s: ColumnSettings, place: number): PlaceSI {
  const first = s.top.distillate === 'none' ? 0 : 1;
  if (place < first) return 'condenser';
  return place >= first + s.stages ? 'reboiler' : place - first + 1;
}

/** Pressure of every place [Pa]: linear over the stages, the ends their own. */
function pressures({ stages, top, bottom: foot, pressure }: ColumnSettings): Float64Array {
  const { top: P1, bottom, perStage, condenser, reboiler } = pressure;
  const last = bottom ?? P1 + (perStage ?? 0) * (stages - 1);
  const P: number[] = top.distillate === 'none' ? [] : [condenser ?? P1];
  for (let j = 0; j < stages; j++) P.push(stages === 1 ? P1 : P1 + ((last - P1) * j) / (stages - 1));
  if (foot.reboiler) P.push(reboiler ?? last);
  return Float64Array.from(P);
}

/** An amount from a compiled flow; a share of the feeds is worked out here. */
function amountOf(flow: FlowSI, n_mol_s: Float64Array, call: Call<ColumnSettings>): AmountOf {
  if (flow.is === 'molar') return { value: flow.n_mol_s, basis: 'mole' };
  if (flow.is === 'mass') return { value: flow.m_kg_s, basis: 'mass' };
  let sum = 0;
  for (let i = 0; i < n_mol_s.length; i++) {
    if (flow.chemical !== undefined && flow.chemical !== i) continue;
    sum += n_mol_s[i]! * (flow.basis === 'mole' ? 1 : call.model.chemicals[i]!.MW_g_mol * 1e-3);
  }
  return { value: flow.share * sum, basis: flow.basis };
}

interface Fed {
  readonly place: number;
  readonly stream: StreamState;
}

/** Mole fractions of all vapour that comes with the feeds of a place, over the chemicals present; undefined without any. */
function vapourAt(at: number, fed: readonly Fed[], present: readonly number[]): Float64Array | undefined {
  const y = new Float64Array(present.length);
  for (const { place, stream } of fed) {
    if (place !== at) continue;
    const vapour = stream.phases.find(
      (p) => p.kind === 'vapour' || (p.kind === 'dense' && stream.vapourFraction >= 0.5),
    );
    if (vapour) for (let k = 0; k < y.length; k++) y[k]! += vapour.n_mol_s[present[k]!]!;
  }
  const total = y.reduce((a, b) => a + b, 0);
  return total > 0 ? y.map((n) => n / total) : undefined;
}

/** Feeds as the engine takes them: several at one place bring one vapour. */
function feedsOf(fed: readonly Fed[], present: readonly number[]): ColumnFeed[] {
  return fed.map(({ place, stream }) => {
    const y = vapourAt(place, fed, present);
    return {
      place,
      n_mol_s: Float64Array.from(present, (i) => stream.n_mol_s[i]!),
      H_W: stream.H_W,
      T_K: stream.T_K,
      vapourFraction: stream.vapourFraction,
      ...(y ? { y } : {}),
    };
  });
}

interface Reading {
  readonly call: Call<ColumnSettings>;
  readonly all: Float64Array;
  readonly present: readonly number[];
  readonly drawPorts: readonly Port[];
  readonly bad: Finding[];
}

function productOf(port: Port, { call, drawPorts, bad }: Reading, path: string): ColumnProduct {
  if (port === 'bottoms') return 'bottoms';
  if (port === topPort(call.settings)) return 'top';
  const draw = drawPorts.indexOf(port);
  if (draw < 0) bad.push(refuse(call, 'column/no-such-product', { path }, [named('port', port)]));
  return Math.max(draw, 0);
}

function chemicalOf(index: number, { call, present, bad }: Reading, path: string): number {
  const at = present.indexOf(index);
  if (at < 0)
    bad.push(
      refuse(call, 'column/chemical-absent', { path, chemical: call.model.chemicals[index]!.id }, [
        named('chemical', call.model.chemicals[index]!.id),
      ]),
    );
  return Math.max(at, 0);
}

function stageOf(place: PlaceSI, { call, bad }: Reading, at: Omit<Finding['at'], 'unit'>): number {
  const j = placeOf(call.settings, place);
  if (j === undefined) {
    const code = typeof place === 'number' ? 'column/no-such-stage' : 'column/no-such-end';
    const seen = typeof place === 'number' ? saw('stage', place, 'number') : named('end', place);
    bad.push(refuse(call, code, at, [seen, saw('stages', call.settings.stages, 'number')]));
  }
  return j ?? 0;
}

function fixingOf(x: FixedBy, k: number, r: Reading): Fixing {
  const path = `fixedBy.${k}`;
  switch (x.fix) {
    case 'refluxRatio':
      return { fix: 'refluxRatio', value: x.value };
    case 'boilup':
      return { fix: 'boilup', value: x.value };
    case 'flow':
      return {
        fix: 'flow',
        product: productOf(x.product, r, `${path}.product`),
        flow: amountOf(x.value, r.all, r.call),
      };
    case 'reflux':
      return { fix: 'reflux', flow: amountOf(x.value, r.all, r.call) };
    case 'purity':
    case 'recovery': {
      const product = productOf(x.product, r, `${path}.product`);
      const chemical = chemicalOf(x.chemical, r, `${path}.chemical`);
      return x.fix === 'purity'
        ? { fix: 'purity', product, chemical, value: x.value, basis: x.basis }
        : { fix: 'recovery', product, chemical, value: x.value };
    }
    case 'temperature':
      return { fix: 'temperature', place: stageOf(x.stage, r, { path: `${path}.stage` }), value: x.value };
    case 'duty':
      return { fix: 'duty', at: x.at, value: x.value };
  }
}

/** Efficiencies by place; the lowest stage needs a vapour from below, from a reboiler or from a feed. */
function efficiencies(places: number, r: Reading, feeds: readonly ColumnFeed[]): Float64Array {
  const { call, bad } = r;
  const out = new Float64Array(places).fill(1);
  call.settings.murphree?.forEach((range, k) => {
    const from = stageOf(range.from, r, { path: `murphree.${k}.from` });
    const to = stageOf(range.to, r, { path: `murphree.${k}.to` });
    for (let j = Math.min(from, to); j <= Math.max(from, to); j++) out[j] = range.value;
  });
  const last = places - 1;
  if (!call.settings.bottom.reboiler && out[last] !== 1 && !feeds.some((f) => f.place === last && f.y))
    bad.push(
      refuse(call, 'column/efficiency-needs-vapour', { path: 'murphree', stage: call.settings.stages }),
    );
  return out;
}

/**
 * What the engine is asked, from settings and entering streams: chemicals present only, feeds that flow, pressures by place.
 *
 * @returns  column/no-feed; else every name that does not exist in this column: column/no-such-stage, column/no-such-end,
 *           column/no-such-product, column/chemical-absent, column/port-without-stage, column/efficiency-needs-vapour,
 *           pressure/not-positive
 */
export function jobOf(call: Call<ColumnSettings>): Outcome<ColumnJob> {
  const { settings, model } = call;
  const { n_mol_s: all, total_mol_s } = mixed(call.in, model.nc);
  if (!(total_mol_s > 0)) return noSolution(refuse(call, 'column/no-feed', {}));
  const present: number[] = [];
  for (let i = 0; i < all.length; i++) if (all[i]! > 0) present.push(i);
  const drawPorts = Object.keys(settings.sides ?? {}).sort();
  const r: Reading = { call, all, present, drawPorts, bad: [] };
  const P_Pa = pressures(settings);
  const bad = P_Pa.findIndex((P) => !(P > 0));
  if (bad >= 0)
    r.bad.push(
      refuse(call, 'pressure/not-positive', { path: 'pressure' }, [saw('pressure', P_Pa[bad]!, 'pressure')]),
    );
  const feedPorts = Object.keys(call.in)
    .sort()
    .filter((port) => call.in[port]!.phases.length > 0);
  const fed = feedPorts.map((port): Fed => {
    const stage = settings.feeds[port]?.stage;
    if (stage === undefined)
      r.bad.push(
        refuse(call, 'column/port-without-stage', { port, path: `feeds.${port}.stage` }, [
          named('port', port),
        ]),
      );
    const place = stage === undefined ? 0 : stageOf(stage, r, { port, path: `feeds.${port}.stage` });
    return { place, stream: call.in[port]! };
  });
  const feeds = feedsOf(fed, present);
  const draws = drawPorts.map((port): ColumnDraw => {
    const side = settings.sides![port]!;
    return {
      place: stageOf(side.stage, r, { port, path: `sides.${port}.stage` }),
      phase: side.phase,
      flow: amountOf(side.flow, all, call),
    };
  });
  const fixed = (settings.fixedBy ?? []).map((x, k) => fixingOf(x, k, r));
  const efficiency = efficiencies(P_Pa.length, r, feeds);
  const [first, ...rest] = r.bad;
  if (first) return noSolution(first, ...rest);
  const task: ColumnTask = {
    model: model.of(present),
    top: settings.top.distillate,
    reboiler: settings.bottom.reboiler,
    P_Pa,
    feeds,
    draws,
    efficiency,
    subcooling_K: settings.top.distillate === 'liquid' ? (settings.subcooling ?? 0) : 0,
    fixed,
  };
  return solved({ task, present, feedPorts, drawPorts });
}
