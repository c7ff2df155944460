import type { StreamState } from '../equilibrium/types';
import type { StreamId } from '../ids';
import { type Finding, named } from '../outcome';
import type { KindCatalogue, PortSpec } from '../units/types';
import type { NetworkFindingCode } from './findings';
import type { Plan } from './plan';
import type { ProblemUnit, SolveState } from './types';

/** What is known of a stream while a solve runs: its state, or why there is none. */
export type Known = StreamState | 'waiting' | 'no-solution';

/** Why a unit cannot be solved now. */
export type Unready = { readonly state: Exclude<SolveState, 'solved'>; readonly reasons: readonly Finding[] };

/** A reason of the network's own: a note where a unit only waits, else beyond limit. */
export const because = (
  code: NetworkFindingCode,
  at: Finding['at'],
  evidence: Finding['evidence'] = [],
): Finding => ({
  code,
  weight: code === 'network/waits-for' ? 'note' : 'beyond-limit',
  at,
  evidence,
});

const numberOf = (ports: readonly string[], spec: PortSpec): number =>
  ports.filter((p) => p.startsWith(spec.name) && /^[1-9]\d*$/.test(p.slice(spec.name.length))).length;

/** Ports that must have a stream and have none. */
function openPorts(unit: ProblemUnit, catalogue: KindCatalogue): Finding[] {
  return catalogue.ports.flatMap((spec) => {
    const ports = Object.keys(spec.dir === 'in' ? unit.in : unit.out);
    if (spec.optional) return [];
    const enough = spec.numbered
      ? numberOf(ports, spec) >= spec.numbered.min
      : spec.dir === 'out' || ports.includes(spec.name);
    if (enough) return [];
    const code = spec.dir === 'in' ? 'network/inlet-missing' : 'network/outlet-missing';
    return [because(code, { unit: unit.id, port: spec.numbered ? `${spec.name}1` : spec.name })];
  });
}

/**
 * Why a unit cannot be solved yet, or undefined when it can: a missing value first (network/inlet-missing,
 * network/outlet-missing, network/source-missing), then what is missing upstream (network/waits-for); network/unknown-kind
 * before both. Streams of a loop of which nothing is known yet are none of its reasons.
 */
export function whyNot(
  unit: ProblemUnit,
  catalogue: KindCatalogue | undefined,
  plan: Plan,
  known: ReadonlyMap<StreamId, Known>,
): Unready | undefined {
  if (!catalogue)
    return { state: 'no-solution', reasons: [because('network/unknown-kind', { unit: unit.id })] };
  const missing = openPorts(unit, catalogue);
  const needed = [...Object.values(unit.in), ...(plan.reads.get(unit.id) ?? []).map((r) => r.stream)];
  for (const stream of needed)
    if (!plan.source.has(stream)) missing.push(because('network/source-missing', { unit: unit.id, stream }));
  if (unit.settings === null || missing.length > 0) return { state: 'needs-value', reasons: missing };
  const waits = needed.filter((stream) => typeof known.get(stream) === 'string');
  if (waits.length === 0) return undefined;
  return { state: 'waiting', reasons: waits.map((stream) => waitsFor(unit, stream, plan)) };
}

/** That a unit waits for a stream, and for whose. */
export function waitsFor(unit: ProblemUnit, stream: StreamId, plan: Plan): Finding {
  const from = plan.units[plan.source.get(stream)!.unit]!;
  return because('network/waits-for', { unit: unit.id, stream }, [named('unit', from.id)]);
}
