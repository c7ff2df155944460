import type { StreamId, UnitId } from '../../ids';
import { type Arc, cheapOrder } from '../feedback';
import type { Plan } from '../plan';
import type { Read } from '../types';

/** How a loop is solved: in which order its units, and what is assumed before and found after each pass. */
export interface LoopPlan {
  /** Members in the order of a pass, by place in the plan's list. */
  readonly order: readonly number[];
  readonly tears: readonly StreamId[];
  /** Settings that refer to a stream which is made only after them, and is not torn itself. */
  readonly scalars: readonly Read[];
}

/** A stream is many numbers, a read one. */
const STREAM = 1000;
const READ = 150;
/** A stream is rather torn where its unit has flow without it: the first pass starts from empty tears. */
const ENTERED = 60;

/** Chooses the tears of a strongly connected component: few and cheap ones, always the same for the same sketch. */
export function loopPlanOf(plan: Plan, members: readonly number[]): LoopPlan {
  const place = new Map(members.map((m, k) => [m, k] as const));
  const byId = new Map<UnitId, number>(members.map((m, k) => [plan.units[m]!.id, k] as const));
  const entered = members.map((m) =>
    Object.values(plan.units[m]!.in).some((s) => !place.has(plan.source.get(s)?.unit ?? -1)),
  );
  const streams: (Arc & { stream: StreamId })[] = [];
  const reads: (Arc & { read: Read })[] = [];
  for (const m of members) {
    const from = place.get(m)!;
    for (const stream of Object.values(plan.units[m]!.out)) {
      const to = place.get(plan.target.get(stream)?.unit ?? -1);
      if (to !== undefined) streams.push({ from, to, weight: STREAM - (entered[to] ? ENTERED : 0), stream });
    }
    for (const read of plan.reads.get(plan.units[m]!.id) ?? []) {
      const source = place.get(plan.source.get(read.stream)?.unit ?? -1);
      if (source !== undefined) reads.push({ from: source, to: byId.get(read.unit)!, weight: READ, read });
    }
  }
  const order = cheapOrder(members.length, [...streams, ...reads]);
  const at = new Int32Array(members.length);
  order.forEach((k, i) => {
    at[k] = i;
  });
  const isBack = ({ from, to }: Arc): boolean => at[from]! >= at[to]!;
  const tears = streams.filter(isBack).map((a) => a.stream);
  return {
    order: order.map((k) => members[k]!),
    tears,
    scalars: reads.filter((a) => isBack(a) && !tears.includes(a.read.stream)).map((a) => a.read),
  };
}
