import type { Port, StreamId, UnitId } from '../ids';
import { components } from './order';
import type { Problem, ProblemUnit, Read } from './types';

/** Which unit makes or takes a stream, by place in the problem's list. */
export interface End {
  readonly unit: number;
  readonly port: Port;
}

/** A problem as a graph: units are nodes, streams and reads are edges. */
export interface Plan {
  readonly units: readonly ProblemUnit[];
  readonly source: ReadonlyMap<StreamId, End>;
  readonly target: ReadonlyMap<StreamId, End>;
  /** Reads by the unit that has them. */
  readonly reads: ReadonlyMap<UnitId, readonly Read[]>;
  /** Upstream first. */
  readonly order: readonly { readonly members: readonly number[]; readonly loop: boolean }[];
}

/** The solving order. Pure: the same problem gives the same plan. */
export function planOf(problem: Problem): Plan {
  const { units } = problem;
  const source = new Map<StreamId, End>();
  const target = new Map<StreamId, End>();
  const place = new Map<UnitId, number>();
  units.forEach((u, unit) => {
    place.set(u.id, unit);
    for (const [port, stream] of Object.entries(u.out)) source.set(stream, { unit, port });
    for (const [port, stream] of Object.entries(u.in)) target.set(stream, { unit, port });
  });
  const after: number[][] = units.map(() => []);
  for (const [stream, from] of source) {
    const to = target.get(stream);
    if (to) after[from.unit]!.push(to.unit);
  }
  const reads = new Map<UnitId, Read[]>();
  for (const read of problem.reads) {
    const list = reads.get(read.unit);
    if (list) list.push(read);
    else reads.set(read.unit, [read]);
    const from = source.get(read.stream);
    const to = place.get(read.unit);
    if (from && to !== undefined) after[from.unit]!.push(to);
  }
  const order = components(after).map((members) => ({
    members,
    loop: members.length > 1 || after[members[0]!]!.includes(members[0]!),
  }));
  return { units, source, target, reads, order };
}
