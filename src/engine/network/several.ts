import type { StreamId } from '../ids';
import { type Finding, saw } from '../outcome';
import { totalOf } from '../units/streams';
import type { StreamMemory } from './memory';

/** A live answer and one from nothing agree within this, relative in any flow and in kelvins. */
const FLOW = 1e-6;
const KELVIN = 1e-4;
/** Flows below this share of the stream are compared against it. */
const TRACE = 1e-6;

/**
 * Streams in which a solve from nothing found another answer than the live one: network/several-answers, with the largest
 * relative difference of a component's flow [-] and that of temperature [K].
 */
export function severalAnswers(
  live: ReadonlyMap<StreamId, StreamMemory>,
  clean: ReadonlyMap<StreamId, StreamMemory>,
): Finding[] {
  const found: Finding[] = [];
  for (const [stream, { state: b }] of clean) {
    const a = live.get(stream)?.state;
    if (!a) continue;
    const floor = TRACE * Math.max(totalOf(a.n_mol_s), totalOf(b.n_mol_s));
    let flow = 0;
    for (let i = 0; i < a.n_mol_s.length; i++) {
      const [x, y] = [a.n_mol_s[i]!, b.n_mol_s[i]!];
      if (x !== y) flow = Math.max(flow, Math.abs(x - y) / Math.max(x, y, floor));
    }
    const kelvin = Math.abs(a.T_K - b.T_K);
    if (flow <= FLOW && kelvin <= KELVIN) continue;
    found.push({
      code: 'network/several-answers',
      weight: 'caution',
      at: { stream },
      evidence: [saw('flow', flow, 'number'), saw('temperature', kelvin, 'temperatureDifference')],
    });
  }
  return found;
}
