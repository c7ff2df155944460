import type { Finding } from '../outcome';
import { pairLimits } from './pairLimits';
import type { Run } from './run';
import { sameData } from './same';

/** All findings of a solve, in the order of the sketch's units; waiting units are told by their state alone. */
export function collectFindings({ problem, found, memory }: Run): Finding[] {
  const all: Finding[] = [];
  const ofLoops: Finding[] = [];
  for (const unit of problem.units) {
    const result = found.units.get(unit.id)!;
    if (result.state === 'no-solution' || result.state === 'needs-value') {
      for (const reason of result.reasons ?? []) {
        // What is missing is told before solving; of a loop the solve alone can tell.
        const ofLoop = reason.at.unit === undefined;
        if (!ofLoop && result.state === 'needs-value') continue;
        // What all units of a loop say is said once.
        if (ofLoop && ofLoops.some((f) => sameData(f, reason))) continue;
        if (ofLoop) ofLoops.push(reason);
        all.push(reason);
      }
    } else if (result.state === 'solved') {
      const remembered = memory.units.get(unit.id)!;
      all.push(...remembered.outcome.findings, ...remembered.limitFindings);
    }
    for (const stream of Object.values(unit.out)) all.push(...(memory.streams.get(stream)?.findings ?? []));
  }
  const states = [...memory.streams].map(([id, s]) => [id, s.state] as const);
  all.push(...pairLimits(memory.model, states, problem.limits));
  return all;
}
