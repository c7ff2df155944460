import type { StreamState } from '../equilibrium/types';
import type { UnitId } from '../ids';
import { closureOf } from './closure';
import { isBoundary, type Kinds } from './kinds';
import type { Memory } from './memory';
import type { Plan } from './plan';
import type { Closure, UnitClosure, UnitResult } from './types';

/**
 * Closure of the sketch and of every unit. The envelope holds all solved units between feeds and products: what enters comes
 * from feeds, from outside (air without a stream) or from an unsolved unit's side, which then is said by `complete`; what leaves
 * goes to products, to hanging ends, through ports without a stream, or towards units that have no answer.
 */
export function overallClosure(
  plan: Plan,
  results: ReadonlyMap<UnitId, UnitResult>,
  memory: Memory,
  kinds: Kinds,
): Closure {
  const ins: StreamState[] = [];
  const outs: StreamState[] = [];
  const byUnit: Record<string, UnitClosure> = {};
  let heat_W = 0;
  let power_W = 0;
  let made: Float64Array | undefined;
  let complete = true;
  const answered = plan.units.map((unit) => {
    if (results.get(unit.id)?.state !== 'solved') return undefined;
    const outcome = memory.units.get(unit.id)?.outcome;
    return outcome?.state === 'solved' ? outcome.value : undefined;
  });
  plan.units.forEach((unit, k) => {
    const answer = answered[k];
    if (!answer) {
      complete = false;
      return;
    }
    if (isBoundary(kinds, unit.kind)) {
      ins.push(...Object.values(answer.out));
    } else {
      const { closure } = memory.units.get(unit.id)!;
      if (closure) byUnit[unit.id] = closure;
      ins.push(...Object.values(answer.drawn ?? {}));
      heat_W += answer.heat_W;
      power_W += answer.power_W;
      if (answer.made_mol_s) {
        made ??= new Float64Array(memory.data.nc);
        for (let i = 0; i < made.length; i++) made[i]! += answer.made_mol_s[i]!;
      }
    }
    for (const [port, state] of Object.entries(answer.out)) {
      const stream = unit.out[port];
      const to = stream === undefined ? undefined : plan.target.get(stream);
      if (!to || !answered[to.unit] || isBoundary(kinds, plan.units[to.unit]!.kind)) outs.push(state);
    }
  });
  return { ...closureOf(ins, outs, heat_W, power_W, made, memory.data), complete, byUnit };
}
