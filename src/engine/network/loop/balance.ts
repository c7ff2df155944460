import type { StreamState } from '../../equilibrium/types';
import type { StreamId, UnitId } from '../../ids';
import { type Finding, named, saw } from '../../outcome';
import { totalOf } from '../../units/streams';
import type { Answer } from '../../units/types';
import { closureOf, worstOf } from '../closure';
import type { UnitClosure } from '../types';
import type { Torn } from './memory';
import type { Ending, Going, Loop } from './types';

/** Which streams pass the loop's envelope: from outside or a feed, to outside or a product or nowhere. */
export interface Envelope {
  readonly inner: ReadonlySet<UnitId>;
  enters(stream: StreamId): boolean;
  leaves(stream: StreamId): boolean;
}

/** The envelope around a loop's units but feeds and products. */
export function envelopeOf({ run, members }: Loop): Envelope {
  const { units, source, target } = run.plan;
  const inner = new Set(members.filter((m) => !m.boundary).map((m) => m.unit.id));
  const isInner = (end: { readonly unit: number } | undefined): boolean =>
    end !== undefined && inner.has(units[end.unit]!.id);
  return {
    inner,
    enters: (stream) => !isInner(source.get(stream)),
    leaves: (stream) => !isInner(target.get(stream)),
  };
}

/** Balance around the whole loop after a pass in which every unit has an answer: what is assumed and what came back differ. */
export function loopBalance(loop: Loop, going: Going, envelope: Envelope): UnitClosure {
  const ins: StreamState[] = [];
  const outs: StreamState[] = [];
  const { data } = loop.run.memory;
  const made = new Float64Array(data.nc);
  let heat_W = 0;
  let power_W = 0;
  for (const { unit, boundary } of loop.members) {
    if (boundary) continue;
    const { call, answer } = saidOf(going, unit.id);
    for (const [port, stream] of Object.entries(unit.in))
      if (envelope.enters(stream)) ins.push(call.in[port]!);
    for (const [port, stream] of Object.entries(unit.out))
      if (envelope.leaves(stream)) outs.push(answer.out[port]!);
    ins.push(...Object.values(answer.drawn ?? {}));
    heat_W += answer.heat_W;
    power_W += answer.power_W;
    if (answer.made_mol_s) for (let i = 0; i < made.length; i++) made[i]! += answer.made_mol_s[i]!;
  }
  return closureOf(ins, outs, heat_W, power_W, made, data);
}

function saidOf(going: Going, unit: UnitId) {
  const said = going.said.get(unit);
  if (said?.outcome.state !== 'solved') throw new Error('a balance is drawn around units with an answer');
  return { call: said.call, answer: said.outcome.value satisfies Answer };
}

/** Worst closure of the units that take a torn stream, with what came back in place of what was assumed [-]. */
export function worstTaker(loop: Loop, going: Going, back: Torn): number {
  let worst = 0;
  for (const { unit, boundary } of loop.members) {
    if (boundary) continue;
    const ports = Object.entries(unit.in);
    if (!ports.some(([, stream]) => loop.plan.tears.includes(stream))) continue;
    const { call, answer } = saidOf(going, unit.id);
    const ins = ports.map(([port, stream]) => {
      const t = loop.plan.tears.indexOf(stream);
      return t < 0 ? call.in[port]! : back.streams[t]!;
    });
    ins.push(...Object.values(answer.drawn ?? {}));
    const outs = Object.values(answer.out);
    const closure = closureOf(
      ins,
      outs,
      answer.heat_W,
      answer.power_W,
      answer.made_mol_s,
      loop.run.memory.data,
    );
    worst = Math.max(worst, worstOf(closure));
  }
  return worst;
}

/** A chemical settles when more than this share of what enters leaves [-]. */
const HALF = 0.5;

/** What of a chemical would stay in the loop after this pass, and how much of it goes round [mol/s]. */
export interface Staying {
  readonly entering: number;
  readonly leaving: number;
  readonly round: number;
}

/** What of chemical i enters, leaves and goes round after a pass. */
export function stayingOf(balance: UnitClosure, back: Torn, i: number): Staying {
  const { in: into, out, made } = balance.chemicals[i]!;
  let round = 0;
  for (const s of back.streams) round += s.n_mol_s[i]!;
  return { entering: into + made, leaving: out, round };
}

/**
 * Chemicals that gather in the loop, by place: more than half of what enters stays although so many times it goes round; worst
 * first.
 */
export function gathered(balance: UnitClosure, back: Torn, times: number): number[] {
  const staying = balance.chemicals.map((_, i) => stayingOf(balance, back, i));
  const gathers = ({ entering, leaving, round }: Staying): boolean =>
    entering > 0 && leaving < HALF * entering && round > times * entering;
  const excess = (i: number): number => staying[i]!.entering - staying[i]!.leaving;
  return staying.flatMap((s, i) => (gathers(s) ? [i] : [])).sort((a, b) => excess(b) - excess(a));
}

/** Whether a chemical goes round that neither enters nor is made any more. */
export const isStale = (balance: UnitClosure, back: Torn): boolean =>
  balance.chemicals.some((_, i) => {
    const { entering, round } = stayingOf(balance, back, i);
    return entering <= 0 && balance.chemicals[i]!.in === 0 && round > 0;
  });

/** Says which chemicals have no way out, and the stream of the loop that is richest in them. */
function noWayOut(
  chemicals: readonly number[],
  { run, members }: Loop,
  states: ReadonlyMap<StreamId, StreamState>,
  balance: UnitClosure,
  back: Torn,
): Finding {
  const taken = new Set(members.flatMap((m) => (m.boundary ? [] : Object.values(m.unit.in))));
  const inside = members.flatMap(({ unit }) => Object.values(unit.out).filter((s) => taken.has(s)));
  let [richest, most] = [inside[0], -1];
  for (const stream of inside) {
    const n = states.get(stream)?.n_mol_s ?? new Float64Array(0);
    const total = totalOf(n);
    const share = total > 0 ? chemicals.reduce((sum, i) => sum + n[i]! / total, 0) : 0;
    if (share > most) [richest, most] = [stream, share];
  }
  const sum = { entering: 0, leaving: 0, round: 0 };
  for (const i of chemicals) {
    const { entering, leaving, round } = stayingOf(balance, back, i);
    sum.entering += entering;
    sum.leaving += leaving;
    sum.round += round;
  }
  return {
    code: 'network/no-way-out',
    weight: 'beyond-limit',
    at: {
      ...(richest === undefined ? {} : { stream: richest }),
      chemical: run.memory.model.chemicals[chemicals[0]!]!.id,
    },
    evidence: [
      ...chemicals.map((i) => named('chemical', run.memory.model.chemicals[i]!.id)),
      saw('entering', sum.entering, 'molarFlow'),
      saw('leaving', sum.leaving, 'molarFlow'),
      saw('round', sum.round, 'molarFlow'),
      saw('fraction', most, 'fraction'),
      ...members.map(({ unit }) => named('unit', unit.id)),
    ],
  };
}

/**
 * The end of an attempt in which chemicals gather, if some do.
 *
 * @param states  of streams, in which is looked where a purge would take most
 */
export function gathering(
  loop: Loop,
  states: ReadonlyMap<StreamId, StreamState>,
  balance: UnitClosure,
  back: Torn,
  times: number,
): Ending | undefined {
  const stuck = gathered(balance, back, times);
  if (stuck.length === 0) return undefined;
  return { is: 'no-solution', findings: [noWayOut(stuck, loop, states, balance, back)] };
}
